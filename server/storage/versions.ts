import { Problem } from '../http/problem';

/** Refuses a change to a record that somebody else changed since it was read, showing both. */
export function requireVersion(current: { readonly version: number }, sent: { readonly version: number }): void {
  if (current.version === sent.version) return;
  throw new Problem('version-conflict', 'Somebody else changed this meanwhile. Look at both and choose.', {
    current,
    sent,
  });
}

/** Which fields differ between two views of a record, in words, without its version. */
export function changedFields(before: object, after: object): string {
  const was = before as Readonly<Record<string, unknown>>;
  const names = Object.entries(after)
    .filter(([name, value]) => name !== 'version' && JSON.stringify(value) !== JSON.stringify(was[name]))
    .map(([name]) => name.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`));
  return names.length === 0 ? 'nothing' : names.join(', ');
}

/** The members of a change that were sent: absent means unchanged. */
export function sentMembers<T extends object>(change: T): Partial<T> {
  return Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined)) as Partial<T>;
}
