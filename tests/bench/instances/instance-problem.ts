import type { Bay, CrewNeed, Maker, PlaceNeed, Problem, Stage } from '@common/planning/problem/problem';
import type { Link } from '@common/planning/problem/link';
import type { Span } from '@common/time/span';
import type { InstanceData, SkillData, StartLag } from './instance-data';

/** The one production that all activities of an instance belong to, so that the finish sum is the makespan. */
export const INSTANCE_PRODUCTION = 'instance';

/** The id of the stage that stands for the activity at a position of the file. */
export const stageIdOf = (position: number): string => `a${position}`;
/** The id of the maker that stands for a resource of a multi-skill instance, by its position. */
export const makerIdOf = (position: number): string => `m${position}`;
/** The id of the craft that stands for a skill, by its position. */
export const craftIdOf = (position: number): string => `c${position}`;
/** The id of the bay that stands for a renewable resource, by its position. */
export const bayIdOf = (position: number): string => `b${position}`;

/**
 * An instance as a planning problem: a period is a minute, a renewable resource a bay, an activity a stage that runs by the
 * clock; in a multi-skill instance a resource is a maker who is always on shift and a skill a craft.
 */
export function instanceProblem(data: InstanceData): Problem {
  const horizon: Span = { start: 0, end: latestFinish(data) };
  return {
    horizon,
    makers: data.skills === null ? [] : makersOf(data.skills, horizon),
    bays: data.capacities.map((capacity, k): Bay => ({ id: bayIdOf(k), capacity, open: null })),
    stages: data.activities.map((_, k) => stageOf(data, k)),
    links: linksOf(data, horizon.end),
    keyDates: [],
    advances: [],
    days: [],
    workingTime: [horizon],
    freezeUntil: 0,
    issued: null,
    weights: { changePenaltyMinor: 0, unevenness: 0, earliness: 1 },
  };
}

/** If there is a plan at all, there is one that ends by then: every activity after the others, and its longest lag. */
function latestFinish(data: InstanceData): number {
  const longest = data.activities.map((activity) => activity.duration);
  for (const { from, lag } of data.arcs) longest[from] = Math.max(longest[from], lag);
  const release = data.activities.reduce((latest, activity) => Math.max(latest, activity.release), 0);
  return Math.max(
    1,
    longest.reduce((sum, minutes) => sum + minutes, release),
  );
}

function makersOf(skills: SkillData, horizon: Span): Maker[] {
  return skills.mastery.map((masters, k) => ({
    id: makerIdOf(k),
    crafts: masters.flatMap((holds, skill) => (holds ? [{ craftId: craftIdOf(skill), pacePermille: 1000 }] : [])),
    shifts: [horizon],
    overtime: [],
    hourCostMinor: 0,
    overtimeHourCostMinor: 0,
    limits: null,
  }));
}

function stageOf(data: InstanceData, position: number): Stage {
  const activity = data.activities[position];
  const crew = (data.skills?.required[position] ?? []).flatMap((count, skill): CrewNeed[] =>
    count > 0 ? [{ craftId: craftIdOf(skill), least: count, most: count }] : [],
  );
  const places = activity.demands.flatMap((units, k): PlaceNeed[] =>
    units > 0 && activity.duration > 0 ? [{ bayIds: [bayIdOf(k)], units, hold: { kind: 'work' } }] : [],
  );
  return {
    id: stageIdOf(position),
    pieceId: INSTANCE_PRODUCTION,
    productionId: INSTANCE_PRODUCTION,
    effort: { kind: 'duration', minutes: activity.duration },
    crew: activity.duration > 0 ? crew : [],
    crewLossPermille: 0,
    continuity: crew.length > 0 && activity.duration > 0 ? 'session' : 'clock',
    places,
    dwell: null,
    earliestStart: activity.release,
    latestEnd: null,
    fixedStart: null,
    pin: null,
    progress: { kind: 'to-do' },
  };
}

/** One link for each pair of activities and direction of time; a negative lag becomes the maximum gap of the way round. */
function linksOf(data: InstanceData, unbounded: number): Link[] {
  const isTimed = data.format === 'rcpspmax';
  const maximumOf = new Map<string, number>();
  const pair = (from: number, to: number): string => `${from} ${to}`;
  for (const { from, to, lag } of data.arcs)
    if (lag < 0) maximumOf.set(pair(to, from), Math.min(maximumOf.get(pair(to, from)) ?? Infinity, -lag));
  const links = new Map<string, Link>();
  for (const arc of data.arcs) {
    if (arc.lag < 0) continue;
    const key = pair(arc.from, arc.to);
    const known = links.get(key);
    if (known !== undefined && (!isTimed || known.minGapMinutes >= arc.lag)) continue;
    links.set(key, isTimed ? startLink(arc, maximumOf.get(key) ?? null) : finishLink(arc));
  }
  for (const [key, maximum] of maximumOf) {
    if (links.has(key)) continue;
    const [from, to] = key.split(' ').map(Number);
    links.set(key, startLink({ from, to, lag: -unbounded }, maximum));
  }
  return [...links.values()];
}

function startLink(arc: StartLag, maximum: number | null): Link {
  return {
    fromStageId: stageIdOf(arc.from),
    toStageId: stageIdOf(arc.to),
    kind: 'start-start',
    after: 'work',
    minGapMinutes: arc.lag,
    maxGapMinutes: maximum,
    time: 'clock',
  };
}

function finishLink(arc: StartLag): Link {
  return {
    fromStageId: stageIdOf(arc.from),
    toStageId: stageIdOf(arc.to),
    kind: 'finish-start',
    after: 'work',
    minGapMinutes: 0,
    maxGapMinutes: null,
    time: 'clock',
  };
}
