/** The public file of productions: clients, productions, key dates, pieces, stages, links and purchases. */
import type { Transactions } from '../storage/transactions';
import { Clients } from './clients';
import { KeyDates } from './key-dates';
import { Links } from './links';
import { Pieces } from './pieces';
import type { ProductionParts } from './production-routes';
import { Productions } from './productions';
import { Purchases } from './purchases';
import { SignOffs } from './sign-offs';
import { StageReports } from './stage-reports';
import { Stages } from './stages';

export { mountProductions } from './production-routes';
export { StageRepository } from './stage-repository';
export { ProductionRepository } from './production-repository';
export { keyDateView } from './production-mapper';
export { handsFaults, readHands } from './stage-fitness';
export { stageName } from './stage-name';
export { writeUnderstoodWaits } from './links';

/** Everything that the routes of productions work with. */
export function createProductionParts(transactions: Transactions): ProductionParts {
  return {
    clients: new Clients(transactions),
    productions: new Productions(transactions),
    keyDates: new KeyDates(transactions),
    purchases: new Purchases(transactions),
    pieces: new Pieces(transactions),
    stages: new Stages(transactions),
    links: new Links(transactions),
    reports: new StageReports(transactions),
    signOffs: new SignOffs(transactions),
  };
}
