import { searchRescues, type RescueQuestion, type RescuesFound } from '@common/rescue';
import type { JobHooks, SearchProgress } from './job-hooks';

/** A date at risk. */
export type RescueTask = RescueQuestion;

/** What was found, the best first. */
export type RescueFound = RescuesFound;

/** Looks for what would save the date; a cancel leaves what was found so far. */
export function runRescue(task: RescueTask, hooks: JobHooks<SearchProgress>): RescueFound {
  return searchRescues(task, hooks);
}
