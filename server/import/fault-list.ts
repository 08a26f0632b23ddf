import type { FieldFault } from '@common/contract/problem-details';

/** Faults told one by one; of more, only how many there are. */
export const MOST_TOLD = 500;

/** What is wrong with a file, row by row. Sentences are made only for those that are told. */
export class FaultList {
  readonly #told: FieldFault[] = [];
  #count = 0;

  get count(): number {
    return this.#count;
  }

  /** Notes a fault at a physical line of the file, counted from 1. */
  add(line: number, sentence: () => string): void {
    this.#count += 1;
    if (this.#told.length < MOST_TOLD) {
      this.#told.push({ pointer: '/csv', line, detail: sentence() });
    }
  }

  /** The faults in the order of their lines, and a last one that counts the rest. */
  all(): readonly FieldFault[] {
    const inOrder = [...this.#told].sort((a, b) => (a.line ?? 0) - (b.line ?? 0));
    const rest = this.#count - this.#told.length;
    return rest === 0
      ? inOrder
      : [...inOrder, { pointer: '/csv', detail: `There are ${rest} more faults. Mend these first, then try again.` }];
  }
}
