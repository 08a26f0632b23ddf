import type { Activity, InstanceData, StartLag } from './instance-data';
import { LARGEST_NUMBER, LineReader } from './line-reader';

/** Reads a ProGen/max file (Schwindt 1996): minimum and maximum lags between starts. Activity 0 is the source, n+1 the sink. */
export function readSch(file: string, text: string): InstanceData {
  const lines = new LineReader(file, text);
  const header = lines.numbers('the header "activities resources 0 0"', 2);
  const count = lines.inRange(header[0], 0, 100_000, 'the number of activities') + 2;
  const resources = lines.inRange(header[1], 0, 1_000, 'the number of resources');
  const arcs: StartLag[] = [];
  for (let activity = 0; activity < count; activity++) arcs.push(...readLags(lines, activity, count));
  const activities: Activity[] = [];
  for (let activity = 0; activity < count; activity++) activities.push(readActivity(lines, activity, resources));
  const capacities = resources === 0 ? [] : lines.numbers('the row of capacities', resources);
  lines.expectCount(capacities, resources, 'the row of capacities');
  for (const units of capacities) lines.inRange(units, 0, LARGEST_NUMBER, 'a capacity');
  return { format: 'rcpspmax', activities, capacities, arcs, skills: null };
}

function readLags(lines: LineReader, activity: number, count: number): StartLag[] {
  const row = lines.numbers(`the successors of activity ${activity}`, 3);
  lines.expectNumber(row[0], activity, 'the activity number');
  lines.expectNumber(row[1], 1, `the number of modes of activity ${activity}`);
  const successors = lines.inRange(row[2], 0, count, `the number of successors of activity ${activity}`);
  lines.expectCount(row, 3 + 2 * successors, `the successors and lags of activity ${activity}`);
  return row.slice(3, 3 + successors).map((to, k) => ({
    from: activity,
    to: lines.inRange(to, 0, count - 1, `a successor of activity ${activity}`),
    lag: lines.inRange(row[3 + successors + k], -LARGEST_NUMBER, LARGEST_NUMBER, `a lag of activity ${activity}`),
  }));
}

function readActivity(lines: LineReader, activity: number, resources: number): Activity {
  const row = lines.numbers(`the demands of activity ${activity}`, 3 + resources);
  lines.expectCount(row, 3 + resources, `the demands of activity ${activity}`);
  lines.expectNumber(row[0], activity, 'the activity number');
  lines.expectNumber(row[1], 1, `the mode of activity ${activity}`);
  for (const value of row.slice(2)) lines.inRange(value, 0, LARGEST_NUMBER, `a number of activity ${activity}`);
  return { label: String(activity), duration: row[2], demands: row.slice(3), release: 0 };
}
