import { computed, effect, inject, Injectable, signal, untracked } from '@angular/core';
import type { Placement, Plan } from '@common/planning';
import type { Minute } from '@common/time/span';
import { dateChanges, dateMargins } from '../date-margins';
import { LatestOnly } from '../planning-worker/latest-only';
import { PlanningLine } from '../planning-worker/planning-line';
import type { AnswerBody, Trial } from '../planning-worker/protocol';
import { PlanStore } from '../plan-store';
import { BoardStore } from './board-store';
import { boardRows } from './engine/board-rows';
import { ghostsOf } from './engine/ghosts';
import {
  type Hold,
  type HoldEvent,
  type HoldState,
  IDLE,
  type Place,
  samePlace,
  stepHold,
} from './engine/hold-machine';
import { magnetsOf, nudgeStart, type SnapField, snapStart, workableSpans } from './engine/snap';
import { holdable, otherCrews, type Refusal, targetOf } from './engine/take-targets';
import { workStart } from './engine/tape';

/** Pixels within which a start catches on the end of what it waits for. */
const MAGNET_PX = 9;

/** The row that the hand is over, and why it can't take the stage, where it can't. */
export interface Over {
  readonly rowKey: string;
  readonly refusal: Refusal | null;
}

/** The stage in hand: where it came from, where it is aimed, and what would follow if it were dropped now. */
@Injectable()
export class HoldStore {
  private readonly plan = inject(PlanStore);
  private readonly board = inject(BoardStore);
  private readonly line = inject(PlanningLine);
  private readonly stateNow = signal<HoldState>(IDLE);
  private readonly overNow = signal<Over | null>(null);
  private readonly trialNow = signal<Trial | null>(null);
  private readonly failureNow = signal<string | null>(null);
  private readonly trials = new LatestOnly<Place & { readonly stageId: string }, AnswerBody>(
    (move) => this.line.ask({ kind: 'try-move', move }),
    (answer) => this.receive(answer),
  );

  readonly state = this.stateNow.asReadonly();
  readonly over = this.overNow.asReadonly();
  readonly trial = this.trialNow.asReadonly();
  /** Why the consequences can't be shown, where they can't. */
  readonly failure = this.failureNow.asReadonly();
  readonly hold = computed<Hold | null>(() => {
    const state = this.stateNow();
    return state.kind === 'idle' ? null : state.hold;
  });
  /** Whether a stage is in hand and may still be put elsewhere. */
  readonly holding = computed(() => this.stateNow().kind === 'held' || this.stateNow().kind === 'moving');
  readonly place = computed<Place | null>(() => {
    const state = this.stateNow();
    return state.kind === 'moving' || state.kind === 'dropped' ? state.place : null;
  });
  /** The plan as it would be. */
  readonly planAfter = computed<Plan | null>(() => {
    const view = this.plan.view();
    const trial = this.trialNow();
    if (!view || !trial) return null;
    const moved = new Set(trial.moved);
    return { placements: [...view.plan.placements.filter((one) => !moved.has(one.stageId)), ...trial.placements] };
  });
  readonly moved = computed<ReadonlySet<string>>(() => new Set(this.trialNow()?.moved ?? []));
  readonly ghosts = computed(() => {
    const view = this.plan.view();
    const plan = this.planAfter();
    if (!view || !plan) return [];
    const after = boardRows({ ...view, plan }, this.board.rowsBy());
    return ghostsOf(this.board.layout(), this.board.scale(), after, this.moved());
  });
  /** The dates that pay or gain, the worst first. */
  readonly ledger = computed(() => {
    const view = this.plan.view();
    const plan = this.planAfter();
    return view && plan ? dateChanges(this.plan.margins(), dateMargins(view.problem, plan)) : [];
  });

  constructor() {
    effect(() => {
      const view = this.plan.view();
      if (!view) return;
      // A plan that changed under the hand makes what is held meaningless: it goes back.
      untracked(() => this.letGo());
      void this.line.ask({ kind: 'hold-plan', problem: view.problem, plan: view.plan });
    });
  }

  /** Takes a stage in hand from a row; does nothing for one that can't be moved. Whether it is held. */
  take(stageId: string, rowKey: string, by: Hold['by']): boolean {
    const about = this.about(stageId);
    if (!about || holdable(about.stage) !== 'yes' || this.plan.busy() !== null) return false;
    const target = this.targetOver(stageId, rowKey, rowKey);
    if (target?.kind !== 'takes') return false;
    const { makerIds, bayIds } = target;
    const origin: Place = { start: workStart(about.placement), makerIds, bayIds };
    this.step({ kind: 'take', hold: { stageId, rowKey, origin, by } });
    this.overNow.set({ rowKey, refusal: null });
    return this.holding();
  }

  /** Aims the held stage at a start, snapped, and at the row under the hand; a row that refuses leaves it on its own. */
  aim(start: Minute, rowKey: string): void {
    const hold = this.hold();
    if (!hold || !this.holding()) return;
    const target = this.targetOver(hold.stageId, hold.rowKey, rowKey);
    if (target?.kind === 'refuses') {
      this.overNow.set({ rowKey, refusal: target.refusal });
      this.aimPlace({ ...hold.origin, start: snapStart(start, this.field(hold.stageId, hold.origin)) });
      return;
    }
    const { makerIds, bayIds } = target ?? hold.origin;
    this.overNow.set({ rowKey, refusal: null });
    this.aimPlace({ start: snapStart(start, this.field(hold.stageId, { makerIds })), makerIds, bayIds });
  }

  /** Moves the held stage by quarter hours of working time. */
  nudge(quarters: number): void {
    const hold = this.hold();
    if (!hold || !this.holding()) return;
    const place = this.place() ?? hold.origin;
    this.aimPlace({ ...place, start: nudgeStart(place.start, quarters, this.field(hold.stageId, place)) });
  }

  /** Moves the held stage by whole days at the same time of day, or as near as anyone works. */
  nudgeDays(days: number): void {
    const hold = this.hold();
    if (!hold || !this.holding()) return;
    const place = this.place() ?? hold.origin;
    const field = { ...this.field(hold.stageId, place), magnets: [] };
    let start = place.start;
    // Over a weekend the nearest workable start may be the one it came from: go on until it is another day's.
    for (let step = 1; step <= 7 && start === place.start; step += 1) {
      start = snapStart(place.start + Math.sign(days) * (Math.abs(days) + step - 1) * 1440, field);
      if (Math.sign(start - place.start) !== Math.sign(days)) start = place.start;
    }
    this.aimPlace({ ...place, start });
  }

  /** Hands the held stage to the next row that can take it; on the pieces' wall to the next maker who could. */
  nudgeRow(direction: 1 | -1): void {
    const hold = this.hold();
    if (!hold || !this.holding()) return;
    const place = this.place() ?? hold.origin;
    const choices = this.choices(hold);
    if (choices.length < 2) return;
    const now = choices.findIndex((choice) => sameOffer(choice.place, place));
    const next = choices[(Math.max(0, now) + direction + choices.length) % choices.length];
    this.overNow.set({ rowKey: next.rowKey, refusal: null });
    this.aimPlace({ ...next.place, start: snapStart(place.start, this.field(hold.stageId, next.place)) });
  }

  /** Lets go where it is aimed; a stage that was not moved simply goes back. Whether the plan was changed. */
  async drop(): Promise<boolean> {
    this.step({ kind: 'drop' });
    const state = this.stateNow();
    if (state.kind !== 'dropped') {
      this.clear();
      return false;
    }
    const done = await this.plan.moveStage(state.hold.stageId, state.place);
    this.step({ kind: 'settle' });
    this.clear();
    return done;
  }

  /** Puts the stage back where it came from. */
  escape(): void {
    const byKeys = this.hold()?.by === 'keys';
    this.step({ kind: 'escape' });
    this.clear();
    // Keys let go at once; a pointer is still down, and its release is what ends the hold.
    if (byKeys) this.step({ kind: 'settle' });
  }

  private letGo(): void {
    if (this.stateNow().kind !== 'dropped') this.stateNow.set(IDLE);
    this.clear();
  }

  private aimPlace(place: Place): void {
    const hold = this.hold();
    // A hand moves far more often than it aims anew: what was asked already is not asked again.
    if (!hold || samePlace(this.place() ?? hold.origin, place)) return;
    this.step({ kind: 'aim', place });
    this.trials.put({ stageId: hold.stageId, ...place });
  }

  private receive(answer: AnswerBody): void {
    if (answer.kind === 'moved' && this.stateNow().kind !== 'idle') {
      this.trialNow.set(answer.trial);
      this.failureNow.set(null);
    } else if (answer.kind === 'failed') {
      this.failureNow.set(answer.message);
    }
  }

  private choices(hold: Hold): { readonly rowKey: string; readonly place: Place }[] {
    const about = this.about(hold.stageId);
    if (!about) return [];
    if (this.board.rowsBy() === 'piece') {
      const crews = otherCrews(about.problem, about.placement);
      const others = crews.map(({ makerIds }) => ({ rowKey: hold.rowKey, place: { ...hold.origin, makerIds } }));
      return [{ rowKey: hold.rowKey, place: hold.origin }, ...others];
    }
    return this.board.rows().flatMap((row) => {
      const target = this.targetOver(hold.stageId, hold.rowKey, row.key);
      if (target?.kind !== 'takes') return [];
      return [{ rowKey: row.key, place: { ...hold.origin, makerIds: target.makerIds, bayIds: target.bayIds } }];
    });
  }

  private targetOver(stageId: string, fromKey: string, toKey: string): ReturnType<typeof targetOf> | null {
    const about = this.about(stageId);
    if (!about) return null;
    return targetOf({ ...about, by: this.board.rowsBy(), fromId: idIn(fromKey), toId: idIn(toKey) });
  }

  private field(stageId: string, place: Pick<Place, 'makerIds'>): SnapField {
    const about = this.about(stageId);
    if (!about) return { earliest: 0, workable: null, magnets: [], reachMinutes: 0 };
    const { problem, plan, stage } = about;
    return {
      earliest: problem.horizon.start,
      workable: workableSpans(problem, stage, place.makerIds),
      magnets: magnetsOf(problem, plan, stageId),
      reachMinutes: (MAGNET_PX / this.board.zoom()) * 60,
    };
  }

  private about(stageId: string): StageAbout | null {
    const view = this.plan.view();
    const stage = view?.problem.stages.find((one) => one.id === stageId);
    const placement = view?.plan.placements.find((one) => one.stageId === stageId);
    return view && stage && placement ? { problem: view.problem, plan: view.plan, stage, placement } : null;
  }

  private step(event: HoldEvent): void {
    this.stateNow.update((state) => stepHold(state, event));
  }

  private clear(): void {
    this.trials.clear();
    this.trialNow.set(null);
    this.overNow.set(null);
    this.failureNow.set(null);
  }
}

interface StageAbout {
  readonly problem: Parameters<typeof workableSpans>[0];
  readonly plan: Plan;
  readonly stage: Parameters<typeof workableSpans>[1];
  readonly placement: Placement;
}

/** The record's id in a row's key. */
function idIn(rowKey: string): string {
  return rowKey.slice(rowKey.indexOf(':') + 1);
}

function sameOffer(a: Place, b: Place): boolean {
  return JSON.stringify([a.makerIds, a.bayIds]) === JSON.stringify([b.makerIds, b.bayIds]);
}
