import type { Reason } from '../problem/explanation';
import type { FormatInstant, Names } from './names';

export function sayReason(_reason: Reason, _names: Names, _formatInstant: FormatInstant): string {
  throw new Error('Not written yet.');
}
