import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What calendar addresses last showed. */
export class FeedState1764547205000 implements MigrationInterface {
  readonly name = 'FeedState1764547205000';

  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`
      create table feed_state (
        scope text primary key,
        history jsonb not null,
        text_hash bytea not null,
        changed_at timestamptz not null,
        constraint feed_state_text_hash_check check (octet_length(text_hash) = 32)
      )
    `);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`drop table feed_state`);
  }
}
