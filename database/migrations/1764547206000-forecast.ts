import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What a studio believes of its times before it has said otherwise. */
const FIRST_FORECAST = {
  draws: 1000,
  learning: 'past-hours',
  dwellLowPermille: 850,
  dwellHighPermille: 1500,
  replyLowPermille: 500,
  replyHighPermille: 3000,
  deliveryLatePermille: 300,
  absencePermille: 20,
  climateSpreadPermille: 60,
};

/** How the forecast draws, and how each key date was forecast day by day. */
export class Forecast1764547206000 implements MigrationInterface {
  readonly name = 'Forecast1764547206000';

  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`alter table studio add column forecast jsonb`);
    await queryRunner.query(`update studio set forecast = '${JSON.stringify(FIRST_FORECAST)}'`);
    await queryRunner.query(`alter table studio alter column forecast set not null`);
    await queryRunner.query(`
      create table date_forecast (
        day date not null,
        key_date_id uuid not null references key_date on delete cascade,
        miss_chance double precision not null,
        p80 integer not null,
        primary key (day, key_date_id),
        constraint date_forecast_miss_chance_check check (miss_chance between 0 and 1)
      )
    `);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`drop table date_forecast`);
    await queryRunner.query(`alter table studio drop column forecast`);
  }
}
