import type { TimedProblem } from './timed-problem';

/**
 * Serial generation for timed problems (Kelley 1963): stages in the order of their keys, each at its earliest. The profile is a
 * packed word for each minute; a placement looks at each minute of it once. Nothing is allocated in a pass.
 */
export class TimedPass {
  /** The order in which the last pass placed the stages. */
  readonly order: Int32Array;
  private readonly left: Int32Array;
  private readonly keys: Int32Array;
  private readonly counts: Int32Array;
  private readonly rank: Int32Array;

  constructor(readonly problem: TimedProblem) {
    const { count, longest, demands } = problem;
    this.order = new Int32Array(count);
    this.left = new Int32Array(demands.words * (longest + 1));
    this.keys = new Int32Array(count);
    this.counts = new Int32Array(4 * longest + 4);
    this.rank = new Int32Array(count);
    problem.topological.forEach((stage, place) => (this.rank[stage] = place));
    this.clear(longest + 1);
  }

  /**
   * Lays out all stages by their keys (any whole numbers within four times the longest schedule), the least first; a stage's key
   * counts as no less than those of all that lead into it. Writes starts and returns the makespan.
   */
  run(keys: Int32Array, starts: Int32Array): number {
    this.sortByKeys(keys);
    return this.layOut(this.order, starts);
  }

  /** Lays out all stages in an order that puts each after all that lead into it. */
  layOut(order: Int32Array, starts: Int32Array): number {
    const { problem } = this;
    const { inOf, inFrom, inLag, durations, release } = problem;
    const isOneWord = problem.demands.words === 1;
    let makespan = 0;
    for (let k = 0; k < order.length; k += 1) {
      const stage = order[k];
      let from = release[stage];
      for (let a = inOf[stage], end = inOf[stage + 1]; a < end; a += 1) {
        const least = starts[inFrom[a]] + inLag[a];
        if (least > from) from = least;
      }
      const start = isOneWord ? this.placeInWord(stage, from) : this.placeInWords(stage, from);
      starts[stage] = start;
      if (start + durations[stage] > makespan) makespan = start + durations[stage];
    }
    this.clear(makespan);
    return makespan;
  }

  private placeInWord(stage: number, from: number): number {
    const { left } = this;
    const { durations, demands } = this.problem;
    const demand = demands.byStage[stage];
    const length = durations[stage];
    if (demand === 0 || length === 0) return from;
    const spare = demands.spare[0];
    let start = from;
    let known = from;
    for (let t = start + length - 1; t >= known;) {
      if (((left[t] - demand) & spare) === spare) t -= 1;
      else {
        // Minutes after the clash have been looked at: only those beyond the old end are new.
        known = start + length;
        start = t + 1;
        t = start + length - 1;
      }
    }
    for (let t = start, end = start + length; t < end; t += 1) left[t] -= demand;
    return start;
  }

  private placeInWords(stage: number, from: number): number {
    const { left } = this;
    const { durations, demands } = this.problem;
    const { words, spare, byStage } = demands;
    const length = durations[stage];
    const row = stage * words;
    if (length === 0) return from;
    let start = from;
    let known = from;
    for (let t = start + length - 1; t >= known;) {
      let fits = true;
      for (let w = 0; w < words; w += 1) {
        if (((left[t * words + w] - byStage[row + w]) & spare[w]) !== spare[w]) {
          fits = false;
          break;
        }
      }
      if (fits) t -= 1;
      else {
        known = start + length;
        start = t + 1;
        t = start + length - 1;
      }
    }
    for (let t = start * words, end = (start + length) * words; t < end; t += words) {
      for (let w = 0; w < words; w += 1) left[t + w] -= byStage[row + w];
    }
    return start;
  }

  private clear(minutes: number): void {
    const { left } = this;
    const { words, capacity } = this.problem.demands;
    if (words === 1) {
      left.fill(capacity[0], 0, minutes);
      return;
    }
    for (let t = 0; t < minutes * words; t += words) for (let w = 0; w < words; w += 1) left[t + w] = capacity[w];
  }

  /** Counting sort by keys raised to those of all that leads into a stage; ties in topological order. */
  private sortByKeys(given: Int32Array): void {
    const { keys, counts, order, problem } = this;
    const { topological, inOf, inFrom, count } = problem;
    let least = given[topological[0]];
    let most = least;
    for (let k = 0; k < count; k += 1) {
      const stage = topological[k];
      let key = given[stage];
      for (let a = inOf[stage], end = inOf[stage + 1]; a < end; a += 1)
        if (keys[inFrom[a]] > key) key = keys[inFrom[a]];
      keys[stage] = key;
      if (key < least) least = key;
      if (key > most) most = key;
    }
    const range = most - least + 2;
    for (let k = 0; k < count; k += 1) counts[keys[k] - least + 1] += 1;
    for (let v = 1; v < range; v += 1) counts[v] += counts[v - 1];
    for (let k = 0; k < count; k += 1) {
      const stage = topological[k];
      order[counts[keys[stage] - least]++] = stage;
    }
    counts.fill(0, 0, range + 1);
  }
}
