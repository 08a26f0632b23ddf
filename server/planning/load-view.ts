import type { LoadView } from '@common/contract';
import { bayLoad, craftLoad, makerLoad, type LoadRow, type Plan } from '@common/planning';
import type { Transactions } from '../storage/transactions';
import { readDesk, type Desk } from './desk';

type By = 'craft' | 'maker' | 'bay';

const LOADS = { craft: craftLoad, maker: makerLoad, bay: bayLoad } as const;

/** Hours asked against hours there, by day. */
export class Loads {
  constructor(private readonly transactions: Transactions) {}

  read(by: By): Promise<LoadView> {
    return this.transactions.read(async (manager) => viewOf(await readDesk(manager, this.transactions.clock()), by));
  }
}

function viewOf(desk: Desk, by: By): LoadView {
  const all = LOADS[by](desk.problem, desk.plan);
  const tentative = new Map(LOADS[by](desk.problem, tentativePart(desk)).map((row) => [row.id, row]));
  const names = { craft: desk.directory.crafts, maker: desk.directory.makers, bay: desk.directory.bays }[by];
  const rowOf = new Map(all.map((row) => [row.id, row]));
  return {
    days: desk.problem.days.map((day) => day.day),
    rows: names.flatMap(({ id, name }) => {
      const row = rowOf.get(id);
      return row ? [{ id, name, ...minutesOf(row), tentativeMinutes: loads(tentative.get(id)) }] : [];
    }),
  };
}

/** The placements of productions that are promised to nobody. */
function tentativePart({ rows, directory, plan }: Desk): Plan {
  const tentative = new Set(rows.productions.filter(({ state }) => state === 'tentative').map(({ id }) => id));
  const productionOf = new Map(directory.stages.map((stage) => [stage.id, stage.productionId]));
  return { placements: plan.placements.filter(({ stageId }) => tentative.has(productionOf.get(stageId) ?? '')) };
}

function minutesOf(row: LoadRow): { loadMinutes: number[]; capacityMinutes: number[] } {
  return { loadMinutes: loads(row), capacityMinutes: row.cells.map((cell) => Math.round(cell.capacityMinutes)) };
}

function loads(row: LoadRow | undefined): number[] {
  return row?.cells.map((cell) => Math.round(cell.loadMinutes)) ?? [];
}
