import type { CycleStep } from '../bounds/critical-path';
import type { Conflict, LateLimit } from '../gaps/conflict-data';
import type { FormatInstant, Names } from './names';
import { list, sayMinutes } from './say-list';

/** Why no plan keeps every requirement, as two sentences: what cannot go together, and what would mend it. */
export function sayConflict(conflict: Conflict, names: Names, formatInstant: FormatInstant): string {
  switch (conflict.kind) {
    case 'cycle':
      return (
        `These cannot all hold, by ${sayMinutes(conflict.excessMinutes)}: ${sayChain(conflict.steps, names)}. ` +
        'Widen the longest gap allowed, or shorten what has to fit inside it.'
      );
    case 'too-late':
      return (
        `${names.stage(conflict.stageId)} cannot keep to ${sayLimit(conflict.limit)} ${formatInstant(conflict.notAfter)}: ` +
        `from ${formatInstant(conflict.notBefore)} on, ${sayChain(conflict.steps, names)} takes ` +
        `${sayMinutes(conflict.excessMinutes)} too long. Begin earlier, shorten the way there, or move the limit.`
      );
    case 'collision': {
      const asked = [...conflict.bayIds.map(names.bay), ...conflict.craftIds.map(names.craft)];
      return (
        `${list(conflict.stageIds.map(names.stage))} ask together for more of ${list(asked)} than there is, ` +
        `and ${conflict.links.length > 0 ? 'the gaps between them do not let them wait for each other' : 'there is no time for one after the other'}. ` +
        'Widen a gap, or give one of them another place or other hands.'
      );
    }
  }
}

function sayLimit(limit: LateLimit): string {
  const words: Readonly<Record<LateLimit, string>> = {
    horizon: 'the end of the planned time,',
    latest: 'its latest end,',
    fixed: 'its visit at',
    pin: 'its pin at',
    progress: 'its start at',
  };
  return words[limit];
}

/** The steps in the order of time; a stage's own work and dwell are said with the stage. */
function sayChain(steps: readonly CycleStep[], names: Names): string {
  const said = steps.map(({ cause, lagMinutes }) => {
    switch (cause.kind) {
      case 'work':
        return `${names.stage(cause.stageId)} works ${sayMinutes(Math.abs(lagMinutes))}`;
      case 'dwell':
        return `${names.stage(cause.stageId)} dwells`;
      case 'window':
        return `${names.stage(cause.followerId)} starts inside the window of ${names.stage(cause.stageId)}`;
      case 'min-gap':
        return `${names.stage(cause.link.toStageId)} comes ${sayGap(cause.link.minGapMinutes)}after ${names.stage(cause.link.fromStageId)}`;
      case 'max-gap':
        return `${names.stage(cause.link.toStageId)} follows ${names.stage(cause.link.fromStageId)} within ${sayMinutes(cause.link.maxGapMinutes ?? 0)}`;
    }
  });
  return said.length === 0 ? 'its own work' : said.join('; ');
}

const sayGap = (minutes: number): string => (minutes > 0 ? `at least ${sayMinutes(minutes)} ` : '');
