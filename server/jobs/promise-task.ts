import { findPromise, type Promised, type PromiseQuestion } from '@common/promise';
import type { JobHooks } from './job-message';

/** A production that the studio is asked for. */
export type PromiseTask = PromiseQuestion;

/** The ways that were weighed. */
export interface PromiseFound {
  readonly ways: readonly Promised[];
}

/** Says when the production could be ready; a cancel leaves the ways weighed so far. */
export function runPromise(task: PromiseTask, hooks: JobHooks<'promise'>): PromiseFound {
  return { ways: findPromise(task, hooks) };
}
