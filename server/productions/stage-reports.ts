import type { EntityManager } from 'typeorm';
import type { z } from 'zod';
import type { StageReport as StageReportSchema, StageView } from '@common/contract';
import { IssuedEntry, type Stage, type StageReport } from '@database/entities';
import { invalidField, Problem } from '../http/problem';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { stageView } from './production-mapper';
import { stageName } from './stage-name';
import { StageRepository } from './stage-repository';
import { requireStage } from './stages';

type Report = z.output<typeof StageReportSchema>;
type Kind = StageReport['kind'];

const MS_PER_MINUTE = 60_000;
/** A telephone's clock may be a little ahead of ours. */
const CLOCK_SKEW_MS = 5 * MS_PER_MINUTE;
/** Somebody who says nothing of the hours is believed to have worked since the start, unless that is longer than any shift. */
const LONGEST_STRETCH_MINUTES = 720;

const DEEDS: Readonly<Record<Kind, string>> = { start: 'Began', pause: 'Paused', finish: 'Finished' };

/** What makers and managers report of stages. A report sent twice (a poor connection) counts once. */
export class StageReports {
  constructor(private readonly transactions: Transactions) {}

  report(actor: Actor, id: string, kind: Kind, report: Report): Promise<StageView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const stage = await requireStage(repository, id);
      const earlier = await repository.report(report.key);
      if (earlier) {
        if (earlier.stageId === id && earlier.kind === kind) return stageView(stage);
        throw new Problem('already-exists', 'This report was sent before, for something else.');
      }
      requirePossible(stage, kind, new Date(report.at), unit.at);
      const before = stageView(stage);
      const last = await repository.lastReport(id, 'start');
      apply(stage, kind, report, last);
      await repository.saveStage(stage);
      if (kind === 'start') await this.#setHands(unit.manager, repository, stage.id, actor);
      const { key, spentMinutes = null, remainingMinutes = null, note = '' } = report;
      const row = { key, stageId: id, kind, accountId: actor.accountId, at: new Date(report.at) };
      await repository.addReport({ ...row, spentMinutes, remainingMinutes, note, receivedAt: unit.at });
      const after = stageView(stage);
      const sentence = `${DEEDS[kind]} ${stageName(stage)}${note === '' ? '.' : `: ${note}`}`;
      await unit.record({ action: `reported-${kind}`, subject: { kind: 'stage', id }, sentence, before, after });
      return after;
    });
  }

  /** Who is on it: the crew it was issued to, unless a maker outside of it began; and the bays it was issued to. */
  async #setHands(manager: EntityManager, repository: StageRepository, id: string, actor: Actor): Promise<void> {
    const issued = await manager.findOne(IssuedEntry, { where: { stageId: id }, order: { planNumber: 'DESC' } });
    const crew = [...new Set(issued?.crew.map((member) => member.makerId))];
    const known = await repository.makersOn(id);
    const own = actor.makerId;
    if (own !== null && !crew.includes(own))
      await repository.setHands(id, [...new Set([...known, own])], issued?.bayIds ?? []);
    else if (crew.length > 0) await repository.setHands(id, crew, issued?.bayIds ?? []);
  }
}

function requirePossible(stage: Stage, kind: Kind, at: Date, now: Date): void {
  if (stage.kind === 'sign-off') {
    throw invalidField('', 'A sign-off is decided by the client, not worked on.');
  }
  if (stage.state === 'finished') {
    throw invalidField('', `${stageName(stage)} is finished already.`);
  }
  if (kind === 'pause' && stage.state !== 'started') {
    throw invalidField('', `${stageName(stage)} is not being worked on, so there is nothing to pause.`);
  }
  if (at.getTime() > now.getTime() + CLOCK_SKEW_MS) {
    throw invalidField('/at', 'This lies in the future. Set the clock of this device right.');
  }
  if (stage.startedAt !== null && at < stage.startedAt) {
    throw invalidField('/at', 'This lies before the work began.');
  }
}

function apply(stage: Stage, kind: Kind, report: Report, lastStart: StageReport | null): void {
  const at = new Date(report.at);
  const spent = report.spentMinutes ?? spentUntil(at, stage, kind, lastStart);
  stage.spentMinutes = spent;
  if (report.remainingMinutes !== undefined) stage.remainingMinutes = report.remainingMinutes;
  // Finished without having been begun: it began as long ago as it took.
  stage.startedAt ??= new Date(at.getTime() - (kind === 'finish' ? spent * MS_PER_MINUTE : 0));
  if (kind === 'finish') {
    stage.state = 'finished';
    stage.finishedAt = at;
    stage.remainingMinutes = 0;
  } else {
    stage.state = kind === 'start' ? 'started' : 'paused';
  }
  stage.version += 1;
}

function spentUntil(at: Date, stage: Stage, kind: Kind, lastStart: StageReport | null): number {
  if (kind === 'start' || stage.state !== 'started' || lastStart === null) return stage.spentMinutes;
  const minutes = Math.max(0, Math.round((at.getTime() - lastStart.at.getTime()) / MS_PER_MINUTE));
  return minutes > LONGEST_STRETCH_MINUTES ? stage.spentMinutes : stage.spentMinutes + minutes;
}
