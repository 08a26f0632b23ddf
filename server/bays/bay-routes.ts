import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { Bays } from './bays';

/** Bays and moulds. */
export function mountBays(api: Api, bays: Bays): void {
  api.on(endpoints.listBays, () => bays.list());
  api.on(endpoints.createBay, ({ actor, body }) => bays.create(actor, body));
  api.on(endpoints.changeBay, ({ actor, params, body }) => bays.change(actor, params.id, body));
}
