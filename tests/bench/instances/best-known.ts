import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

/** What is known of an instance: null bounds where the table has none; `unsat` where it is proved to have no plan. */
export interface BestKnown {
  readonly lowerBound: number | null;
  readonly best: number | 'unsat' | null;
}

/** The table `best-known.csv` beside the instances of a set, by file name; empty where there is none. */
export function readBestKnown(directory: string): ReadonlyMap<string, BestKnown> {
  const path = join(directory, 'best-known.csv');
  const table = new Map<string, BestKnown>();
  if (!existsSync(path)) return table;
  const [header, ...rows] = readFileSync(path, 'utf8').trim().split(/\r?\n/);
  const titles = header.split(',');
  const lowerColumn = titles.indexOf('lower_bound');
  const bestColumn = titles.findIndex((title) => title === 'best_known' || title === 'best_published');
  for (const row of rows) {
    const cells = row.split(',');
    const best = cells[bestColumn];
    table.set(cells[0], {
      lowerBound: numberOrNull(cells[lowerColumn]),
      best: best === 'unsat' ? 'unsat' : numberOrNull(best),
    });
  }
  return table;
}

function numberOrNull(cell: string | undefined): number | null {
  return cell !== undefined && /^\d+$/.test(cell.trim()) ? Number(cell) : null;
}
