import type { Span } from '../../time/span';
import type { CrewMember, Placement, Plan } from '../problem/plan';
import { FINISHED, STARTED } from './compiled';
import type { Layout } from './layout';

/** The plan that a layout stands for, with ids and instants again; placements in the order of stage ids. */
export function toPlan(layout: Layout): Plan {
  const { compiled } = layout;
  const placements: Placement[] = [];
  for (let stage = 0; stage < compiled.stageCount; stage += 1) {
    if (layout.isPlaced[stage] === 0) continue;
    placements.push({
      stageId: compiled.stages[stage].id,
      work: workOf(layout, stage),
      crew: crewOf(layout, stage),
      bayIds: [...(layout.housing[stage] ?? [])].map((bay) => compiled.bayIds[bay]).filter((id) => id !== undefined),
      dwellEnd: layout.finish[stage] + compiled.origin,
    });
  }
  return { placements };
}

function workOf(layout: Layout, stage: number): Span[] {
  const { origin, work } = layout.compiled;
  const start = layout.start[stage] + origin;
  if (work.fixity[stage] === FINISHED) return [{ start, end: layout.end[stage] + origin }];
  // What a begun stage did before now is told by an empty span at its start.
  const spans: Span[] = work.fixity[stage] === STARTED ? [{ start, end: start }] : [];
  for (let k = layout.spanAt[stage], left = layout.spanCount[stage]; left > 0; k += 2, left -= 1) {
    spans.push({ start: layout.spanPool[k] + origin, end: layout.spanPool[k + 1] + origin });
  }
  return spans.length > 0 ? spans : [{ start, end: start }];
}

function crewOf(layout: Layout, stage: number): CrewMember[] {
  const { compiled } = layout;
  const crew = layout.crew[stage];
  if (!crew) return [];
  return [...crew.makers].map((maker, i) => ({
    makerId: compiled.makerIds[maker],
    craftId: compiled.craftIds[crew.crafts[i]] ?? '',
  }));
}
