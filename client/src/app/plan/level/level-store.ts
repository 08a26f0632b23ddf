import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { endpoints, type LevelProposal, type LevelRun } from '@common/contract';
import { Api, onLiveEvent, toApiFailure } from '../../api';
import { PlanStore, type PlanTrouble } from '../plan-store';

/** How often to ask after a levelling where no live event says how it stands. */
const ASK_EVERY_MS = 1_000;
/** How long to look for something better before asking. */
export const LEVEL_SECONDS = 6;

type Mode = LevelRun['mode'];

/** One levelling from its start to what becomes of it. */
@Injectable()
export class LevelStore {
  private readonly api = inject(Api);
  private readonly plan = inject(PlanStore);
  private readonly runNow = signal<LevelRun | null>(null);
  private readonly proposalNow = signal<LevelProposal | null>(null);
  private readonly troubleNow = signal<PlanTrouble | null>(null);
  private readonly busyNow = signal(false);
  private timer: ReturnType<typeof setInterval> | undefined;

  readonly run = this.runNow.asReadonly();
  readonly proposal = this.proposalNow.asReadonly();
  readonly trouble = this.troubleNow.asReadonly();
  readonly busy = this.busyNow.asReadonly();
  readonly underWay = computed(() => isUnderWay(this.runNow()));

  constructor() {
    inject(DestroyRef).onDestroy(() => clearInterval(this.timer));
    onLiveEvent((event) => {
      if (event?.kind === 'level' && event.run.id === this.runNow()?.id) void this.show(event.run);
    });
  }

  /** Starts a levelling of the plan as it is seen. */
  async start(mode: Mode, seconds = LEVEL_SECONDS): Promise<void> {
    const revision = this.plan.view()?.revision;
    if (revision === undefined) return;
    this.forget();
    await this.attempt(async () => {
      const run = await this.api.callEndpoint(endpoints.startLevel, { body: { revision, mode, seconds } });
      await this.show(run);
      this.watch();
    });
  }

  /** Takes up a levelling again, as after a reload. */
  async resume(id: string): Promise<void> {
    if (this.runNow()?.id === id) return;
    this.forget();
    await this.attempt(async () => {
      await this.show(await this.api.callEndpoint(endpoints.readLevel, { params: { id } }));
      this.watch();
    });
  }

  /** Stops; what was found so far can still be taken. */
  async stop(): Promise<void> {
    const id = this.runNow()?.id;
    if (id === undefined) return;
    await this.attempt(async () => this.show(await this.api.callEndpoint(endpoints.cancelLevel, { params: { id } })));
  }

  /** Takes what was found into the working plan. Whether that came about. */
  async take(): Promise<boolean> {
    const id = this.runNow()?.id;
    const revision = this.plan.view()?.revision;
    if (id === undefined || revision === undefined) return false;
    return this.attempt(async () => {
      await this.api.callEndpoint(endpoints.takeLevel, { params: { id }, body: { revision } });
      this.plan.refresh('Taken into the working plan.');
      this.forget();
    });
  }

  /** Leaves what was found. */
  async leave(): Promise<void> {
    const run = this.runNow();
    this.forget();
    if (!run || (run.state !== 'found' && run.state !== 'cancelled')) return;
    await this.attempt(
      async () => void (await this.api.callEndpoint(endpoints.leaveLevel, { params: { id: run.id } })),
    );
  }

  private watch(): void {
    clearInterval(this.timer);
    this.timer = setInterval(() => void this.ask(), ASK_EVERY_MS);
  }

  private async ask(): Promise<void> {
    const run = this.runNow();
    if (!run || !isUnderWay(run)) {
      clearInterval(this.timer);
      return;
    }
    const next = await this.api.callEndpoint(endpoints.readLevel, { params: { id: run.id } }).catch(() => null);
    if (next !== null && next.id === this.runNow()?.id) await this.show(next);
  }

  /** News may arrive out of order: what has ended does not begin again. */
  private async show(run: LevelRun): Promise<void> {
    const now = this.runNow();
    if (now?.id === run.id && !isUnderWay(now) && isUnderWay(run)) return;
    this.runNow.set(run);
    const found = run.state === 'found' || run.state === 'cancelled';
    if (!found || this.proposalNow()?.run.id === run.id) return;
    try {
      const proposal = await this.api.callEndpoint(endpoints.readProposal, { params: { id: run.id } });
      if (this.runNow()?.id === run.id) this.proposalNow.set(proposal);
    } catch (error) {
      const failure = toApiFailure(error);
      this.troubleNow.set({ title: failure.title, detail: failure.detail });
    }
  }

  private async attempt(step: () => Promise<void>): Promise<boolean> {
    this.busyNow.set(true);
    this.troubleNow.set(null);
    try {
      await step();
      return true;
    } catch (error) {
      const failure = toApiFailure(error);
      this.troubleNow.set({ title: failure.title, detail: failure.detail });
      return false;
    } finally {
      this.busyNow.set(false);
    }
  }

  private forget(): void {
    clearInterval(this.timer);
    this.runNow.set(null);
    this.proposalNow.set(null);
    this.troubleNow.set(null);
  }
}

function isUnderWay(run: LevelRun | null): boolean {
  return run !== null && (run.state === 'waiting' || run.state === 'running');
}
