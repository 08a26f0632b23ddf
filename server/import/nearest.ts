/** Names beyond this many are not searched: a hint is not worth the time. */
const MOST_SEARCHED = 400;

/** The name nearest to a word by letters to change, if a slip of the pen could make the one of the other; null otherwise. */
export function nearest(word: string, names: readonly string[]): string | null {
  const wanted = word.trim().toLowerCase();
  const reach = Math.max(1, Math.floor(wanted.length / 3));
  let best: { readonly name: string; readonly changes: number } | null = null;
  for (const name of names.slice(0, MOST_SEARCHED)) {
    if (Math.abs(name.length - wanted.length) > reach) continue;
    const changes = lettersToChange(wanted, name.toLowerCase());
    if (changes <= reach && (best === null || changes < best.changes)) best = { name, changes };
  }
  return best?.name ?? null;
}

/** Levenshtein's distance, row by row (Wagner and Fischer, 1974). */
function lettersToChange(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, column) => column);
  for (let i = 1; i <= a.length; i += 1) {
    const next = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const replaced = row[j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1);
      next.push(Math.min(replaced, row[j] + 1, next[j - 1] + 1));
    }
    row = next;
  }
  return row[b.length];
}
