import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Account } from './account';
import { Stage } from './stage';

/** What was reported of a stage. The sender chooses the key, so that a report sent twice counts once. */
@Entity({ name: 'stage_report' })
@Index('stage_report_stage_id_idx', ['stageId'])
@Check('stage_report_kind_check', `kind in ('start', 'pause', 'finish')`)
export class StageReport {
  @PrimaryColumn({ type: 'uuid' })
  key: string;

  @Column({ type: 'uuid' })
  stageId: string;

  @ManyToOne(() => Stage, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @Column({ type: 'uuid', nullable: true })
  accountId: string | null;

  @ManyToOne(() => Account, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'account_id' })
  account: Relation<Account> | null;

  @Column({ type: 'text' })
  kind: 'start' | 'pause' | 'finish';

  @Column({ type: 'timestamptz' })
  at: Date;

  @Column({ type: 'integer', nullable: true })
  spentMinutes: number | null;

  @Column({ type: 'integer', nullable: true })
  remainingMinutes: number | null;

  @Column({ type: 'text', default: '' })
  note: string;

  @Column({ type: 'timestamptz', default: () => 'now()' })
  receivedAt: Date;
}
