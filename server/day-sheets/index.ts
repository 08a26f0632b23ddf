/** The public file of day sheets. */
import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { DaySheets } from './day-sheets';

export { DaySheets } from './day-sheets';

/** Makers' issued days. */
export function mountDaySheets(api: Api, sheets: DaySheets): void {
  api.on(endpoints.readDaySheet, ({ actor, query }) => sheets.read(actor, query));
}
