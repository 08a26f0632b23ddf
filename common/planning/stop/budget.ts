import type { StopReason } from '../problem/result';

/** What a search may spend, in schedules and by the caller's own clock; once spent it stays so. */
export class Budget {
  schedules = 0;
  private reason: StopReason | null = null;

  constructor(
    private readonly maxSchedules: number,
    private readonly shouldStop: () => boolean,
  ) {}

  /** Counts one pass of a generation scheme. */
  spend(): void {
    this.schedules += 1;
  }

  /** Whether the search has to end now: schedules used up, told to stop, or finished. */
  isSpent(): boolean {
    if (this.reason === null) {
      if (this.schedules >= this.maxSchedules) this.reason = 'budget';
      else if (this.shouldStop()) this.reason = 'cancelled';
    }
    return this.reason !== null;
  }

  /** Whether the caller wants the search to end, whatever is left to spend. */
  isStopped(): boolean {
    if (this.reason === null && this.shouldStop()) this.reason = 'cancelled';
    return this.reason === 'cancelled';
  }

  /** Ends the search for a reason of its own. */
  finish(reason: 'proven-best' | 'nothing-to-improve'): void {
    this.reason ??= reason;
  }

  /** Why the search ended; `budget` where it was never asked. */
  get stop(): StopReason {
    return this.reason ?? 'budget';
  }
}
