import type { Activity, InstanceData, StartLag } from './instance-data';
import { LARGEST_NUMBER, LineReader } from './line-reader';

/** Reads a single-mode PSPLIB file (Kolisch & Sprecher 1996). Jobs are numbered from 1; the first is the source, the last the sink. */
export function readSm(file: string, text: string): InstanceData {
  const lines = new LineReader(file, text);
  const jobs = headerNumber(lines, 'jobs (incl. supersource/sink )', 2);
  const resources = headerNumber(lines, '- renewable', 0);
  const arcsByJob = readPrecedences(lines, jobs);
  const activities = readRequests(lines, jobs, resources);
  lines.skipPast('RESOURCEAVAILABILITIES:');
  lines.next('the resource titles');
  const capacities = resources === 0 ? [] : lines.numbers('the row of capacities', resources);
  lines.expectCount(capacities, resources, 'the row of capacities');
  for (const units of capacities) lines.inRange(units, 0, LARGEST_NUMBER, 'a capacity');
  const arcs = arcsByJob.map(({ from, to }) => ({ from, to, lag: activities[from].duration }));
  return { format: 'psplib', activities, capacities, arcs, skills: null };
}

function headerNumber(lines: LineReader, title: string, least: number): number {
  for (;;) {
    const line = lines.next(`"${title}"`);
    if (!line.includes(title)) continue;
    const word = /:\s*(\S+)/.exec(line)?.[1] ?? '';
    return lines.inRange(lines.wholeNumber(word, title), least, 100_000, `"${title}"`);
  }
}

function readPrecedences(lines: LineReader, jobs: number): Omit<StartLag, 'lag'>[] {
  lines.skipPast('PRECEDENCE RELATIONS:');
  lines.next('the precedence titles');
  const arcs: Omit<StartLag, 'lag'>[] = [];
  for (let job = 1; job <= jobs; job++) {
    const [number, modes, count, ...successors] = lines.numbers(`the successors of job ${job}`, 3);
    lines.expectNumber(number, job, 'the job number');
    lines.expectNumber(modes, 1, `the number of modes of job ${job}`);
    lines.expectNumber(successors.length, count, `the number of successors of job ${job}`);
    for (const successor of successors) {
      lines.inRange(successor, 1, jobs, `a successor of job ${job}`);
      arcs.push({ from: job - 1, to: successor - 1 });
    }
  }
  return arcs;
}

function readRequests(lines: LineReader, jobs: number, resources: number): Activity[] {
  lines.skipPast('REQUESTS/DURATIONS:');
  lines.next('the request titles');
  lines.next('the rule under the request titles');
  const activities: Activity[] = [];
  for (let job = 1; job <= jobs; job++) {
    const row = lines.numbers(`the requests of job ${job}`, 3 + resources);
    lines.expectCount(row, 3 + resources, `the requests of job ${job}`);
    lines.expectNumber(row[0], job, 'the job number');
    lines.expectNumber(row[1], 1, `the mode of job ${job}`);
    for (const value of row.slice(2)) lines.inRange(value, 0, LARGEST_NUMBER, `a number of job ${job}`);
    activities.push({ label: String(job), duration: row[2], demands: row.slice(3), release: 0 });
  }
  return activities;
}
