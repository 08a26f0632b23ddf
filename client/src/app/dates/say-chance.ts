import type { ForecastView } from '@common/contract';

/** "under 1 in 1,000", "4.2 %", "63 %", "over 999 in 1,000": a chance as far as so many draws can tell it. */
export function sayChance(share: number, draws: number): string {
  if (share <= 0) return `under 1 in ${draws.toLocaleString('en')}`;
  if (share >= 1) return `over ${(draws - 1).toLocaleString('en')} in ${draws.toLocaleString('en')}`;
  const percent = share * 100;
  return `${percent < 9.95 || percent > 90.05 ? percent.toFixed(1) : percent.toFixed(0)} %`;
}

/** From a fifth on a chance of missing is said to be a risk, from a half on to be likelier than not. Common practice, no source. */
const AT_RISK = 0.2;
const LIKELIER = 0.5;

/** What a chance of missing comes to in a word, with its tone; null where it needs none. */
export function judgeChance(share: number): { readonly word: string; readonly tone: 'risk' | 'fault' } | null {
  if (share >= LIKELIER) return { word: 'likelier missed than met', tone: 'fault' };
  return share >= AT_RISK ? { word: 'at risk', tone: 'risk' } : null;
}

/** "up from 12 % on Mon 30 Nov", "as on Mon 30 Nov": how a chance has moved; whole per cents, for draws tell no finer over days. */
export function sayChanceMoved(now: number, before: number, day: string): string {
  const [here, there] = [Math.round(now * 100), Math.round(before * 100)];
  if (here === there) return `as on ${day}`;
  return `${here > there ? 'up' : 'down'} from ${there} % on ${day}`;
}

/** "320 of 1,000 draws". */
export function sayDraws({ draws, drawsAsked }: Pick<ForecastView, 'draws' | 'drawsAsked'>): string {
  return `${draws.toLocaleString('en')} of ${drawsAsked.toLocaleString('en')} draws`;
}

/** Where the chances come from: how many draws, and what the studio's finished work says of its estimates. */
export function sayBasis(forecast: Pick<ForecastView, 'draws' | 'drawsAsked' | 'overrun' | 'stages'>): string {
  const { draws, drawsAsked, overrun } = forecast;
  if (forecast.stages.length === 0) return 'Nothing has a place in the plan yet; chances come with it.';
  const made = draws < drawsAsked ? `${sayDraws(forecast)}, for it was stopped` : `${draws.toLocaleString('en')} draws`;
  return `Chances are from living the plan through: ${made}. ${sayOverrun(overrun)}`;
}

function sayOverrun({ learning, middlePermille, pastStages }: ForecastView['overrun']): string {
  if (learning === 'estimates') return 'Estimates are believed as they stand, as the settings say.';
  const share = `${(middlePermille / 10).toFixed(0)} % of its estimates`;
  if (pastStages === 0) return `No finished work to learn from yet: the studio is taken to need ${share}.`;
  return `${pastStages === 1 ? 'One finished stage says' : `${pastStages} finished stages say`} that the studio needs ${share}.`;
}
