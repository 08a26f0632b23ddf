import { z } from 'zod';
import { endpoint, OFFICE, WORKSHOP, ById } from './endpoint';
import { Id, Instant, Minutes, Name, Note, Removal, Version } from './primitives';
import { PieceView } from './piece';
import { StageDraft, StageLink, StageView } from './stage';
import { ProductionView } from './productions';

export const PieceCreate = z.object({
  name: Name,
  note: Note.default(''),
  recipe: z
    .object({
      recipeId: Id,
      size: z.number().positive().max(10_000),
      casts: z.int().min(1).max(200),
      moulds: z.int().min(0).max(20),
      coats: z.int().min(1).max(20),
    })
    .nullable(),
});
export const PieceChange = z
  .object({ name: Name, note: Note, position: z.int().min(0) })
  .partial()
  .extend({ version: Version });

export const StageCreate = StageDraft.extend({ afterStageIds: z.array(Id).max(20) });
export const StageChange = StageDraft.partial().extend({ position: z.int().min(0).optional(), version: Version });
export const LinkCreate = StageLink.omit({ id: true });

/** A maker's or manager's report on a stage; `key` makes a repeated send harmless. */
export const StageReport = z.object({
  key: Id,
  at: Instant,
  spentMinutes: Minutes.optional(),
  remainingMinutes: Minutes.optional(),
  note: Note.optional(),
});

/** What a sign-off was decided as. */
export const SignOffDecision = z.object({
  decision: z.enum(['approved', 'changes-asked']),
  at: Instant,
  note: Note,
  version: Version,
});

export const pieceEndpoints = {
  createPiece: endpoint({
    method: 'POST',
    path: '/api/productions/:id/pieces',
    who: OFFICE,
    summary: 'Add a piece, from a recipe or empty',
    params: ById,
    body: PieceCreate,
    response: ProductionView,
    status: 201,
  }),
  changePiece: endpoint({
    method: 'PATCH',
    path: '/api/pieces/:id',
    who: OFFICE,
    summary: 'Change a piece',
    params: ById,
    body: PieceChange,
    response: PieceView,
  }),
  removePiece: endpoint({
    method: 'DELETE',
    path: '/api/pieces/:id',
    who: OFFICE,
    summary: 'Remove a piece on which no work has begun',
    params: ById,
    query: Removal,
  }),
  createStage: endpoint({
    method: 'POST',
    path: '/api/pieces/:id/stages',
    who: OFFICE,
    summary: 'Add a stage to a piece',
    params: ById,
    body: StageCreate,
    response: StageView,
    status: 201,
  }),
  changeStage: endpoint({
    method: 'PATCH',
    path: '/api/stages/:id',
    who: OFFICE,
    summary: 'Change a stage',
    params: ById,
    body: StageChange,
    response: StageView,
  }),
  removeStage: endpoint({
    method: 'DELETE',
    path: '/api/stages/:id',
    who: OFFICE,
    summary: 'Remove a stage on which no work has begun',
    params: ById,
    query: Removal,
  }),
  createLink: endpoint({
    method: 'POST',
    path: '/api/links',
    who: OFFICE,
    summary: 'Let one stage wait for another; a circle is refused, named stage by stage',
    body: LinkCreate,
    response: StageLink,
    status: 201,
  }),
  removeLink: endpoint({
    method: 'DELETE',
    path: '/api/links/:id',
    who: OFFICE,
    summary: 'Remove a link',
    params: ById,
  }),
  startStage: endpoint({
    method: 'POST',
    path: '/api/stages/:id/start',
    who: WORKSHOP,
    summary: 'Report that work began',
    params: ById,
    body: StageReport,
    response: StageView,
  }),
  pauseStage: endpoint({
    method: 'POST',
    path: '/api/stages/:id/pause',
    who: WORKSHOP,
    summary: 'Report that work stopped for now',
    params: ById,
    body: StageReport,
    response: StageView,
  }),
  finishStage: endpoint({
    method: 'POST',
    path: '/api/stages/:id/finish',
    who: WORKSHOP,
    summary: 'Report that work ended; its dwell begins',
    params: ById,
    body: StageReport,
    response: StageView,
  }),
  decideSignOff: endpoint({
    method: 'POST',
    path: '/api/stages/:id/decision',
    who: ['owner', 'manager', 'client'],
    summary: "Decide a sign-off of one's own production",
    params: ById,
    body: SignOffDecision,
    response: StageView,
  }),
};
