/** The one public file of promises: when a production that is asked for could be delivered, and what it would push. */
export { promise } from './promise';
export type { Promised, PromiseOptions, PromiseStep, PromiseWay, PushedDate, WayOfLaying } from './promise';
export type { ShortRow, Shortages } from './shortages';
