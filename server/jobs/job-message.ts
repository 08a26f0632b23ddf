import type { LevelProgress } from '@common/planning';
import type { ForecastFound, ForecastProgress, ForecastTask } from './forecast-task';
import type { LevelFound, LevelTask } from './level-task';
import type { PromiseFound, PromiseTask } from './promise-task';
import type { SearchProgress } from './job-hooks';
import type { RescueFound, RescueTask } from './rescue-task';

/** Counts up when a message changes, so that a worker of another build is not misunderstood. */
export const PROTOCOL = 2;

/** Everything that a worker can be asked, by name: what it is given, what it says on the way, and what it finds. */
export interface Jobs {
  readonly level: { readonly task: LevelTask; readonly progress: LevelProgress; readonly found: LevelFound };
  readonly forecast: {
    readonly task: ForecastTask;
    readonly progress: ForecastProgress;
    readonly found: ForecastFound;
  };
  readonly promise: { readonly task: PromiseTask; readonly progress: SearchProgress; readonly found: PromiseFound };
  readonly rescue: { readonly task: RescueTask; readonly progress: SearchProgress; readonly found: RescueFound };
}
export type JobName = keyof Jobs;

/** What a worker is asked to do. `cancel` is one shared word: 1 tells it to stop. */
export type JobMessage<N extends JobName = JobName> = {
  readonly [K in N]: {
    readonly protocol: typeof PROTOCOL;
    readonly name: K;
    readonly task: Jobs[K]['task'];
    readonly cancel: SharedArrayBuffer;
  };
}[N];

/** What a worker says of the job that it has. */
export type WorkerMessage<N extends JobName = JobName> =
  | { readonly protocol: typeof PROTOCOL; readonly kind: 'progress'; readonly progress: Jobs[N]['progress'] }
  | { readonly protocol: typeof PROTOCOL; readonly kind: 'found'; readonly found: Jobs[N]['found'] }
  | { readonly protocol: typeof PROTOCOL; readonly kind: 'failed'; readonly failure: string };
