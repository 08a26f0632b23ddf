/** The public file of the import of stages. */
import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { Transactions } from '../storage/transactions';
import { StageImports } from './stage-imports';

/** Stages from CSV text. */
export function mountImport(api: Api, transactions: Transactions): void {
  const imports = new StageImports(transactions);
  api.on(endpoints.importStages, ({ actor, params, body }) => imports.import(actor, params.id, body));
}
