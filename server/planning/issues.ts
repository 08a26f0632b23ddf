import type { IssuedPlanSummary, IssuePreview } from '@common/contract';
import { sayUnmet, type Plan, type Unmet } from '@common/planning';
import type { IssuedPlan } from '@database/entities';
import { Problem } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { keyDateEffects, sayChanges } from './changes';
import { readDesk, type Desk } from './desk';
import { IssueRepository } from './issue-repository';
import { requireDesk } from './revisions';

/**
 * Broken rules that a manager may issue with, seeing them: a date that will be missed, a stage that waits for its place, a limit
 * that is a caution. With any other the plan would tell people what can not be done.
 */
const MAY_BE_ISSUED: ReadonlySet<Unmet['rule']> = new Set(['key-date', 'placed-once', 'limits']);

const STALE =
  'Stages, makers or dates changed since this plan was laid out. Level it, or move a stage, to bring it up to date.';

/** The plan that the studio works to: what issuing would change, and issuing. */
export class Issues {
  constructor(private readonly transactions: Transactions) {}

  preview(): Promise<IssuePreview> {
    return this.transactions.read(async (manager) => {
      const desk = await readDesk(manager, this.transactions.clock());
      const before = issuedBefore(desk);
      const changes = sayChanges(before, desk.plan, desk.names, desk.format);
      const counts = new Map<string, number>();
      for (const id of changes.flatMap((change) => change.makerIds)) counts.set(id, (counts.get(id) ?? 0) + 1);
      return {
        revision: desk.rows.studio.planRevision,
        changes,
        forMakers: [...counts].map(([makerId, count]) => ({ makerId, changes: count })),
        keyDates: keyDateEffects(desk.problem, before, desk.plan),
        obstacles: [...(desk.isStale ? [STALE] : []), ...sayStrangers(desk), ...sayAll(desk, obstaclesOf(desk))],
        warnings: sayAll(
          desk,
          desk.unmet.filter(({ rule }) => MAY_BE_ISSUED.has(rule)),
        ),
      };
    });
  }

  /** Issues the working plan as it stands at `revision`, if it answers the studio as it is and breaks nothing that matters. */
  issue(
    actor: Actor,
    { revision, note }: { readonly revision: number; readonly note: string },
  ): Promise<IssuedPlanSummary> {
    return this.transactions.write(actor, async (unit) => {
      const desk = await requireDesk(unit, revision);
      if (desk.head === null || desk.isStale) throw new Problem('plan-stale', STALE);
      const obstacles = [...sayStrangers(desk), ...sayAll(desk, obstaclesOf(desk))];
      if (obstacles.length > 0) {
        const errors = obstacles.map((detail) => ({ pointer: '', detail }));
        throw new Problem('plan-unsound', obstacles[0], { errors });
      }
      const repository = new IssueRepository(unit.manager);
      const number = ((await repository.newest())?.number ?? 0) + 1;
      const changes = sayChanges(issuedBefore(desk), desk.plan, desk.names, desk.format);
      const row = {
        number,
        revisionId: desk.head.id,
        issuedAt: unit.at,
        issuedBy: actor.accountId,
        note,
        fingerprint: desk.head.fingerprint,
        changes: new Set(changes.map((change) => change.stageId)).size,
      };
      await repository.add(row);
      await repository.addRows(number, desk.problem, desk.plan);
      await unit.announce({ kind: 'plan-issued', number });
      const summary = {
        number,
        at: unit.at.toISOString(),
        by: actor.name,
        note,
        stages: desk.plan.placements.length,
        changes: row.changes,
      };
      const sentence = `Issued plan ${String(number)}${note === '' ? '.' : `: ${note}`}`;
      await unit.record({ action: 'issued', subject: { kind: 'issued-plan', id: null }, sentence, after: summary });
      return summary;
    });
  }

  list(): Promise<IssuedPlanSummary[]> {
    return this.transactions.read(async (manager) =>
      (await new IssueRepository(manager).all()).map(({ plan, stages }) => summaryOf(plan, stages)),
    );
  }
}

function summaryOf(plan: IssuedPlan, stages: number): IssuedPlanSummary {
  return {
    number: plan.number,
    at: plan.issuedAt.toISOString(),
    by: plan.issuer?.name ?? null,
    note: plan.note,
    stages,
    changes: plan.changes,
  };
}

/** What was issued last, of the stages that the plan is about. */
function issuedBefore({ rows }: Desk): Plan {
  const known = new Set(rows.stages.map((stage) => stage.id));
  return { placements: (rows.issued?.placements ?? []).filter(({ stageId }) => known.has(stageId)) };
}

function obstaclesOf({ unmet }: Desk): Unmet[] {
  return unmet.filter(({ rule }) => !MAY_BE_ISSUED.has(rule));
}

/** Nobody can be told of work who is not in the crew: a freelancer whom the plan counts on has to be entered first. */
function sayStrangers({ measures, names, plan }: Desk): string[] {
  const working = new Set(plan.placements.flatMap(({ crew }) => crew.map(({ makerId }) => makerId)));
  return measures.flatMap((measure) =>
    measure.kind === 'freelancer' && working.has(measure.makerId)
      ? [
          `${names.maker(measure.makerId)} has work in the plan but is not in the crew. Enter them there, drop the measure, and level again.`,
        ]
      : [],
  );
}

function sayAll({ names, format }: Desk, unmet: readonly Unmet[]): string[] {
  return unmet.map((one) => sayUnmet(one, names, format));
}
