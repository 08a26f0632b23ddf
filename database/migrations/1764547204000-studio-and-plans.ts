import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What a new studio begins with; the owner changes it in the settings. */
const FIRST_SETTINGS = {
  changePenaltyMinor: 500,
  unevennessWeight: 1,
  earlinessWeight: 1,
  freezeMinutes: 1440,
  restBetweenMinutes: 660,
  dayLimitMinutes: 600,
  weekLimitMinutes: 2880,
  roomTemperatureCelsius: 18,
  roomHumidityPercent: 55,
  overtimePermille: 1500,
};

/** The studio itself, the working plan with its history, and the issued plans under their constraints. */
export class StudioAndPlans1764547204000 implements MigrationInterface {
  readonly name = 'StudioAndPlans1764547204000';

  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`
      create table working_revision (
        id uuid primary key,
        seq integer not null,
        parent_id uuid references working_revision on delete restrict,
        label text not null,
        layout jsonb not null,
        fingerprint text not null,
        planned_from integer not null,
        changed_by uuid references account on delete set null,
        changed_at timestamptz not null,
        constraint working_revision_seq_key unique (seq)
      )
    `);
    await queryRunner.query(`
      create index working_revision_parent_id_idx on working_revision (parent_id)
    `);
    await queryRunner.query(`
      create table studio (
        id uuid primary key,
        single boolean not null default true,
        name text not null,
        zone text not null,
        currency text not null,
        settings jsonb not null,
        head_revision_id uuid references working_revision on delete restrict,
        plan_revision integer not null default 0,
        version integer not null default 1,
        constraint studio_single_key unique (single),
        constraint studio_currency_check check (currency ~ '^[A-Z]{3}$'),
        constraint studio_single_check check (single)
      )
    `);
    await queryRunner.query(`
      create table level_run (
        id uuid primary key,
        state text not null,
        mode text not null,
        revision integer not null,
        base_id uuid not null references working_revision on delete restrict,
        seconds double precision not null,
        seed integer not null,
        planned_from integer not null,
        fingerprint text not null,
        started_by uuid references account on delete set null,
        started_at timestamptz not null,
        ended_at timestamptz,
        schedules integer not null default 0,
        objective jsonb,
        bound jsonb,
        stop text,
        failure text,
        found jsonb,
        worked_by integer,
        constraint level_run_mode_check check (mode in ('dates', 'within-dates')),
        constraint level_run_state_check check (state in ('waiting', 'running', 'found', 'taken', 'left', 'cancelled', 'failed'))
      )
    `);
    await queryRunner.query(`
      create index level_run_started_at_idx on level_run (started_at)
    `);
    await queryRunner.query(`
      create table issued_plan (
        number integer primary key,
        revision_id uuid not null references working_revision on delete restrict,
        issued_at timestamptz not null,
        issued_by uuid references account on delete set null,
        note text not null default '',
        fingerprint text not null,
        changes integer not null,
        constraint issued_plan_number_check check (number >= 1)
      )
    `);
    await queryRunner.query(`
      create table issued_entry (
        plan_number integer not null references issued_plan on delete cascade,
        stage_id uuid not null references stage on delete restrict,
        starts_at timestamptz not null,
        ends_at timestamptz not null,
        dwell_ends_at timestamptz not null,
        work jsonb not null,
        crew jsonb not null,
        bay_ids jsonb not null,
        primary key (plan_number, stage_id),
        constraint issued_entry_times_check check (starts_at <= ends_at and ends_at <= dwell_ends_at)
      )
    `);
    await queryRunner.query(`
      create index issued_entry_stage_id_idx on issued_entry (stage_id)
    `);
    await queryRunner.query(`
      create table issued_shift (
        id uuid primary key,
        plan_number integer not null references issued_plan on delete cascade,
        maker_id uuid not null references maker on delete restrict,
        stage_id uuid not null references stage on delete restrict,
        craft_id uuid not null references craft on delete restrict,
        during tstzrange not null,
        constraint issued_shift_during_check check (not isempty(during)),
        constraint issued_shift_one_place_at_once exclude using gist (plan_number with =, maker_id with =, during with &&)
      )
    `);
    await queryRunner.query(`
      create index issued_shift_stage_id_idx on issued_shift (stage_id)
    `);
    await queryRunner.query(`
      create index issued_shift_maker_id_idx on issued_shift (maker_id)
    `);
    await queryRunner.query(`
      create table issued_occupancy (
        id uuid primary key,
        plan_number integer not null references issued_plan on delete cascade,
        bay_id uuid not null references bay on delete restrict,
        stage_id uuid not null references stage on delete restrict,
        slot integer not null,
        capacity integer not null,
        during tstzrange not null,
        constraint issued_occupancy_slot_check check (0 <= slot and slot < capacity),
        constraint issued_occupancy_during_check check (not isempty(during)),
        constraint issued_occupancy_one_stage_a_slot exclude using gist (plan_number with =, bay_id with =, slot with =, during with &&)
      )
    `);
    await queryRunner.query(`
      create index issued_occupancy_stage_id_idx on issued_occupancy (stage_id)
    `);
    await queryRunner.query(`
      create index issued_occupancy_bay_id_idx on issued_occupancy (bay_id)
    `);
    await queryRunner.query(`
      create table feed_token (
        id uuid primary key,
        token_hash bytea not null,
        account_id uuid not null references account on delete cascade,
        scope text not null,
        maker_id uuid references maker on delete cascade,
        production_id uuid references production on delete cascade,
        created_at timestamptz not null,
        last_read_at timestamptz,
        revoked_at timestamptz,
        constraint feed_token_token_hash_key unique (token_hash),
        constraint feed_token_production_check check ((scope = 'production') = (production_id is not null)),
        constraint feed_token_maker_check check ((scope = 'maker') = (maker_id is not null)),
        constraint feed_token_scope_check check (scope in ('maker', 'production', 'studio')),
        constraint feed_token_token_hash_check check (octet_length(token_hash) = 32)
      )
    `);
    await queryRunner.query(`
      create index feed_token_account_id_idx on feed_token (account_id)
    `);
    await queryRunner.query(`
      insert into studio (id, name, zone, currency, settings)
      values (gen_random_uuid(), 'The workshop', 'Europe/London', 'GBP', '${JSON.stringify(FIRST_SETTINGS)}')
    `);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`drop table feed_token`);
    await queryRunner.query(`drop table issued_occupancy`);
    await queryRunner.query(`drop table issued_shift`);
    await queryRunner.query(`drop table issued_entry`);
    await queryRunner.query(`drop table issued_plan`);
    await queryRunner.query(`drop table level_run`);
    await queryRunner.query(`drop table studio`);
    await queryRunner.query(`drop table working_revision`);
  }
}
