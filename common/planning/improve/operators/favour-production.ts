import type { Operator } from './operator';

/** Lets one production's stages choose earlier than others': one of a late date's where something is late. */
export const favourProduction: Operator = (genome, { compiled, chance, late, start }) => {
  const { order } = genome;
  const { productionOf } = compiled.dates;
  const stage = late.length > 0 ? late[chance.below(late.length)] : order[chance.below(order.length)];
  const favoured = productionOf[stage];
  const from = start[stage];
  const pull = 1 + chance.below(Math.max(2, order.length >> 2));
  const keys = new Float64Array(order.length);
  for (let p = 0; p < order.length; p += 1) {
    const isPulled = productionOf[order[p]] === favoured && start[order[p]] >= from;
    keys[order[p]] = isPulled ? p - pull - 0.5 : p;
  }
  order.sort((a, b) => keys[a] - keys[b]);
};
