import { type PartChoice, sortByKeys } from './part';

const MOST_STAGES = 40;
const DAY = 1440;

/** Everything that begins within some days around a stage that is amiss, in an order shaken by chance (Palpant, Artigues & Michelon 2004). */
export const timeWindow: PartChoice = (_, { amiss, chance, layout, order }) => {
  const middle = layout.start[amiss[chance.below(amiss.length)]];
  const days = 0.5 + 4 * chance.share();
  const part: number[] = [];
  for (const stage of order) {
    if (layout.start[stage] > middle + DAY || part.length === MOST_STAGES) break;
    if (layout.start[stage] >= middle - days * DAY) part.push(stage);
  }
  const shake = 2 * DAY * chance.share() ** 2;
  return sortByKeys(part, (stage) => layout.start[stage] + shake * (chance.share() - 0.5));
};
