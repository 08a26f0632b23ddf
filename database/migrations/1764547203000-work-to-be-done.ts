import type { MigrationInterface, QueryRunner } from 'typeorm';

/** The library, bays and productions, down to stages, links and what was reported of them. */
export class WorkToBeDone1764547203000 implements MigrationInterface {
  readonly name = 'WorkToBeDone1764547203000';

  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`
      create table material (
        id uuid primary key,
        name text not null,
        family text not null,
        reference_celsius double precision not null,
        reference_humidity_percent double precision not null,
        attended_minutes integer not null,
        cautions text[] not null default '{}',
        note text not null default '',
        version integer not null default 1,
        constraint material_name_key unique (name),
        constraint material_attended_minutes_check check (attended_minutes >= 0),
        constraint material_reference_humidity_percent_check check (reference_humidity_percent between 0 and 100)
      )
    `);
    await queryRunner.query(`
      create table material_dwell (
        material_id uuid not null references material on delete cascade,
        position integer not null,
        milestone text not null,
        low_minutes integer not null,
        likely_minutes integer not null,
        high_minutes integer not null,
        law jsonb not null,
        minimum_celsius double precision,
        maximum_celsius double precision,
        source text not null,
        primary key (material_id, position),
        constraint material_dwell_milestone_key unique (material_id, milestone),
        constraint material_dwell_celsius_check check (minimum_celsius <= maximum_celsius),
        constraint material_dwell_minutes_check check (0 <= low_minutes and low_minutes <= likely_minutes and likely_minutes <= high_minutes),
        constraint material_dwell_milestone_check check (milestone in ('pot-life', 'touch', 'demould', 'next-layer', 'next-layer-until', 'sandable', 'full-cure'))
      )
    `);
    await queryRunner.query(`
      create table recipe (
        id uuid primary key,
        name text not null,
        makes text not null,
        size_unit text not null,
        usual_size double precision not null,
        usual_casts integer not null,
        usual_moulds integer not null,
        usual_coats integer not null,
        version integer not null default 1,
        constraint recipe_name_key unique (name),
        constraint recipe_usual_coats_check check (usual_coats between 1 and 20),
        constraint recipe_usual_moulds_check check (usual_moulds between 0 and 20),
        constraint recipe_usual_casts_check check (usual_casts between 1 and 200),
        constraint recipe_usual_size_check check (usual_size > 0)
      )
    `);
    await queryRunner.query(`
      create table production (
        id uuid primary key,
        client_id uuid not null references client on delete restrict,
        name text not null,
        mark text not null,
        hue integer not null,
        state text not null,
        note text not null default '',
        created_at timestamptz not null default now(),
        version integer not null default 1,
        constraint production_state_check check (state in ('tentative', 'committed', 'delivered', 'declined')),
        constraint production_hue_check check (hue between 0 and 11)
      )
    `);
    await queryRunner.query(`
      create table key_date (
        id uuid primary key,
        production_id uuid not null references production on delete cascade,
        kind text not null,
        at timestamptz not null,
        strength text not null,
        weight integer not null,
        version integer not null default 1,
        constraint key_date_weight_check check (weight between 1 and 1000),
        constraint key_date_strength_check check (strength in ('hard', 'wished')),
        constraint key_date_kind_check check (kind in ('rehearsal-loan', 'delivery', 'get-in', 'fit-up', 'technical-rehearsal', 'dress-rehearsal', 'opening'))
      )
    `);
    await queryRunner.query(`
      create index key_date_production_id_idx on key_date (production_id)
    `);
    await queryRunner.query(`
      create table piece (
        id uuid primary key,
        production_id uuid not null references production on delete restrict,
        name text not null,
        position integer not null,
        recipe_id uuid references recipe on delete set null,
        note text not null default '',
        version integer not null default 1,
        removed_at timestamptz
      )
    `);
    await queryRunner.query(`
      create index piece_production_id_idx on piece (production_id)
    `);
    await queryRunner.query(`
      create table key_date_piece (
        key_date_id uuid not null references key_date on delete cascade,
        piece_id uuid not null references piece on delete cascade,
        primary key (key_date_id, piece_id)
      )
    `);
    await queryRunner.query(`
      create table bay (
        id uuid primary key,
        name text not null,
        kind text not null,
        capacity integer not null,
        piece_id uuid references piece on delete set null,
        temperature_celsius double precision,
        humidity_percent double precision,
        size jsonb,
        note text not null default '',
        active boolean not null default true,
        version integer not null default 1,
        constraint bay_piece_check check (piece_id is null or kind = 'mould'),
        constraint bay_humidity_percent_check check (humidity_percent between 0 and 100),
        constraint bay_capacity_check check (capacity between 1 and 50),
        constraint bay_kind_check check (kind in ('booth', 'welding', 'hot-wire', 'table', 'oven', 'floor', 'store', 'mould', 'other'))
      )
    `);
    await queryRunner.query(`
      create unique index bay_name_key on bay (name) where kind <> 'mould'
    `);
    await queryRunner.query(`
      create table bay_opening (
        bay_id uuid not null references bay on delete cascade,
        position integer not null,
        first_day date not null,
        rule text not null,
        start_minute_of_day integer not null,
        length_minutes integer not null,
        except_days date[] not null default '{}',
        kind text not null default 'ordinary',
        primary key (bay_id, position),
        constraint bay_opening_kind_check check (kind in ('ordinary', 'overtime')),
        constraint bay_opening_length_minutes_check check (length_minutes between 15 and 1440),
        constraint bay_opening_start_minute_of_day_check check (start_minute_of_day between 0 and 1439)
      )
    `);
    await queryRunner.query(`
      create table recipe_step (
        id uuid primary key,
        name text not null,
        kind text not null,
        low_minutes integer not null,
        likely_minutes integer not null,
        high_minutes integer not null,
        crew_loss_permille integer not null,
        continuity text not null,
        dwell_minutes integer,
        dwell_attended_minutes integer,
        dwell_material_id uuid references material on delete restrict,
        dwell_milestone text,
        dwell_window jsonb,
        cautions text[] not null default '{}',
        note text not null default '',
        visit_at timestamptz,
        reply_minutes integer not null default 0,
        recipe_id uuid not null references recipe on delete cascade,
        position integer not null,
        after integer[] not null default '{}',
        each text not null,
        mould text not null default 'none',
        until_position integer,
        constraint recipe_step_position_key unique (recipe_id, position),
        constraint recipe_step_dwell_check check ((dwell_minutes is null) = (dwell_attended_minutes is null)),
        constraint recipe_step_dwell_minutes_check check (dwell_minutes >= 0 and dwell_attended_minutes >= 0),
        constraint recipe_step_crew_loss_permille_check check (crew_loss_permille between 0 and 500),
        constraint recipe_step_hands_on_check check (0 <= low_minutes and low_minutes <= likely_minutes and likely_minutes <= high_minutes),
        constraint recipe_step_continuity_check check (continuity in ('session', 'shifts', 'free', 'clock')),
        constraint recipe_step_kind_check check (kind in ('make', 'sign-off', 'check', 'transport')),
        constraint recipe_step_until_position_check check (until_position > position),
        constraint recipe_step_mould_check check (mould in ('none', 'makes', 'fills')),
        constraint recipe_step_each_check check (each in ('once', 'cast', 'coat', 'mould'))
      )
    `);
    await queryRunner.query(`
      create table recipe_step_crew (
        step_id uuid not null references recipe_step on delete cascade,
        position integer not null,
        craft_id uuid not null references craft on delete restrict,
        least integer not null,
        most integer not null,
        primary key (step_id, position),
        constraint recipe_step_crew_least_check check (1 <= least and least <= most and most <= 12)
      )
    `);
    await queryRunner.query(`
      create table recipe_step_place (
        step_id uuid not null references recipe_step on delete cascade,
        position integer not null,
        units integer not null,
        hold text not null,
        primary key (step_id, position),
        constraint recipe_step_place_hold_check check (hold in ('work', 'dwell', 'until-stage')),
        constraint recipe_step_place_units_check check (units between 1 and 50)
      )
    `);
    await queryRunner.query(`
      create table recipe_step_place_bay (
        step_id uuid not null,
        place_position integer not null,
        position integer not null,
        bay_id uuid not null references bay on delete restrict,
        primary key (step_id, place_position, position),
        constraint recipe_step_place_bay_step_id_place_position_fkey foreign key (step_id, place_position) references recipe_step_place (step_id, position) on delete cascade
      )
    `);
    await queryRunner.query(`
      create table stage (
        id uuid primary key,
        name text not null,
        kind text not null,
        low_minutes integer not null,
        likely_minutes integer not null,
        high_minutes integer not null,
        crew_loss_permille integer not null,
        continuity text not null,
        dwell_minutes integer,
        dwell_attended_minutes integer,
        dwell_material_id uuid references material on delete restrict,
        dwell_milestone text,
        dwell_window jsonb,
        cautions text[] not null default '{}',
        note text not null default '',
        visit_at timestamptz,
        reply_minutes integer not null default 0,
        piece_id uuid not null references piece on delete restrict,
        position integer not null,
        nth integer,
        repeats integer,
        state text not null default 'to-do',
        started_at timestamptz,
        finished_at timestamptz,
        spent_minutes integer not null default 0,
        remaining_minutes integer,
        decision text,
        decided_at timestamptz,
        decision_note text not null default '',
        version integer not null default 1,
        removed_at timestamptz,
        constraint stage_decision_check check (decision is null or (decision in ('approved', 'changes-asked') and kind = 'sign-off')),
        constraint stage_spent_minutes_check check (spent_minutes >= 0 and remaining_minutes >= 0),
        constraint stage_times_check check (started_at <= finished_at),
        constraint stage_finished_check check ((state = 'finished') = (finished_at is not null)),
        constraint stage_started_check check ((state = 'to-do') = (started_at is null)),
        constraint stage_state_check check (state in ('to-do', 'started', 'paused', 'finished')),
        constraint stage_nth_check check ((nth is null) = (repeats is null) and 1 <= nth and nth <= repeats),
        constraint stage_dwell_check check ((dwell_minutes is null) = (dwell_attended_minutes is null)),
        constraint stage_dwell_minutes_check check (dwell_minutes >= 0 and dwell_attended_minutes >= 0),
        constraint stage_crew_loss_permille_check check (crew_loss_permille between 0 and 500),
        constraint stage_hands_on_check check (0 <= low_minutes and low_minutes <= likely_minutes and likely_minutes <= high_minutes),
        constraint stage_continuity_check check (continuity in ('session', 'shifts', 'free', 'clock')),
        constraint stage_kind_check check (kind in ('make', 'sign-off', 'check', 'transport'))
      )
    `);
    await queryRunner.query(`
      create index stage_piece_id_idx on stage (piece_id)
    `);
    await queryRunner.query(`
      create table stage_crew (
        stage_id uuid not null references stage on delete cascade,
        position integer not null,
        craft_id uuid not null references craft on delete restrict,
        least integer not null,
        most integer not null,
        primary key (stage_id, position),
        constraint stage_crew_least_check check (1 <= least and least <= most and most <= 12)
      )
    `);
    await queryRunner.query(`
      create table stage_place (
        stage_id uuid not null references stage on delete cascade,
        position integer not null,
        units integer not null,
        hold text not null,
        until_stage_id uuid references stage on delete restrict,
        primary key (stage_id, position),
        constraint stage_place_until_check check ((hold = 'until-stage') = (until_stage_id is not null)),
        constraint stage_place_hold_check check (hold in ('work', 'dwell', 'until-stage')),
        constraint stage_place_units_check check (units between 1 and 50)
      )
    `);
    await queryRunner.query(`
      create table stage_place_bay (
        stage_id uuid not null,
        place_position integer not null,
        position integer not null,
        bay_id uuid not null references bay on delete restrict,
        primary key (stage_id, place_position, position),
        constraint stage_place_bay_stage_id_place_position_fkey foreign key (stage_id, place_position) references stage_place (stage_id, position) on delete cascade
      )
    `);
    await queryRunner.query(`
      create table stage_maker (
        stage_id uuid not null references stage on delete cascade,
        maker_id uuid not null references maker on delete restrict,
        primary key (stage_id, maker_id)
      )
    `);
    await queryRunner.query(`
      create table stage_bay (
        stage_id uuid not null references stage on delete cascade,
        position integer not null,
        bay_id uuid not null references bay on delete restrict,
        primary key (stage_id, position)
      )
    `);
    await queryRunner.query(`
      create table link (
        id uuid primary key,
        from_stage_id uuid not null references stage on delete cascade,
        to_stage_id uuid not null references stage on delete cascade,
        kind text not null,
        after text not null,
        min_gap_minutes integer not null,
        max_gap_minutes integer,
        time text not null,
        constraint link_ends_key unique (from_stage_id, to_stage_id, kind, after),
        constraint link_gaps_check check (min_gap_minutes <= max_gap_minutes),
        constraint link_time_check check (time in ('clock', 'working')),
        constraint link_after_check check (after in ('dwell', 'work')),
        constraint link_kind_check check (kind in ('finish-start', 'start-start', 'finish-finish', 'start-finish')),
        constraint link_self_check check (from_stage_id <> to_stage_id)
      )
    `);
    await queryRunner.query(`
      create index link_to_stage_id_idx on link (to_stage_id)
    `);
    await queryRunner.query(`
      create table purchase (
        id uuid primary key,
        production_id uuid not null references production on delete cascade,
        stage_id uuid not null references stage on delete restrict,
        name text not null,
        supplier text not null default '',
        lead_days integer not null,
        ordered_on date,
        due_on date,
        received_on date,
        cost_minor bigint not null,
        version integer not null default 1,
        constraint purchase_order_check check (ordered_on <= received_on),
        constraint purchase_cost_minor_check check (cost_minor >= 0),
        constraint purchase_lead_days_check check (lead_days between 0 and 730)
      )
    `);
    await queryRunner.query(`
      create index purchase_production_id_idx on purchase (production_id)
    `);
    await queryRunner.query(`
      create table stage_report (
        key uuid primary key,
        stage_id uuid not null references stage on delete cascade,
        account_id uuid references account on delete set null,
        kind text not null,
        at timestamptz not null,
        spent_minutes integer,
        remaining_minutes integer,
        note text not null default '',
        received_at timestamptz not null default now(),
        constraint stage_report_kind_check check (kind in ('start', 'pause', 'finish'))
      )
    `);
    await queryRunner.query(`
      create index stage_report_stage_id_idx on stage_report (stage_id)
    `);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`drop table stage_report`);
    await queryRunner.query(`drop table purchase`);
    await queryRunner.query(`drop table link`);
    await queryRunner.query(`drop table stage_bay`);
    await queryRunner.query(`drop table stage_maker`);
    await queryRunner.query(`drop table stage_place_bay`);
    await queryRunner.query(`drop table stage_place`);
    await queryRunner.query(`drop table stage_crew`);
    await queryRunner.query(`drop table stage`);
    await queryRunner.query(`drop table recipe_step_place_bay`);
    await queryRunner.query(`drop table recipe_step_place`);
    await queryRunner.query(`drop table recipe_step_crew`);
    await queryRunner.query(`drop table recipe_step`);
    await queryRunner.query(`drop table bay_opening`);
    await queryRunner.query(`drop table bay`);
    await queryRunner.query(`drop table key_date_piece`);
    await queryRunner.query(`drop table piece`);
    await queryRunner.query(`drop table key_date`);
    await queryRunner.query(`drop table production`);
    await queryRunner.query(`drop table recipe`);
    await queryRunner.query(`drop table material_dwell`);
    await queryRunner.query(`drop table material`);
  }
}
