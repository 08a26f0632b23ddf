import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Account } from './account';

/** One line of the audit trail, written in the transaction of the change that it tells of. Never changed afterwards. */
@Entity({ name: 'audit_entry' })
@Index('audit_entry_at_idx', ['at'])
@Index('audit_entry_subject_id_idx', ['subjectId'])
export class AuditEntry {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'timestamptz' })
  at: Date;

  @Column({ type: 'uuid', nullable: true })
  accountId: string | null;

  @ManyToOne(() => Account, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'account_id' })
  account: Relation<Account> | null;

  /** The account's name then; null where no account acted. */
  @Column({ type: 'text', nullable: true })
  accountName: string | null;

  @Column({ type: 'text' })
  action: string;

  @Column({ type: 'text' })
  subjectKind: string;

  @Column({ type: 'uuid', nullable: true })
  subjectId: string | null;

  @Column({ type: 'text' })
  sentence: string;

  @Column({ type: 'jsonb', nullable: true })
  before: object | null;

  @Column({ type: 'jsonb', nullable: true })
  after: object | null;
}
