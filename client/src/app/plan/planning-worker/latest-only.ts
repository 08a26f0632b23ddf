/**
 * Runs one job at a time and keeps only the newest that waits: a pointer moves far more often than a plan can be laid out, and
 * nobody wants to see the answer to where the hand was a moment ago.
 */
export class LatestOnly<Job, Result> {
  private running = false;
  private next: { readonly job: Job } | null = null;
  private round = 0;

  constructor(
    private readonly run: (job: Job) => Promise<Result>,
    private readonly deliver: (result: Result, job: Job) => void,
  ) {}

  /** Takes a job in place of any that waits. */
  put(job: Job): void {
    this.next = { job };
    if (!this.running) void this.work();
  }

  /** Forgets what waits, and the result of what runs. */
  clear(): void {
    this.next = null;
    this.round += 1;
  }

  private async work(): Promise<void> {
    this.running = true;
    while (this.next !== null) {
      const { job } = this.next;
      this.next = null;
      const round = this.round;
      const result = await this.run(job);
      if (round === this.round) this.deliver(result, job);
    }
    this.running = false;
  }
}
