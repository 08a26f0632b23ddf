export { homeOf, safeReturn } from './home';
export { ROLE_WORDS } from './role-words';
export { onlyFor, signedIn, signedOut } from './session-guard';
export { sessionInterceptor } from './session-interceptor';
export { SessionStore, type Account } from './session-store';
