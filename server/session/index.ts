/** The public file of signing in: who acts, their accounts and sessions. */
export { isOffice, type Actor } from './actor';
export { AccountRepository } from './account-repository';
export { actorOf } from './account-mapper';
export { Accounts } from './accounts';
export { keepSessions, type SessionKeeping } from './session-cookie';
export { mountSession } from './session-routes';
export { beginSession, createPassport, type Authenticator } from './sign-in';
export { hashPassword } from './passwords';
export { mountGoogle } from './google-routes';
