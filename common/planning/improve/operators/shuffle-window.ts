import type { Operator } from './operator';

/** Reorders the stages that choose within a short stretch of the order: a small neighbourhood opened at random (Shaw 1998). */
export const shuffleWindow: Operator = (genome, { chance }) => {
  const { order } = genome;
  const size = Math.min(order.length, 3 + chance.below(8));
  const from = chance.below(order.length - size + 1);
  for (let k = size - 1; k > 0; k -= 1) {
    const other = chance.below(k + 1);
    const stage = order[from + k];
    order[from + k] = order[from + other];
    order[from + other] = stage;
  }
};
