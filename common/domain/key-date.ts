/** What a production's key date is, in the order in which they usually come. */
export const KEY_DATE_KINDS = [
  'rehearsal-loan',
  'delivery',
  'get-in',
  'fit-up',
  'technical-rehearsal',
  'dress-rehearsal',
  'opening',
] as const;
export type KeyDateKind = (typeof KEY_DATE_KINDS)[number];

/** How a key date is written in sentences and headings. */
export const KEY_DATE_NAMES: Readonly<Record<KeyDateKind, string>> = {
  'rehearsal-loan': 'Rehearsal loan',
  delivery: 'Delivery',
  'get-in': 'Get-in',
  'fit-up': 'Fit-up',
  'technical-rehearsal': 'Technical rehearsal',
  'dress-rehearsal': 'Dress rehearsal',
  opening: 'Opening',
};

/** A key date as far as its place among the others goes; `at` in minutes or any other measure that grows with time. */
export interface DatedKind {
  readonly kind: KeyDateKind;
  readonly at: number;
}

/**
 * What is odd in the order of a production's dates, as sentences: a get-in before the delivery, say. They are cautions and
 * forbid nothing, for a production may tour. A rehearsal loan comes when it likes.
 */
export function keyDateCautions(dates: readonly DatedKind[]): readonly string[] {
  const staged = dates.filter((date) => date.kind !== 'rehearsal-loan');
  const inOrder = staged.toSorted((a, b) => KEY_DATE_KINDS.indexOf(a.kind) - KEY_DATE_KINDS.indexOf(b.kind));
  return inOrder.slice(1).flatMap((date, i) => {
    const before = inOrder[i];
    const isOdd = before.kind !== date.kind && before.at > date.at;
    return isOdd ? [`${KEY_DATE_NAMES[date.kind]} comes before ${KEY_DATE_NAMES[before.kind].toLowerCase()}.`] : [];
  });
}
