import type { Placement, Problem, Stage } from '@common/planning';
import type { RowsBy } from './board-rows';

/** Why a row can't take the stage in hand; the words are made elsewhere. */
export type Refusal =
  | { readonly kind: 'wrong-craft'; readonly craftId: string }
  | { readonly kind: 'in-crew-already' }
  | { readonly kind: 'wrong-bay' };

/** The makers and bays that dropping on a row asks for, or why it can't be; null leaves a side to the engine. */
export type Target =
  | { readonly kind: 'takes'; readonly makerIds: readonly string[] | null; readonly bayIds: readonly string[] | null }
  | { readonly kind: 'refuses'; readonly refusal: Refusal };

interface TargetQuestion {
  readonly problem: Problem;
  readonly stage: Stage;
  readonly placement: Placement;
  readonly by: RowsBy;
  /** The maker or bay whose row the stage was taken from, and the one whose row it is over. */
  readonly fromId: string;
  readonly toId: string;
}

/**
 * What it means to let go over a row. On a maker's or a bay's row the drop names that maker or bay, on its own row too: what one
 * drops on is what one gets. A piece's row says nothing about either.
 */
export function targetOf(question: TargetQuestion): Target {
  switch (question.by) {
    case 'piece':
      return { kind: 'takes', makerIds: null, bayIds: null };
    case 'maker':
      return makerTarget(question);
    case 'bay':
      return bayTarget(question);
  }
}

function makerTarget({ problem, placement, fromId, toId }: TargetQuestion): Target {
  const crew = placement.crew.map((member) => member.makerId);
  if (fromId === toId) return { kind: 'takes', makerIds: crew, bayIds: null };
  if (crew.includes(toId)) return { kind: 'refuses', refusal: { kind: 'in-crew-already' } };
  const craftId = placement.crew.find((member) => member.makerId === fromId)?.craftId;
  const maker = problem.makers.find((one) => one.id === toId);
  const holds = maker?.crafts.some((craft) => craft.craftId === craftId) ?? false;
  if (craftId === undefined || !holds) {
    return { kind: 'refuses', refusal: { kind: 'wrong-craft', craftId: craftId ?? '' } };
  }
  return { kind: 'takes', makerIds: crew.map((id) => (id === fromId ? toId : id)), bayIds: null };
}

function bayTarget({ stage, placement, fromId, toId }: TargetQuestion): Target {
  const bays = placement.bayIds;
  if (fromId === toId) return { kind: 'takes', makerIds: null, bayIds: bays };
  const place = bays.indexOf(fromId);
  if (place < 0 || !stage.places[place]?.bayIds.includes(toId)) {
    return { kind: 'refuses', refusal: { kind: 'wrong-bay' } };
  }
  return { kind: 'takes', makerIds: null, bayIds: bays.map((id, index) => (index === place ? toId : id)) };
}

/** Whether a stage can be taken in hand at all, and if not, why. */
export function holdable(stage: Stage): 'yes' | 'started' | 'finished' | 'visit' {
  if (stage.progress.kind !== 'to-do') return stage.progress.kind;
  return stage.fixedStart !== null ? 'visit' : 'yes';
}

/** Crews that could take a stage in place of its own, each with one maker changed for another who holds the same craft. */
export function otherCrews(
  problem: Problem,
  placement: Placement,
): { readonly makerId: string; readonly makerIds: readonly string[] }[] {
  const crew = placement.crew.map((member) => member.makerId);
  const [first] = placement.crew;
  if (!first) return [];
  return problem.makers
    .filter((maker) => !crew.includes(maker.id) && maker.crafts.some((craft) => craft.craftId === first.craftId))
    .map((maker) => ({ makerId: maker.id, makerIds: [maker.id, ...crew.slice(1)] }));
}

/** Bays that could take a stage in place of its own, each with one place changed. */
export function otherBays(
  stage: Stage,
  placement: Placement,
): { readonly bayId: string; readonly bayIds: readonly string[] }[] {
  return stage.places.flatMap((place, index) =>
    place.bayIds
      .filter((bayId) => bayId !== placement.bayIds[index])
      .map((bayId) => ({ bayId, bayIds: placement.bayIds.map((own, at) => (at === index ? bayId : own)) })),
  );
}
