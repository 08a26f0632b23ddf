import type { Fault } from './fault';
import { findLinkCycles } from './link-cycles';
import type { Problem } from './problem';
import { findAmountFaults } from './validate-amounts';
import { findIdFaults } from './validate-ids';
import { findPlaceFaults } from './validate-places';
import { findWorkFaults } from './validate-work';

/**
 * Faults of a problem that can be told without a search, in a stable order; an empty list means that a search may start.
 * Where ids or amounts make no sense, only those faults are told, because the rest cannot be judged.
 */
export function validate(problem: Problem): Fault[] {
  const senseless = [...findIdFaults(problem), ...findAmountFaults(problem)];
  if (senseless.length > 0) return senseless;
  const cycles = findLinkCycles(problem).map((cycle): Fault => ({ kind: 'link-cycle', ...cycle }));
  return [...findWorkFaults(problem), ...findPlaceFaults(problem), ...cycles];
}
