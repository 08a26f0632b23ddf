import { inject } from '@angular/core';
import { type CanActivateFn, Router, type UrlTree } from '@angular/router';
import type { Role } from '@common/contract';
import { homeOf } from './home';
import { SessionStore } from './session-store';

/** Lets signed-in people through; sends others to sign in, and from there back to where they were going. */
export const signedIn: CanActivateFn = async (_route, state) => {
  const router = inject(Router);
  const session = inject(SessionStore);
  try {
    await session.load();
  } catch {
    return to(router, '/unreachable', state.url);
  }
  return session.account() !== null || to(router, '/sign-in', state.url);
};

/** Sends people who are signed in already to their own first page. */
export const signedOut: CanActivateFn = async () => {
  const router = inject(Router);
  const session = inject(SessionStore);
  try {
    await session.load();
  } catch {
    return to(router, '/unreachable', '/sign-in');
  }
  const role = session.role();
  return role === null || router.parseUrl(homeOf(role));
};

/** Lets only these roles through; others land on their own first page. Stands inside `signedIn`. */
export function onlyFor(roles: readonly Role[]): CanActivateFn {
  return () => {
    const role = inject(SessionStore).role();
    const router = inject(Router);
    return (role !== null && roles.includes(role)) || router.parseUrl(role === null ? '/sign-in' : homeOf(role));
  };
}

function to(router: Router, page: string, from: string): UrlTree {
  return router.createUrlTree([page], { queryParams: from === '/' ? {} : { return: from } });
}
