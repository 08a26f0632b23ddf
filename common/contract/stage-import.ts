import { z } from 'zod';
import { endpoint, OFFICE, ById } from './endpoint';
import { FieldFault } from './problem-details';

/** Stages from CSV text; columns are named in docs/import.md. `try` only reports, `take` imports when no row is at fault. */
export const StageImport = z.object({
  csv: z.string().max(1_500_000, 'The file is longer than 1,500,000 characters. Split it.'),
  mode: z.enum(['try', 'take']),
});
export const StageImportResult = z.object({
  /** New pieces, and stages in new and old ones; none where anything is at fault. */
  pieces: z.int(),
  stages: z.int(),
  faults: z.array(FieldFault),
  taken: z.boolean(),
});
export type StageImportResult = z.infer<typeof StageImportResult>;

export const stageImportEndpoints = {
  importStages: endpoint({
    method: 'POST',
    path: '/api/productions/:id/import',
    who: OFFICE,
    summary: 'Read stages from CSV: all rows or none',
    params: ById,
    body: StageImport,
    response: StageImportResult,
  }),
};
