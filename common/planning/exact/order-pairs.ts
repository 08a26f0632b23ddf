import { atLeast, type Engine } from './engine';
import type { TimedBay, TimedModel } from './timed-model';

/** Two stages that no lag puts in order, with 0/1 variables for either order; -1 for an order that lags exclude. */
export interface Order {
  readonly first: number;
  readonly second: number;
  readonly firstBefore: number;
  readonly secondBefore: number;
}

/** Pairs of stages that may overlap in time by the lags alone, and for which `isWanted`; variables from `next` on. */
export function orderPairs(
  distances: readonly Int32Array[],
  durations: readonly number[],
  isWanted: (a: number, b: number) => boolean,
  next: number,
): Order[] {
  const orders: Order[] = [];
  let variable = next;
  for (let first = 0; first < durations.length; first++)
    for (let second = first + 1; second < durations.length; second++) {
      const isApart = distances[first][second] >= durations[first] || distances[second][first] >= durations[second];
      if (isApart || durations[first] === 0 || durations[second] === 0 || !isWanted(first, second)) continue;
      const mayPrecede = distances[second][first] <= -durations[first] || distances[second][first] === NO_LAG;
      const mayFollow = distances[first][second] <= -durations[second] || distances[first][second] === NO_LAG;
      orders.push({
        first,
        second,
        firstBefore: mayPrecede ? variable++ : -1,
        secondBefore: mayFollow ? variable++ : -1,
      });
    }
  return orders;
}

/** The literals of which one holds where the two stages do not overlap. */
export function canOrder(order: Order): (readonly [number, number])[] {
  return [order.firstBefore, order.secondBefore].filter((v) => v >= 0).map((v) => atLeast(v, 1));
}

/** Ties the variables to the starts: while one is 1, the one stage ends before the other starts. */
export function addOrders(engine: Engine, orders: readonly Order[], durations: readonly number[]): void {
  for (const { first, second, firstBefore, secondBefore } of orders) {
    if (firstBefore >= 0) engine.arcs.addLag(first, second, durations[first], ...atLeast(firstBefore, 1));
    if (secondBefore >= 0) engine.arcs.addLag(second, first, durations[second], ...atLeast(secondBefore, 1));
    if (firstBefore >= 0 && secondBefore >= 0) engine.addClause([2 * firstBefore + 1, 0], [2 * secondBefore + 1, 0]);
  }
}

/** Whether two stages together ask more of some bay than it has. */
export function collide(bays: readonly TimedBay[], a: number, b: number): boolean {
  return bays.some(({ capacity, demands }) => demands[a] + demands[b] > capacity);
}

/** No path of lags leads from one stage to another. */
export const NO_LAG = -0x40000000;

/** Longest paths between all starts (Floyd 1962); null where some path leads back to its beginning with a positive length. */
export function longestLags(model: TimedModel): Int32Array[] | null {
  const n = model.durations.length;
  const distances = Array.from({ length: n }, (_, i) => new Int32Array(n).fill(NO_LAG).fill(0, i, i + 1));
  for (const { from, to, lag } of model.lags) distances[from][to] = Math.max(distances[from][to], lag);
  for (let k = 0; k < n; k++)
    for (let i = 0; i < n; i++) {
      const half = distances[i][k];
      if (half === NO_LAG) continue;
      for (let j = 0; j < n; j++) {
        const other = distances[k][j];
        if (other !== NO_LAG && half + other > distances[i][j]) distances[i][j] = half + other;
      }
    }
  return distances.every((row, i) => row[i] === 0) ? distances : null;
}
