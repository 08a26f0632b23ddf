import type { Unmet } from '../problem/result';
import type { FormatInstant, Names } from './names';

export function sayUnmet(_unmet: Unmet, _names: Names, _formatInstant: FormatInstant): string {
  throw new Error('Not written yet.');
}
