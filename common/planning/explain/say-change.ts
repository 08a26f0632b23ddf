import type { FormatInstant, Names } from './names';
import type { PlanChange } from './plan-change';
import { list } from './say-list';

/** One change between two plans as a sentence. */
export function sayChange(change: PlanChange, names: Names, formatInstant: FormatInstant): string {
  const stage = names.stage(change.stageId);
  switch (change.kind) {
    case 'added':
      return `${stage} is new and starts ${formatInstant(change.start)}.`;
    case 'removed':
      return `${stage} is gone; it was to start ${formatInstant(change.start)}.`;
    case 'moved':
      return `${stage} starts ${change.to > change.from ? 'later' : 'earlier'}: ${formatInstant(change.to)} instead of ${formatInstant(change.from)}.`;
    case 'reshaped':
      return `${stage} ends ${formatInstant(change.toEnd)} instead of ${formatInstant(change.fromEnd)}.`;
    case 'crew': {
      const joined = list(change.joined.map(names.maker));
      const left = list(change.left.map(names.maker));
      if (change.left.length === 0) return `${joined} ${change.joined.length > 1 ? 'join' : 'joins'} ${stage}.`;
      if (change.joined.length === 0) return `${left} ${change.left.length > 1 ? 'leave' : 'leaves'} ${stage}.`;
      return `${stage} goes from ${left} to ${joined}.`;
    }
    case 'bay':
      return `${stage} moves from ${list(change.from.map(names.bay))} to ${list(change.to.map(names.bay))}.`;
  }
}
