import { StageBounds } from '../construct/bounds-of-stage';
import { NEVER } from '../construct/calendar';
import { compile } from '../construct/compile';
import {
  type Compiled,
  FINISH_FINISH,
  FINISH_START,
  FINISHED,
  FIXED_START,
  FROZEN,
  FREE,
  NO_WINDOW,
  START_FINISH,
  START_START,
  STARTED,
} from '../construct/compiled';
import { curedBy } from '../construct/cured-by';
import type { Ask } from '../construct/ask';
import { Fitter } from '../construct/fitter';
import { type Fit, Layout, newFit } from '../construct/layout';
import { loadPlan } from '../construct/load-plan';
import type { Reason } from '../problem/explanation';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import { findTaker } from './find-taker';

/** Waits longer than this many turns are told from their latest part. */
const MOST_TURNS = 5000;
/** Other work told as having been in the way, the latest first. */
const MOST_TOLD = 3;

/** Tells why stages of one plan start when they do, by asking, minute by minute gained, what stands against an earlier start. */
export class Explainer {
  readonly compiled: Compiled;
  readonly layout: Layout;
  private readonly fitter: Fitter;
  private readonly bounds: StageBounds;
  private readonly trial: Fit = newFit();

  constructor(problem: Problem, plan: Plan) {
    this.compiled = compile(problem);
    this.layout = new Layout(this.compiled);
    loadPlan(this.layout, plan);
    this.fitter = new Fitter(this.layout);
    this.bounds = new StageBounds(this.layout, this.fitter);
  }

  /**
   * Reasons for a placed stage's start, the one that binds last first. The first holds until the start itself; each holds until
   * no later than the one before; together they leave no time unexplained from the stage's lower bound on.
   */
  reasonsFor(stage: number): Reason[] {
    const tied = this.tiedReason(stage);
    if (tied) return [tied];
    const { reasons, low } = this.lowerBound(stage);
    const turns = this.turnsFrom(stage, low);
    return [...tidy(turns.reverse()), ...reasons];
  }

  private instant(minute: number): number {
    return minute + this.compiled.origin;
  }

  private tiedReason(stage: number): Reason | null {
    const until = this.instant(this.layout.start[stage]);
    switch (this.compiled.work.fixity[stage]) {
      case FINISHED:
      case STARTED:
        return { kind: 'started', until };
      case FROZEN:
        return { kind: 'frozen', until };
      case FIXED_START:
        return this.compiled.stages[stage].pin?.start != null ? { kind: 'pinned', until } : { kind: 'visit', until };
      default:
        return null;
    }
  }

  /** The latest start that links, purchases and the horizon alone ask for, and every reason that asks for exactly that. */
  private lowerBound(stage: number): { reasons: Reason[]; low: number } {
    const { links, work, problem } = this.compiled;
    const found: Reason[] = [{ kind: 'horizon', until: problem.horizon.start }];
    const earliest = this.compiled.stages[stage].earliestStart;
    if (earliest > problem.horizon.start) found.push({ kind: 'earliest', until: earliest });
    for (let k = links.inOf[stage]; k < links.inOf[stage + 1]; k += 1) {
      const link = links.inLinks[k];
      const before = links.from[link];
      const kind = links.kind[link];
      if (this.layout.isPlaced[before] === 0 || kind === FINISH_FINISH || kind === START_FINISH) continue;
      const ref = this.firstEnd(link, before);
      const gap = links.minGap[link];
      const until = this.instant(
        links.isWorking[link] === 1 ? this.compiled.workingClock.earliestAfter(ref, gap) : ref + gap,
      );
      const stageId = this.compiled.stages[before].id;
      if (gap !== 0 || kind === START_START) found.push({ kind: 'gap-after', stageId, gapMinutes: gap, until });
      else if (links.afterWork[link] === 0 && work.dwellAge[before] > 0)
        found.push({ kind: 'dwell-before', stageId, until });
      else found.push({ kind: 'work-before', stageId, until });
    }
    const low = Math.max(...found.map((reason) => reason.until));
    return { reasons: found.filter((reason) => reason.until === low), low: low - this.compiled.origin };
  }

  private firstEnd(link: number, before: number): number {
    const { links } = this.compiled;
    const kind = links.kind[link];
    if (kind === START_START || kind === START_FINISH) return this.layout.start[before];
    return links.afterWork[link] === 1 ? this.layout.end[before] : this.layout.finish[before];
  }

  /** What moved the start on from the lower bound to where it is, in the order of time. */
  private turnsFrom(stage: number, low: number): Reason[] {
    const { layout, trial } = this;
    const start = layout.start[stage];
    const turns: Reason[] = [];
    if (low >= start) return turns;
    const ask = this.askFor(stage);
    layout.unplace(stage);
    for (let t = low, turn = 0; t < start && turn < MOST_TURNS; turn += 1) {
      ask.lowStart = t;
      this.fitter.leniency = 'other-work';
      const fits = this.fitter.fit(ask, trial);
      this.fitter.leniency = 'none';
      if (!fits || trial.start > start) {
        turns.push({ kind: 'kept-for-evenness', until: this.instant(start) });
        break;
      }
      if (trial.start > t) turns.push(this.calendarReason(ask, stage, t, trial.start));
      t = trial.start;
      if (t >= start) break;
      const taken = this.takenReason(ask, stage);
      if (!taken || taken.until - this.compiled.origin > start) {
        turns.push(this.heldReason(stage) ?? { kind: 'kept-for-evenness', until: this.instant(start) });
        break;
      }
      turns.push(taken);
      t = taken.until - this.compiled.origin;
    }
    this.relay(stage, ask);
    return turns;
  }

  private askFor(stage: number): Ask {
    const { layout } = this;
    this.bounds.gather(stage, 0);
    let minutes = 0;
    for (let k = layout.spanAt[stage], left = layout.spanCount[stage]; left > 0; k += 2, left -= 1) {
      minutes += layout.spanPool[k + 1] - layout.spanPool[k];
    }
    return {
      stage,
      crew: layout.crew[stage],
      housing: layout.housing[stage],
      minutes,
      overtime: this.worksOvertime(stage),
      lowStart: 0,
      lowEnd: this.lowEndByLinks(stage),
      lowFinish: -NEVER,
      lastStart: NEVER,
      lastEnd: NEVER,
    };
  }

  /** The earliest end that links from placed stages ask for. */
  private lowEndByLinks(stage: number): number {
    const { links } = this.compiled;
    let low = -NEVER;
    for (let k = links.inOf[stage]; k < links.inOf[stage + 1]; k += 1) {
      const link = links.inLinks[k];
      const kind = links.kind[link];
      const bindsEnd = kind === FINISH_FINISH || kind === START_FINISH;
      if (!bindsEnd || this.layout.isPlaced[links.from[link]] === 0) continue;
      const ref = this.firstEnd(link, links.from[link]);
      const gap = links.minGap[link];
      low = Math.max(low, links.isWorking[link] === 1 ? this.compiled.workingClock.earliestAfter(ref, gap) : ref + gap);
    }
    return low;
  }

  private relay(stage: number, ask: Ask): void {
    const { layout } = this;
    const fit = newFit();
    fit.start = layout.start[stage];
    fit.end = layout.end[stage];
    fit.finish = layout.finish[stage];
    fit.spanCount = layout.spanCount[stage];
    fit.spans = layout.spanPool.slice(layout.spanAt[stage], layout.spanAt[stage] + 2 * fit.spanCount);
    layout.place(stage, fit, ask.crew, ask.housing);
  }

  private worksOvertime(stage: number): boolean {
    const { layout } = this;
    for (const maker of layout.crew[stage]?.makers ?? []) {
      for (let k = layout.spanAt[stage], left = layout.spanCount[stage]; left > 0; k += 2, left -= 1) {
        if (!this.compiled.makers.ordinary[maker].covers(layout.spanPool[k], layout.spanPool[k + 1])) return true;
      }
    }
    return false;
  }

  /** Why nothing can start from `from` until `until`, were there no other work: shifts, opening hours, or a link to its end. */
  private calendarReason(ask: Ask, stage: number, from: number, until: number): Reason {
    const at = this.instant(until);
    for (const bay of ask.housing ?? []) {
      const open = bay >= 0 ? this.compiled.bays.open[bay] : null;
      if (open && !open.covers(until - 1, until))
        return { kind: 'bay-closed', bayId: this.compiled.bayIds[bay], until: at };
    }
    const crew = ask.crew;
    for (let k = 0; crew && k < crew.makers.length; k += 1) {
      const { ordinary, extended } = this.compiled.makers;
      const calendar = (ask.overtime ? extended : ordinary)[crew.makers[k]];
      if (!calendar.covers(until - 1, until)) {
        return { kind: 'crew-off-shift', craftId: this.compiled.craftIds[crew.crafts[k]] ?? '', until: at };
      }
    }
    return this.endBoundReason(stage, at) ?? { kind: 'too-long-for-shift', until: at };
  }

  private endBoundReason(stage: number, until: number): Reason | null {
    const { links } = this.compiled;
    for (let k = links.inOf[stage]; k < links.inOf[stage + 1]; k += 1) {
      const link = links.inLinks[k];
      const kind = links.kind[link];
      if ((kind !== FINISH_FINISH && kind !== START_FINISH) || this.layout.isPlaced[links.from[link]] === 0) continue;
      return {
        kind: 'gap-after',
        stageId: this.compiled.stages[links.from[link]].id,
        gapMinutes: links.minGap[link],
        until,
      };
    }
    return null;
  }

  /** Other work in the way of the trial: the crew's, or what is in the bay. */
  private takenReason(ask: Ask, stage: number): Reason | null {
    const { trial, layout } = this;
    let found: Reason | null = null;
    const isFree = this.compiled.work.continuity[stage] === FREE;
    for (let k = 0; ask.crew && k < ask.crew.makers.length; k += 1) {
      const maker = ask.crew.makers[k];
      const bookings = layout.bookings[maker];
      for (let s = 0; s < (isFree ? Math.min(1, trial.spanCount) : trial.spanCount); s += 1) {
        const end = isFree ? Math.min(trial.spans[1], trial.start + 30) : trial.spans[2 * s + 1];
        const i = bookings.indexAt(trial.spans[2 * s]);
        if (i >= bookings.count || bookings.starts[i] >= end) continue;
        const until = this.instant(bookings.ends[i]);
        if (found && found.until >= until) break;
        found = {
          kind: 'crew-busy',
          makerId: this.compiled.makerIds[maker],
          craftId: this.compiled.craftIds[ask.crew.crafts[k]] ?? '',
          stageId: this.compiled.stages[bookings.stages[i]].id,
          until,
        };
        break;
      }
    }
    const taker = findTaker(layout, stage, ask.housing, trial);
    if (taker && (!found || taker.until > found.until - this.compiled.origin)) {
      const { id: stageId } = this.compiled.stages[taker.stage];
      found = { kind: 'bay-taken', bayId: this.compiled.bayIds[taker.bay], stageId, until: this.instant(taker.until) };
    }
    return found;
  }

  /** Whether a follower's window or maximum gap would be missed by the trial: then the stage was kept back for it. */
  private heldReason(stage: number): Reason | null {
    const { links, work } = this.compiled;
    const { layout, trial } = this;
    for (let k = links.outOf[stage]; k < links.outOf[stage + 1]; k += 1) {
      const link = links.outLinks[k];
      const after = links.to[link];
      if (layout.isPlaced[after] === 0) continue;
      const kind = links.kind[link];
      const startBinds = kind === START_START || kind === START_FINISH;
      const ref = startBinds ? trial.start : links.afterWork[link] === 1 ? trial.end : trial.finish;
      const target = kind === FINISH_START || kind === START_START ? layout.start[after] : layout.end[after];
      let latest = links.maxGap[link] < NEVER ? ref + links.maxGap[link] : NEVER;
      if (links.isWorking[link] === 1 && latest < NEVER)
        latest = this.compiled.workingClock.latestAfter(ref, links.maxGap[link]);
      if (kind === FINISH_START && links.afterWork[link] === 0 && work.windowKind[stage] !== NO_WINDOW) {
        latest = Math.min(
          latest,
          curedBy(this.compiled, stage, layout.housing[stage], trial.end, work.windowAge[stage] + 1) - 1,
        );
      }
      if (latest < target) {
        return {
          kind: 'held-for-window',
          stageId: this.compiled.stages[after].id,
          until: this.instant(layout.start[stage]),
        };
      }
    }
    return null;
  }
}

/**
 * Turns, latest first, as a person would tell them: what bound last in full, then each piece of other work that stood in the way
 * once, without the nights in between.
 */
function tidy(turns: readonly Reason[]): Reason[] {
  const told: Reason[] = [];
  const seen = new Set<string>();
  for (const turn of turns) {
    if (turn.kind === 'crew-busy' || turn.kind === 'bay-taken') {
      if (seen.has(turn.stageId) || seen.size >= MOST_TOLD) continue;
      seen.add(turn.stageId);
      told.push(turn);
    } else if (seen.size === 0 && turn.kind !== told[told.length - 1]?.kind) told.push(turn);
  }
  return told;
}
