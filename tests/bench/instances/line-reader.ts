/** A file that is not what its format says; the message names the file, the line and what was expected. */
export class InstanceFault extends Error {
  constructor(file: string, line: number, what: string) {
    super(`${file}, line ${line}: ${what}`);
    this.name = 'InstanceFault';
  }
}

/** Walks through the lines of an instance file, skipping blank ones, and remembers where it is for complaints. */
export class LineReader {
  private readonly lines: readonly string[];
  private position = 0;

  constructor(
    private readonly file: string,
    text: string,
  ) {
    this.lines = text.split(/\r?\n/);
  }

  /** A fault at the line read last (or at the first one). */
  fault(what: string): InstanceFault {
    return new InstanceFault(this.file, Math.max(1, this.position), what);
  }

  /** The next line that is not blank; a fault that says what was expected where the file ends instead. */
  next(expected: string): string {
    while (this.position < this.lines.length) {
      const line = this.lines[this.position++];
      if (line.trim() !== '') return line;
    }
    throw this.fault(`the file ends where ${expected} should be.`);
  }

  /** Skips to just after the first line that contains `title`. */
  skipPast(title: string): void {
    while (this.position < this.lines.length) if (this.lines[this.position++].includes(title)) return;
    throw this.fault(`the section "${title}" is missing.`);
  }

  /** The next line as whole numbers, at least `least` of them; brackets around a number are allowed. */
  numbers(expected: string, least: number): number[] {
    const words = this.next(expected).trim().split(/\s+/);
    const values = words.map((word) => this.wholeNumber(word, expected));
    if (values.length < least)
      throw this.fault(`${expected} should have ${least} numbers or more, but has ${values.length}.`);
    return values;
  }

  /** One word as a whole number, or a fault. */
  wholeNumber(word: string, expected: string): number {
    const bare = word.startsWith('[') && word.endsWith(']') ? word.slice(1, -1) : word;
    if (!/^-?\d+$/.test(bare)) throw this.fault(`"${word}" is not a whole number (${expected}).`);
    return Number(bare);
  }

  /** Checks that a number lies in a range, both ends included, and gives it back. */
  inRange(value: number, low: number, high: number, what: string): number {
    if (value < low || value > high)
      throw this.fault(`${what} is ${value}, but should lie between ${low} and ${high}.`);
    return value;
  }

  /** Checks that a number read here is the one expected. */
  expectNumber(value: number, wanted: number, what: string): void {
    if (value !== wanted) throw this.fault(`${what} should be ${wanted}, but is ${value}.`);
  }

  /** Checks how many numbers a row has. */
  expectCount(row: readonly number[], wanted: number, what: string): void {
    if (row.length !== wanted) throw this.fault(`${what} should have ${wanted} numbers, but has ${row.length}.`);
  }
}

/** Bound on durations, demands and lags: nothing published comes near, and sums stay exact integers. */
export const LARGEST_NUMBER = 1_000_000;
