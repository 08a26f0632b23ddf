import type { Maker, Stage } from '../problem/problem';
import type { Calendar } from './calendar';
import type { CompiledMakers, Crew } from './compiled';
import { minutesLeft } from './minutes-left';

/** At most this many crews are weighed for one stage; the best by output and regret. */
const MOST_CREWS = 48;
/** Combinations looked at before the best are kept. */
const MOST_COMBINATIONS = 4000;

/** The crews that each stage may choose from, the least regretted and quickest first. */
export function chooseCrews(
  stages: readonly Stage[],
  makers: readonly Maker[],
  calendars: CompiledMakers,
  craftIds: readonly string[],
): Crew[][] {
  const tension = craftTension(stages, makers, calendars, craftIds);
  const craftIndex = new Map(craftIds.map((id, i) => [id, i]));
  const makerIndex = new Map(makers.map((maker, i) => [maker.id, i]));
  const paces = makers.map((maker) => {
    const row = new Float64Array(craftIds.length);
    for (const craft of maker.crafts) {
      const c = craftIndex.get(craft.craftId);
      if (c !== undefined) row[c] = craft.pacePermille;
    }
    return row;
  });
  const known = new Map<string, Crew[]>();
  let count = 0;
  return stages.map((stage) => {
    const given = givenMakers(stage);
    const key = JSON.stringify([stage.crew, stage.crewLossPermille, given]);
    const same = known.get(key);
    if (same) return same;
    const needs = stage.crew.map((need) => ({
      craft: craftIndex.get(need.craftId) ?? -1,
      least: need.least,
      most: need.most,
    }));
    const teams = given
      ? [
          seatGiven(
            given.map((id) => makerIndex.get(id) ?? -1),
            needs,
            paces,
          ),
        ]
      : combine(needs, paces);
    const crews = teams.map((team) => toCrew(stage.crewLossPermille, team, paces, tension, calendars.hourCost));
    const chosen = thin(crews.filter((crew) => crew.outputPermille > 0 || given !== null)).map((crew) => ({
      ...crew,
      index: count++,
    }));
    known.set(key, chosen);
    return chosen;
  });
}

/** The craft of someone who is there without being asked for. */
const NO_CRAFT = -1;

interface Need {
  readonly craft: number;
  readonly least: number;
  readonly most: number;
}

/** Seats as pairs of maker and craft. */
type Team = readonly (readonly [number, number])[];

function givenMakers(stage: Stage): readonly string[] | null {
  const { progress, pin } = stage;
  if (progress.kind === 'finished') return progress.makerIds;
  if (progress.kind === 'started') return progress.makerIds.length > 0 ? progress.makerIds : null;
  return pin?.makerIds ?? null;
}

/** Gives each of the given makers a seat: first those that only one craft suits, so that all needs are met where they can be. */
function seatGiven(given: readonly number[], needs: readonly Need[], paces: readonly Float64Array[]): Team {
  if (needs.length === 0) return given.map((maker) => [maker, NO_CRAFT]);
  const seats = needs.map((need) => ({ ...need, taken: 0 }));
  const choices = (maker: number): number => needs.filter((need) => paces[maker][need.craft] > 0).length;
  const team: [number, number][] = [];
  for (const maker of [...given].sort((a, b) => choices(a) - choices(b) || a - b)) {
    const able = seats.filter((seat) => paces[maker][seat.craft] > 0);
    const seat =
      able.find((one) => one.taken < one.least) ?? able.find((one) => one.taken < one.most) ?? able[0] ?? seats[0];
    seat.taken += 1;
    team.push([maker, seat.craft]);
  }
  return team;
}

/** Every way to fill the needs from makers who hold the crafts, up to a limit. */
function combine(needs: readonly Need[], paces: readonly Float64Array[]): Team[] {
  if (needs.length === 0) return [];
  let teams: Team[] = [[]];
  for (const need of needs) {
    const holders = paces.flatMap((row, maker) => (row[need.craft] > 0 ? [maker] : []));
    holders.sort((a, b) => paces[b][need.craft] - paces[a][need.craft] || a - b);
    const next: Team[] = [];
    for (const team of teams) {
      const free = holders.filter((maker) => !team.some(([taken]) => taken === maker));
      for (let size = need.least; size <= Math.min(need.most, free.length); size += 1) {
        pick(free, size, (group) => {
          next.push([...team, ...group.map((maker): [number, number] => [maker, need.craft])]);
          return next.length < MOST_COMBINATIONS;
        });
      }
    }
    teams = next;
  }
  return teams;
}

/** Calls back with each group of a size in lexicographic order until told to stop. */
function pick(from: readonly number[], size: number, take: (group: readonly number[]) => boolean): void {
  const group: number[] = [];
  const choose = (next: number): boolean => {
    if (group.length === size) return take(group);
    for (let i = next; i <= from.length - (size - group.length); i += 1) {
      group.push(from[i]);
      if (!choose(i + 1)) return false;
      group.pop();
    }
    return true;
  };
  choose(0);
}

function toCrew(
  lossPermille: number,
  team: Team,
  paces: readonly Float64Array[],
  tension: Float64Array,
  hourCost: Float64Array,
): Crew {
  const loss = lossPermille * Math.max(0, team.length - 1);
  let regret = 0;
  for (const [maker, craft] of team) {
    if (craft === NO_CRAFT) continue;
    // Freelancers are called in where staff would come too late.
    let scarcest = hourCost[maker] > 0 ? 1 : 0;
    paces[maker].forEach((pace, other) => {
      if (pace > 0 && other !== craft) scarcest = Math.max(scarcest, tension[other] - tension[craft]);
    });
    regret += scarcest;
  }
  return {
    index: -1,
    makers: Int32Array.from(team, ([maker]) => maker),
    crafts: Int32Array.from(team, ([, craft]) => craft),
    outputPermille: team.reduce((sum, [maker, craft]) => sum + (craft === NO_CRAFT ? 0 : paces[maker][craft]), -loss),
    regretPermille: Math.round(1000 * Math.min(1, regret)),
  };
}

/** Keeps the best crews, by person-minutes for the same work and by regret, in a stable order. */
function thin(crews: readonly Crew[]): Crew[] {
  const cost = (crew: Crew): number => (crew.makers.length * 1000) / crew.outputPermille + crew.regretPermille / 1000;
  return crews
    .map((crew, i) => ({ crew, i }))
    .sort((a, b) => cost(a.crew) - cost(b.crew) || a.i - b.i)
    .slice(0, MOST_CREWS)
    .map(({ crew }) => crew);
}

/** Minutes asked of each craft against minutes there: above 1 where there is too little. Makers count for all they hold. */
function craftTension(
  stages: readonly Stage[],
  makers: readonly Maker[],
  calendars: CompiledMakers,
  craftIds: readonly string[],
): Float64Array {
  const asked = new Map<string, number>();
  for (const stage of stages) {
    const hands = stage.crew.reduce((sum, need) => sum + need.least, 0);
    for (const need of stage.crew) {
      const share = stage.effort.kind === 'duration' ? need.least : need.least / hands;
      asked.set(need.craftId, (asked.get(need.craftId) ?? 0) + minutesLeft(stage) * share);
    }
  }
  const there = new Map<string, number>();
  makers.forEach((maker, m) => {
    const minutes = calendarMinutes(calendars.ordinary[m]);
    for (const craft of maker.crafts) {
      there.set(
        craft.craftId,
        (there.get(craft.craftId) ?? 0) + (minutes * craft.pacePermille) / 1000 / maker.crafts.length,
      );
    }
  });
  return Float64Array.from(craftIds, (id) => (asked.get(id) ?? 0) / Math.max(1, there.get(id) ?? 0));
}

function calendarMinutes(calendar: Calendar): number {
  let sum = 0;
  for (let i = 0; i < calendar.count; i += 1) sum += calendar.ends[i] - calendar.starts[i];
  return sum;
}
