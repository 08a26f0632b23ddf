import { computed, inject, Injectable, signal } from '@angular/core';
import { endpoints, type WorkingPlanView } from '@common/contract';
import { Api, type ApiFailure, onLiveEvent, readEndpoint, toApiFailure } from '../api';
import { dateMargins } from './date-margins';
import type { Place } from './timeline/engine/hold-machine';
import { planNames, type PlanNames } from './wording/plan-names';

/** A change that did not come about, in words for whoever made it. */
export interface PlanTrouble {
  readonly title: string;
  readonly detail: string;
}

type Change = (revision: number) => Promise<{ readonly revision: number }>;

/** The working plan as the page sees it, and every change that can be made to it. */
@Injectable()
export class PlanStore {
  private readonly api = inject(Api);
  private readonly changing = signal<string | null>(null);
  private readonly lastTrouble = signal<PlanTrouble | null>(null);
  private readonly lastNews = signal<string>('');

  readonly read = readEndpoint(endpoints.readPlan);
  /** The plan as last read; undefined before the first answer. */
  readonly view = this.read.value;
  readonly names = computed<PlanNames | null>(() => mapOf(this.view(), (view) => planNames(view.directory)));
  readonly margins = computed(() => mapOf(this.view(), (view) => dateMargins(view.problem, view.plan)) ?? []);
  /** What is under way, in words ("Moving…"); null while nothing is. */
  readonly busy = this.changing.asReadonly();
  readonly trouble = this.lastTrouble.asReadonly();
  /** What was done last, for those who listen to the page. */
  readonly news = this.lastNews.asReadonly();

  constructor() {
    onLiveEvent((event) => {
      const revised = event?.kind === 'plan-revised' && event.revision !== this.view()?.revision;
      if (event === null || revised || event.kind === 'plan-issued') this.read.reload();
    });
  }

  /** Puts a stage elsewhere and holds it there. Whether it came about. */
  moveStage(stageId: string, place: Place): Promise<boolean> {
    const move = { stageId, start: place.start, makerIds: copy(place.makerIds), bayIds: copy(place.bayIds) };
    return this.change('Moving…', 'Moved.', (revision) =>
      this.api.callEndpoint(endpoints.moveStage, { body: { revision, ...move } }),
    );
  }

  /** Lets a held stage go, so that the engine may move it. */
  releasePin(stageId: string): Promise<boolean> {
    return this.change('Letting go…', 'Let go.', (revision) =>
      this.api.callEndpoint(endpoints.releasePin, { body: { revision, stageId } }),
    );
  }

  /** Takes the last change back. */
  undo(): Promise<boolean> {
    const label = this.view()?.undoLabel;
    return this.change('Undoing…', label ? `Undone: ${label}.` : 'Undone.', (revision) =>
      this.api.callEndpoint(endpoints.undo, { body: { revision } }),
    );
  }

  /** Makes the change again. */
  redo(): Promise<boolean> {
    const label = this.view()?.redoLabel;
    return this.change('Making it again…', label ? `Made again: ${label}.` : 'Made again.', (revision) =>
      this.api.callEndpoint(endpoints.redo, { body: { revision } }),
    );
  }

  /** Reads the plan again after a change made elsewhere on the page: a levelling taken, an issue. */
  refresh(news: string): void {
    this.lastTrouble.set(null);
    this.lastNews.set(news);
    this.read.reload();
  }

  /** Puts the last trouble away. */
  dismissTrouble(): void {
    this.lastTrouble.set(null);
  }

  private async change(doing: string, done: string, change: Change): Promise<boolean> {
    const view = this.view();
    if (view === undefined || this.changing() !== null) return false;
    this.changing.set(doing);
    this.lastTrouble.set(null);
    try {
      await change(view.revision);
      await this.reread();
      this.lastNews.set(done);
      return true;
    } catch (error) {
      await this.explainTrouble(toApiFailure(error), view);
      return false;
    } finally {
      this.changing.set(null);
    }
  }

  /** At a conflict the page shows the other's plan at once and says whose it is; nothing is written over unseen. */
  private async explainTrouble(failure: ApiFailure, seen: WorkingPlanView): Promise<void> {
    if (failure.kind !== 'version-conflict') {
      this.lastTrouble.set({ title: failure.title, detail: failure.detail });
      return;
    }
    const fresh = await this.reread().catch(() => undefined);
    const who = fresh && fresh.revision !== seen.revision ? (fresh.changedBy ?? 'The studio') : 'Someone';
    this.lastTrouble.set({
      title: `${who} changed the plan meanwhile`,
      detail: 'This is their plan now. Your change was not made; make it again if it still makes sense.',
    });
  }

  /** Reads the plan through the write seam, so that a change counts as done only when it is seen. */
  private async reread(): Promise<WorkingPlanView> {
    const fresh = await this.api.callEndpoint(endpoints.readPlan);
    this.read.set(fresh);
    return fresh;
  }
}

function mapOf<T, R>(value: T | undefined, map: (value: T) => R): R | null {
  return value === undefined ? null : map(value);
}

function copy(ids: readonly string[] | null): string[] | null {
  return ids && [...ids];
}
