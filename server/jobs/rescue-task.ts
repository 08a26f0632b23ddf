import { searchRescues, type RescueQuestion, type RescuesFound } from '@common/rescue';
import type { JobHooks } from './job-message';

/** A date at risk. */
export type RescueTask = RescueQuestion;

/** How many measures were weighed so far, of how many. */
export interface SearchProgress {
  readonly weighed: number;
  readonly of: number;
}

/** What was found, the best first. */
export type RescueFound = RescuesFound;

/** Looks for what would save the date; a cancel leaves what was found so far. */
export function runRescue(task: RescueTask, hooks: JobHooks<'rescue'>): RescueFound {
  return searchRescues(task, hooks);
}
