import type { Plan } from '../problem/plan';
import type { PlanChange } from './plan-change';

export function comparePlans(_before: Plan, _after: Plan): PlanChange[] {
  throw new Error('Not written yet.');
}
