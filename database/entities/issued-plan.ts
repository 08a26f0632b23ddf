import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Account } from './account';
import { WorkingRevision } from './working-revision';

/** What the studio works to, by number; the highest one holds. */
@Entity({ name: 'issued_plan' })
@Check('issued_plan_number_check', 'number >= 1')
export class IssuedPlan {
  @PrimaryColumn({ type: 'integer' })
  number: number;

  @Column({ type: 'uuid' })
  revisionId: string;

  @ManyToOne(() => WorkingRevision, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'revision_id' })
  revision: Relation<WorkingRevision>;

  @Column({ type: 'timestamptz' })
  issuedAt: Date;

  @Column({ type: 'uuid', nullable: true })
  issuedBy: string | null;

  @ManyToOne(() => Account, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'issued_by' })
  issuer: Relation<Account> | null;

  @Column({ type: 'text', default: '' })
  note: string;

  @Column({ type: 'text' })
  fingerprint: string;

  /** Stages that stand otherwise than in the plan before. */
  @Column({ type: 'integer' })
  changes: number;
}
