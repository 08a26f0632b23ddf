import type { Operator } from './operator';

/** Swaps two stages that choose not far from one another. */
export const swapNeighbours: Operator = (genome, { chance }) => {
  const { order } = genome;
  if (order.length < 2) return;
  const p = chance.below(order.length - 1);
  const q = Math.min(order.length - 1, p + 1 + chance.below(5));
  const stage = order[p];
  order[p] = order[q];
  order[q] = stage;
};
