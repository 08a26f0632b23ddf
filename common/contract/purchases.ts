import { z } from 'zod';
import { endpoint, OFFICE, ById } from './endpoint';
import { Day, Id, Minor, Name, Removal, Version } from './primitives';

/** A bought-in part with a lead time and the stage that needs it. */
export const PurchaseView = z.object({
  id: Id,
  productionId: Id,
  stageId: Id,
  name: z.string(),
  supplier: z.string(),
  leadDays: z.int(),
  orderedOn: Day.nullable(),
  dueOn: Day.nullable(),
  receivedOn: Day.nullable(),
  costMinor: Minor.optional(),
  version: Version,
});
export type PurchaseView = z.infer<typeof PurchaseView>;

export const PurchaseDraft = z.object({
  stageId: Id,
  name: Name,
  supplier: z.string().trim().max(120),
  leadDays: z.int().min(0).max(730),
  orderedOn: Day.nullable(),
  dueOn: Day.nullable(),
  receivedOn: Day.nullable(),
  costMinor: Minor,
});
export const PurchaseChange = PurchaseDraft.partial().extend({ version: Version });

export const purchaseEndpoints = {
  createPurchase: endpoint({
    method: 'POST',
    path: '/api/productions/:id/purchases',
    who: OFFICE,
    summary: 'Add a purchase',
    params: ById,
    body: PurchaseDraft,
    response: PurchaseView,
    status: 201,
  }),
  changePurchase: endpoint({
    method: 'PATCH',
    path: '/api/purchases/:id',
    who: OFFICE,
    summary: 'Change a purchase',
    params: ById,
    body: PurchaseChange,
    response: PurchaseView,
  }),
  removePurchase: endpoint({
    method: 'DELETE',
    path: '/api/purchases/:id',
    who: OFFICE,
    summary: 'Remove a purchase',
    params: ById,
    query: Removal,
  }),
};
