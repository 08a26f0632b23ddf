import type { Problem, Stage } from '../problem/problem';
import { CapacityCurve, type Supply } from './capacity-curve';

/** A stage that takes of a supply: its position in the problem and the least it takes. */
export interface EnergyUse {
  readonly stage: number;
  /** Maker-minutes times pace in permille, or unit-minutes of a bay; above 0. */
  readonly amount: number;
}

/** A craft, a bay or a set of them as a supply of capacity, and who takes of it. */
export interface EnergySource {
  readonly kind: 'craft' | 'bay';
  readonly ids: readonly string[];
  readonly curve: CapacityCurve;
  readonly uses: readonly EnergyUse[];
}

/**
 * Every craft alone, all crafts together, and every choice of bays that stages ask for. `workMinutes` are the least minutes of
 * work that each stage has left, by position; sources that nothing is asked of are left out.
 */
export function energySources(problem: Problem, workMinutes: readonly number[]): EnergySource[] {
  const crafts = [...new Set(problem.stages.flatMap((stage) => stage.crew.map((need) => need.craftId)))].sort();
  const sets = crafts.length > 1 ? [...crafts.map((craft) => [craft]), crafts] : crafts.map((craft) => [craft]);
  const sources = [...sets.map((ids) => craftSource(problem, ids, workMinutes)), ...baySources(problem, workMinutes)];
  return sources.filter((source) => source.uses.length > 0);
}

function craftSource(problem: Problem, ids: readonly string[], workMinutes: readonly number[]): EnergySource {
  const supplies: Supply[] = [];
  let slowest = Infinity;
  for (const maker of problem.makers) {
    const paces = maker.crafts.filter((craft) => ids.includes(craft.craftId)).map((craft) => craft.pacePermille);
    if (paces.length === 0) continue;
    const rate = Math.max(...paces);
    slowest = Math.min(slowest, ...paces);
    for (const { start, end } of [...maker.shifts, ...maker.overtime]) supplies.push({ start, end, rate });
  }
  const pace = Number.isFinite(slowest) ? slowest : 0;
  const uses = usesBy(problem, (stage, k) => craftAmount(stage, ids, pace, workMinutes[k]));
  return { kind: 'craft', ids, curve: new CapacityCurve(supplies), uses };
}

/** Shared-out work by one set of crafts takes all its minutes at the usual pace; else the least crew for the least time. */
function craftAmount(stage: Stage, ids: readonly string[], slowest: number, minutes: number): number {
  if (stage.progress.kind === 'finished' || stage.continuity === 'clock') return 0;
  const needs = stage.crew.filter((need) => ids.includes(need.craftId));
  if (needs.length === 0) return 0;
  if (stage.effort.kind === 'person-minutes' && needs.length === stage.crew.length)
    return 1000 * (stage.progress.kind === 'started' ? stage.progress.remainingMinutes : stage.effort.minutes);
  return needs.reduce((sum, need) => sum + need.least, 0) * minutes * slowest;
}

/** A place is occupied for the work at least, in one of the bays it may be in. */
function baySources(problem: Problem, workMinutes: readonly number[]): EnergySource[] {
  const choices = new Map<string, { ids: readonly string[]; uses: EnergyUse[] }>();
  problem.stages.forEach((stage, k) => {
    const minutes = workMinutes[k];
    if (stage.progress.kind === 'finished' || !(minutes > 0 && Number.isFinite(minutes))) return;
    for (const { bayIds, units } of stage.places) {
      const key = [...bayIds].sort().join('\n');
      const choice = choices.get(key) ?? { ids: bayIds, uses: [] };
      choice.uses.push({ stage: k, amount: units * minutes });
      choices.set(key, choice);
    }
  });
  const capacities = new Map(problem.bays.map((bay) => [bay.id, bay.capacity]));
  // Holds may run past the horizon, so the supply goes on for ever as far as any plan is concerned.
  const { start } = problem.horizon;
  const end = problem.horizon.end + FOR_EVER_MINUTES;
  return [...choices.values()].map(({ ids, uses }): EnergySource => {
    const rate = ids.reduce((sum, id) => sum + (capacities.get(id) ?? 0), 0);
    return { kind: 'bay', ids, curve: new CapacityCurve([{ start, end, rate }]), uses };
  });
}

const FOR_EVER_MINUTES = 10_000_000;

function usesBy(problem: Problem, amountOf: (stage: Stage, position: number) => number): EnergyUse[] {
  return problem.stages.flatMap((stage, k) => {
    const amount = amountOf(stage, k);
    return amount > 0 && Number.isFinite(amount) ? [{ stage: k, amount }] : [];
  });
}
