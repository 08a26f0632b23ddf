import type { Operator } from './operator';

/** Gives one stage another crew, or leaves the choice to the engine again. */
export const changeCrew: Operator = (genome, { compiled, chance, late }) => {
  const pool = late.length > 0 && chance.share() < 0.7 ? late : genome.order;
  for (let tries = 0; tries < 8; tries += 1) {
    const stage = pool[chance.below(pool.length)];
    const crews = compiled.work.crews[stage].length;
    if (crews < 2) continue;
    genome.crewChoice[stage] = genome.crewChoice[stage] >= 0 && chance.share() < 0.5 ? -1 : chance.below(crews);
    return;
  }
};
