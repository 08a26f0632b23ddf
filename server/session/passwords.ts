import { hash, verify } from '@node-rs/argon2';

/** argon2id with the least that the OWASP Password Storage Cheat Sheet names: 19 MiB, two passes, one lane. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

/** The hash of nobody's password: checked where there is no account, so that an answer takes as long as where there is one. */
const nobody = hash('nobody has this password', COST);

/** A salted argon2id hash in PHC form. */
export function hashPassword(password: string): Promise<string> {
  return hash(password, COST);
}

/** Whether a password belongs to a hash; null for an account that has none, which takes just as long to refuse. */
export async function isPassword(password: string, passwordHash: string | null): Promise<boolean> {
  const isRight = await verify(passwordHash ?? (await nobody), password);
  return passwordHash !== null && isRight;
}
