import type { FormatInstant, Names } from './names';
import type { PlanChange } from './plan-change';

export function sayChange(_change: PlanChange, _names: Names, _formatInstant: FormatInstant): string {
  throw new Error('Not written yet.');
}
