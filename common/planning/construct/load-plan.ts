import type { Placement, Plan } from '../problem/plan';
import type { Compiled, Crew } from './compiled';
import { FINISHED, STARTED } from './compiled';
import { type Layout, newFit, pushSpan } from './layout';

/** Lays every placement of a plan into a layout exactly as it is; placements of unknown stages are passed over. */
export function loadPlan(layout: Layout, plan: Plan): void {
  const { compiled } = layout;
  layout.clear();
  for (const placement of plan.placements) {
    const stage = compiled.stageIndex.get(placement.stageId);
    if (stage === undefined || placement.work.length === 0 || layout.isPlaced[stage] === 1) continue;
    loadPlacement(layout, stage, placement);
  }
}

function loadPlacement(layout: Layout, stage: number, placement: Placement): void {
  const { compiled } = layout;
  const { origin, work } = compiled;
  const fit = newFit();
  fit.start = placement.work[0].start - origin;
  fit.end = placement.work[placement.work.length - 1].end - origin;
  fit.finish = placement.dwellEnd - origin;
  const spans =
    work.fixity[stage] === FINISHED ? [] : work.fixity[stage] === STARTED ? placement.work.slice(1) : placement.work;
  for (const span of spans) if (span.end > span.start) pushSpan(fit, span.start - origin, span.end - origin);
  const crew = crewOf(compiled, stage, placement);
  const housing = Int32Array.from(placement.bayIds, (id) => compiled.bayIds.indexOf(id));
  layout.place(stage, fit, crew, housing);
}

/** The compiled crew with the same makers in the same crafts, or one made for the purpose; null where nobody is there. */
function crewOf(compiled: Compiled, stage: number, placement: Placement): Crew | null {
  const seats = placement.crew
    .map((member) => [compiled.makerIds.indexOf(member.makerId), compiled.craftIds.indexOf(member.craftId)])
    .filter(([maker]) => maker >= 0);
  if (seats.length === 0) return null;
  const has = (crew: Crew): boolean =>
    crew.makers.length === seats.length &&
    seats.every(([maker, craft]) => crew.makers.some((other, k) => other === maker && crew.crafts[k] === craft));
  const known = compiled.work.crews[stage].find(has);
  if (known) return known;
  let output = -compiled.work.crewLoss[stage] * (seats.length - 1);
  for (const [maker, craft] of seats) {
    const held = compiled.problem.makers
      .find((one) => one.id === compiled.makerIds[maker])
      ?.crafts.find((one) => one.craftId === compiled.craftIds[craft]);
    output += held?.pacePermille ?? 0;
  }
  return {
    index: -1,
    makers: Int32Array.from(seats, ([maker]) => maker),
    crafts: Int32Array.from(seats, ([, craft]) => craft),
    outputPermille: output,
    regretPermille: 0,
  };
}
