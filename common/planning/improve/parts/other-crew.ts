import { type PartChoice, withFollowers } from './part';

const MOST_OF_CHAIN = 30;

/** A stage that is amiss with another crew, or with overtime allowed or taken away, and what follows it. */
export const otherCrew: PartChoice = (genome, scene) => {
  const { amiss, chance, compiled, layout } = scene;
  const stage = amiss[chance.below(amiss.length)];
  const crews = compiled.work.crews[stage].length;
  if (chance.share() < 0.5) {
    genome.overtime[stage] = genome.overtime[stage] === 1 ? 0 : 1;
    if (genome.overtime[stage] === 0) genome.crewChoice[stage] = -1;
  } else if (crews > 1) {
    genome.crewChoice[stage] = genome.crewChoice[stage] >= 0 && chance.share() < 0.5 ? -1 : chance.below(crews);
  } else return [];
  const chain = withFollowers(scene, stage, MOST_OF_CHAIN);
  return chain.sort((a, b) => layout.start[a] - layout.start[b] || a - b);
};
