import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { Clients } from './clients';
import type { KeyDates } from './key-dates';
import type { Links } from './links';
import type { Pieces } from './pieces';
import type { Productions } from './productions';
import type { Purchases } from './purchases';
import type { SignOffs } from './sign-offs';
import type { StageReports } from './stage-reports';
import type { Stages } from './stages';

/** What the routes of productions work with. */
export interface ProductionParts {
  readonly clients: Clients;
  readonly productions: Productions;
  readonly keyDates: KeyDates;
  readonly purchases: Purchases;
  readonly pieces: Pieces;
  readonly stages: Stages;
  readonly links: Links;
  readonly reports: StageReports;
  readonly signOffs: SignOffs;
}

/** Clients, productions and everything in them. */
export function mountProductions(api: Api, parts: ProductionParts): void {
  const { clients, productions, keyDates, purchases } = parts;
  api.on(endpoints.listClients, () => clients.list());
  api.on(endpoints.createClient, ({ actor, body }) => clients.create(actor, body));
  api.on(endpoints.listProductions, () => productions.list());
  api.on(endpoints.readProduction, ({ actor, params }) => productions.read(actor, params.id));
  api.on(endpoints.createProduction, ({ actor, body }) => productions.create(actor, body));
  api.on(endpoints.changeProduction, ({ actor, params, body }) => productions.change(actor, params.id, body));
  api.on(endpoints.createKeyDate, ({ actor, params, body }) => keyDates.create(actor, params.id, body));
  api.on(endpoints.changeKeyDate, ({ actor, params, body }) => keyDates.change(actor, params.id, body));
  api.on(endpoints.removeKeyDate, ({ actor, params, query }) => keyDates.remove(actor, params.id, query.version));
  api.on(endpoints.createPurchase, ({ actor, params, body }) => purchases.create(actor, params.id, body));
  api.on(endpoints.changePurchase, ({ actor, params, body }) => purchases.change(actor, params.id, body));
  api.on(endpoints.removePurchase, ({ actor, params, query }) => purchases.remove(actor, params.id, query.version));
  mountPieces(api, parts);
}

function mountPieces(api: Api, { pieces, stages, links, reports, signOffs }: ProductionParts): void {
  api.on(endpoints.createPiece, ({ actor, params, body }) => pieces.create(actor, params.id, body));
  api.on(endpoints.changePiece, ({ actor, params, body }) => pieces.change(actor, params.id, body));
  api.on(endpoints.removePiece, ({ actor, params, query }) => pieces.remove(actor, params.id, query.version));
  api.on(endpoints.createStage, ({ actor, params, body }) => stages.create(actor, params.id, body));
  api.on(endpoints.changeStage, ({ actor, params, body }) => stages.change(actor, params.id, body));
  api.on(endpoints.removeStage, ({ actor, params, query }) => stages.remove(actor, params.id, query.version));
  api.on(endpoints.createLink, ({ actor, body }) => links.create(actor, body));
  api.on(endpoints.removeLink, ({ actor, params }) => links.remove(actor, params.id));
  api.on(endpoints.startStage, ({ actor, params, body }) => reports.report(actor, params.id, 'start', body));
  api.on(endpoints.pauseStage, ({ actor, params, body }) => reports.report(actor, params.id, 'pause', body));
  api.on(endpoints.finishStage, ({ actor, params, body }) => reports.report(actor, params.id, 'finish', body));
  api.on(endpoints.decideSignOff, ({ actor, params, body }) => signOffs.decide(actor, params.id, body));
}
