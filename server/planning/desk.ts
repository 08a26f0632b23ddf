import type { EntityManager } from 'typeorm';
import type { Directory } from '@common/contract';
import { check, fingerprint, takeInProgress, type Names, type Plan, type Problem, type Unmet } from '@common/planning';
import { buildProblem, type StudioSnapshot } from '@common/planning-input';
import { dayOfInstant } from '@common/time/calendar-day';
import type { WorkingRevision } from '@database/entities';
import { directoryOf, formatIn, namesOf } from './directory';
import { RevisionRepository } from './revision-repository';
import { minuteOf, snapshotOf, type Pins } from './snapshot';
import { applyMeasures, type Measure } from '@common/rescue';
import { readStudioRows, type StudioRows } from './snapshot-repository';

const MINUTES_PER_HOUR = 60;

/**
 * The studio and its working plan, read at one instant and laid on the desk: what reading, moving, levelling and issuing all
 * start from.
 */
export interface Desk {
  readonly rows: StudioRows;
  readonly head: WorkingRevision | null;
  readonly pins: Pins;
  /** What the working plan counts on besides what the studio has. */
  readonly measures: readonly Measure[];
  readonly now: number;
  /** Where the problem's horizon begins; see `planningFrom`. */
  readonly from: number;
  readonly snapshot: StudioSnapshot;
  readonly problem: Problem;
  /** The head's plan with what has happened since taken in; empty before there is one. */
  readonly plan: Plan;
  /** What the checker says of `plan`. */
  readonly unmet: readonly Unmet[];
  /** Whether the head no longer answers the studio as it is. */
  readonly isStale: boolean;
  readonly directory: Directory;
  readonly names: Names;
  readonly format: (at: number) => string;
}

/** Reads the studio and lays out its working plan; the manager has to be that of a transaction that sees one instant. */
export async function readDesk(manager: EntityManager, at: Date): Promise<Desk> {
  const rows = await readStudioRows(manager);
  const { headRevisionId, zone } = rows.studio;
  const head = headRevisionId === null ? null : await new RevisionRepository(manager).byId(headRevisionId);
  const pins = head?.layout.pins ?? {};
  const measures = head?.layout.measures ?? [];
  const now = minuteOf(at);
  const from = planningFrom(head, now, zone);
  const snapshot = applyMeasures(snapshotOf(rows, pins), measures);
  const problem = buildProblem(snapshot, { now: from, horizonEnd: null });
  const plan = takeInProgress(problem, head?.layout.plan ?? { placements: [] });
  const directory = directoryOf(rows, measures);
  return {
    rows,
    head,
    pins,
    measures,
    now,
    from,
    snapshot,
    problem,
    plan,
    unmet: check(problem, plan),
    isStale: head === null || head.plannedFrom !== from || nameOfContent(problem) !== head.fingerprint,
    directory,
    names: namesOf(directory),
    format: formatIn(zone),
  };
}

/** The problem of the same studio from a minute on, with other pins or measures. */
export function problemOf(
  { rows, measures: counted, pins: held }: Pick<Desk, 'rows' | 'measures' | 'pins'>,
  { from, pins = held, measures = counted }: Partial<Pick<Desk, 'pins' | 'measures'>> & Pick<Desk, 'from'>,
): Problem {
  return buildProblem(applyMeasures(snapshotOf(rows, pins), measures), { now: from, horizonEnd: null });
}

/**
 * The minute at which the problem begins. On the day on which the plan was laid out it is the minute of that, so that the plan and
 * what a hand does to it answer the same problem; on later days what is still to do can no longer lie before the present hour.
 */
export function planningFrom(head: Pick<WorkingRevision, 'plannedFrom'> | null, now: number, zone: string): number {
  const isSameDay = head !== null && dayOfInstant(head.plannedFrom, zone) === dayOfInstant(now, zone);
  return isSameDay && head.plannedFrom <= now ? head.plannedFrom : now - (now % MINUTES_PER_HOUR);
}

/**
 * The name of what a plan has to answer. What is issued is left out: issuing a plan does not make it answer another question.
 */
export function nameOfContent(problem: Problem): string {
  return fingerprint({ ...problem, issued: null, freezeUntil: problem.horizon.start });
}
