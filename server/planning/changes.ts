import type { KeyDateEffect, PlanChange } from '@common/contract';
import type { z } from 'zod';
import { comparePlans, sayChange, type FormatInstant, type Names, type Plan, type Problem } from '@common/planning';

type Effect = z.output<typeof KeyDateEffect>;

/** Every change between two plans in a sentence, with the makers that it matters to. */
export function sayChanges(before: Plan, after: Plan, names: Names, format: FormatInstant): PlanChange[] {
  const was = new Map(before.placements.map((placement) => [placement.stageId, placement]));
  const is = new Map(after.placements.map((placement) => [placement.stageId, placement]));
  return comparePlans(before, after).map((change) => {
    const [old, present] = [was.get(change.stageId), is.get(change.stageId)];
    const makerIds = [...(old?.crew ?? []), ...(present?.crew ?? [])].map((member) => member.makerId);
    return {
      stageId: change.stageId,
      sentence: sayChange(change, names, format),
      makerIds: [...new Set(makerIds)].sort(),
      fromStart: old?.work.at(0)?.start ?? null,
      toStart: present?.work.at(0)?.start ?? null,
    };
  });
}

/** How each key date of the problem fares in two plans. */
export function keyDateEffects(problem: Problem, before: Plan, after: Plan): Effect[] {
  const [was, is] = [finishes(before), finishes(after)];
  return problem.keyDates.map((keyDate) => ({
    keyDateId: keyDate.id,
    marginBefore: marginOf(keyDate, was),
    marginAfter: marginOf(keyDate, is),
  }));
}

/** When each placed stage is ready, its dwell included. */
export function finishes(plan: Plan): ReadonlyMap<string, number> {
  return new Map(plan.placements.map(({ stageId, dwellEnd }) => [stageId, dwellEnd]));
}

/** When everything that a key date waits for is ready; null where a part of it has no place. */
export function readyAt(keyDate: Problem['keyDates'][number], finish: ReadonlyMap<string, number>): number | null {
  const ends = keyDate.stageIds.map((stageId) => finish.get(stageId));
  return ends.every((end) => end !== undefined) && ends.length > 0 ? Math.max(...ends) : null;
}

function marginOf(keyDate: Problem['keyDates'][number], finish: ReadonlyMap<string, number>): number | null {
  const ready = readyAt(keyDate, finish);
  return ready === null ? null : keyDate.at - ready;
}
