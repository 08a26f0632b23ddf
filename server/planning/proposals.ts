import type { LevelProposal } from '@common/contract';
import { check, measure, takeInProgress, type Problem as PlanningProblem } from '@common/planning';
import type { LevelRun } from '@database/entities';
import { Problem } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { keyDateEffects, sayChanges } from './changes';
import { nameOfContent, problemOf, readDesk, type Desk } from './desk';
import { isUnderWay, levelRunView, LevelRepository } from './level-repository';
import { requireRun } from './level-runs';
import { recordRevised, requireDesk } from './revisions';
import { RevisionRepository } from './revision-repository';

const LABELS = { dates: 'Level', 'within-dates': 'Even out the load' } as const;

/** What levellings found, beside the working plan, and taking it. */
export class Proposals {
  constructor(private readonly transactions: Transactions) {}

  read(id: string): Promise<LevelProposal> {
    return this.transactions.read(async (manager) => {
      const run = await requireRun(new LevelRepository(manager), id);
      const desk = await readDesk(manager, this.transactions.clock());
      const { plan, problem } = requireFresh(run, desk);
      const before = takeInProgress(problem, desk.head?.layout.plan ?? { placements: [] });
      const unmet = check(problem, plan);
      return {
        run: levelRunView(run),
        before: measure(problem, before, check(problem, before)),
        after: measure(problem, plan, unmet),
        plan: plan as LevelProposal['plan'],
        unmet: unmet as LevelProposal['unmet'],
        changes: sayChanges(before, plan, desk.names, desk.format),
        keyDates: keyDateEffects(problem, before, plan),
      };
    });
  }

  /** Takes what was found into the working plan, if that is still the one that was levelled and the studio has not changed. */
  take(actor: Actor, id: string, revision: number): Promise<{ readonly revision: number }> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new LevelRepository(unit.manager);
      const run = await requireRun(repository, id);
      const desk = await requireDesk(unit, revision);
      const { plan } = requireFresh(run, desk);
      if (run.state === 'taken' || run.state === 'left') {
        throw new Problem('already-exists', `What this levelling found was ${run.state} already.`);
      }
      const label = LABELS[run.mode];
      const count = await new RevisionRepository(unit.manager).add(unit, desk.rows.studio, {
        parentId: run.baseId,
        label,
        layout: { plan, pins: desk.pins, measures: desk.measures },
        fingerprint: run.fingerprint,
        plannedFrom: run.plannedFrom,
      });
      run.state = 'taken';
      await repository.save(run);
      await unit.announce({ kind: 'level', run: levelRunView(run) });
      await recordRevised(unit, desk.rows.studio, 'revised', `Working plan: ${label}.`);
      return { revision: count };
    });
  }
}

function requireFresh(
  run: LevelRun,
  desk: Desk,
): { readonly plan: NonNullable<LevelRun['found']>; readonly problem: PlanningProblem } {
  if (isUnderWay(run)) throw new Problem('level-running', 'It is still levelling. Wait for it, or stop it first.');
  if (run.found === null) throw new Problem('not-found', 'This levelling found nothing.');
  const problem = problemOf(desk, { from: run.plannedFrom });
  if (desk.head?.id !== run.baseId || nameOfContent(problem) !== run.fingerprint) {
    throw new Problem('plan-stale', 'The studio or its working plan changed since this was found. Level again.');
  }
  return { plan: run.found, problem };
}
