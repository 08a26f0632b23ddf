import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Who may sign in, their sessions, and what was changed by whom. */
export class AccountsAndAudit1764547202000 implements MigrationInterface {
  readonly name = 'AccountsAndAudit1764547202000';

  async up(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`
      create table account (
        id uuid primary key,
        name text not null,
        email text not null,
        role text not null,
        password_hash text,
        google_subject text,
        maker_id uuid references maker on delete restrict,
        client_id uuid references client on delete restrict,
        active boolean not null default true,
        last_sign_in_at timestamptz,
        created_at timestamptz not null default now(),
        version integer not null default 1,
        constraint account_google_subject_key unique (google_subject),
        constraint account_client_check check ((role = 'client') = (client_id is not null)),
        constraint account_maker_check check (role <> 'maker' or maker_id is not null),
        constraint account_role_check check (role in ('owner', 'manager', 'maker', 'client'))
      )
    `);
    await queryRunner.query(`
      create unique index account_email_lower_key on account (lower(email))
    `);
    await queryRunner.query(`
      create table session (
        sid varchar primary key,
        sess json not null,
        expire timestamp(6) not null
      )
    `);
    await queryRunner.query(`
      create index session_expire_idx on session (expire)
    `);
    await queryRunner.query(`
      create table audit_entry (
        id uuid primary key,
        at timestamptz not null,
        account_id uuid references account on delete set null,
        account_name text,
        action text not null,
        subject_kind text not null,
        subject_id uuid,
        sentence text not null,
        before jsonb,
        after jsonb
      )
    `);
    await queryRunner.query(`
      create index audit_entry_subject_id_idx on audit_entry (subject_id)
    `);
    await queryRunner.query(`
      create index audit_entry_at_idx on audit_entry (at)
    `);
  }

  async down(queryRunner: QueryRunner): Promise<void> {
    await queryRunner.query(`drop table audit_entry`);
    await queryRunner.query(`drop table session`);
    await queryRunner.query(`drop table account`);
  }
}
