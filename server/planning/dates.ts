import type { DateRisk } from '@common/contract';
import { drivingChain, sayReason, type Problem } from '@common/planning';
import { formatMinutes } from '@common/time/format-instant';
import { isoOfMinute } from '@database/column-values';
import type { Transactions } from '../storage/transactions';
import { finishes, readyAt } from './changes';
import { readDesk, type Desk } from './desk';

/** A margin below this much working time is called close: two days of eight hours. */
const CLOSE_MINUTES = 960;

/** Reasons that another order of work could do away with. */
const CAN_BE_CHANGED: ReadonlySet<string> = new Set(['crew-busy', 'bay-taken']);

type KeyDate = Problem['keyDates'][number];
type Chain = ReturnType<typeof drivingChain>;

/** The key dates ahead: what margin each has in the working plan, and what leads to it. */
export class Dates {
  constructor(private readonly transactions: Transactions) {}

  read(): Promise<DateRisk[]> {
    return this.transactions.read(async (manager) => {
      const desk = await readDesk(manager, this.transactions.clock());
      const finish = finishes(desk.plan);
      return [...desk.problem.keyDates]
        .sort((a, b) => a.at - b.at || a.id.localeCompare(b.id))
        .map((keyDate) => riskOf(desk, keyDate, readyAt(keyDate, finish)));
    });
  }
}

function riskOf(desk: Desk, keyDate: KeyDate, ready: number | null): DateRisk {
  const kind = desk.directory.keyDates.find((one) => one.id === keyDate.id)?.kind ?? 'delivery';
  const about = { keyDateId: keyDate.id, productionId: keyDate.productionId, kind, strength: keyDate.strength };
  const at = isoOfMinute(keyDate.at);
  if (ready === null) {
    const sentence =
      keyDate.stageIds.length === 0 ? 'Nothing is planned for it yet.' : 'A part of it has no place in the plan yet.';
    const nothing = { readyAt: null, marginMinutes: null, workingMarginMinutes: null, drivers: [] };
    return { ...about, at, ...nothing, state: 'unplanned', sentence };
  }
  const chain = drivingChain(desk.problem, desk.plan, keyDate.id);
  const marginMinutes = keyDate.at - ready;
  const workingMarginMinutes =
    marginMinutes < 0
      ? -workingMinutes(desk.problem, keyDate.at, ready)
      : workingMinutes(desk.problem, ready, keyDate.at);
  const isMet = workingMarginMinutes >= CLOSE_MINUTES ? 'met' : 'close';
  return {
    ...about,
    at,
    readyAt: isoOfMinute(ready),
    marginMinutes,
    workingMarginMinutes,
    state: marginMinutes < 0 ? 'missed' : isMet,
    sentence: sayDate(desk, chain, ready, marginMinutes),
    drivers: driversOf(desk, chain),
  };
}

function sayDate({ names, format }: Desk, chain: Chain, ready: number, marginMinutes: number): string {
  const length = formatMinutes(Math.abs(marginMinutes));
  const when = marginMinutes < 0 ? `${length} too late` : `${length} in time`;
  // What people or bays make it wait for can be changed; else the first cause says most.
  const cause = chain.steps.find(({ because }) => CAN_BE_CHANGED.has(because.kind)) ?? chain.steps.at(-1);
  if (!cause) return `Ready ${format(ready)}, ${when}.`;
  return `Ready ${format(ready)}, ${when}. It hangs on ${names.stage(cause.stageId)}: ${sayReason(cause.because, names, format)}.`;
}

/** The chain's stages, first cause first, each once with what binds it most. */
function driversOf({ plan, directory, names, format }: Desk, chain: Chain): DateRisk['drivers'] {
  const placed = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  const stages = new Map(directory.stages.map((stage) => [stage.id, stage]));
  const seen = new Set<string>();
  return chain.steps
    .flatMap(({ stageId, because }) => {
      const placement = placed.get(stageId);
      const stage = stages.get(stageId);
      if (!placement || !stage || seen.has(stageId)) return [];
      seen.add(stageId);
      const [start, end] = [placement.work[0].start, placement.dwellEnd];
      const sentence = `${names.stage(stageId)}: ${sayReason(because, names, format)}.`;
      const { productionId, name } = stage;
      return [{ stageId, productionId, name, start: isoOfMinute(start), end: isoOfMinute(end), sentence }];
    })
    .reverse();
}

function workingMinutes({ workingTime }: Problem, from: number, until: number): number {
  return workingTime.reduce(
    (sum, span) => sum + Math.max(0, Math.min(span.end, until) - Math.max(span.start, from)),
    0,
  );
}
