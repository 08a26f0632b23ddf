import type { Span } from '../../time/span';
import type { Plan } from '../problem/plan';
import type { Problem } from '../problem/problem';
import type { Calendar } from './calendar';
import { compile } from './compile';
import {
  type Compiled,
  type Crew,
  FINISH_START,
  FIXED_START,
  FROZEN,
  HOLD_DWELL,
  HOLD_UNTIL,
  MOVABLE,
  START_FINISH,
  START_START,
} from './compiled';
import { Generator } from './generator';
import type { Genome } from './genome';
import { Layout } from './layout';
import { loadPlan } from './load-plan';

/** No stage: nothing in the plan made it wait. */
export const NO_DRIVER = -1;

const NOTHING: ReadonlySet<string> = new Set();

/** Not looked up yet since the last run. */
const UNKNOWN = -2;

/**
 * A plan made ready to be lived through again and again with other times: the same order and bays by the same generation scheme,
 * while efforts, dwells, earliest starts and absences are what the caller last wrote. Who does a stage is settled anew among those
 * who may: a studio whose laminator is ill or held up asks the other one. Stages are indexed in the order of `stageIds`. A pin, a visit or the freeze is a wish when what comes before is late, so there it is a start not to come before.
 */
export class Replay {
  readonly stageIds: readonly string[];
  readonly makerIds: readonly string[];
  /** Efforts still to do, in minutes; written by the caller before `run`. */
  readonly effortMinutes: Int32Array;
  /** Dwells in thousandths of a reference minute; written by the caller. */
  readonly dwellAge: Float64Array;
  /** Starts not to come before, in minutes from the horizon's start; written by the caller. */
  readonly earliest: Int32Array;

  private readonly compiled: Compiled;
  private readonly generator: Generator;
  private readonly genome: Genome;
  private readonly ordinary: Calendar[];
  private readonly extended: Calendar[];
  private readonly wholeOrdinary: readonly Calendar[];
  private readonly wholeExtended: readonly Calendar[];
  /** Makers whose overtime is ever asked for. */
  private readonly worksLonger: ReadonlySet<number>;
  private readonly usersOfBay: readonly (readonly number[])[];
  private readonly drivers: Int32Array;

  /** `givesWay`: stages that are laid out after all others, whenever they start. */
  constructor(problem: Problem, plan: Plan, givesWay: ReadonlySet<string> = NOTHING) {
    const base = compile(problem);
    const planned = new Layout(base);
    loadPlan(planned, plan);
    this.wholeOrdinary = base.makers.ordinary;
    this.wholeExtended = base.makers.extended;
    this.ordinary = [...base.makers.ordinary];
    this.extended = [...base.makers.extended];
    this.effortMinutes = base.work.minutes.slice();
    this.dwellAge = base.work.dwellAge.slice();
    this.earliest = earliestOf(base);
    this.compiled = this.withPlanned(base, planned);
    this.generator = new Generator(this.compiled);
    this.genome = genomeOfPlan(this.compiled, planned, givesWay);
    this.worksLonger = askedForOvertime(this.compiled, this.genome);
    this.drivers = new Int32Array(base.stageCount).fill(UNKNOWN);
    this.stageIds = base.stages.map((stage) => stage.id);
    this.makerIds = base.makerIds;
    this.usersOfBay = base.bayIds.map((_, bay) =>
      base.stages.map((_, stage) => stage).filter((stage) => planned.housing[stage]?.includes(bay)),
    );
  }

  /** Lays everything out with the times as they are now written. */
  run(): void {
    this.generator.decode(this.genome);
    this.drivers.fill(UNKNOWN);
  }

  /** When a stage is over, dwell included, in minutes from the horizon's start; the horizon's end where it found no place. */
  finishOf(stage: number): number {
    const { layout } = this.generator;
    return layout.isPlaced[stage] === 1 ? layout.finish[stage] : this.compiled.horizonMinutes;
  }

  /** Sends a maker home for some time, as spans of instants; none for a maker who is always there. */
  setAbsence(maker: number, away: readonly Span[]): void {
    if (away.length === 0) {
      this.ordinary[maker] = this.wholeOrdinary[maker];
      this.extended[maker] = this.wholeExtended[maker];
      return;
    }
    const { origin, horizonMinutes } = this.compiled;
    const [ordinary, extended] = [this.wholeOrdinary[maker], this.wholeExtended[maker]];
    this.ordinary[maker] = ordinary.less(away, origin, horizonMinutes);
    if (extended === ordinary) this.extended[maker] = this.ordinary[maker];
    else if (this.worksLonger.has(maker)) this.extended[maker] = extended.less(away, origin, horizonMinutes);
  }

  /**
   * The stage that let this one begin no sooner in the last run: the one before it by link, or that had its crew or its bay, which
   * let go last; NO_DRIVER where its earliest start did. Exact but for bays that hold several pieces, where it is the last to leave.
   */
  driverOf(stage: number): number {
    if (this.generator.layout.isPlaced[stage] === 0) return NO_DRIVER;
    if (this.drivers[stage] === UNKNOWN) {
      const found = { driver: NO_DRIVER, release: this.earliest[stage] };
      this.weighLinks(stage, found);
      this.weighCrew(stage, found);
      this.weighBays(stage, found);
      this.drivers[stage] = found.driver;
    }
    return this.drivers[stage];
  }

  private weighLinks(stage: number, found: Release): void {
    const { links, workingClock } = this.compiled;
    const { layout } = this.generator;
    for (let k = links.inOf[stage]; k < links.inOf[stage + 1]; k += 1) {
      const link = links.inLinks[k];
      const before = links.from[link];
      if (layout.isPlaced[before] === 0) continue;
      const kind = links.kind[link];
      const isFromStart = kind === START_START || kind === START_FINISH;
      const from = isFromStart
        ? layout.start[before]
        : links.afterWork[link] === 1
          ? layout.end[before]
          : layout.finish[before];
      const gap = links.minGap[link];
      const low = links.isWorking[link] === 1 ? workingClock.earliestAfter(from, gap) : from + gap;
      const bindsStart = kind === FINISH_START || kind === START_START;
      weigh(found, before, bindsStart ? low : low - (layout.end[stage] - layout.start[stage]));
    }
  }

  private weighCrew(stage: number, found: Release): void {
    const { layout } = this.generator;
    const crew = layout.crew[stage];
    if (!crew) return;
    for (const maker of crew.makers) {
      const bookings = layout.bookings[maker];
      const before = bookings.indexAt(layout.start[stage]) - 1;
      if (before >= 0) weigh(found, bookings.stages[before], bookings.ends[before]);
    }
  }

  private weighBays(stage: number, found: Release): void {
    const { layout } = this.generator;
    const housing = layout.housing[stage];
    if (!housing) return;
    for (const bay of housing) {
      for (const other of bay < 0 ? [] : this.usersOfBay[bay]) {
        if (other === stage || layout.isPlaced[other] === 0 || layout.start[other] >= layout.start[stage]) continue;
        const until = this.heldUntil(other, bay);
        if (until <= layout.start[stage]) weigh(found, other, until);
      }
    }
  }

  private heldUntil(stage: number, bay: number): number {
    const { placeOf, placeHold, placeUntil } = this.compiled.work;
    const { layout } = this.generator;
    const place = placeOf[stage] + (layout.housing[stage]?.indexOf(bay) ?? 0);
    if (placeHold[place] === HOLD_DWELL) return layout.finish[stage];
    const last = placeHold[place] === HOLD_UNTIL ? placeUntil[place] : stage;
    return last >= 0 && layout.isPlaced[last] === 1 ? layout.end[last] : layout.end[stage];
  }

  /** The compiled problem with the plan's bays as the only choice and few crews, nothing tied but what has happened. */
  private withPlanned(base: Compiled, planned: Layout): Compiled {
    const { work } = base;
    return {
      ...base,
      makers: { ...base.makers, ordinary: this.ordinary, extended: this.extended },
      work: {
        ...work,
        minutes: this.effortMinutes,
        dwellAge: this.dwellAge,
        earliest: this.earliest,
        fixity: work.fixity.map((fixity) => (fixity === FIXED_START || fixity === FROZEN ? MOVABLE : fixity)),
        crews: work.crews.map((crews, stage) => withStandIns(planned.crew[stage], crews)),
        // Absences only take time away; a crew put together by hand may have other hours than any other.
        anyTime: (stage) => (planned.crew[stage]?.index === -1 ? null : work.anyTime(stage)),
        housings: work.housings.map((housings, stage) =>
          planned.housing[stage] ? [planned.housing[stage]] : housings,
        ),
      },
    };
  }
}

/** Crews that are asked when the planned one is held up; more than a few change little and cost time. */
const MOST_STAND_INS = 3;

/** The planned crew first, so that it keeps its work where nobody would be sooner, then others of as many hands. */
function withStandIns(planned: Crew | null, crews: readonly Crew[]): readonly Crew[] {
  if (!planned) return crews;
  const others = crews.filter(
    ({ index, makers }) => index !== planned.index && makers.length === planned.makers.length,
  );
  return [planned, ...others.slice(0, MOST_STAND_INS)];
}

interface Release {
  driver: number;
  release: number;
}

function weigh(found: Release, driver: number, release: number): void {
  if (release <= found.release) return;
  found.driver = driver;
  found.release = release;
}

function earliestOf({ work }: Compiled): Int32Array {
  return work.earliest.map((earliest, stage) => {
    const isWished = work.fixity[stage] === FIXED_START || work.fixity[stage] === FROZEN;
    return isWished ? Math.max(earliest, work.fixedStart[stage]) : earliest;
  });
}

/** The plan's own order of starts; stages without a place come last. Overtime stays where the plan works it. */
function genomeOfPlan(compiled: Compiled, planned: Layout, givesWay: ReadonlySet<string>): Genome {
  const movable = compiled.stages.map((_, stage) => stage).filter((stage) => compiled.work.fixity[stage] === MOVABLE);
  const startOf = (stage: number): number =>
    planned.isPlaced[stage] === 1 ? planned.start[stage] : compiled.horizonMinutes;
  const isLast = compiled.stages.map(({ id }) => (givesWay.has(id) ? 1 : 0));
  movable.sort(
    (a, b) => isLast[a] - isLast[b] || startOf(a) - startOf(b) || planned.finish[a] - planned.finish[b] || a - b,
  );
  return {
    order: Int32Array.from(movable),
    crewChoice: new Int16Array(compiled.stageCount).fill(-1),
    overtime: Uint8Array.from(compiled.stages, (_, stage) => (worksOvertime(compiled, planned, stage) ? 1 : 0)),
  };
}

/** The makers of stages that the plan works overtime for, and of those that have begun, for which overtime is tried. */
function askedForOvertime({ work, stages }: Compiled, { overtime }: Genome): ReadonlySet<number> {
  const asked = stages
    .map((_, stage) => stage)
    .filter((stage) => overtime[stage] === 1 || work.fixity[stage] !== MOVABLE)
    .flatMap((stage) => work.crews[stage].flatMap((crew) => [...crew.makers]));
  return new Set(asked);
}

function worksOvertime({ makers }: Compiled, planned: Layout, stage: number): boolean {
  const crew = planned.crew[stage];
  if (!crew) return false;
  for (let k = planned.spanAt[stage], left = planned.spanCount[stage]; left > 0; k += 2, left -= 1) {
    const [start, end] = [planned.spanPool[k], planned.spanPool[k + 1]];
    if (crew.makers.some((maker) => maker >= 0 && !makers.ordinary[maker].covers(start, end))) return true;
  }
  return false;
}
