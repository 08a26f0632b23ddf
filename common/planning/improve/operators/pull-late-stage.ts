import { moveEntry, type Operator } from './operator';

/** Lets one stage that a late date waits for choose its place earlier; any stage where nothing is late. */
export const pullLateStage: Operator = (genome, { chance, late }) => {
  const { order } = genome;
  const stage = late.length > 0 ? late[chance.below(late.length)] : order[chance.below(order.length)];
  const from = order.indexOf(stage);
  const reach = 1 + chance.below(Math.min(from + 1, 8 + (order.length >> 2)));
  moveEntry(order, from, Math.max(0, from - reach));
};
