import type { Maker, Problem, Stage } from '../problem/problem';
import { Calendar, NEVER } from './calendar';
import { chooseHousings } from './choose-housings';
import {
  CLOCK,
  type Compiled,
  type CompiledMakers,
  type CompiledWork,
  type Crew,
  FINISHED,
  FIXED_START,
  FREE,
  FROZEN,
  HARD_WINDOW,
  HOLD_DWELL,
  HOLD_UNTIL,
  HOLD_WORK,
  MOVABLE,
  NO_WINDOW,
  ROOM,
  SESSION,
  SHIFTS,
  SOFT_WINDOW,
  STARTED,
} from './compiled';
import { chooseCrews } from './choose-crews';
import { CuringCurve } from './curing-curve';
import { minutesLeft } from './minutes-left';

const CONTINUITY = { session: SESSION, shifts: SHIFTS, free: FREE, clock: CLOCK } as const;
const HOLD = { work: HOLD_WORK, dwell: HOLD_DWELL, 'until-stage': HOLD_UNTIL } as const;

/** Lays out what each stage asks for. */
export function compileWork(
  problem: Problem,
  stages: readonly Stage[],
  stageIndex: Compiled['stageIndex'],
  makers: readonly Maker[],
  calendars: CompiledMakers,
  bayIndex: ReadonlyMap<string, number>,
  craftIds: readonly string[],
): CompiledWork {
  const origin = problem.horizon.start;
  const craftIndex = new Map(craftIds.map((id, i) => [id, i]));
  const clamp = (instant: number): number => Math.max(-NEVER, Math.min(NEVER, instant - origin));
  const needs = stages.flatMap((stage) => stage.crew);
  const places = stages.flatMap((stage) => stage.places);
  const fixed = stages.map((stage) => findFixity(problem, stage));
  const window = stages.map((stage) => stage.dwell?.window ?? null);
  const crews = chooseCrews(stages, makers, calendars, craftIds);
  return {
    minutes: Int32Array.from(stages, minutesLeft),
    isDuration: Uint8Array.from(stages, (stage) => (stage.effort.kind === 'duration' ? 1 : 0)),
    continuity: Uint8Array.from(stages, (stage) => CONTINUITY[stage.continuity]),
    fixity: Uint8Array.from(fixed, ([fixity]) => fixity),
    fixedStart: Int32Array.from(fixed, ([, start]) => clamp(start)),
    earliest: Int32Array.from(stages, (stage) => Math.max(0, clamp(stage.earliestStart))),
    latest: Int32Array.from(stages, (stage) => (stage.latestEnd === null ? NEVER : clamp(stage.latestEnd))),
    needOf: offsetsOf(stages, (stage) => stage.crew.length),
    needCraft: Int32Array.from(needs, (need) => craftIndex.get(need.craftId) ?? -1),
    needLeast: Int32Array.from(needs, (need) => need.least),
    needMost: Int32Array.from(needs, (need) => need.most),
    crewLoss: Int32Array.from(stages, (stage) => stage.crewLossPermille),
    crews,
    anyTime: anyTimeOf(crews, calendars, problem.horizon.end - origin),
    placeOf: offsetsOf(stages, (stage) => stage.places.length),
    placeUnits: Int32Array.from(places, (place) => place.units),
    placeHold: Uint8Array.from(places, (place) => HOLD[place.hold.kind]),
    placeUntil: Int32Array.from(places, (place) =>
      place.hold.kind === 'until-stage' ? (stageIndex.get(place.hold.stageId) ?? -1) : -1,
    ),
    housings: stages.map((stage) => chooseHousings(stage, bayIndex)),
    dwellAge: Float64Array.from(stages, (stage) => (stage.dwell?.minutes ?? 0) * 1000),
    attended: Int32Array.from(stages, (stage) =>
      stage.progress.kind === 'finished' ? 0 : (stage.dwell?.attendedMinutes ?? 0),
    ),
    windowKind: Uint8Array.from(window, (one) =>
      one === null ? NO_WINDOW : one.kind === 'soft' ? SOFT_WINDOW : HARD_WINDOW,
    ),
    windowAge: Float64Array.from(window, (one) => (one?.minutes ?? 0) * 1000),
    windowExtra: Int32Array.from(window, (one) => (one?.kind === 'soft' ? one.extraMinutes : 0)),
    windowCost: Float64Array.from(window, (one) => (one?.kind === 'soft' ? one.costMinor : 0)),
    curves: compileCurves(problem, stages, bayIndex),
    keptPlace: Int32Array.from(stages, (stage) => stage.places.findIndex((place) => place.hold.kind !== 'work')),
  };
}

/** The ordinary time of anyone in a stage's crews, worked out when it is first asked for and once for stages that choose from the same. */
function anyTimeOf(
  crewsOf: readonly (readonly Crew[])[],
  { ordinary }: CompiledMakers,
  horizonMinutes: number,
): CompiledWork['anyTime'] {
  const known = new Map<readonly Crew[], Calendar>();
  return (stage) => {
    const crews = crewsOf[stage];
    if (crews.length === 0) return null;
    let time = known.get(crews);
    if (!time) {
      const able = [...new Set(crews.flatMap((crew) => [...crew.makers]))];
      time = Calendar.anyOf(
        able.map((maker) => ordinary[maker]),
        horizonMinutes,
      );
      known.set(crews, time);
    }
    return time;
  };
}

function offsetsOf(stages: readonly Stage[], count: (stage: Stage) => number): Int32Array {
  const offsets = new Int32Array(stages.length + 1);
  stages.forEach((stage, i) => (offsets[i + 1] = offsets[i] + count(stage)));
  return offsets;
}

/** What ties a stage, and to which instant. A pin or a visit is asked for by name and beats the freeze. */
function findFixity(problem: Problem, stage: Stage): [number, number] {
  if (stage.progress.kind === 'finished') return [FINISHED, stage.progress.start];
  if (stage.progress.kind === 'started') return [STARTED, stage.progress.start];
  const pinned = stage.pin?.start ?? stage.fixedStart;
  if (pinned !== null && pinned !== undefined) return [FIXED_START, pinned];
  const issued = problem.issued?.placements.find((placement) => placement.stageId === stage.id);
  const start = issued?.work[0]?.start;
  const frozen = start !== undefined && start >= problem.horizon.start && start < problem.freezeUntil;
  return frozen ? [FROZEN, start] : [MOVABLE, problem.horizon.start];
}

function compileCurves(
  problem: Problem,
  stages: readonly Stage[],
  bayIndex: ReadonlyMap<string, number>,
): (ReadonlyMap<number, CuringCurve> | null)[] {
  const curves = new Map(
    problem.advances.map((profile) => [profile.id, new CuringCurve(profile, problem.horizon.start)]),
  );
  return stages.map((stage) => {
    const entries = Object.entries(stage.dwell?.advance ?? {});
    if (entries.length === 0) return null;
    const byPlace = new Map<number, CuringCurve>();
    for (const [place, id] of entries) {
      const curve = curves.get(id);
      const key = place === 'room' ? ROOM : bayIndex.get(place);
      if (curve && key !== undefined) byPlace.set(key, curve);
    }
    return byPlace;
  });
}
