import { NEVER } from './calendar';
import type { Compiled, Crew } from './compiled';

/** Minutes of work for an effort with a crew; NEVER where the crew gets nothing done. */
export function workMinutes(compiled: Compiled, stage: number, effort: number, crew: Crew | null): number {
  if (compiled.work.isDuration[stage] === 1 || !crew || compiled.work.needOf[stage + 1] === compiled.work.needOf[stage])
    return effort;
  if (effort === 0) return 0;
  return crew.outputPermille > 0 ? Math.min(NEVER, Math.ceil((effort * 1000) / crew.outputPermille)) : NEVER;
}
