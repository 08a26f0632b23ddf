import { z } from 'zod';
import { KEY_DATE_KINDS } from '../domain/key-date';
import { endpoint, OFFICE, WORKSHOP, ById } from './endpoint';
import { PieceView } from './piece';
import { Id, Instant, Name, Note, Removal, Version } from './primitives';
import { PurchaseView } from './purchases';
import { StageLink, StageView } from './stage';

export const ClientView = z.object({ id: Id, name: z.string(), version: Version });
export type ClientView = z.infer<typeof ClientView>;

export { KEY_DATE_KINDS };
const keyDateFields = {
  kind: z.enum(KEY_DATE_KINDS),
  at: Instant,
  strength: z.enum(['hard', 'wished']),
  weight: z.int().min(1).max(1000),
  /** The pieces that have to be ready by it; empty for every piece of the production. */
  pieceIds: z.array(Id).max(500),
};
export const KeyDateDraft = z.object({ ...keyDateFields, pieceIds: keyDateFields.pieceIds.default([]) });
export const KeyDateChange = z.object(keyDateFields).partial().extend({ version: Version });
export const KeyDateView = z.object({ ...keyDateFields, id: Id, productionId: Id, version: Version });
export type KeyDateView = z.infer<typeof KeyDateView>;

/** `tentative` productions are planned but promised to nobody; `delivered` and `declined` leave the plan. */
export const PRODUCTION_STATES = ['tentative', 'committed', 'delivered', 'declined'] as const;

export const ProductionSummary = z.object({
  id: Id,
  name: z.string(),
  clientId: Id,
  clientName: z.string(),
  /** Two letters, printed wherever the hue is used. */
  mark: z.string(),
  hue: z.int().min(0).max(11),
  state: z.enum(PRODUCTION_STATES),
  keyDates: z.array(KeyDateView),
  pieces: z.int(),
  stages: z.int(),
  finishedStages: z.int(),
  handsOnMinutes: z.int(),
  version: Version,
});
export type ProductionSummary = z.infer<typeof ProductionSummary>;

export const ProductionView = ProductionSummary.extend({
  note: z.string(),
  piecesInOrder: z.array(PieceView),
  stagesInOrder: z.array(StageView),
  links: z.array(StageLink),
  purchases: z.array(PurchaseView),
});
export type ProductionView = z.infer<typeof ProductionView>;

const Mark = z
  .string()
  .trim()
  .regex(/^\p{L}{2}$/u, 'A mark is two letters.');
const productionFields = {
  name: Name,
  clientId: Id,
  mark: Mark,
  hue: z.int().min(0).max(11),
  state: z.enum(PRODUCTION_STATES),
  note: Note,
};
export const ProductionCreate = z.object({
  ...productionFields,
  note: Note.default(''),
  keyDates: z.array(KeyDateDraft).max(20).default([]),
});
export const ProductionChange = z.object(productionFields).partial().extend({ version: Version });

export const productionEndpoints = {
  listClients: endpoint({
    method: 'GET',
    path: '/api/clients',
    who: OFFICE,
    summary: 'Clients',
    response: z.array(ClientView),
  }),
  createClient: endpoint({
    method: 'POST',
    path: '/api/clients',
    who: OFFICE,
    summary: 'Add a client',
    body: z.object({ name: Name }),
    response: ClientView,
    status: 201,
  }),
  listProductions: endpoint({
    method: 'GET',
    path: '/api/productions',
    who: WORKSHOP,
    summary: 'Productions',
    response: z.array(ProductionSummary),
  }),
  readProduction: endpoint({
    method: 'GET',
    path: '/api/productions/:id',
    who: WORKSHOP,
    summary: 'One production with its pieces, stages and links',
    params: ById,
    response: ProductionView,
  }),
  createProduction: endpoint({
    method: 'POST',
    path: '/api/productions',
    who: OFFICE,
    summary: 'Enter a production',
    body: ProductionCreate,
    response: ProductionView,
    status: 201,
  }),
  changeProduction: endpoint({
    method: 'PATCH',
    path: '/api/productions/:id',
    who: OFFICE,
    summary: 'Change a production',
    params: ById,
    body: ProductionChange,
    response: ProductionView,
  }),
  createKeyDate: endpoint({
    method: 'POST',
    path: '/api/productions/:id/key-dates',
    who: OFFICE,
    summary: 'Add a key date',
    params: ById,
    body: KeyDateDraft,
    response: KeyDateView,
    status: 201,
  }),
  changeKeyDate: endpoint({
    method: 'PATCH',
    path: '/api/key-dates/:id',
    who: OFFICE,
    summary: 'Move or change a key date',
    params: ById,
    body: KeyDateChange,
    response: KeyDateView,
  }),
  removeKeyDate: endpoint({
    method: 'DELETE',
    path: '/api/key-dates/:id',
    who: OFFICE,
    summary: 'Remove a key date',
    params: ById,
    query: Removal,
  }),
};
