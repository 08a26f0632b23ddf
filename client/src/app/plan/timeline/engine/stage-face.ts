import type { Directory, WorkingPlanView } from '@common/contract';
import type { Problem, Stage } from '@common/planning';

type DirectoryStage = Directory['stages'][number];
type DirectoryProduction = Directory['productions'][number];

/** What a stage looks like on the wall, wherever it stands: whose it is, what it is, how far it has come. */
export interface StageFace {
  readonly id: string;
  readonly productionId: string;
  readonly pieceId: string;
  readonly name: string;
  readonly pieceName: string;
  readonly productionName: string;
  /** Two letters, written wherever the hue is used. */
  readonly mark: string;
  /** Index into the productions' hues, 0 to 11. */
  readonly hue: number;
  readonly kind: DirectoryStage['kind'];
  readonly progress: Stage['progress']['kind'];
  readonly paused: boolean;
  readonly tentative: boolean;
  readonly pinned: boolean;
  /** Issued to begin before the freeze ends, so it stays unless asked. */
  readonly frozen: boolean;
}

/** Every stage's face by its id; a stage that the directory doesn't know still has one, named by what it is. */
export function readFaces(view: Pick<WorkingPlanView, 'directory' | 'problem'>): ReadonlyMap<string, StageFace> {
  const { directory } = view;
  const problem: Problem = view.problem;
  const named = new Map(directory.stages.map((stage) => [stage.id, stage]));
  const productions = new Map(directory.productions.map((production) => [production.id, production]));
  const pieces = new Map(directory.pieces.map((piece) => [piece.id, piece.name]));
  const frozen = frozenStages(problem);
  const faces = problem.stages.map((stage): StageFace => {
    const entry = named.get(stage.id);
    const production = productions.get(stage.productionId);
    return {
      id: stage.id,
      productionId: stage.productionId,
      pieceId: stage.pieceId,
      name: stageName(entry),
      pieceName: pieces.get(stage.pieceId) ?? 'A piece',
      ...productionFace(production),
      kind: entry?.kind ?? 'make',
      progress: stage.progress.kind,
      paused: entry?.state === 'paused',
      pinned: stage.pin !== null,
      frozen: frozen.has(stage.id),
    };
  });
  return new Map(faces.map((face) => [face.id, face]));
}

function stageName(entry: DirectoryStage | undefined): string {
  if (!entry) return 'A stage';
  return entry.nth !== null && entry.of !== null ? `${entry.name}, ${entry.nth} of ${entry.of}` : entry.name;
}

function productionFace(
  production: DirectoryProduction | undefined,
): Pick<StageFace, 'productionName' | 'mark' | 'hue' | 'tentative'> {
  return {
    productionName: production?.name ?? 'A production',
    mark: production?.mark ?? '––',
    hue: production?.hue ?? 0,
    tentative: production?.state === 'tentative',
  };
}

/** Stages that the freeze holds: issued to begin inside it, not begun, and not pinned since. */
function frozenStages(problem: Problem): ReadonlySet<string> {
  const issued = new Map(
    (problem.issued?.placements ?? []).map((placement) => [placement.stageId, placement.work[0]?.start]),
  );
  const held = problem.stages.filter((stage) => {
    const start = issued.get(stage.id);
    const inside = start !== undefined && start >= problem.horizon.start && start < problem.freezeUntil;
    return inside && stage.progress.kind === 'to-do' && stage.pin === null && stage.fixedStart === null;
  });
  return new Set(held.map((stage) => stage.id));
}
