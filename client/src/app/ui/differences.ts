/** One field in which a stored record and what was sent differ, as both would be read. */
export interface Difference {
  readonly label: string;
  readonly theirs: string;
  readonly mine: string;
}

/** The fields that were sent and differ from what is stored, by the names given; fields without a name stay out. */
export function differencesOf(
  current: unknown,
  sent: unknown,
  labels: Readonly<Record<string, string>>,
): readonly Difference[] {
  const theirs = (current ?? {}) as Readonly<Record<string, unknown>>;
  const mine = (sent ?? {}) as Readonly<Record<string, unknown>>;
  return Object.entries(labels)
    .filter(([key]) => key in mine && JSON.stringify(mine[key]) !== JSON.stringify(theirs[key]))
    .map(([key, label]) => ({ label, theirs: say(theirs[key]), mine: say(mine[key]) }));
}

function say(value: unknown): string {
  if (value === null || value === undefined || value === '') {
    return 'nothing';
  }
  if (typeof value === 'boolean') {
    return value ? 'yes' : 'no';
  }
  if (typeof value === 'string' || typeof value === 'number') {
    return String(value);
  }
  if (Array.isArray(value)) {
    return value.length === 0 ? 'none' : `${value.length} in the list`;
  }
  return Object.values(value).map(say).join(' · ');
}
