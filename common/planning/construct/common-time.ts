import type { Calendar } from './calendar';
import type { Compiled, Crew } from './compiled';

/** What a crew's common time was worked out from, and the result. */
interface Known {
  readonly sources: readonly Calendar[];
  readonly common: Calendar;
}

/**
 * The time that all of a crew, and the bays that close, have in common: one calendar to look into instead of several. Worked out
 * once for each crew, and again where a maker's calendar has been changed for another.
 */
export class CommonTime {
  private readonly ordinary: (Known | undefined)[] = [];
  private readonly extended: (Known | undefined)[] = [];
  private readonly pairs = new WeakMap<Calendar, WeakMap<Calendar, Calendar>>();

  constructor(private readonly compiled: Compiled) {}

  /** The common time of a crew's makers and of the bays that close at all; null where there is neither. */
  of(crew: Crew | null, overtime: boolean, housing: Int32Array | null): Calendar | null {
    const common = crew && crew.makers.length > 0 ? this.ofCrew(crew, overtime) : null;
    return housing === null ? common : this.withBays(common, housing);
  }

  private withBays(crewTime: Calendar | null, housing: Int32Array): Calendar | null {
    let common = crewTime;
    for (let k = 0; k < housing.length; k += 1) {
      const open = housing[k] >= 0 ? this.compiled.bays.open[housing[k]] : null;
      if (open) common = common ? this.pair(common, open) : open;
    }
    return common;
  }

  /** The time in which at all one of a stage's crews might work in its bays; null where nothing sets any. */
  ofAny(stage: number, overtime: boolean, housing: Int32Array): Calendar | null {
    return this.withBays(overtime ? null : this.compiled.work.anyTime(stage), housing);
  }

  private ofCrew(crew: Crew, overtime: boolean): Calendar {
    const calendars = overtime ? this.compiled.makers.extended : this.compiled.makers.ordinary;
    const { makers, index } = crew;
    if (makers.length === 1) return calendars[makers[0]];
    const table = overtime ? this.extended : this.ordinary;
    const known = index >= 0 ? table[index] : undefined;
    if (known && isOf(known.sources, makers, calendars)) return known.common;
    const sources = Array.from(makers, (maker) => calendars[maker]);
    const common = sources.reduce((all, calendar) => all.and(calendar));
    if (index >= 0) table[index] = { sources, common };
    return common;
  }

  private pair(a: Calendar, b: Calendar): Calendar {
    let ofA = this.pairs.get(a);
    if (!ofA) this.pairs.set(a, (ofA = new WeakMap()));
    let common = ofA.get(b);
    if (!common) ofA.set(b, (common = a.and(b)));
    return common;
  }
}

function isOf(sources: readonly Calendar[], makers: Int32Array, calendars: readonly Calendar[]): boolean {
  for (let k = 0; k < makers.length; k += 1) if (sources[k] !== calendars[makers[k]]) return false;
  return true;
}
