import type { ClientProduction } from '@common/contract';
import type { IssuedEntry, Link, Piece, Production, Stage } from '@database/entities';
import { notFound } from '../http/problem';
import { keyDateView } from '../productions';
import type { Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { ClientPageRepository, isOpen } from './client-page-repository';

/** What a client sees: their own productions, the dates, and what they have to decide. */
export class ClientPage {
  constructor(private readonly transactions: Transactions) {}

  read({ clientId }: Actor): Promise<ClientProduction[]> {
    if (clientId === null) throw notFound('client');
    return this.transactions.read(async (manager) => {
      const repository = new ClientPageRepository(manager);
      const productions = await repository.productionsOf(clientId);
      const stages = productions.flatMap((production) => production.pieces).flatMap((piece) => piece.stages);
      const ids = stages.map((stage) => stage.id);
      const entries = new Map((await repository.issuedEntries(ids)).map((entry) => [entry.stageId, entry]));
      const links = await repository.linksTo(ids);
      return productions.map((production) => viewOf(production, entries, links));
    });
  }
}

function viewOf(
  production: Production,
  entries: ReadonlyMap<string, IssuedEntry>,
  links: readonly Link[],
): ClientProduction {
  const pieces = [...production.pieces].sort((a, b) => a.position - b.position);
  const stages = pieces.flatMap((piece) => piece.stages);
  const ready = stages.flatMap((stage) => entries.get(stage.id)?.dwellEndsAt.getTime() ?? []);
  return {
    id: production.id,
    name: production.name,
    mark: production.mark,
    hue: production.hue,
    keyDates: production.keyDates.map(keyDateView).sort((a, b) => a.at.localeCompare(b.at) || a.id.localeCompare(b.id)),
    readyAt: ready.length === 0 ? null : new Date(Math.max(...ready)).toISOString(),
    finishedStages: stages.filter((stage) => stage.state === 'finished').length,
    stages: stages.length,
    decisions: pieces.flatMap((piece) => decisionsOf(piece, entries, links)),
  };
}

function decisionsOf(
  piece: Piece,
  entries: ReadonlyMap<string, IssuedEntry>,
  links: readonly Link[],
): ClientProduction['decisions'] {
  return piece.stages
    .filter((stage) => stage.kind === 'sign-off')
    .sort((a, b) => a.position - b.position)
    .map((stage) => ({
      stageId: stage.id,
      pieceName: piece.name,
      name: stage.name,
      askedFrom: (stage.visitAt ?? entries.get(stage.id)?.startsAt)?.toISOString() ?? null,
      state: stateOf(stage, links, piece.stages),
      version: stage.version,
    }));
}

function stateOf(
  stage: Stage,
  links: readonly Link[],
  siblings: readonly Stage[],
): ClientProduction['decisions'][number]['state'] {
  if (stage.state === 'finished') return 'approved';
  if (stage.decision === 'changes-asked') return 'changes-asked';
  return isOpen(stage, links, siblings) ? 'open' : 'ahead';
}
