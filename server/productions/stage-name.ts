/** What a sentence calls a stage. */
export interface NamedStage {
  readonly name: string;
  readonly nth: number | null;
  readonly repeats: number | null;
  readonly piece: { readonly name: string };
}

/** “Moon: Lay up (3 of 8)”. */
export function stageName({ name, nth, repeats, piece }: NamedStage): string {
  return `“${piece.name}: ${name}${nth === null ? '' : ` (${String(nth)} of ${String(repeats)})`}”`;
}
