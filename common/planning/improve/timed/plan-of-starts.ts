import type { Compiled } from '../../construct/compiled';
import type { Placement, Plan } from '../../problem/plan';

/** The plan of a timed problem whose stages, in compiled order, start so many minutes from the horizon's start. */
export function planOfStarts(compiled: Compiled, starts: Int32Array): Plan {
  const { origin, work, bayIds } = compiled;
  const placements = compiled.stages.map((stage, k): Placement => {
    const start = starts[k] + origin;
    const end = start + work.minutes[k];
    const housing = [...work.housings[k][0]].map((bay) => bayIds[bay]);
    return { stageId: stage.id, work: [{ start, end }], crew: [], bayIds: housing, dwellEnd: end };
  });
  return { placements };
}
