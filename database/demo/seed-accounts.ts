import { hash, verify } from '@node-rs/argon2';
import { Account } from '@database/entities';
import { In, type EntityManager } from 'typeorm';
import type { DemoAccount } from './demo-studio-types';
import { recordId, recordIdOrNull } from './record-id';

/**
 * What everybody in the demo signs in with. It is no secret: the demo holds nothing that is true, and is only ever set up where
 * somebody asks for it by name.
 */
export const DEMO_PASSWORD = 'bench-and-brush';

/** argon2id with the least that the OWASP Password Storage Cheat Sheet names: 19 MiB, two passes, one lane. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

/** Lets the demo's people sign in. */
export async function seedAccounts(manager: EntityManager, accounts: readonly DemoAccount[]): Promise<void> {
  const rows = await Promise.all(
    accounts.map(async ({ id, name, email, role, makerId, clientId }) => ({
      id: recordId(id),
      name,
      email,
      role,
      makerId: recordIdOrNull(makerId),
      clientId: recordIdOrNull(clientId),
      passwordHash: await hash(DEMO_PASSWORD, COST),
    })),
  );
  await manager.insert(Account, rows);
}

/** Lines that tell who of the demo's people can still sign in with its password, and how; none where nobody can. */
export async function demoSignIns(
  manager: EntityManager,
  accounts: readonly DemoAccount[],
): Promise<readonly string[]> {
  const ids = accounts.map((account) => recordId(account.id));
  const rows = await manager.find(Account, { where: { id: In(ids), active: true } });
  const open: string[] = [];
  for (const id of ids) {
    const row = rows.find((one) => one.id === id);
    if (row?.passwordHash && (await verify(row.passwordHash, DEMO_PASSWORD))) {
      open.push(`  ${row.email.padEnd(24)} ${row.role.padEnd(8)} ${row.name}`);
    }
  }
  return open.length === 0 ? [] : [`Everybody in the demo signs in with the password: ${DEMO_PASSWORD}`, ...open];
}
