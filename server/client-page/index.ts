/** The public file of the client's page. */
import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { ClientPage } from './client-page';

export { ClientPage } from './client-page';

/** The client's own page. */
export function mountClientPage(api: Api, page: ClientPage): void {
  api.on(endpoints.readClientPage, ({ actor }) => page.read(actor));
}
