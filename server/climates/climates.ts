import type { z } from 'zod';
import type { ClimateLogResult, ClimateView, endpoints } from '@common/contract';
import { readingGaps } from '@common/dwell/climate-profile';
import { Bay, Climate, ClimateReading, ROOM_PLACE, Studio } from '@database/entities';
import type { EntityManager } from 'typeorm';
import { invalidField, Problem } from '../http/problem';
import type { Actor } from '../session';
import { placeOf, readClimates, type StudioClimates } from '../storage/climates';
import type { Transactions } from '../storage/transactions';
import { readClimateLog } from './read-log';

type Change = z.output<(typeof endpoints)['changeClimate']['body']>;
type Log = z.output<(typeof endpoints)['importClimateLog']['body']>;

const MS_PER_MINUTE = 60_000;
const WEEK_MINUTES = 7 * 24 * 60;
const ROWS_AT_ONCE = 2000;

/** Temperature and humidity of the studio and of each bay: as they are over the seasons, and as a logger measured them. */
export class Climates {
  constructor(private readonly transactions: Transactions) {}

  list(): Promise<ClimateView[]> {
    return this.transactions.read((manager) => viewsOf(manager, this.transactions.clock()));
  }

  change(actor: Actor, { bayId, profile, version }: Change): Promise<ClimateView> {
    return this.transactions.write(actor, async (unit) => {
      const name = await requirePlace(unit.manager, bayId);
      const place = placeOf(bayId);
      const before = await unit.manager.findOneBy(Climate, { place });
      if ((before?.version ?? 0) !== version) {
        throw new Problem('version-conflict', `Somebody else changed the climate of ${name} meanwhile.`, {
          current: { profile: before?.profile ?? null },
          sent: { profile },
        });
      }
      const row = { place, bayId, profile, version: version + 1 };
      await unit.manager.upsert(Climate, row, ['place']);
      await unit.record({
        action: 'changed',
        subject: { kind: 'climate', id: bayId },
        sentence: `${profile === null ? 'Let go' : 'Set'} the climate of ${name}.`,
        before: { profile: before?.profile ?? null },
        after: { profile },
      });
      return viewOf(unit.manager, bayId, unit.at);
    });
  }

  importLog(actor: Actor, { bayId, csv, mode }: Log): Promise<ClimateLogResult> {
    return this.transactions.write(actor, async (unit) => {
      const name = await requirePlace(unit.manager, bayId);
      const { zone } = await unit.manager.findOneByOrFail(Studio, { single: true });
      const { readings, faults } = readClimateLog(csv, zone);
      const isTaken = mode === 'take' && faults.length === 0;
      if (isTaken) {
        const place = placeOf(bayId);
        const rows = readings.map((reading) => ({ ...reading, place, bayId }));
        for (let from = 0; from < rows.length; from += ROWS_AT_ONCE) {
          await unit.manager.upsert(ClimateReading, rows.slice(from, from + ROWS_AT_ONCE), ['place', 'at']);
        }
        const sentence = `Read ${readings.length} readings of ${name} from a log.`;
        await unit.record({ action: 'imported', subject: { kind: 'climate', id: bayId }, sentence });
      }
      const gaps = readingGaps(readings).map(({ start, end }) => ({ from: iso(start), until: iso(end) }));
      return { readings: readings.length, faults: [...faults], gaps, taken: isTaken };
    });
  }
}

async function requirePlace(manager: EntityManager, bayId: string | null): Promise<string> {
  if (bayId === null) return 'the studio';
  const bay = await manager.findOneBy(Bay, { id: bayId });
  if (!bay) throw invalidField('/bayId', 'There is no such bay.');
  return bay.name;
}

async function viewOf(manager: EntityManager, bayId: string | null, at: Date): Promise<ClimateView> {
  const found = (await viewsOf(manager, at)).find((view) => view.bayId === bayId);
  if (!found) throw invalidField('/bayId', 'This bay is not in use.');
  return found;
}

async function viewsOf(manager: EntityManager, at: Date): Promise<ClimateView[]> {
  const now = Math.floor(at.getTime() / MS_PER_MINUTE);
  const climates = await readClimates(manager, { start: now, end: now + WEEK_MINUTES });
  const bays = await manager.find(Bay, { where: { active: true }, order: { name: 'ASC', id: 'ASC' } });
  const places = [
    { bayId: null, name: 'The studio' },
    ...bays.filter((bay) => bay.pieceId === null).map(({ id, name }) => ({ bayId: id, name })),
  ];
  return places.map(({ bayId, name }) => placeView(climates, bayId, name, now));
}

function placeView(climates: StudioClimates, bayId: string | null, name: string, now: number): ClimateView {
  const place = placeOf(bayId);
  const row = climates.rows.get(place);
  const readings = climates.readings.get(place) ?? [];
  const [first, last] = [readings.at(0), readings.at(-1)];
  return {
    bayId,
    name,
    profile: row?.profile ?? null,
    readings: first && last ? { count: readings.length, from: iso(first.at), until: iso(last.at) } : null,
    week: (climates.history(place) ?? climates.history(ROOM_PLACE) ?? [])
      .filter((step, k, all) => step.from < now + WEEK_MINUTES && (all.at(k + 1)?.from ?? Infinity) > now)
      .map(({ from, celsius, humidityPercent }) => ({ from: Math.max(from, now), celsius, humidityPercent })),
    version: row?.version ?? 0,
  };
}

function iso(minute: number): string {
  return new Date(minute * MS_PER_MINUTE).toISOString();
}
