/**
 * The one public file of the planning engine. Pure: no clock, no chance but a seeded one, nothing read or written.
 */
export * from './problem/problem';
export * from './problem/plan';
export * from './problem/link';
export * from './problem/dwell';
export * from './problem/result';
export * from './problem/explanation';
export * from './problem/fault';
export { validate } from './problem/validate';
export { fingerprint } from './problem/fingerprint';
export { check } from './check/check';
export { measure, compareObjectives, isBetter } from './objective/objective';
export { level } from './improve/level';
export { levelWithinDates } from './improve/level-within-dates';
export { replaceAfterMove } from './improve/replace-after-move';
export { layOutInOrder, takeInProgress } from './improve/lay-out-in-order';
export type { LevelOptions } from './improve/level-options';
export type { Move, MoveResult } from './improve/move';
export { explain } from './explain/explain';
export { drivingChain } from './explain/driving-chain';
export { sayReason } from './explain/say-reason';
export { sayUnmet } from './explain/say-unmet';
export { comparePlans } from './explain/compare-plans';
export { sayChange } from './explain/say-change';
export type { PlanChange } from './explain/plan-change';
export type { Names, FormatInstant } from './explain/names';
export { craftLoad, makerLoad, bayLoad } from './load/load';
export type { LoadRow } from './load/load';
export { NO_DRIVER, Replay } from './construct/replay';
export { Chance } from './improve/chance';
export { criticalPath } from './bounds/critical-path';
export type { CriticalPath, CycleStep, StageTimes } from './bounds/critical-path';
export { lowerBound } from './bounds/lower-bound';
export { findConflict } from './gaps/conflict';
export type { Conflict, ConflictBudget } from './gaps/conflict-data';
export { sayConflict } from './explain/say-conflict';
