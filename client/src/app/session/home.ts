import type { Role } from '@common/contract';

const HOMES: Readonly<Record<Role, string>> = {
  owner: '/plan',
  manager: '/plan',
  maker: '/day-sheet',
  client: '/client',
};

/** Where a role lands after signing in, and where it is sent from pages that are not for it. */
export function homeOf(role: Role): string {
  return HOMES[role];
}

/** An address inside this application to go back to after signing in; null where it would lead away from it. */
export function safeReturn(address: string | null | undefined): string | null {
  return address && /^\/(?![/\\])/.test(address) && !address.startsWith('/sign-in') ? address : null;
}
