import type { MigrationInterface, QueryRunner } from 'typeorm';

/** People who do the work, when they do it, and who it is for. */
export class CrewAndClients1764547201000 implements MigrationInterface {
  readonly name = 'CrewAndClients1764547201000';

  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`
      -- For constraints that compare ids for equality and ranges for overlap at once; trusted, so the owner may.
      create extension if not exists btree_gist
    `);
    await queryRunner.query(`
      create table client (
        id uuid primary key,
        name text not null,
        version integer not null default 1,
        constraint client_name_key unique (name)
      )
    `);
    await queryRunner.query(`
      create table craft (
        id uuid primary key,
        key text not null,
        name text not null,
        version integer not null default 1,
        constraint craft_key_key unique (key),
        constraint craft_key_check check (key ~ '^[a-z][a-z0-9-]{0,39}$')
      )
    `);
    await queryRunner.query(`
      create table maker (
        id uuid primary key,
        name text not null,
        initials text not null,
        hour_cost_minor bigint not null,
        day_limit_minutes integer,
        week_limit_minutes integer,
        active boolean not null default true,
        note text not null default '',
        version integer not null default 1,
        constraint maker_week_limit_minutes_check check (week_limit_minutes between 0 and 10080),
        constraint maker_day_limit_minutes_check check (day_limit_minutes between 0 and 1440),
        constraint maker_hour_cost_minor_check check (hour_cost_minor >= 0)
      )
    `);
    await queryRunner.query(`
      create table maker_craft (
        maker_id uuid not null references maker on delete cascade,
        craft_id uuid not null references craft on delete restrict,
        pace_permille integer not null,
        primary key (maker_id, craft_id),
        constraint maker_craft_pace_permille_check check (pace_permille between 100 and 3000)
      )
    `);
    await queryRunner.query(`
      create table maker_pattern (
        maker_id uuid not null references maker on delete cascade,
        position integer not null,
        first_day date not null,
        rule text not null,
        start_minute_of_day integer not null,
        length_minutes integer not null,
        except_days date[] not null default '{}',
        kind text not null default 'ordinary',
        primary key (maker_id, position),
        constraint maker_pattern_kind_check check (kind in ('ordinary', 'overtime')),
        constraint maker_pattern_length_minutes_check check (length_minutes between 15 and 1440),
        constraint maker_pattern_start_minute_of_day_check check (start_minute_of_day between 0 and 1439)
      )
    `);
    await queryRunner.query(`
      create table leave (
        id uuid primary key,
        maker_id uuid not null references maker on delete cascade,
        days daterange not null,
        note text not null default '',
        version integer not null default 1,
        constraint leave_days_check check (not isempty(days)),
        constraint leave_no_overlap exclude using gist (maker_id with =, days with &&)
      )
    `);
    await queryRunner.query(`
      create table closure (
        id uuid primary key,
        name text not null,
        days daterange not null,
        version integer not null default 1,
        constraint closure_days_check check (not isempty(days))
      )
    `);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`drop table closure`);
    await queryRunner.query(`drop table leave`);
    await queryRunner.query(`drop table maker_pattern`);
    await queryRunner.query(`drop table maker_craft`);
    await queryRunner.query(`drop table maker`);
    await queryRunner.query(`drop table craft`);
    await queryRunner.query(`drop table client`);
    await queryRunner.query(`drop extension btree_gist`);
  }
}
