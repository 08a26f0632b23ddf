import type { Crew } from './compiled';

/** What a placement must not come before, who does it and where. Instants are minutes from the horizon's start. */
export interface Ask {
  stage: number;
  crew: Crew | null;
  housing: Int32Array | null;
  /** Minutes of work for this crew, extras for missed windows included. */
  minutes: number;
  lowStart: number;
  lowEnd: number;
  lowFinish: number;
  /** No start after this one is of use. */
  lastStart: number;
  /** No end of work after this one is of use; NEVER where any is. */
  lastEnd: number;
  /** Whether overtime may be worked. */
  overtime: boolean;
}

/** What a fit may overlook where a manager's word leaves no room: nothing; what is in the bays; other work too; calendars as well. */
export type Leniency = 'none' | 'bays' | 'other-work' | 'calendars';
