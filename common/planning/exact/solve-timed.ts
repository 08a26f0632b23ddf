import { addCrewConstraints, crewVariables, sparingly, type CrewChoice, type CrewVariables } from './crew-constraints';
import { Engine } from './engine';
import { hallBays } from './hall-bays';
import { addOrders, canOrder, collide, longestLags, orderPairs, type Order } from './order-pairs';
import { Search, type SearchBudget } from './search';
import { TimeTable } from './time-table';
import type { TimedBay, TimedModel } from './timed-model';

/** A solution: starts by stage, and for each stage its crew as pairs of maker and craft. */
export interface TimedSolution {
  readonly starts: readonly number[];
  readonly crews: readonly (readonly (readonly [maker: number, craft: number])[])[];
  readonly makespan: number;
}

/** How far a solve has come. */
export type TimedEnd = 'proved' | 'infeasible' | 'budget';

/** Stages beyond which pairs are only put in order where a bay forces them apart. */
const MOST_STAGES_FOR_PAIRS = 80;

/** Exact search on one timed model; `run` may be called again with a larger budget. */
export class TimedSolver {
  private readonly engine: Engine;
  private readonly search: Search | null = null;
  private readonly crews: CrewVariables | null = null;
  private readonly makespan: number;
  private readonly orders: readonly Order[];
  private isExhausted = false;

  constructor(
    private readonly model: TimedModel,
    private readonly onBetter: (solution: TimedSolution) => void = () => undefined,
  ) {
    const n = model.durations.length;
    this.makespan = n;
    const distances = longestLags(model);
    const hall = model.crews === null ? [] : hallBays(model.crews, model.durations);
    const bays = [...model.bays, ...hall];
    const orders = distances === null ? [] : this.pairs(distances, bays);
    this.orders = orders;
    const ordersEnd = orders.reduce((last, order) => Math.max(last, order.firstBefore, order.secondBefore), n) + 1;
    if (model.crews !== null) this.crews = crewVariables(model.crews, ordersEnd);
    const flags = (this.crews?.next ?? ordersEnd) - n - 1;
    const latestEnd = model.problem.horizon.end - model.problem.horizon.start;
    const zeros = new Array<number>(flags).fill(0);
    this.engine = new Engine([...model.earliest, 0, ...zeros], [...model.latest, latestEnd, ...zeros.map(() => 1)]);
    const isImpossible =
      distances === null ||
      model.latest.some((latest, k) => latest < model.earliest[k]) ||
      bays.some((bay) => bay.demands.some((units, k) => units > bay.capacity && model.durations[k] > 0));
    if (isImpossible || !this.constrain(bays, orders)) {
      this.isExhausted = true;
      return;
    }
    const crewChoices = model.crews !== null && this.crews !== null ? sparingly(model.crews, this.crews) : [];
    const ofOrders = orders.flatMap((order) => [order.firstBefore, order.secondBefore].filter((v) => v >= 0));
    const goal = {
      objective: this.makespan,
      starts: [...model.durations.keys()],
      choices: [...ofOrders, ...crewChoices.map((choice) => choice.variable)],
      choicesOf: crewChoices.length === 0 ? [] : model.durations.map((_, stage) => choicesOf(crewChoices, stage)),
    };
    this.search = new Search(this.engine, goal, (values) => this.onBetter(this.solution(values)));
  }

  /** Conflicts so far: each ended one attempt to lay out the stages. */
  get conflicts(): number {
    return this.search?.conflicts ?? 0;
  }

  /** No plan ends earlier, in minutes from the horizon's start. */
  get lowerBound(): number {
    return this.search?.lowerBound ?? 0;
  }

  /** The best solution found; null where there is none yet. */
  get best(): TimedSolution | null {
    return this.search?.best ? this.solution(this.search.best) : null;
  }

  /** Only solutions with a smaller makespan are sought from now on; between runs. */
  askBelow(makespan: number): void {
    if (!this.engine.assert(2 * this.makespan + 1, 1 - makespan)) this.isExhausted = true;
  }

  /** Takes starts found elsewhere as what to better: only shorter solutions are sought, near to them first; between runs. */
  askBetterThan(starts: Int32Array, makespan: number): void {
    this.askBelow(makespan);
    const values = new Int32Array(this.engine.trail.value.length >> 1).fill(-1);
    values.set(starts);
    values[this.makespan] = makespan;
    for (const { first, second, firstBefore, secondBefore } of this.orders) {
      if (firstBefore >= 0) values[firstBefore] = starts[first] + this.model.durations[first] <= starts[second] ? 1 : 0;
      if (secondBefore >= 0)
        values[secondBefore] = starts[second] + this.model.durations[second] <= starts[first] ? 1 : 0;
    }
    this.search?.lean(values);
  }

  run(budget: SearchBudget): TimedEnd {
    if (this.isExhausted || this.search === null) return 'infeasible';
    return this.search.run(budget);
  }

  private pairs(distances: readonly Int32Array[], bays: readonly TimedBay[]): Order[] {
    const { durations, crews } = this.model;
    const n = durations.length;
    if (crews === null && n > MOST_STAGES_FOR_PAIRS) return [];
    const sharesMakers = (a: number, b: number): boolean =>
      crews !== null && crews.holds.some((holds) => canServe(holds, crews.needs[a]) && canServe(holds, crews.needs[b]));
    return orderPairs(distances, durations, (a, b) => collide(bays, a, b) || sharesMakers(a, b), n + 1);
  }

  private constrain(bays: readonly TimedBay[], orders: readonly Order[]): boolean {
    const { engine, model } = this;
    const { durations, lags, crews } = model;
    const variables = [...durations.keys()];
    for (const { from, to, lag } of lags) engine.arcs.addLag(from, to, lag);
    for (const v of variables) engine.arcs.addLag(v, this.makespan, durations[v]);
    addOrders(engine, orders, durations);
    for (const order of orders) if (collide(bays, order.first, order.second)) engine.addClause(...canOrder(order));
    for (const { capacity, demands } of bays)
      engine.add(new TimeTable(engine.trail, { capacity, demands, durations, variables }));
    if (crews !== null && this.crews !== null) addCrewConstraints(engine, crews, this.crews, orders);
    return engine.start();
  }

  private solution(values: Int32Array): TimedSolution {
    const n = this.model.durations.length;
    const crews: (readonly [number, number])[][] = Array.from({ length: n }, () => []);
    for (const { variable, stage, maker, craft } of this.crews?.choices ?? [])
      if (values[variable] === 1) crews[stage].push([maker, craft]);
    const starts = [...values.subarray(0, n)];
    return { starts, crews, makespan: values[this.makespan] };
  }
}

const canServe = (holds: readonly boolean[], needs: readonly number[]): boolean =>
  needs.some((need, craft) => need > 0 && holds[craft]);

const choicesOf = (choices: readonly CrewChoice[], stage: number): number[] =>
  choices.filter((choice) => choice.stage === stage).map((choice) => choice.variable);
