import type { Activity, InstanceData, StartLag } from './instance-data';
import { LARGEST_NUMBER, LineReader } from './line-reader';

interface PendingSuccessor {
  readonly from: number;
  readonly project: number;
  readonly number: number;
  /** Where the complaint goes if the successor does not exist. */
  readonly fault: Error;
}

/** Reads an MPLIB file (Van Eynde & Vanhoucke 2020): several projects over shared resources. Projects and activities count from 1. */
export function readMplib(file: string, text: string): InstanceData {
  const lines = new LineReader(file, text);
  const projects = lines.inRange(lines.numbers('the number of projects', 1)[0], 1, 10_000, 'the number of projects');
  const resources = lines.inRange(lines.numbers('the number of resources', 1)[0], 0, 1_000, 'the number of resources');
  const capacities = resources === 0 ? [] : lines.numbers('the row of capacities', resources);
  lines.expectCount(capacities, resources, 'the row of capacities');
  for (const units of capacities) lines.inRange(units, 0, LARGEST_NUMBER, 'a capacity');
  const activities: Activity[] = [];
  const pending: PendingSuccessor[] = [];
  const positions = new Map<string, number>();
  for (let project = 1; project <= projects; project++) {
    const [count, release] = lines.numbers(`the size and release of project ${project}`, 2);
    lines.inRange(count, 1, 100_000, `the number of activities of project ${project}`);
    lines.inRange(release, 0, LARGEST_NUMBER, `the release of project ${project}`);
    if (resources > 0) lines.numbers(`the resource use of project ${project}`, resources);
    for (let number = 1; number <= count; number++) {
      const label = `${project}:${number}`;
      positions.set(label, activities.length);
      activities.push(readRow(lines, label, release, resources, activities.length, pending));
    }
  }
  const arcs = pending.map((successor): StartLag => {
    const to = positions.get(`${successor.project}:${successor.number}`);
    if (to === undefined) throw successor.fault;
    return { from: successor.from, to, lag: activities[successor.from].duration };
  });
  return { format: 'multiproject', activities, capacities, arcs, skills: null };
}

function readRow(
  lines: LineReader,
  label: string,
  release: number,
  resources: number,
  from: number,
  pending: PendingSuccessor[],
): Activity {
  const words = lines.next(`the row of activity ${label}`).trim().split(/\s+/);
  if (words.length < 2 + resources)
    throw lines.fault(`activity ${label} should have a duration, ${resources} demands and a number of successors.`);
  const numbers = words
    .slice(0, 2 + resources)
    .map((word) => lines.inRange(lines.wholeNumber(word, label), 0, LARGEST_NUMBER, `a number of activity ${label}`));
  const successors = words.slice(2 + resources);
  lines.expectNumber(successors.length, numbers[1 + resources], `the number of successors of activity ${label}`);
  for (const word of successors) {
    const parts = /^(\d+):(\d+)$/.exec(word);
    if (parts === null) throw lines.fault(`"${word}" is not a successor written project:activity.`);
    const fault = lines.fault(`activity ${label} has the successor ${word}, which does not exist.`);
    pending.push({ from, project: Number(parts[1]), number: Number(parts[2]), fault });
  }
  return { label, duration: numbers[0], demands: numbers.slice(1, 1 + resources), release };
}
