import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type { FieldFault, StageChange, StageCreate, StageDraft, StageView } from '@common/contract';
import { PLAIN_LINK } from '@common/domain/stage-draft';
import { type Link, type Stage } from '@database/entities';
import { invalidField, invalidFields, notFound, Problem } from '../http/problem';
import type { Actor } from '../session';
import { draftRow } from '@database/draft-row';
import { draftFaults } from '../storage/drafts';
import { knownRecords } from '../storage/known-records';
import type { Transactions } from '../storage/transactions';
import type { Unit } from '../storage/unit';
import { changedFields, requireVersion, sentMembers } from '../storage/versions';
import { writeUnderstoodWaits } from './links';
import { requireUnneeded } from './pieces';
import { stageView } from './production-mapper';
import { handsFaults, readHands } from './stage-fitness';
import { stageName } from './stage-name';
import { StageRepository } from './stage-repository';

type Draft = z.output<typeof StageDraft>;

/** Steps of making a piece. */
export class Stages {
  constructor(private readonly transactions: Transactions) {}

  create(actor: Actor, pieceId: string, { afterStageIds, ...draft }: z.output<typeof StageCreate>): Promise<StageView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const piece = await repository.piece(pieceId);
      if (!piece) throw notFound('piece');
      const id = randomUUID();
      await requireSound(unit, repository, id, draft, null);
      await requireStages(repository, afterStageIds, '/afterStageIds');
      const siblings = await repository.stagesOf(pieceId);
      const position = 1 + Math.max(-1, ...siblings.map((sibling) => sibling.position));
      if (afterStageIds.length > 0) await writeUnderstoodWaits(repository, [pieceId]);
      await repository.addStages([{ ...draftRow(draft), id, pieceId, position }]);
      await repository.addParts(new Map([[id, draft]]));
      const afterThese = [...new Set(afterStageIds)];
      await repository.addLinks(afterThese.map((fromStageId) => plainLink(fromStageId, id)));
      const stage = await requireStage(repository, id);
      const after = stageView(stage);
      const sentence = `Added the stage ${stageName(stage)}.`;
      await unit.record({ action: 'created', subject: { kind: 'stage', id }, sentence, after });
      return after;
    });
  }

  change(actor: Actor, id: string, change: z.output<typeof StageChange>): Promise<StageView> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const stage = await requireStage(repository, id);
      const before = stageView(stage);
      requireVersion(before, change);
      const { position, version: _version, ...fields } = change;
      const draft: Draft = { ...before, ...sentMembers(fields) };
      await requireSound(unit, repository, id, draft, before);
      requireDecisionKept(stage, draft);
      Object.assign(stage, draftRow(draft), { version: stage.version + 1 });
      if (position !== undefined) await moveTo(repository, stage, position);
      await repository.saveStage(stage);
      await repository.replaceParts(id, fields);
      const after = stageView(await requireStage(repository, id));
      const sentence = `Changed the stage ${stageName(stage)}: ${changedFields(before, after)}.`;
      await unit.record({ action: 'changed', subject: { kind: 'stage', id }, sentence, before, after });
      return after;
    });
  }

  /** Removes a stage; what waited for it now waits for what it waited for. */
  remove(actor: Actor, id: string, version: number): Promise<void> {
    return this.transactions.write(actor, async (unit) => {
      const repository = new StageRepository(unit.manager);
      const stage = await requireStage(repository, id);
      const before = stageView(stage);
      requireVersion(before, { version });
      if (stage.state !== 'to-do')
        throw new Problem('still-in-use', `Work has begun on ${stageName(stage)}; it stays.`);
      await requireUnneeded(repository, [id], stageName(stage));
      const bridges = bridgesOver(id, await repository.links());
      await repository.removeStages([id], unit.at);
      await repository.addLinks(bridges);
      const sentence = `Removed the stage ${stageName(stage)}.`;
      await unit.record({ action: 'removed', subject: { kind: 'stage', id }, sentence, before });
    });
  }
}

/** A stage that is not removed, or the problem that there is none. */
export async function requireStage(repository: StageRepository, id: string): Promise<Stage> {
  const stage = await repository.stage(id);
  if (!stage) throw notFound('stage');
  return stage;
}

/** A plain link: the second stage starts when the first and its dwell have ended. */
function plainLink(fromStageId: string, toStageId: string): Partial<Link> {
  return { ...PLAIN_LINK, id: randomUUID(), fromStageId, toStageId };
}

function bridgesOver(id: string, links: readonly Link[]): Partial<Link>[] {
  const before = links.filter((link) => link.toStageId === id && link.kind === 'finish-start');
  const after = links.filter((link) => link.fromStageId === id && link.kind === 'finish-start');
  const isThere = (from: string, to: string) =>
    links.some((link) => link.fromStageId === from && link.toStageId === to && link.kind === 'finish-start');
  return before.flatMap(({ fromStageId }) =>
    after
      .filter(({ toStageId }) => !isThere(fromStageId, toStageId))
      .map(({ toStageId }) => plainLink(fromStageId, toStageId)),
  );
}

async function requireSound(
  unit: Unit,
  repository: StageRepository,
  id: string,
  draft: Draft,
  before: Draft | null,
): Promise<void> {
  const faults: FieldFault[] = [
    ...draftFaults(draft, await knownRecords(unit.manager)),
    ...handsFaults(await readHands(unit.manager, unit.at), draft),
  ];
  if (draft.visitAt !== null && draft.visitAt !== before?.visitAt && new Date(draft.visitAt) < unit.at) {
    faults.push({ pointer: '/visitAt', detail: 'This visit has gone by. Choose an instant that is still ahead.' });
  }
  for (const [i, { hold, untilStageId }] of draft.places.entries()) {
    const pointer = `/places/${String(i)}/untilStageId`;
    if (hold === 'until-stage' && untilStageId === null) {
      faults.push({ pointer, detail: 'Say until which stage the place is kept.' });
    } else if (untilStageId === id || (untilStageId !== null && !(await repository.stage(untilStageId)))) {
      faults.push({ pointer, detail: 'Choose another stage that comes later.' });
    }
  }
  if (faults.length > 0) throw invalidFields(faults);
}

function requireDecisionKept(stage: Stage, draft: Draft): void {
  if (stage.decision !== null && draft.kind !== 'sign-off') {
    throw invalidField('/kind', 'The client has decided on this; it stays a sign-off.');
  }
}

async function requireStages(repository: StageRepository, ids: readonly string[], pointer: string): Promise<void> {
  const known = new Set((await repository.outline()).map((stage) => stage.id));
  const faults = ids.flatMap((id, i) =>
    known.has(id) ? [] : [{ pointer: `${pointer}/${String(i)}`, detail: 'There is no such stage.' }],
  );
  if (faults.length > 0) throw invalidFields(faults);
}

/** Puts the stage at a place among its piece's, and counts all anew. */
async function moveTo(repository: StageRepository, stage: Stage, position: number): Promise<void> {
  const others = (await repository.stagesOf(stage.pieceId)).filter((sibling) => sibling.id !== stage.id);
  others.splice(position, 0, stage);
  for (const [place, sibling] of others.entries()) {
    if (sibling.id === stage.id) stage.position = place;
    else if (sibling.position !== place) await repository.setPosition(sibling.id, place);
  }
}
