import type { Operator } from './operator';

/** Lets one stage that a late date waits for use overtime, or takes overtime away where nothing is late any more. */
export const toggleOvertime: Operator = (genome, { chance, late }) => {
  if (late.length > 0) {
    const stage = late[chance.below(late.length)];
    genome.overtime[stage] = genome.overtime[stage] === 1 && chance.share() < 0.5 ? 0 : 1;
    return;
  }
  const paid = genome.order.filter((stage) => genome.overtime[stage] === 1);
  if (paid.length > 0) genome.overtime[paid[chance.below(paid.length)]] = 0;
};
