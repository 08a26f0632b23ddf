import type { FeedScope } from '@common/contract/feeds';
import { isOffice, type Actor } from '../session/actor';

/** Of a production, what decides who may see its calendar. */
export interface ProductionOwner {
  readonly clientId: string;
}

/**
 * Whether an account may have, and go on reading, the calendar of a scope: the office any, a maker their own work, a client their
 * own production. It is asked when an address is made and again at every reading, for roles and clients change. `production`
 * is the scope's, or null where there is none.
 */
export function mayRead(actor: Actor, scope: FeedScope, production: ProductionOwner | null): boolean {
  if (isOffice(actor)) {
    return true;
  }
  switch (scope.kind) {
    case 'maker':
      return actor.role === 'maker' && actor.makerId === scope.makerId;
    case 'production':
      return actor.role === 'client' && production !== null && actor.clientId === production.clientId;
    case 'studio':
      return false;
  }
}
