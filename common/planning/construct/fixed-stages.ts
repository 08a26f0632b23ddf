import type { StageBounds } from './bounds-of-stage';
import { NEVER } from './calendar';
import { type Compiled, type Crew, FINISHED, FIXED_START, FROZEN, STARTED } from './compiled';
import type { Ask, Leniency } from './ask';
import type { Fitter } from './fitter';
import { copyFit, type Fit, type Layout, newFit, pushSpan } from './layout';
import { workMinutes } from './work-minutes';

/**
 * Lays out every stage that is tied to its time: what has happened, what has begun, what is frozen, pinned or agreed. They stand
 * where they were put even where that breaks a rule, which the checker then tells.
 */
export function placeFixed(layout: Layout, fitter: Fitter, bounds: StageBounds): void {
  const { fixity, fixedStart } = layout.compiled.work;
  const tied = [...fixity.keys()].filter((stage) => fixity[stage] !== 0);
  const rank = (stage: number): number => (fixity[stage] >= STARTED ? FINISHED - fixity[stage] : 2);
  tied.sort((a, b) => rank(a) - rank(b) || fixedStart[a] - fixedStart[b] || a - b);
  for (const stage of tied) {
    if (fixity[stage] === FINISHED) placeFinished(layout, fitter, stage);
    else if (fixity[stage] === STARTED) placeStarted(layout, fitter, stage);
    else if (fixity[stage] === FROZEN) placeFrozen(layout, fitter, stage);
    else if (fixity[stage] === FIXED_START) {
      bounds.gather(stage, 0);
      placeAt(layout, fitter, stage, fixedStart[stage], owedFor(bounds, fixedStart[stage]), null);
    }
  }
}

function placeFinished(layout: Layout, fitter: Fitter, stage: number): void {
  const { compiled } = layout;
  const { progress } = compiled.stages[stage];
  if (progress.kind !== 'finished') return;
  const fit = newFit();
  const housing = compiled.work.housings[stage][0] ?? null;
  fit.start = progress.start - compiled.origin;
  fit.end = progress.end - compiled.origin;
  fit.finish = fitter.dwellEnd({ stage, housing }, fit.end);
  layout.place(stage, fit, compiled.work.crews[stage][0] ?? null, housing);
}

function placeStarted(layout: Layout, fitter: Fitter, stage: number): void {
  const { work } = layout.compiled;
  const found = firstFit(
    layout,
    fitter,
    stage,
    Math.max(0, work.fixedStart[stage]),
    NEVER,
    ['bays', 'other-work', 'calendars'],
    null,
  );
  found.fit.start = work.fixedStart[stage];
  if (work.minutes[stage] === 0) {
    found.fit.end = found.fit.start;
    found.fit.finish = fitter.dwellEnd({ stage, housing: found.housing }, found.fit.end);
  }
  layout.place(stage, found.fit, found.crew, found.housing);
}

function placeFrozen(layout: Layout, fitter: Fitter, stage: number): void {
  const { compiled } = layout;
  const issued = compiled.problem.issued?.placements.find(
    (placement) => placement.stageId === compiled.stages[stage].id,
  );
  if (!issued) return;
  const fit = newFit();
  for (const span of issued.work)
    if (span.end > span.start) pushSpan(fit, span.start - compiled.origin, span.end - compiled.origin);
  fit.start = issued.work[0].start - compiled.origin;
  fit.end = issued.work[issued.work.length - 1].end - compiled.origin;
  const seats = issued.crew
    .map((member) => [compiled.makerIds.indexOf(member.makerId), compiled.craftIds.indexOf(member.craftId)])
    .filter(([maker]) => maker >= 0);
  const crew: Crew = {
    index: -1,
    makers: Int32Array.from(seats, ([maker]) => maker),
    crafts: Int32Array.from(seats, ([, craft]) => craft),
    outputPermille: 1000,
    regretPermille: 0,
  };
  const housing = Int32Array.from(issued.bayIds, (id) => compiled.bayIds.indexOf(id));
  fit.finish = fitter.dwellEnd({ stage, housing }, fit.end);
  layout.place(stage, fit, crew, housing);
}

/**
 * Lays a stage exactly at a start, by the strictest reading of the rules that allows it; its crew and bays are chosen.
 * `extraEffort` is what it owes for windows missed, in minutes.
 */
export function placeAt(
  layout: Layout,
  fitter: Fitter,
  stage: number,
  start: number,
  extraEffort: number,
  only: Choice | null,
): void {
  const found = firstFit(
    layout,
    fitter,
    stage,
    start,
    start,
    ['none', 'bays', 'other-work', 'calendars'],
    only,
    extraEffort,
  );
  layout.place(stage, found.fit, found.crew, found.housing);
}

/** The effort that a stage which starts at an instant owes for soft windows that it misses, by the bounds gathered for it. */
export function owedFor(bounds: StageBounds, start: number): number {
  let extra = 0;
  for (let k = 0; k < bounds.softUntil.length; k += 1) if (start > bounds.softUntil[k]) extra += bounds.softExtra[k];
  return extra;
}

/** Crew and bays that a hand has chosen; null for the engine to choose. */
export interface Choice {
  readonly crews: readonly Crew[] | null;
  readonly housings: readonly Int32Array[] | null;
}

interface Found {
  readonly fit: Fit;
  readonly crew: Crew | null;
  readonly housing: Int32Array | null;
}

function firstFit(
  layout: Layout,
  fitter: Fitter,
  stage: number,
  start: number,
  lastStart: number,
  leniencies: readonly Leniency[],
  only: Choice | null,
  extraEffort = 0,
): Found {
  const { compiled } = layout;
  const housings = only?.housings ?? compiled.work.housings[stage];
  const crews = only?.crews ?? compiled.work.crews[stage];
  const effort = compiled.work.minutes[stage] + extraEffort;
  for (const leniency of leniencies) {
    for (const overtime of leniency === 'calendars' ? [false] : [false, true]) {
      const best = bestFit(compiled, fitter, { stage, start, lastStart, effort, leniency, overtime }, housings, crews);
      if (best) return best;
    }
  }
  return unhinged(fitter, stage, start, effort, crews[0] ?? null, housings[0] ?? null);
}

interface Wish {
  readonly stage: number;
  readonly start: number;
  readonly lastStart: number;
  readonly effort: number;
  readonly leniency: Leniency;
  readonly overtime: boolean;
}

const ANY_END = { lowEnd: -NEVER, lowFinish: -NEVER } as const;

function bestFit(
  compiled: Compiled,
  fitter: Fitter,
  wish: Wish,
  housings: readonly Int32Array[],
  crews: readonly Crew[],
): Found | null {
  let best: Found | null = null;
  const trial = newFit();
  fitter.leniency = wish.leniency;
  for (const housing of housings) {
    for (const crew of crews.length > 0 ? crews : [null]) {
      const minutes = workMinutes(compiled, wish.stage, wish.effort, crew);
      const ask: Ask = { ...wish, crew, housing, minutes, lowStart: wish.start, lastEnd: NEVER, ...ANY_END };
      if (!fitter.fit(ask, trial) || (best && trial.finish >= best.fit.finish)) continue;
      best = { fit: newFit(), crew, housing };
      copyFit(trial, best.fit);
    }
  }
  fitter.leniency = 'none';
  return best;
}

/** Work at a run from a start, whatever stands against it: the last resort for what a hand has put where nothing fits. */
function unhinged(
  fitter: Fitter,
  stage: number,
  start: number,
  effort: number,
  crew: Crew | null,
  housing: Int32Array | null,
): Found {
  const fit = newFit();
  fit.start = start;
  fit.end = start + effort;
  if (effort > 0) pushSpan(fit, start, fit.end);
  fit.finish = Math.min(NEVER, fitter.dwellEnd({ stage, housing }, fit.end));
  return { fit, crew, housing };
}
