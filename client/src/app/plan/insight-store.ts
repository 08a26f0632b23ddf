import { computed, effect, inject, Injectable, signal, untracked } from '@angular/core';
import type { DrivingChain, LoadRow, Reason } from '@common/planning';
import { PlanningLine } from './planning-worker/planning-line';
import { PlanStore } from './plan-store';

/** What is known about a plan once it has been thought about. */
interface Insight {
  readonly fingerprint: string;
  readonly revision: number;
  readonly reasons: ReadonlyMap<string, readonly Reason[]>;
  readonly chains: readonly DrivingChain[];
  readonly load: readonly LoadRow[];
}

/** Why the stages stand where they do, which chains drive the dates, and the load: worked out beside the page, plan by plan. */
@Injectable()
export class InsightStore {
  private readonly plan = inject(PlanStore);
  private readonly line = inject(PlanningLine);
  private readonly known = signal<Insight | null>(null);
  private readonly failureNow = signal<string | null>(null);

  readonly reasons = computed(() => this.known()?.reasons ?? new Map<string, readonly Reason[]>());
  readonly chains = computed(() => this.known()?.chains ?? []);
  readonly load = computed(() => this.known()?.load ?? []);
  /** Whether what is known is about the plan on the wall. */
  readonly fresh = computed(() => this.known()?.revision === this.plan.view()?.revision);
  readonly failure = this.failureNow.asReadonly();

  constructor() {
    effect(() => {
      const view = this.plan.view();
      if (view) untracked(() => void this.think(view.revision, view.fingerprint));
    });
  }

  private async think(revision: number, fingerprint: string): Promise<void> {
    const [reasons, chains, load] = await Promise.all([
      this.line.ask({ kind: 'read-reasons' }),
      this.line.ask({ kind: 'read-chains' }),
      this.line.ask({ kind: 'read-load' }),
    ]);
    // The plan may have changed while its worker thought: the newer question brings its own answer.
    if (this.plan.view()?.revision !== revision) return;
    const failed = [reasons, chains, load].find((answer) => answer.kind === 'failed');
    this.failureNow.set(failed?.kind === 'failed' ? failed.message : null);
    this.known.set({
      revision,
      fingerprint,
      reasons: new Map(reasons.kind === 'reasons' ? reasons.reasons.map((one) => [one.stageId, one.reasons]) : []),
      chains: chains.kind === 'chains' ? chains.chains : [],
      load: load.kind === 'load' ? load.load.crafts : [],
    });
  }
}
