import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { Crafts } from './crafts';
import type { Leaves } from './leaves';
import type { Makers } from './makers';

/** Crafts, makers and their leave. */
export function mountCrew(
  api: Api,
  { crafts, makers, leaves }: { crafts: Crafts; makers: Makers; leaves: Leaves },
): void {
  api.on(endpoints.listCrafts, () => crafts.list());
  api.on(endpoints.createCraft, ({ actor, body }) => crafts.create(actor, body));
  api.on(endpoints.removeCraft, ({ actor, params }) => crafts.remove(actor, params.id));
  api.on(endpoints.listMakers, ({ actor }) => makers.list(actor));
  api.on(endpoints.readMaker, ({ actor, params }) => makers.read(actor, params.id));
  api.on(endpoints.createMaker, ({ actor, body }) => makers.create(actor, body));
  api.on(endpoints.changeMaker, ({ actor, params, body }) => makers.change(actor, params.id, body));
  api.on(endpoints.listLeave, ({ actor, query }) => leaves.list(actor, query.makerId));
  api.on(endpoints.createLeave, ({ actor, body }) => leaves.create(actor, body));
  api.on(endpoints.removeLeave, ({ actor, params }) => leaves.remove(actor, params.id));
}
