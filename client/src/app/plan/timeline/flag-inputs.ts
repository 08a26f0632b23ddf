import type { Directory } from '@common/contract';
import type { KeyDate } from '@common/planning';
import { formatMinutes } from '@common/time/format-instant';
import type { DateMargin } from '../date-margins';
import type { PlanNames } from '../wording/plan-names';
import type { FlagInput } from './engine/flags';

/** A flag with the mark of its production. */
export interface MarkedFlag extends FlagInput {
  readonly mark: string;
  readonly hue: number;
}

/** What is written on each key date's flag: its name and, where it is late, that word and by how much. */
export function flagInputs(
  keyDates: readonly KeyDate[],
  margins: readonly DateMargin[],
  names: PlanNames,
  directory: Directory,
): MarkedFlag[] {
  const margin = new Map(margins.map((one) => [one.keyDate.id, one.marginMinutes]));
  const productions = new Map(directory.productions.map((production) => [production.id, production]));
  return keyDates.map((date) => {
    const marginMinutes = margin.get(date.id) ?? null;
    const production = productions.get(date.productionId);
    const late = marginMinutes !== null && marginMinutes < 0 ? `, late ${formatMinutes(-marginMinutes)}` : '';
    return {
      keyDateId: date.id,
      productionId: date.productionId,
      at: date.at,
      strength: date.strength,
      marginMinutes,
      text: `${names.keyDate(date.id)}${late}`,
      mark: production?.mark ?? '––',
      hue: production?.hue ?? 0,
    };
  });
}
