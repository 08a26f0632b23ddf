import type { Problem } from '../problem/problem';
import { NEVER } from './calendar';
import { type CompiledLinks, FINISH_FINISH, FINISH_START, START_FINISH, START_START } from './compiled';

const KINDS = {
  'finish-start': FINISH_START,
  'start-start': START_START,
  'finish-finish': FINISH_FINISH,
  'start-finish': START_FINISH,
} as const;

/** Lays links out as columns, in an order of their own that does not depend on the problem's. */
export function compileLinks(problem: Problem, stageCount: number, index: ReadonlyMap<string, number>): CompiledLinks {
  const rows = problem.links.map((link) => [
    index.get(link.fromStageId) ?? -1,
    index.get(link.toStageId) ?? -1,
    KINDS[link.kind],
    link.after === 'work' ? 1 : 0,
    link.minGapMinutes,
    link.maxGapMinutes ?? NEVER,
    link.time === 'working' ? 1 : 0,
  ]);
  rows.sort((a, b) => {
    for (let k = 0; k < a.length; k += 1) if (a[k] !== b[k]) return a[k] - b[k];
    return 0;
  });
  const column = (k: number): Int32Array => Int32Array.from(rows, (row) => row[k]);
  const from = column(0);
  const to = column(1);
  const incoming = groupBy(to, stageCount);
  const outgoing = groupBy(from, stageCount);
  return {
    count: rows.length,
    from,
    to,
    kind: Uint8Array.from(column(2)),
    afterWork: Uint8Array.from(column(3)),
    minGap: column(4),
    maxGap: column(5),
    isWorking: Uint8Array.from(column(6)),
    inOf: incoming.offsets,
    inLinks: incoming.members,
    outOf: outgoing.offsets,
    outLinks: outgoing.members,
  };
}

/** Positions of a column grouped by its values: group `g` is `members[offsets[g]..offsets[g + 1]]`, in order. */
export function groupBy(
  column: Int32Array,
  groups: number,
): { readonly offsets: Int32Array; readonly members: Int32Array } {
  const offsets = new Int32Array(groups + 1);
  for (const group of column) offsets[group + 1] += 1;
  for (let g = 0; g < groups; g += 1) offsets[g + 1] += offsets[g];
  const next = offsets.slice();
  const members = new Int32Array(column.length);
  column.forEach((group, i) => {
    members[next[group]] = i;
    next[group] += 1;
  });
  return { offsets, members };
}
