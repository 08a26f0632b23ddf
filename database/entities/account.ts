import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Client } from './client';
import { Maker } from './maker';

/** A person who may sign in. Made unique by the lower-case e-mail address. */
@Entity({ name: 'account' })
@Unique('account_google_subject_key', ['googleSubject'])
@Index('account_email_lower_key', { synchronize: false })
@Check('account_role_check', `role in ('owner', 'manager', 'maker', 'client')`)
@Check('account_maker_check', `role <> 'maker' or maker_id is not null`)
@Check('account_client_check', `(role = 'client') = (client_id is not null)`)
export class Account {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'text' })
  email: string;

  @Column({ type: 'text' })
  role: 'owner' | 'manager' | 'maker' | 'client';

  /** argon2id in PHC form; null for a person who signs in otherwise. */
  @Column({ type: 'text', nullable: true })
  passwordHash: string | null;

  /** The `sub` of a Google account; null where none is tied. */
  @Column({ type: 'text', nullable: true })
  googleSubject: string | null;

  @Column({ type: 'uuid', nullable: true })
  makerId: string | null;

  @ManyToOne(() => Maker, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'maker_id' })
  maker: Relation<Maker> | null;

  @Column({ type: 'uuid', nullable: true })
  clientId: string | null;

  @ManyToOne(() => Client, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'client_id' })
  client: Relation<Client> | null;

  @Column({ type: 'boolean', default: true })
  active: boolean;

  @Column({ type: 'timestamptz', nullable: true })
  lastSignInAt: Date | null;

  @Column({ type: 'timestamptz', default: () => 'now()' })
  createdAt: Date;

  @Column({ type: 'integer', default: 1 })
  version: number;
}
