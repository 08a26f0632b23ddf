import type { PromiseAnswer, PromiseWayView, ShortRowView } from '@common/contract';
import type { Promised, PromiseWay, ShortRow } from '@common/promise';
import type { Desk } from '../desk';

/** What the engine found with the names that people know. */
export function answerOf(promised: Promised, desk: Pick<Desk, 'directory' | 'names' | 'problem'>): PromiseAnswer {
  const { crafts, bays } = desk.directory;
  const { shortages } = promised;
  return {
    draws: promised.draws,
    seed: promised.seed,
    behind: wayView(promised.behind, desk),
    among: wayView(promised.among, desk),
    shortages: {
      weeks: [...shortages.weeks],
      crafts: rowViews(shortages.crafts, crafts),
      bays: rowViews(shortages.bays, bays),
    },
  };
}

function wayView(
  way: PromiseWay,
  { directory, names, problem }: Pick<Desk, 'directory' | 'names' | 'problem'>,
): PromiseWayView {
  const dates = new Map(problem.keyDates.map((date) => [date.id, date]));
  const kinds = new Map(directory.keyDates.map((date) => [date.id, date]));
  const productions = new Map(directory.productions.map(({ id, name }) => [id, name]));
  return {
    ...way,
    drivers: way.drivers.map((driver) => ({ ...driver, name: names.stage(driver.stageId) })),
    asked: [...way.asked],
    others: way.others.flatMap((other) => {
      const date = dates.get(other.keyDateId);
      const kind = kinds.get(other.keyDateId)?.kind;
      if (!date || !kind) return [];
      return [{ ...other, productionName: productions.get(date.productionId) ?? '', kind, strength: date.strength }];
    }),
  };
}

function rowViews(
  rows: readonly ShortRow[],
  known: readonly { readonly id: string; readonly name: string }[],
): ShortRowView[] {
  const names = new Map(known.map(({ id, name }) => [id, name]));
  return rows.map(({ id, takenMinutes, askedMinutes, capacityMinutes, shortMinutes }) => ({
    id,
    name: names.get(id) ?? '',
    takenMinutes: [...takenMinutes],
    askedMinutes: [...askedMinutes],
    capacityMinutes: [...capacityMinutes],
    shortMinutes: [...shortMinutes],
  }));
}
