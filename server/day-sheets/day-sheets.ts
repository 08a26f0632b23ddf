import type { DaySheet, DaySheetEntry } from '@common/contract';
import { dayOfInstant, daySpan } from '@common/time/calendar-day';
import { isoOfMinute } from '@database/column-values';
import type { IssuedEntry, IssuedShift, Stage } from '@database/entities';
import { notFound, Problem, invalidFields } from '../http/problem';
import { isOffice, type Actor } from '../session';
import type { Transactions } from '../storage/transactions';
import { DaySheetRepository } from './day-sheet-repository';

const MS_PER_MINUTE = 60_000;

/** What makers do on one day, as it was issued. */
export class DaySheets {
  constructor(private readonly transactions: Transactions) {}

  /** A maker's day; makers see their own, the office anybody's. Without a day, today in the studio. */
  read(viewer: Actor, asked: { readonly day?: string; readonly makerId?: string }): Promise<DaySheet> {
    const makerId = whoseSheet(viewer, asked.makerId);
    return this.transactions.read(async (manager) => {
      const repository = new DaySheetRepository(manager);
      const maker = await repository.maker(makerId);
      if (!maker) throw notFound('maker');
      const zone = await repository.zone();
      const now = Math.floor(this.transactions.clock().getTime() / MS_PER_MINUTE);
      const day = asked.day ?? dayOfInstant(now, zone);
      const plan = await repository.newestPlan();
      const head = { day, makerId, makerName: maker.name, zone, issuedNumber: plan?.number ?? null };
      if (!plan) return { ...head, entries: [], dwells: [] };
      const span = daySpan(day, zone);
      const from = new Date(span.start * MS_PER_MINUTE);
      const until = new Date(span.end * MS_PER_MINUTE);
      const shifts = await repository.shifts(plan.number, makerId, from, until);
      return {
        ...head,
        entries: await entriesOf(repository, plan.number, makerId, shifts),
        dwells: await dwellsOf(repository, await repository.dwelling(plan.number, from, until), makerId, shifts),
      };
    });
  }
}

function whoseSheet(viewer: Actor, makerId: string | undefined): string {
  if (!isOffice(viewer) && makerId !== undefined && makerId !== viewer.makerId) {
    throw new Problem('not-allowed', 'Makers see their own day sheet.');
  }
  const whose = makerId ?? viewer.makerId;
  if (whose === null) throw invalidFields([{ pointer: '?makerId', detail: 'Say whose day sheet.' }]);
  return whose;
}

async function entriesOf(
  repository: DaySheetRepository,
  planNumber: number,
  makerId: string,
  shifts: readonly IssuedShift[],
): Promise<DaySheetEntry[]> {
  const ids = [...new Set(shifts.map((shift) => shift.stageId))];
  const stages = await repository.stages(ids);
  const issued = new Map((await repository.entries(planNumber, ids)).map((entry) => [entry.stageId, entry]));
  const { makers, bays } = await repository.names();
  const homeTime = Math.max(...shifts.map((shift) => shift.during.end));
  return shifts.flatMap(({ stageId, during }) => {
    const [stage, entry] = [stages.get(stageId), issued.get(stageId)];
    if (!stage || !entry) return [];
    const dwellUntil = Math.floor(entry.dwellEndsAt.getTime() / MS_PER_MINUTE);
    const isLastPart = during.end === Math.floor(entry.endsAt.getTime() / MS_PER_MINUTE);
    const dwells = dwellUntil > during.end;
    const others = [...new Set(entry.crew.map((member) => member.makerId))].filter((id) => id !== makerId);
    return [
      {
        ...describe(stage),
        kind: stage.kind,
        nth: stage.nth,
        of: stage.repeats,
        start: isoOfMinute(during.start),
        end: isoOfMinute(during.end),
        bayName: entry.bayIds.map((id) => bays.get(id) ?? '?').join(', ') || null,
        withMakers: others.map((id) => makers.get(id) ?? '?').sort(),
        cautions: stage.cautions,
        note: stage.note,
        state: stage.state,
        spentMinutes: stage.spentMinutes,
        handsOnMinutes: stage.likelyMinutes,
        dwellUntil: isLastPart && dwells ? isoOfMinute(dwellUntil) : null,
        beforeGoingHome: isLastPart && dwells && dwellUntil > homeTime,
        version: stage.version,
      },
    ];
  });
}

/** Cures and dryings under way that day which concern the maker: of their own work, or which their work waits for. */
async function dwellsOf(
  repository: DaySheetRepository,
  dwelling: readonly IssuedEntry[],
  makerId: string,
  shifts: readonly IssuedShift[],
): Promise<DaySheet['dwells']> {
  const links = await repository.followersOf(dwelling.map((entry) => entry.stageId));
  const own = new Set(shifts.map((shift) => shift.stageId));
  const awaited = new Set(links.filter((link) => own.has(link.toStageId)).map((link) => link.fromStageId));
  const concerned = dwelling.filter(
    ({ stageId, crew }) => awaited.has(stageId) || crew.some((member) => member.makerId === makerId),
  );
  const stages = await repository.stages(concerned.map((entry) => entry.stageId));
  return concerned.flatMap(({ stageId, dwellEndsAt }) => {
    const stage = stages.get(stageId);
    if (!stage) return [];
    const { pieceName, name, mark, hue } = describe(stage);
    return [{ stageId, pieceName, name, mark, hue, until: dwellEndsAt.toISOString() }];
  });
}

function describe(
  stage: Stage,
): Pick<DaySheetEntry, 'stageId' | 'pieceName' | 'productionName' | 'mark' | 'hue' | 'name'> {
  const { piece, id, name } = stage;
  const { production } = piece;
  return {
    stageId: id,
    pieceName: piece.name,
    productionName: production.name,
    mark: production.mark,
    hue: production.hue,
    name,
  };
}
