import type { FeatureParts } from './app';
import { Accounts, mountSession } from './session';

/** Every feature's routes, made and mounted. */
export function mountFeatures(parts: FeatureParts): void {
  const { api, transactions } = parts;
  mountSession(api, { ...parts, accounts: new Accounts(transactions) });
}
