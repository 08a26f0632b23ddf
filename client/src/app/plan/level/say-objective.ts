import type { Objective } from '@common/planning';
import { formatMinutes } from '@common/time/format-instant';

/** One part of what is sought, before and after, in words. */
export interface ObjectiveLine {
  readonly part: keyof Objective;
  readonly name: string;
  readonly before: string;
  readonly after: string;
  /** Whether it got better, worse, or stayed. */
  readonly change: 'better' | 'worse' | 'same';
  /** What is proven about it; empty where nothing is. */
  readonly proven: string;
}

type Bound = Readonly<Record<string, number | null>>;

const NAMES: readonly (readonly [keyof Objective, string])[] = [
  ['unplaced', 'Stages and rules that can’t be met'],
  ['hardLateness', 'Late on hard dates, weighed'],
  ['wishedLateness', 'Late on wished dates, weighed'],
  ['costMinor', 'Overtime, freelancers, missed windows'],
  ['unevenness', 'Unevenness of the load'],
  ['changes', 'Stages other than issued'],
];

/** The parts of the objective in their order, as two plans compare. `sayMoney` writes minor units. */
export function objectiveLines(
  before: Objective,
  after: Objective,
  bound: Bound | null,
  sayMoney: (minor: number) => string,
): ObjectiveLine[] {
  return NAMES.map(([part, name]) => ({
    part,
    name,
    before: part === 'unevenness' ? '100 %' : sayAmount(part, before[part], sayMoney),
    after: part === 'unevenness' ? sayShare(after[part], before[part]) : sayAmount(part, after[part], sayMoney),
    change: after[part] < before[part] ? 'better' : after[part] > before[part] ? 'worse' : 'same',
    proven: sayProven(part, after[part], bound?.[part] ?? null, sayMoney),
  }));
}

/** "Best possible" where that is proven; the proven lower end where it isn't; never more than is known. */
function sayProven(
  part: keyof Objective,
  value: number,
  bound: number | null,
  sayMoney: (minor: number) => string,
): string {
  if (bound === null) return '';
  if (bound >= value) return 'proven: no plan does better';
  if (part === 'unevenness') return `proven within ${Math.ceil(((value - bound) / Math.max(1, value)) * 100)} %`;
  return `proven: not below ${sayAmount(part, bound, sayMoney)}`;
}

/** An amount of one part of the objective. */
export function sayAmount(part: keyof Objective, value: number, sayMoney: (minor: number) => string): string {
  if (part === 'costMinor') return sayMoney(value);
  if (value === 0) return 'none';
  return part === 'hardLateness' || part === 'wishedLateness' ? formatMinutes(value) : `${value}`;
}

function sayShare(after: number, before: number): string {
  return before === 0 ? (after === 0 ? '100 %' : 'more') : `${Math.round((after / before) * 100)} %`;
}
