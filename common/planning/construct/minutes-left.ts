import type { Stage } from '../problem/problem';

/** Minutes of a stage's effort that are still to be laid out. */
export function minutesLeft(stage: Stage): number {
  if (stage.progress.kind === 'finished') return 0;
  return stage.progress.kind === 'started' ? stage.progress.remainingMinutes : stage.effort.minutes;
}
