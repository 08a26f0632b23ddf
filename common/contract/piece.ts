import { z } from 'zod';
import { Id, Version } from './primitives';

/** A thing being made, one of a production's. */
export const PieceView = z.object({
  id: Id,
  productionId: Id,
  name: z.string(),
  position: z.int(),
  recipeId: Id.nullable(),
  note: z.string(),
  version: Version,
});
export type PieceView = z.infer<typeof PieceView>;
