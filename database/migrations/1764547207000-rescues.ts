import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What a studio allows for a date at risk before it has said otherwise; prices in minor units. */
const FIRST_TERMS = {
  allowed: [
    'overtime',
    'weekend-shift',
    'freelancer',
    'heat',
    'second-mould',
    'faster-material',
    'earlier-sign-off',
    'part-delivery',
    'later-date',
  ],
  eveningMinutes: 120,
  eveningDays: 14,
  weekendMinutes: 480,
  freelancerDayMinor: 26_000,
  freelancerDays: 5,
  heatCelsius: 24,
  heatHourMinor: 180,
  mouldMinor: 40_000,
  materialMinor: 4_000,
  signOffMinor: 8_000,
  partDeliveryMinor: 30_000,
  laterDayMinor: 25_000,
  laterDays: 21,
  goalPermille: 200,
};

/** What may be done for a date at risk, and searches about the working plan. */
export class Rescues1764547207000 implements MigrationInterface {
  readonly name = 'Rescues1764547207000';

  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`alter table studio add column rescue jsonb`);
    await queryRunner.query(`update studio set rescue = '${JSON.stringify(FIRST_TERMS)}'`);
    await queryRunner.query(`alter table studio alter column rescue set not null`);
    await queryRunner.query(`
      create table plan_search (
        id uuid primary key,
        state text not null,
        key_date_id uuid references key_date on delete cascade,
        production_id uuid references production on delete cascade,
        base_id uuid not null references working_revision on delete restrict,
        fingerprint text not null,
        planned_from integer not null,
        started_by uuid references account on delete set null,
        started_at timestamptz not null,
        ended_at timestamptz,
        weighed integer not null default 0,
        of_count integer not null default 0,
        failure text,
        found jsonb,
        worked_by integer,
        constraint plan_search_state_check check (state in ('waiting', 'running', 'found', 'cancelled', 'failed')),
        constraint plan_search_subject_check check ((key_date_id is null) <> (production_id is null))
      )
    `);
    await queryRunner.query(`create index plan_search_key_date_id_idx on plan_search (key_date_id)`);
    await queryRunner.query(`create index plan_search_production_id_idx on plan_search (production_id)`);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`drop table plan_search`);
    await queryRunner.query(`alter table studio drop column rescue`);
  }
}
