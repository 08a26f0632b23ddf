import { z } from 'zod';
import { endpoint } from './endpoint';
import { Id, Instant, Version } from './primitives';
import { KeyDateView } from './productions';

/** One of a client's own productions as the client sees it: dates and decisions, nothing of other work or of rates. */
export const ClientProduction = z.object({
  id: Id,
  name: z.string(),
  mark: z.string(),
  hue: z.int(),
  keyDates: z.array(KeyDateView),
  /** When the issued plan has the last piece ready; null before the first issue. */
  readyAt: Instant.nullable(),
  finishedStages: z.int(),
  stages: z.int(),
  decisions: z.array(
    z.object({
      stageId: Id,
      pieceName: z.string(),
      name: z.string(),
      askedFrom: Instant.nullable(),
      state: z.enum(['ahead', 'open', 'approved', 'changes-asked']),
      version: Version,
    }),
  ),
});
export type ClientProduction = z.infer<typeof ClientProduction>;

export const clientPageEndpoints = {
  readClientPage: endpoint({
    method: 'GET',
    path: '/api/client-page',
    who: ['client'],
    summary: "One's own productions: dates, next decision",
    response: z.array(ClientProduction),
  }),
};
