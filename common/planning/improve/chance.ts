/**
 * The engine's only source of chance: a seeded 32-bit generator (xorshift of Marsaglia 2003 behind a splitmix start), the same
 * numbers on every machine.
 */
export class Chance {
  private state: number;

  constructor(seed: number) {
    let mixed = (seed | 0) + 0x9e3779b9;
    mixed = Math.imul(mixed ^ (mixed >>> 16), 0x21f0aaad);
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
    this.state = (mixed ^ (mixed >>> 15)) | 0 || 0x1234567;
  }

  /** A whole number from 0 to `count - 1`; 0 where `count` is 0. */
  below(count: number): number {
    return Math.floor((this.next() / 4_294_967_296) * count);
  }

  /** A number from 0 to 1, without 1. */
  share(): number {
    return this.next() / 4_294_967_296;
  }

  private next(): number {
    let x = this.state;
    x ^= x << 13;
    x ^= x >>> 17;
    x ^= x << 5;
    this.state = x;
    return x >>> 0;
  }
}
