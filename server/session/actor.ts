import type {} from 'express-session';
import type {} from 'passport';
import type { Role } from '@common/contract';

/** Who acts: the signed-in account as each request finds it. */
export interface Actor {
  readonly accountId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly makerId: string | null;
  readonly clientId: string | null;
}

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- how Express lets its types be extended
  namespace Express {
    // eslint-disable-next-line @typescript-eslint/no-empty-object-type -- passport's `req.user` is our actor
    interface User extends Actor {}
  }
}

declare module 'express-session' {
  interface SessionData {
    formToken: string;
    /** Where to go once Google has said who it is. */
    googleReturn: string;
  }
}

/** Whether the actor runs the studio and so sees rates and all productions. */
export function isOffice(actor: Actor): boolean {
  return actor.role === 'owner' || actor.role === 'manager';
}
