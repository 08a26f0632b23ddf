import type { Fault, NamedThing } from './fault';
import type { Problem, Stage } from './problem';

/** Ids used twice, and ids that nothing has. */
export function findIdFaults(problem: Problem): Fault[] {
  const known = {
    maker: new Set(problem.makers.map((maker) => maker.id)),
    bay: new Set(problem.bays.map((bay) => bay.id)),
    stage: new Set(problem.stages.map((stage) => stage.id)),
    advance: new Set(problem.advances.map((profile) => profile.id)),
  };
  const faults: Fault[] = [
    ...findDuplicates('maker', problem.makers),
    ...findDuplicates('bay', problem.bays),
    ...findDuplicates('stage', problem.stages),
    ...findDuplicates('key-date', problem.keyDates),
    ...findDuplicates('advance', problem.advances),
  ];
  const want = (what: keyof typeof known, ids: readonly string[], askedBy: string): void => {
    for (const id of ids) if (!known[what].has(id)) faults.push({ kind: 'unknown-id', what, id, askedBy });
  };
  for (const stage of problem.stages) {
    for (const [what, ids] of idsOf(stage)) want(what, ids, stage.id);
  }
  for (const link of problem.links) {
    want('stage', [link.fromStageId], link.toStageId);
    want('stage', [link.toStageId], link.fromStageId);
  }
  for (const date of problem.keyDates) want('stage', date.stageIds, date.id);
  return faults;
}

function findDuplicates(what: NamedThing, items: readonly { readonly id: string }[]): Fault[] {
  const seen = new Set<string>();
  const twice = new Set<string>();
  for (const { id } of items) (seen.has(id) ? twice : seen).add(id);
  return [...twice].map((id) => ({ kind: 'duplicate-id', what, id }));
}

function idsOf(stage: Stage): ['maker' | 'bay' | 'stage' | 'advance', readonly string[]][] {
  const holds = stage.places.flatMap((place) => (place.hold.kind === 'until-stage' ? [place.hold.stageId] : []));
  const begun = stage.progress.kind === 'to-do' ? null : stage.progress;
  return [
    ['bay', stage.places.flatMap((place) => place.bayIds)],
    ['stage', holds],
    ['advance', Object.values(stage.dwell?.advance ?? {})],
    ['maker', [...(stage.pin?.makerIds ?? []), ...(begun?.makerIds ?? [])]],
    ['bay', [...(stage.pin?.bayIds ?? []), ...(begun?.bayIds ?? [])]],
  ];
}
