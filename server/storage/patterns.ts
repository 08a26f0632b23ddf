import { patternFault } from '@common/time/pattern';
import type { FieldFault, Pattern } from '@common/contract';
import type { PatternColumns } from '@database/entities';

/** A stored pattern as the contract has it. */
export function patternOf(row: PatternColumns): Pattern {
  return {
    firstDay: row.firstDay,
    rule: row.rule,
    startMinuteOfDay: row.startMinuteOfDay,
    lengthMinutes: row.lengthMinutes,
    exceptDays: [...row.exceptDays].sort(),
    kind: row.kind,
  };
}

/** What is wrong with patterns beyond the shape of their fields; `pointer` names their list. */
export function patternFaults(patterns: readonly Pattern[], pointer: string): FieldFault[] {
  return patterns.flatMap((pattern, i) => {
    const detail = patternFault(pattern);
    return detail === null ? [] : [{ pointer: `${pointer}/${String(i)}/rule`, detail }];
  });
}
