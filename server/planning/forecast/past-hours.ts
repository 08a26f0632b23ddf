import { MoreThan, type EntityManager } from 'typeorm';
import type { PastHoursView } from '@common/contract';
import { learnOverrun, pertMoments, PRIOR_OVERRUN, type LogFactor, type PastStage } from '@common/forecast';
import { Craft, Stage } from '@database/entities';

/** Work older than this says little of how the studio works now. */
const LOOK_BACK_DAYS = 2 * 365;
const MS_PER_DAY = 86_400_000;

/** A finished stage with the craft that it is counted under. */
export interface PastWork extends PastStage {
  readonly craftId: string | null;
}

/** Hands-on work finished within the last two years, of every production, with the hours that were entered for it. */
export async function readPastWork(manager: EntityManager, at: Date): Promise<readonly PastWork[]> {
  const finished = await manager.find(Stage, {
    where: {
      state: 'finished',
      kind: 'make',
      spentMinutes: MoreThan(0),
      finishedAt: MoreThan(new Date(at.getTime() - LOOK_BACK_DAYS * MS_PER_DAY)),
    },
    relations: { crew: true, piece: true },
    order: { id: 'ASC' },
  });
  return finished.map(({ piece, lowMinutes, likelyMinutes, highMinutes, spentMinutes, crew }) => ({
    productionId: piece.productionId,
    estimate: { low: lowMinutes, likely: likelyMinutes, high: highMinutes },
    actualMinutes: spentMinutes,
    craftId: [...crew].sort((a, b) => a.position - b.position).at(0)?.craftId ?? null,
  }));
}

/** What the settings page shows of them. */
export async function pastHoursView(manager: EntityManager, at: Date): Promise<PastHoursView> {
  const past = await readPastWork(manager, at);
  const names = new Map((await manager.find(Craft)).map(({ id, name }) => [id, name]));
  const byCraft = new Map<string, PastWork[]>();
  for (const work of past) {
    if (work.craftId !== null) byCraft.set(work.craftId, [...(byCraft.get(work.craftId) ?? []), work]);
  }
  const crafts = [...byCraft].map(([craftId, works]) => ({
    craftId,
    name: names.get(craftId) ?? '',
    stages: works.length,
    expectedMinutes: Math.round(works.reduce((sum, { estimate }) => sum + pertMoments(estimate).mean, 0)),
    actualMinutes: works.reduce((sum, { actualMinutes }) => sum + actualMinutes, 0),
  }));
  return {
    stages: past.length,
    productions: new Set(past.map(({ productionId }) => productionId)).size,
    prior: sayFactor({ meanLog: PRIOR_OVERRUN.meanLog, sdLog: PRIOR_OVERRUN.sdLog }),
    learnt: sayFactor(learnOverrun(past)),
    crafts: crafts.sort((a, b) => a.name.localeCompare(b.name) || a.craftId.localeCompare(b.craftId)),
  };
}

/** A factor by its median and one standard deviation about it, per mille. */
export function sayFactor({ meanLog, sdLog }: LogFactor): { middlePermille: number; spreadPermille: number } {
  return {
    middlePermille: Math.round(1000 * Math.exp(meanLog)),
    spreadPermille: Math.round(1000 * (Math.exp(sdLog) - 1)),
  };
}
