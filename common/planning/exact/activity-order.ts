import type { Trail } from './trail';

/** How fast older conflicts lose weight against newer ones. */
const DECAY = 0.95;
const RESCALE_ABOVE = 1e100;

/**
 * Literals "variable at least bound" by how much they took part in recent conflicts (variable state independent decaying sum,
 * Moskewicz et al. 2001), in a binary heap. Literals that are decided when taken come back when their level is undone.
 */
export class ActivityOrder {
  private readonly offset: Int32Array;
  private readonly base: Int32Array;
  private readonly activity: Float64Array;
  private readonly variableOf: Int32Array;
  private readonly place: Int32Array;
  private readonly heap: number[] = [];
  /** Literals taken from the heap and the level at which they were. */
  private readonly taken: number[] = [];
  private readonly takenLevel: number[] = [];
  private step = 1;

  constructor(private readonly trail: Trail) {
    const variables = trail.value.length >> 1;
    this.offset = new Int32Array(variables);
    this.base = new Int32Array(variables);
    let size = 0;
    for (let v = 0; v < variables; v++) {
      this.base[v] = trail.value[2 * v] + 1;
      this.offset[v] = size;
      size += -trail.value[2 * v + 1] - trail.value[2 * v];
    }
    this.activity = new Float64Array(size);
    this.place = new Int32Array(size).fill(-1);
    this.variableOf = new Int32Array(size);
    for (let v = 0; v < variables; v++)
      this.variableOf.fill(v, this.offset[v], v + 1 < variables ? this.offset[v + 1] : size);
  }

  /** Raises a literal's standing. */
  bump(side: number, bound: number): void {
    const v = side >> 1;
    const least = (side & 1) === 0 ? bound : 1 - bound;
    const index = this.offset[v] + least - this.base[v];
    this.activity[index] += this.step;
    if (this.activity[index] > RESCALE_ABOVE) this.rescale();
    if (this.place[index] >= 0) this.up(this.place[index]);
    else if (!this.isDecided(index)) this.insert(index);
    else this.remember(index);
  }

  /** Ages all standings at once. */
  decay(): void {
    this.step /= DECAY;
  }

  /** Takes the undecided literal that stands highest, as a variable and a bound written to `taker`; false if none is known. */
  take(taker: { variable: number; bound: number }): boolean {
    while (this.heap.length > 0) {
      const index = this.pop();
      this.remember(index);
      if (this.isDecided(index)) continue;
      taker.variable = this.variableOf[index];
      taker.bound = this.boundOf(index);
      return true;
    }
    return false;
  }

  /** Brings back the literals taken above a level; to be called when the trail has gone back to it. */
  backtrack(level: number): void {
    while (this.taken.length > 0 && this.takenLevel[this.takenLevel.length - 1] > level) {
      const index = this.taken.pop() as number;
      this.takenLevel.pop();
      if (this.place[index] < 0) this.insert(index);
    }
  }

  private remember(index: number): void {
    this.taken.push(index);
    // A literal taken at a level is decided on it or on the one that its own decision opens.
    this.takenLevel.push(this.trail.level + 1);
  }

  private boundOf(index: number): number {
    const v = this.variableOf[index];
    return this.base[v] + index - this.offset[v];
  }

  private isDecided(index: number): boolean {
    const v = this.variableOf[index];
    const bound = this.boundOf(index);
    const { value } = this.trail;
    return value[2 * v] >= bound || value[2 * v + 1] >= 1 - bound;
  }

  private rescale(): void {
    for (let k = 0; k < this.activity.length; k++) this.activity[k] *= 1 / RESCALE_ABOVE;
    this.step *= 1 / RESCALE_ABOVE;
  }

  private insert(index: number): void {
    this.place[index] = this.heap.push(index) - 1;
    this.up(this.place[index]);
  }

  private pop(): number {
    const { heap, place } = this;
    const top = heap[0];
    const last = heap.pop() as number;
    place[top] = -1;
    if (heap.length > 0 && last !== top) {
      heap[0] = last;
      place[last] = 0;
      this.down(0);
    }
    return top;
  }

  private up(from: number): void {
    const { heap, place, activity } = this;
    const item = heap[from];
    let at = from;
    while (at > 0) {
      const parent = (at - 1) >> 1;
      if (activity[heap[parent]] >= activity[item]) break;
      heap[at] = heap[parent];
      place[heap[at]] = at;
      at = parent;
    }
    heap[at] = item;
    place[item] = at;
  }

  private down(from: number): void {
    const { heap, place, activity } = this;
    const item = heap[from];
    let at = from;
    for (;;) {
      let child = 2 * at + 1;
      if (child >= heap.length) break;
      if (child + 1 < heap.length && activity[heap[child + 1]] > activity[heap[child]]) child++;
      if (activity[heap[child]] <= activity[item]) break;
      heap[at] = heap[child];
      place[heap[at]] = at;
      at = child;
    }
    heap[at] = item;
    place[item] = at;
  }
}
