import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Temperature and humidity of the studio and of its bays: over the week and the seasons, and as measured. */
export class Climates1764547209000 implements MigrationInterface {
  readonly name = 'Climates1764547209000';

  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`
      create table climate (
        place text primary key,
        bay_id uuid references bay on delete cascade,
        profile jsonb,
        version integer not null default 1,
        constraint climate_place_check check (place = coalesce(bay_id::text, 'room'))
      )
    `);
    await queryRunner.query(`
      create table climate_reading (
        place text not null,
        at integer not null,
        bay_id uuid references bay on delete cascade,
        celsius double precision not null,
        humidity_percent double precision not null,
        primary key (place, at),
        constraint climate_reading_place_check check (place = coalesce(bay_id::text, 'room')),
        constraint climate_reading_humidity_check check (humidity_percent between 0 and 100)
      )
    `);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`drop table climate_reading`);
    await queryRunner.query(`drop table climate`);
  }
}
