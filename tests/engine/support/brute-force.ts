import type { TimedSketch } from './timed-problems';

/** The least makespan of a little timed problem by trying every start of every stage; null where no plan exists. */
export function bruteForce(sketch: TimedSketch): number | null {
  const n = sketch.durations.length;
  const starts = new Array<number>(n).fill(0);
  let best: number | null = null;
  const visit = (stage: number): void => {
    if (stage === n) {
      const makespan = Math.max(0, ...starts.map((start, k) => start + sketch.durations[k]));
      if ((best === null || makespan < best) && crewsExist(sketch, starts)) best = makespan;
      return;
    }
    for (let at = 0; at + sketch.durations[stage] <= sketch.end; at++) {
      starts[stage] = at;
      if (fits(sketch, starts, stage)) visit(stage + 1);
    }
  };
  visit(0);
  return best;
}

function fits(sketch: TimedSketch, starts: readonly number[], last: number): boolean {
  for (const [from, to, least, most] of sketch.gaps ?? []) {
    if (Math.max(from, to) !== last) continue;
    const gap = starts[to] - starts[from];
    if (gap < least || (most !== null && gap > most)) return false;
  }
  return (sketch.bays ?? []).every(({ capacity, demands }) => {
    for (let at = starts[last]; at < starts[last] + sketch.durations[last]; at++) {
      let used = 0;
      for (let k = 0; k <= last; k++) if (starts[k] <= at && at < starts[k] + sketch.durations[k]) used += demands[k];
      if (used > capacity) return false;
    }
    return true;
  });
}

function crewsExist(sketch: TimedSketch, starts: readonly number[]): boolean {
  const { holds, needs, durations } = sketch;
  if (holds === undefined || needs === undefined) return true;
  const seats = needs.flatMap((row, stage) =>
    row.flatMap((count, craft) => Array.from({ length: durations[stage] > 0 ? count : 0 }, () => ({ stage, craft }))),
  );
  const taken: { stage: number; maker: number }[] = [];
  const overlap = (a: number, b: number): boolean =>
    a === b || (starts[a] < starts[b] + durations[b] && starts[b] < starts[a] + durations[a]);
  const seat = (k: number): boolean => {
    if (k === seats.length) return true;
    const { stage, craft } = seats[k];
    for (let maker = 0; maker < holds.length; maker++) {
      if (!holds[maker][craft] || taken.some((other) => other.maker === maker && overlap(other.stage, stage))) continue;
      taken.push({ stage, maker });
      if (seat(k + 1)) return true;
      taken.pop();
    }
    return false;
  };
  return seat(0);
}
