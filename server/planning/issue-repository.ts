import { randomUUID } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import type { Plan, Problem } from '@common/planning';
import { IssuedEntry, IssuedOccupancy, IssuedPlan, IssuedShift } from '@database/entities';
import { occupanciesOf } from './occupancies';

/** Rows are sent in parts: a statement takes 65,535 parameters at most. */
const ROWS_AT_ONCE = 1000;
const MS_PER_MINUTE = 60_000;

/** Issued plans and their rows, through one manager. */
export class IssueRepository {
  constructor(private readonly manager: EntityManager) {}

  newest(): Promise<IssuedPlan | null> {
    return this.manager.findOne(IssuedPlan, { where: {}, order: { number: 'DESC' }, relations: { issuer: true } });
  }

  /** All of them, newest first, each with how many stages it holds. */
  async all(): Promise<{ readonly plan: IssuedPlan; readonly stages: number }[]> {
    const plans = await this.manager.find(IssuedPlan, { order: { number: 'DESC' }, relations: { issuer: true } });
    const counts = await this.manager
      .createQueryBuilder(IssuedEntry, 'entry')
      .select('entry.planNumber', 'number')
      .addSelect('count(*)::int', 'stages')
      .groupBy('entry.planNumber')
      .getRawMany<{ number: number; stages: number }>();
    const stages = new Map(counts.map((count) => [count.number, count.stages]));
    return plans.map((plan) => ({ plan, stages: stages.get(plan.number) ?? 0 }));
  }

  async add(plan: Partial<IssuedPlan>): Promise<void> {
    await this.manager.insert(IssuedPlan, plan);
  }

  /**
   * Writes a plan's stages, and what its people and bays do from the problem's start on: of work done before then only the
   * dwells still count, for what really happened may well have overlapped.
   */
  async addRows(planNumber: number, problem: Problem, plan: Plan): Promise<void> {
    const dateOf = (minute: number) => new Date(minute * MS_PER_MINUTE);
    const entries = plan.placements.map(({ stageId, work, crew, bayIds, dwellEnd }) => ({
      planNumber,
      stageId,
      startsAt: dateOf(work[0].start),
      endsAt: dateOf(work[work.length - 1].end),
      dwellEndsAt: dateOf(dwellEnd),
      work: work.map(({ start, end }) => ({ start, end })),
      crew: crew.map(({ makerId, craftId }) => ({ makerId, craftId })),
      bayIds: [...bayIds],
    }));
    const shifts = plan.placements.flatMap(({ stageId, work, crew }) =>
      work
        .map(({ start, end }) => ({ start: Math.max(start, problem.horizon.start), end }))
        .filter((span) => span.end > span.start)
        .flatMap((during) =>
          crew.map(({ makerId, craftId }) => ({ id: randomUUID(), planNumber, stageId, makerId, craftId, during })),
        ),
    );
    const occupancies = occupanciesOf(problem, plan).map(({ start, end, ...row }) => ({
      ...row,
      id: randomUUID(),
      planNumber,
      during: { start, end },
    }));
    for (const rows of inParts(entries)) await this.manager.insert(IssuedEntry, rows);
    for (const rows of inParts(shifts)) await this.manager.insert(IssuedShift, rows);
    for (const rows of inParts(occupancies)) await this.manager.insert(IssuedOccupancy, rows);
  }
}

function inParts<T>(rows: readonly T[]): T[][] {
  const parts: T[][] = [];
  for (let at = 0; at < rows.length; at += ROWS_AT_ONCE) parts.push(rows.slice(at, at + ROWS_AT_ONCE));
  return parts;
}
