import { endpoints } from '@common/contract';
import type { Api } from '../http/api';
import type { StudioService } from './studio-service';

/** The studio's settings, closures and audit trail. */
export function mountStudio(api: Api, studio: StudioService): void {
  api.on(endpoints.readStudio, () => studio.read());
  api.on(endpoints.changeStudio, ({ actor, body }) => studio.change(actor, body));
  api.on(endpoints.listClosures, () => studio.closures());
  api.on(endpoints.createClosure, ({ actor, body }) => studio.createClosure(actor, body));
  api.on(endpoints.changeClosure, ({ actor, params, body }) => studio.changeClosure(actor, params.id, body));
  api.on(endpoints.removeClosure, ({ actor, params, query }) => studio.removeClosure(actor, params.id, query.version));
  api.on(endpoints.readAudit, ({ query }) => studio.audit(query));
}
