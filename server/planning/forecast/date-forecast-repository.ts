import { LessThan, type EntityManager } from 'typeorm';
import type { CalendarDay } from '@common/time/span';
import { DateForecast } from '@database/entities';

/** How a key date was forecast on an earlier day. */
export interface EarlierForecast {
  readonly keyDateId: string;
  readonly day: CalendarDay;
  readonly missChance: number;
  /** Minutes since 1970-01-01T00:00Z. */
  readonly p80: number;
}

/** Forecasts of key dates day by day, through one manager. */
export class DateForecastRepository {
  constructor(private readonly manager: EntityManager) {}

  /** The newest forecasts that are older than a day, all of one day; none where the studio never forecast before. */
  async lastBefore(today: CalendarDay): Promise<readonly EarlierForecast[]> {
    const newest = await this.manager.findOne(DateForecast, {
      where: { day: LessThan(today) },
      order: { day: 'DESC' },
    });
    return newest ? this.manager.findBy(DateForecast, { day: newest.day }) : [];
  }

  /** Keeps today's, over what was kept of today before. Key dates removed meanwhile are passed over. */
  async keep(
    today: CalendarDay,
    forecasts: readonly { readonly keyDateId: string; readonly missChance: number; readonly p80: number }[],
  ): Promise<void> {
    if (forecasts.length === 0) return;
    await this.manager.query(
      `insert into date_forecast (day, key_date_id, miss_chance, p80)
       select $1::date, key_date.id, given.miss_chance, given.p80
       from unnest($2::uuid[], $3::double precision[], $4::integer[]) as given (key_date_id, miss_chance, p80)
       join key_date on key_date.id = given.key_date_id
       on conflict (day, key_date_id) do update set miss_chance = excluded.miss_chance, p80 = excluded.p80`,
      [
        today,
        forecasts.map(({ keyDateId }) => keyDateId),
        forecasts.map(({ missChance }) => missChance),
        forecasts.map(({ p80 }) => p80),
      ],
    );
  }
}
