import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { Climates } from './climates';

/** Temperature and humidity of the studio and of its bays. */
export function mountClimates(api: Api, climates: Climates): void {
  api.on(endpoints.listClimates, () => climates.list());
  api.on(endpoints.changeClimate, ({ actor, body }) => climates.change(actor, body));
  api.on(endpoints.importClimateLog, ({ actor, body }) => climates.importLog(actor, body));
}
