import type { Fault } from './fault';
import type { Problem } from './problem';

export function validate(_problem: Problem): Fault[] {
  throw new Error('Not written yet.');
}
