import { z } from 'zod';
import { endpoint, OFFICE, WORKSHOP, ById } from './endpoint';
import { Id, Name, Note, Version } from './primitives';
import { Pattern } from './crew';

export const BAY_KINDS = ['booth', 'welding', 'hot-wire', 'table', 'oven', 'floor', 'store', 'mould', 'other'] as const;

/** Inner size in whole millimetres; null where it does not matter. */
export const BaySize = z.object({
  lengthMm: z.int().min(1),
  widthMm: z.int().min(1),
  heightMm: z.int().min(1).nullable(),
});

export const BayView = z.object({
  id: Id,
  name: z.string(),
  kind: z.enum(BAY_KINDS),
  capacity: z.int(),
  /** The piece a mould belongs to; null for every other bay. */
  pieceId: Id.nullable(),
  temperatureCelsius: z.number().nullable(),
  humidityPercent: z.number().nullable(),
  size: BaySize.nullable(),
  /** When work may be done in it; empty for always. */
  openings: z.array(Pattern),
  note: z.string(),
  active: z.boolean(),
  version: Version,
});
export type BayView = z.infer<typeof BayView>;

const bayFields = {
  name: Name,
  kind: z.enum(BAY_KINDS),
  capacity: z.int().min(1, 'A bay holds at least one piece.').max(50),
  pieceId: Id.nullable(),
  temperatureCelsius: z.number().min(-20).max(300).nullable(),
  humidityPercent: z.number().min(0).max(100).nullable(),
  size: BaySize.nullable(),
  openings: z.array(Pattern).max(20),
  note: Note,
};
export const BayCreate = z.object({
  ...bayFields,
  pieceId: Id.nullable().default(null),
  temperatureCelsius: bayFields.temperatureCelsius.default(null),
  humidityPercent: bayFields.humidityPercent.default(null),
  size: BaySize.nullable().default(null),
  openings: z.array(Pattern).max(20).default([]),
  note: Note.default(''),
});
export const BayChange = z
  .object({ ...bayFields, active: z.boolean() })
  .partial()
  .extend({ version: Version });

export const bayEndpoints = {
  listBays: endpoint({
    method: 'GET',
    path: '/api/bays',
    who: WORKSHOP,
    summary: 'Bays and moulds',
    response: z.array(BayView),
  }),
  createBay: endpoint({
    method: 'POST',
    path: '/api/bays',
    who: OFFICE,
    summary: 'Add a bay or a mould',
    body: BayCreate,
    response: BayView,
    status: 201,
  }),
  changeBay: endpoint({
    method: 'PATCH',
    path: '/api/bays/:id',
    who: OFFICE,
    summary: 'Change a bay',
    params: ById,
    body: BayChange,
    response: BayView,
  }),
};
