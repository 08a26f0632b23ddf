import { z } from 'zod';
import { Id } from './primitives';
import { LevelRun } from './planning';

/** What the server tells open pages as it happens, as server-sent events at `/api/live` (office roles only see plan events). */
export const LiveEvent = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('plan-revised'), revision: z.int() }),
  z.object({ kind: z.literal('plan-issued'), number: z.int() }),
  z.object({ kind: z.literal('level'), run: LevelRun }),
  /** How far a forecast has come: draws made, of those that it will make. */
  z.object({ kind: z.literal('forecast'), revision: z.int(), draws: z.int(), drawsAsked: z.int() }),
  z.object({ kind: z.literal('record-changed'), subject: z.string(), id: Id.nullable() }),
]);
export type LiveEvent = z.infer<typeof LiveEvent>;
