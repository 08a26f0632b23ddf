import type { RescueSearchView, RescueView, TakenMeasure } from '@common/contract';
import { learnOverrun, NO_FACTOR } from '@common/forecast';
import { takeInProgress } from '@common/planning';
import { cautionOf, sayMeasure, type DateOdds, type Measure, type MeasureNames, type Rescue } from '@common/rescue';
import { invalidField, notFound, Problem } from '../../http/problem';
import type { RescueFound } from '../../jobs/rescue-task';
import type { Actor } from '../../session';
import type { Transactions } from '../../storage/transactions';
import { nameOfContent, problemOf, readDesk, type Desk } from '../desk';
import { FORECAST_SEED } from '../forecast/forecasts';
import { readPastWork } from '../forecast/past-hours';
import { RevisionRepository } from '../revision-repository';
import { recordRevised, requireDesk } from '../revisions';
import { isSearching, SearchRepository } from './search-repository';
import { isFresh, requireSearch, searchView, type SearchRuns } from './search-runs';

/** A search lives each plan through so often at the most: it weighs many. */
const MOST_DRAWS = 300;

type Revised = { readonly revision: number };

/** What would save a date at risk, and letting the working plan count on it. */
export class Rescues {
  constructor(
    private readonly transactions: Transactions,
    private readonly runs: SearchRuns,
  ) {}

  async start(actor: Actor, keyDateId: string): Promise<RescueSearchView> {
    const id = await this.runs.start(actor, async (desk, unit) => {
      const date = desk.problem.keyDates.find((one) => one.id === keyDateId);
      if (!date) throw notFound('key date ahead');
      const placed = new Set(desk.plan.placements.map(({ stageId }) => stageId));
      if (date.stageIds.length === 0 || !date.stageIds.every((stageId) => placed.has(stageId))) {
        throw invalidField('/keyDateId', 'A part of it has no place in the plan yet. Level the plan first.');
      }
      const { forecast, rescue } = desk.rows.studio;
      const learnt =
        forecast.learning === 'past-hours' ? learnOverrun(await readPastWork(unit.manager, unit.at)) : NO_FACTOR;
      return {
        name: 'rescue',
        task: {
          snapshot: desk.snapshot,
          plan: desk.plan,
          now: desk.from,
          keyDateId,
          terms: rescue,
          spreads: forecast,
          overrun: learnt,
          draws: Math.min(MOST_DRAWS, forecast.draws),
          seed: FORECAST_SEED,
        },
        subject: { keyDateId },
        sentence: `Began to look for what would save ${desk.names.keyDate(keyDateId)}.`,
      };
    });
    return this.read(id);
  }

  async read(id: string): Promise<RescueSearchView> {
    const read = await this.runs.read(id);
    const { search, desk } = read;
    const { keyDateId } = search;
    if (keyDateId === null) throw notFound('search');
    const found = search.found as RescueFound | null;
    const before = found?.before.find((odds) => odds.keyDateId === keyDateId);
    return {
      ...searchView(read),
      keyDateId,
      before: before ? { missChance: before.missChance, p80: before.p80 } : null,
      rescues: desk ? (found?.rescues ?? []).map((rescue) => rescueView(rescue, found?.before ?? [], desk)) : [],
    };
  }

  async cancel(id: string): Promise<RescueSearchView> {
    await this.runs.cancel(id);
    return this.read(id);
  }

  /** Lets the working plan count on a rescue, if it is still the one that was searched. */
  take(actor: Actor, id: string, { revision, rescue }: { revision: number; rescue: number }): Promise<Revised> {
    return this.transactions.write(actor, async (unit) => {
      const search = await requireSearch(new SearchRepository(unit.manager), id);
      const desk = await requireDesk(unit, revision);
      if (isSearching(search))
        throw new Problem('level-running', 'It is still searching. Wait for it, or stop it first.');
      const chosen = (search.found as RescueFound | null)?.rescues[rescue];
      if (search.keyDateId === null || !chosen) throw notFound('such rescue');
      if (!isFresh(search, desk)) {
        throw new Problem('plan-stale', 'The studio or its working plan changed since this was found. Search again.');
      }
      const measures = [...desk.measures, ...chosen.measures];
      const label = `Rescue ${desk.names.keyDate(search.keyDateId)}`;
      const made = { label, measures, plan: chosen.plan };
      return { revision: await this.#store(unit, desk, made) };
    });
  }

  measures(): Promise<TakenMeasure[]> {
    return this.transactions.read(async (manager) => {
      const desk = await readDesk(manager, this.transactions.clock());
      return desk.measures.map((measure) => told(measure, desk));
    });
  }

  /** Counts on a measure no longer. The plan stays where it can; what can not is told as unmet. */
  drop(actor: Actor, { revision, measure }: { revision: number; measure: number }): Promise<Revised> {
    return this.transactions.write(actor, async (unit) => {
      const desk = await requireDesk(unit, revision);
      const dropped = desk.measures.at(measure);
      if (!dropped) throw notFound('such measure');
      const measures = desk.measures.filter((one) => one !== dropped);
      const plan = takeInProgress(problemOf(desk, { from: desk.from, measures }), desk.plan);
      const label = `Without: ${sayMeasure(dropped, measureNames(desk))}`;
      return { revision: await this.#store(unit, desk, { label, measures, plan }) };
    });
  }

  async #store(
    unit: Parameters<Parameters<Transactions['write']>[1]>[0],
    desk: Desk,
    {
      label,
      measures,
      plan,
    }: { readonly label: string; readonly measures: readonly Measure[]; readonly plan: Desk['plan'] },
  ): Promise<number> {
    const count = await new RevisionRepository(unit.manager).add(unit, desk.rows.studio, {
      parentId: desk.head?.id ?? null,
      label,
      layout: { plan, pins: desk.pins, measures },
      fingerprint: nameOfContent(problemOf(desk, { from: desk.from, measures })),
      plannedFrom: desk.from,
    });
    await recordRevised(unit, desk.rows.studio, 'revised', `Working plan: ${label}.`);
    return count;
  }
}

function rescueView(rescue: Rescue, before: readonly DateOdds[], desk: Desk): RescueView {
  const chanceBefore = new Map(before.map(({ keyDateId, missChance }) => [keyDateId, missChance]));
  const { missChance, p80 } = rescue.odds;
  return {
    measures: rescue.measures.map((measure) => told(measure, desk)),
    priceMinor: rescue.priceMinor,
    missChance,
    p80,
    saves: missChance * 1000 <= desk.rows.studio.rescue.goalPermille,
    others: rescue.others.map((odds) => ({
      ...odds,
      name: desk.names.keyDate(odds.keyDateId),
      missChanceBefore: chanceBefore.get(odds.keyDateId) ?? 0,
    })),
  };
}

function told(measure: Measure, desk: Desk): TakenMeasure {
  const wire = measure.kind === 'part-delivery' ? { ...measure, pieceIds: [...measure.pieceIds] } : measure;
  return { measure: wire, sentence: sayMeasure(measure, measureNames(desk)), caution: cautionOf(measure) };
}

function measureNames({ names, rows, format }: Desk): MeasureNames {
  const nameIn = (list: readonly { readonly id: string; readonly name: string }[]) => (id: string) =>
    list.find((one) => one.id === id)?.name ?? 'something that is gone';
  return { ...names, material: nameIn(rows.materials), piece: nameIn(rows.pieces), format };
}
