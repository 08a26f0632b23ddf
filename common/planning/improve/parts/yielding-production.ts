import { type PartChoice, sortByKeys } from './part';

const MOST_STAGES = 60;
const DAY = 1440;

/** What is left of two productions around a stage that is amiss: its own, which chooses first, and another that may give way. */
export const yieldingProduction: PartChoice = (_, { amiss, chance, compiled, layout, order }) => {
  const { productionOf, productionCount } = compiled.dates;
  const stage = amiss[chance.below(amiss.length)];
  const own = productionOf[stage];
  const other = chance.below(productionCount);
  const from = layout.start[stage] - DAY * 10 * chance.share();
  const part: number[] = [];
  for (const one of order) {
    if (part.length === MOST_STAGES) break;
    if (layout.start[one] < from || (productionOf[one] !== own && productionOf[one] !== other)) continue;
    part.push(one);
  }
  const pull = 10 * DAY * chance.share();
  return sortByKeys(part, (one) => layout.start[one] - (productionOf[one] === own ? pull : 0));
};
