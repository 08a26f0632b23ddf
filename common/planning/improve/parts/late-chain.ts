import { type PartChoice, compete, sortByKeys, withFollowers } from './part';

/** Stages taken out with a chain at most. */
const MOST_COMPETITORS = 24;
const MOST_OF_CHAIN = 40;
const DAY = 1440;

/**
 * A stage that is amiss, all that follows it, and some of those that have its hands or bays in the time before: the chain chooses
 * first, by up to some days. A related part of the plan is opened and the rest left alone (Shaw 1998; on schedules with
 * resources Palpant, Artigues & Michelon 2004).
 */
export const lateChain: PartChoice = (_, scene) => {
  const { amiss, chance, layout, order } = scene;
  const stage = amiss[chance.below(amiss.length)];
  const chain = withFollowers(scene, stage, MOST_OF_CHAIN);
  const isInChain = new Set(chain);
  const pull = DAY * 2 ** (6 * chance.share() - 1);
  const start = layout.start[stage];
  const likely = Math.min(1, (MOST_COMPETITORS / 2) * (0.2 + chance.share()) * 0.1);
  const part = [...chain];
  for (const other of order) {
    if (part.length >= chain.length + MOST_COMPETITORS || layout.start[other] > start + DAY) break;
    if (layout.end[other] < start - pull || isInChain.has(other) || chance.share() >= likely) continue;
    if (compete(scene, stage, other)) part.push(other);
  }
  return sortByKeys(part, (one) => layout.start[one] - (isInChain.has(one) ? pull : 0));
};
