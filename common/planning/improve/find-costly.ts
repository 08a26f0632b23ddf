import { type Compiled, FINISH_START, SOFT_WINDOW } from '../construct/compiled';
import type { Layout } from '../construct/layout';

/** Movable stages that cost money where they stand: done by hired hands or in overtime, or too late for a soft window, and what set it. */
export function findCostly(compiled: Compiled, layout: Layout): number[] {
  const { links, work } = compiled;
  const costly = new Set<number>();
  for (let stage = 0; stage < compiled.stageCount; stage += 1)
    if (layout.isPlaced[stage] === 1 && isPaidFor(compiled, layout, stage)) costly.add(stage);
  for (let link = 0; link < links.count; link += 1) {
    const from = links.from[link];
    const to = links.to[link];
    const leads = links.kind[link] === FINISH_START && links.afterWork[link] === 0;
    if (work.windowKind[from] !== SOFT_WINDOW || !leads) continue;
    if (layout.isPlaced[from] === 0 || layout.isPlaced[to] === 0) continue;
    if (layout.start[to] > layout.windowEnd(from)) costly.add(from).add(to);
  }
  return [...costly].filter((stage) => work.fixity[stage] === 0);
}

function isPaidFor({ makers }: Compiled, layout: Layout, stage: number): boolean {
  const crew = layout.crew[stage];
  if (!crew) return false;
  for (const maker of crew.makers) {
    if (makers.hourCost[maker] > 0) return true;
    if (makers.hasOvertime[maker] === 0) continue;
    for (let k = layout.spanAt[stage], left = layout.spanCount[stage]; left > 0; k += 2, left -= 1)
      if (!makers.ordinary[maker].covers(layout.spanPool[k], layout.spanPool[k + 1])) return true;
  }
  return false;
}
