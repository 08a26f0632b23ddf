import { FINISHED, type Compiled } from '../construct/compiled';
import type { Layout } from '../construct/layout';

/** Load of each craft on each studio day, with the running sum of its squares in quarter hours: `objective/unevenness` kept up to date. */
export class DayLoad {
  /** Sum of squared quarter hours. */
  sum = 0;
  private readonly minutes: Float64Array;
  private readonly dayStarts: Int32Array;
  private readonly dayEnds: Int32Array;
  private readonly dayCount: number;

  constructor(private readonly layout: Layout) {
    const { compiled } = layout;
    const { days } = compiled.problem;
    this.dayCount = days.length;
    this.dayStarts = Int32Array.from(days, (day) => day.start - compiled.origin);
    this.dayEnds = Int32Array.from(days, (day) => day.end - compiled.origin);
    this.minutes = new Float64Array(Math.max(1, compiled.craftIds.length) * Math.max(1, days.length));
    for (let stage = 0; stage < compiled.stageCount; stage += 1) if (layout.isPlaced[stage] === 1) this.add(stage, 1);
  }

  /** Adds (1) or takes away (-1) what a placed stage asks of its crafts. */
  add(stage: number, sign: 1 | -1): void {
    const { layout } = this;
    if (layout.compiled.work.fixity[stage] === FINISHED) return;
    this.addSpans(
      layout.compiled,
      layout.crew[stage]?.crafts,
      layout.spanPool,
      layout.spanAt[stage],
      layout.spanCount[stage],
      sign,
    );
  }

  /** The same for spans that are not in the layout yet. */
  addSpans(
    compiled: Compiled,
    crafts: Int32Array | undefined,
    spans: Int32Array,
    from: number,
    count: number,
    sign: 1 | -1,
  ): void {
    if (!crafts || compiled.craftIds.length === 0) return;
    for (let k = from, left = count; left > 0; k += 2, left -= 1) {
      for (let day = this.dayAt(spans[k]); day < this.dayCount && this.dayStarts[day] < spans[k + 1]; day += 1) {
        const minutes = Math.min(spans[k + 1], this.dayEnds[day]) - Math.max(spans[k], this.dayStarts[day]);
        if (minutes > 0)
          for (const craft of crafts) if (craft >= 0) this.bump(craft * this.dayCount + day, sign * minutes);
      }
    }
  }

  /** Start of the first day that begins after an instant; the end of days where none does. */
  nextDayStart(instant: number): number {
    const day = this.dayAt(instant);
    return day + 1 < this.dayCount ? this.dayStarts[day + 1] : 0x3fffffff;
  }

  private bump(cell: number, minutes: number): void {
    const before = Math.round(this.minutes[cell] / 15);
    this.minutes[cell] += minutes;
    const after = Math.round(this.minutes[cell] / 15);
    this.sum += after * after - before * before;
  }

  /** The first day that ends after an instant. */
  private dayAt(instant: number): number {
    let low = 0;
    let high = this.dayCount;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.dayEnds[middle] > instant) high = middle;
      else low = middle + 1;
    }
    return low;
  }
}
