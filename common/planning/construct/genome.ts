/**
 * What a search varies and a generator reads: the order in which stages choose their places, and for each stage the crew it is
 * given (an index into its crews, -1 for the engine's own choice) and whether it may work overtime.
 */
export interface Genome {
  readonly order: Int32Array;
  readonly crewChoice: Int16Array;
  readonly overtime: Uint8Array;
}

/** A genome with an order and nothing else decided. */
export function genomeOf(order: ArrayLike<number>): Genome {
  return {
    order: Int32Array.from(order),
    crewChoice: new Int16Array(order.length).fill(-1),
    overtime: new Uint8Array(order.length),
  };
}

/** A copy that may be changed without changing the first. */
export function copyGenome(genome: Genome): Genome {
  return { order: genome.order.slice(), crewChoice: genome.crewChoice.slice(), overtime: genome.overtime.slice() };
}
