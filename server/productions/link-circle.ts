/** One stage waits for another. */
export interface Wait {
  readonly fromStageId: string;
  readonly toStageId: string;
}

/** A stage's place in its piece. */
export interface PlacedStage {
  readonly id: string;
  readonly pieceId: string;
  readonly position: number;
}

/**
 * The waits that are understood without being written: a piece whose stages have no link among themselves is made one stage
 * after another.
 */
export function understoodWaits(stages: readonly PlacedStage[], links: readonly Wait[]): Wait[] {
  const pieceOf = new Map(stages.map((stage) => [stage.id, stage.pieceId]));
  const linked = new Set(
    links
      .filter((link) => pieceOf.get(link.fromStageId) === pieceOf.get(link.toStageId))
      .map((link) => pieceOf.get(link.fromStageId)),
  );
  const last = new Map<string, string>();
  const waits: Wait[] = [];
  for (const stage of [...stages].sort((a, b) => a.position - b.position)) {
    if (linked.has(stage.pieceId)) continue;
    const before = last.get(stage.pieceId);
    if (before !== undefined) waits.push({ fromStageId: before, toStageId: stage.id });
    last.set(stage.pieceId, stage.id);
  }
  return waits;
}

/**
 * The circle that a new wait would close, as stage ids from its `toStageId` round to its `fromStageId`; null where it closes
 * none. The shortest, by breadth-first search.
 */
export function circleClosedBy(wait: Wait, waits: readonly Wait[]): readonly string[] | null {
  const followers = new Map<string, string[]>();
  for (const { fromStageId, toStageId } of waits) {
    followers.set(fromStageId, [...(followers.get(fromStageId) ?? []), toStageId]);
  }
  const reachedFrom = new Map<string, string | null>([[wait.toStageId, null]]);
  const queue = [wait.toStageId];
  for (let at = 0; at < queue.length; at += 1) {
    if (queue[at] === wait.fromStageId) return pathTo(queue[at], reachedFrom);
    for (const next of followers.get(queue[at]) ?? []) {
      if (reachedFrom.has(next)) continue;
      reachedFrom.set(next, queue[at]);
      queue.push(next);
    }
  }
  return null;
}

function pathTo(end: string, reachedFrom: ReadonlyMap<string, string | null>): string[] {
  const path: string[] = [];
  for (let at: string | null = end; at !== null; at = reachedFrom.get(at) ?? null) path.unshift(at);
  return path;
}
