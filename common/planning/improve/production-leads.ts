import type { Compiled } from '../construct/compiled';
import type { Estimate } from '../construct/estimate';
import { latestStartFirst } from '../construct/priority-rules';
import type { Chance } from './chance';

const DAY = 1440;
/** Days of lead for each unit of a date's weight to begin with: as many sequences of productions. */
const LEADS_BY_WEIGHT = [8, 16, 32, 64];

/**
 * How many minutes sooner than its dates ask each production may choose: what decides about lateness where many productions want
 * the same few bays and hands. A sequence of whole projects is sought before anything within them (Kurtulus & Davis 1982 for
 * rules by project; the local search over leads is our own).
 */
export class ProductionLeads {
  private readonly latestStart: Float64Array;
  private readonly spread: number;

  constructor(
    private readonly compiled: Compiled,
    estimate: Estimate,
  ) {
    this.latestStart = latestStartFirst(compiled, estimate);
    this.spread = Math.max(DAY, Math.max(...this.latestStart) - Math.min(...this.latestStart));
  }

  /** No lead for anyone. */
  none(): Float64Array {
    return new Float64Array(this.compiled.dates.productionCount);
  }

  /** Leads in proportion to the weight of each production's weightiest date, from little to much. */
  byWeight(): Float64Array[] {
    const { dates } = this.compiled;
    const weight = this.none();
    for (let date = 0; date < dates.count; date += 1) {
      for (const stage of dates.stages[date]) {
        const production = dates.productionOf[stage];
        weight[production] = Math.max(weight[production], dates.weight[date] * (dates.isHard[date] === 1 ? 8 : 1));
      }
    }
    return LEADS_BY_WEIGHT.map((days) => weight.map((one) => one * days * DAY));
  }

  /** Leads with one production's changed, or with those of two exchanged. */
  change(leads: Float64Array, chance: Chance): Float64Array {
    const changed = leads.slice();
    const one = chance.below(leads.length);
    if (chance.share() < 0.5) changed[one] += (chance.share() - 0.5) * this.spread;
    else {
      const other = chance.below(leads.length);
      changed[one] = leads[other];
      changed[other] = leads[one];
    }
    return changed;
  }

  /** The key of each stage, the smallest first. */
  keys(leads: Float64Array): Float64Array {
    const { productionOf } = this.compiled.dates;
    return this.latestStart.map((start, stage) => start - leads[productionOf[stage]]);
  }
}
