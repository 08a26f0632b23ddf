import type { z } from 'zod';
import type { SignOffDecision, StageView } from '@common/contract';
import { invalidField, notFound, Problem } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { requireVersion } from '../storage/versions';
import { stageView, stageViewFor } from './production-mapper';
import { stageName } from './stage-name';
import { StageRepository } from './stage-repository';
import { requireStage } from './stages';

/** The client's decisions that stages wait for. */
export class SignOffs {
  constructor(private readonly transactions: Transactions) {}

  /** Approved ends the sign-off; changes asked leave it open, to be decided again. A client decides on their own productions. */
  decide(
    actor: Actor,
    id: string,
    { decision, at, note, version }: z.output<typeof SignOffDecision>,
  ): Promise<StageView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const stage = await requireStage(repository, id);
      // Another client's stage is told like one that is not there.
      if (actor.role === 'client' && stage.piece.production.clientId !== actor.clientId) throw notFound('stage');
      if (stage.kind !== 'sign-off') throw invalidField('', `${stageName(stage)} is not a sign-off.`);
      if (stage.state === 'finished') {
        throw new Problem(
          'already-exists',
          `${stageName(stage)} was approved already. Ask the studio for a variation.`,
        );
      }
      const before = stageView(stage);
      requireVersion(stageViewFor(actor, stage), { version });
      if (new Date(at) > unit.at) throw invalidField('/at', 'A decision can not lie in the future.');
      stage.decision = decision;
      stage.decidedAt = new Date(at);
      stage.decisionNote = note;
      if (decision === 'approved') {
        stage.startedAt ??= new Date(at);
        stage.finishedAt = new Date(at);
        stage.state = 'finished';
        stage.remainingMinutes = 0;
      }
      stage.version += 1;
      await repository.saveStage(stage);
      const deed = decision === 'approved' ? 'Approved' : 'Asked for changes at';
      const sentence = `${deed} ${stageName(stage)}${note === '' ? '.' : `: ${note}`}`;
      const after = { ...stageView(stage), decision, decisionNote: note };
      await unit.record({ action: decision, subject: { kind: 'stage', id }, sentence, before, after });
      return stageViewFor(actor, stage);
    });
  }
}
