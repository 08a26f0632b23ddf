/** The one public file of promises: when a production that is asked for could be ready, and what it would push. */
export { findPromise } from './find-promise';
export type { Promised, PromiseHooks, PromiseQuestion, PromiseWay, Pushed, ShortWeek } from './find-promise';
