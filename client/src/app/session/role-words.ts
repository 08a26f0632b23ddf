import type { Role } from '@common/contract';

/** How a role is written. */
export const ROLE_WORDS: Readonly<Record<Role, string>> = {
  owner: 'Owner',
  manager: 'Studio manager',
  maker: 'Maker',
  client: 'Client',
};
