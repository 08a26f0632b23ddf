import type { Budget } from '../../stop/budget';
import { Chance } from '../chance';
import { crossPeak } from './cross-peak';
import { drawFirstKeys } from './first-keys';
import { mirror, type TimedProblem } from './timed-problem';
import { TimedPass } from './timed-pass';

/** Members of each population for a budget of schedules. */
function populationSize(count: number, maxSchedules: number): number {
  const wanted = Math.round(Math.sqrt(Math.min(maxSchedules, 200_000)) * 0.6);
  return Math.max(10, Math.min(wanted, 100, Math.max(20, count)));
}

/** Schedules of one end of time: a row of starts for each member, how long each takes, and what it is compared by. */
interface Population {
  readonly pass: TimedPass;
  readonly starts: Int32Array[];
  readonly makespan: Int32Array;
  /** The makespan and, behind the point, how late the work lies in it: equal makespans leave more room where it lies early. */
  readonly fitness: Float64Array;
}

/**
 * A search for the shortest schedule of a timed problem over two populations, one that leans to the start of time and one that
 * leans to its end. Each generation reads schedules of the one from the other end, crosses them at a peak of resource use and lays
 * them out there, so that every pass is also one half of a forward-backward improvement: the bi-population genetic algorithm of
 * Debels & Vanhoucke 2005, with the peak crossover of Valls, Ballestin & Quintanilla 2008.
 */
export class TimedSearch {
  /** Starts of the best schedule found. */
  readonly best: Int32Array;
  bestMakespan = Infinity;
  private readonly chance: Chance;
  private readonly forward: Population;
  private readonly backward: Population;
  private readonly size: number;
  private readonly keys: Int32Array;
  private readonly read: Int32Array[];
  private readonly child: Int32Array;
  /** Whether schedules of the far end are plans too: they are not where releases bind. */
  private readonly isTwoSided: boolean;

  constructor(
    private readonly problem: TimedProblem,
    private readonly budget: Budget,
    seed: number,
    maxSchedules: number,
    private readonly bound: number,
    private readonly onBetter: () => void,
  ) {
    this.chance = new Chance(seed);
    this.size = populationSize(problem.count, maxSchedules);
    this.best = new Int32Array(problem.count);
    this.keys = new Int32Array(problem.count);
    this.child = new Int32Array(problem.count);
    this.read = Array.from({ length: this.size }, () => new Int32Array(problem.count));
    const far = mirror(problem);
    this.forward = this.emptyPopulation(problem);
    this.backward = this.emptyPopulation({ ...far, longest: Math.max(problem.longest, far.longest) });
    this.isTwoSided = problem.release.every((at) => at === 0);
  }

  run(): void {
    const { count } = this.problem;
    const patience = Math.max(PATIENCE, count >> 1);
    while (!this.isOver()) {
      this.found();
      let from = this.forward;
      let to = this.backward;
      let idle = 0;
      for (let last = this.populationBest(from); !this.isOver() && idle < patience;) {
        this.generation(from, to, Math.min(1, LEAST_SHAKEN + (idle * SHAKEN_MORE) / count ** 2));
        [from, to] = [to, from];
        const now = this.populationBest(from);
        idle = now < last ? 0 : idle + 1;
        last = Math.min(last, now);
        if (idle > 4 && this.isUniform(from)) break;
      }
    }
  }

  private isOver(): boolean {
    if (this.bestMakespan <= this.bound) this.budget.finish('proven-best');
    return this.budget.isSpent();
  }

  private emptyPopulation(problem: TimedProblem): Population {
    return {
      pass: new TimedPass(problem),
      starts: Array.from({ length: this.size }, () => new Int32Array(problem.count)),
      makespan: new Int32Array(this.size),
      fitness: new Float64Array(this.size),
    };
  }

  /** A first population from priority rules with chance. */
  private found(): void {
    for (let member = 0; member < this.size && !this.isOver(); member += 1) {
      drawFirstKeys(this.problem, this.chance, member, this.keys);
      const makespan = this.layOut(this.forward, this.keys, this.forward.starts[member]);
      this.forward.makespan[member] = makespan;
      this.forward.fitness[member] = makespan + this.lateness(this.forward.starts[member], makespan);
    }
  }

  private layOut(population: Population, keys: Int32Array, starts: Int32Array): number {
    const makespan = population.pass.run(keys, starts);
    this.budget.spend();
    if (makespan < this.bestMakespan && (population === this.forward || this.isTwoSided)) {
      this.bestMakespan = makespan;
      this.best.set(starts);
      if (population === this.backward) this.readFromFarEnd(starts, makespan, this.best);
      this.onBetter();
    }
    return makespan;
  }

  /** Starts as seen from the other end of time. */
  private readFromFarEnd(starts: Int32Array, makespan: number, out: Int32Array): void {
    const { durations, count } = this.problem;
    for (let stage = 0; stage < count; stage += 1) out[stage] = makespan - starts[stage] - durations[stage];
  }

  /** Every member of one population leaves a child in the other. */
  private generation(from: Population, to: Population, shaken: number): void {
    const { size, read, chance, keys, child } = this;
    for (let member = 0; member < size; member += 1)
      this.readFromFarEnd(from.starts[member], from.makespan[member], read[member]);
    const elite = this.indexOfBest(from);
    for (let member = 0; member < size && !this.budget.isSpent(); member += 1) {
      to.fitness[member] = Infinity;
      const children = member === elite ? 1 : CHILDREN;
      for (let c = 0; c < children; c += 1) {
        if (member === elite) keys.set(read[member]);
        else {
          const mate = this.tournament(from, member);
          const [mother, father] = chance.share() < 0.5 ? [member, mate] : [mate, member];
          crossPeak(
            this.problem,
            read[mother],
            from.makespan[mother],
            read[father],
            from.makespan[father],
            chance,
            shaken,
            keys,
          );
        }
        const makespan = this.layOut(to, keys, child);
        const fitness = makespan + this.lateness(child, makespan);
        if (fitness >= to.fitness[member]) continue;
        to.fitness[member] = fitness;
        to.makespan[member] = makespan;
        to.starts[member].set(child);
      }
    }
  }

  /** Where the work lies in a schedule on the whole, from 0 for its start to just under 1 for its end. */
  private lateness(starts: Int32Array, makespan: number): number {
    const { count, durations, weight } = this.problem;
    let moment = 0;
    let work = 0;
    for (let stage = 0; stage < count; stage += 1) {
      const part = durations[stage] * weight[stage];
      moment += part * (starts[stage] + durations[stage] / 2);
      work += part;
    }
    return work > 0 && makespan > 0 ? Math.min(0.999, moment / (work * makespan)) : 0;
  }

  private tournament(population: Population, except: number): number {
    const draw = (): number => {
      const other = this.chance.below(this.size - 1);
      return other >= except ? other + 1 : other;
    };
    const a = draw();
    const b = draw();
    return population.fitness[a] <= population.fitness[b] ? a : b;
  }

  private indexOfBest(population: Population): number {
    let best = 0;
    for (let member = 1; member < this.size; member += 1)
      if (population.fitness[member] < population.fitness[best]) best = member;
    return best;
  }

  private populationBest(population: Population): number {
    return population.fitness[this.indexOfBest(population)];
  }

  private isUniform(population: Population): boolean {
    return population.fitness.every((fitness) => fitness === population.fitness[0]);
  }
}

/** Children that each member has in one generation; the best of them stays. */
const CHILDREN = 2;

/** The share of children that chance shakes. It grows with each generation that has brought nothing, the more the fewer the stages. */
const LEAST_SHAKEN = 0.1;
/** The growth of that share, times the number of stages squared. */
const SHAKEN_MORE = 45;
/** Fewest generations without gain after which the search begins anew; half the number of stages where that is more. */
const PATIENCE = 12;
