import type { Reason } from '../problem/explanation';
import type { FormatInstant, Names } from './names';
import { sayMinutes } from './say-list';

/** A reason for a stage's start as a maker would say it; a clause without capital or full stop where it begins with a verb. */
export function sayReason(reason: Reason, names: Names, formatInstant: FormatInstant): string {
  const until = formatInstant(reason.until);
  switch (reason.kind) {
    case 'pinned':
      return 'pinned';
    case 'started':
      return `begun ${until}`;
    case 'frozen':
      return 'issued and inside the freeze';
    case 'visit':
      return `agreed for ${until}`;
    case 'earliest':
      return `cannot start before ${until}`;
    case 'horizon':
      return 'starts as soon as the plan does';
    case 'work-before':
      return `waits for ${names.stage(reason.stageId)} to be done, ${until}`;
    case 'dwell-before':
      return `waits for ${names.stage(reason.stageId)} to cure until ${until}`;
    case 'gap-after':
      return `waits ${sayMinutes(reason.gapMinutes)} after ${names.stage(reason.stageId)}, until ${until}`;
    case 'bay-taken':
      return `${names.bay(reason.bayId)} is taken by ${names.stage(reason.stageId)} until ${until}`;
    case 'bay-closed':
      return `${names.bay(reason.bayId)} is closed until ${until}`;
    case 'crew-busy':
      return `no ${names.craftsperson(reason.craftId)} free before ${until}: ${names.maker(reason.makerId)} is on ${names.stage(reason.stageId)}`;
    case 'crew-off-shift':
      return `no ${names.craftsperson(reason.craftId)} on shift before ${until}`;
    case 'too-long-for-shift':
      return `needs an unbroken shift, the next begins ${until}`;
    case 'held-for-window':
      return `starts late enough for ${names.stage(reason.stageId)} to follow in time`;
    case 'kept-for-evenness':
      return 'could start earlier; kept here to even the load';
  }
}
