import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Account } from './account';
import { KeyDate } from './key-date';
import { Production } from './production';
import { WorkingRevision } from './working-revision';

/** A search about the working plan in the background: for a date's rescue, or for a production's promise; and what it found. */
@Entity({ name: 'plan_search' })
@Index('plan_search_key_date_id_idx', ['keyDateId'])
@Index('plan_search_production_id_idx', ['productionId'])
@Check('plan_search_state_check', `state in ('waiting', 'running', 'found', 'cancelled', 'failed')`)
@Check('plan_search_subject_check', '(key_date_id is null) <> (production_id is null)')
export class PlanSearch {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  state: 'waiting' | 'running' | 'found' | 'cancelled' | 'failed';

  /** The date that is to be saved. */
  @Column({ type: 'uuid', nullable: true })
  keyDateId: string | null;

  @ManyToOne(() => KeyDate, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'key_date_id' })
  keyDate: Relation<KeyDate> | null;

  /** The production that is asked for. */
  @Column({ type: 'uuid', nullable: true })
  productionId: string | null;

  @ManyToOne(() => Production, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'production_id' })
  production: Relation<Production> | null;

  /** The working revision that it is about. */
  @Column({ type: 'uuid' })
  baseId: string;

  @ManyToOne(() => WorkingRevision, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'base_id' })
  base: Relation<WorkingRevision>;

  /** Name of the problem that it is about. */
  @Column({ type: 'text' })
  fingerprint: string;

  @Column({ type: 'integer' })
  plannedFrom: number;

  @Column({ type: 'uuid', nullable: true })
  startedBy: string | null;

  @ManyToOne(() => Account, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'started_by' })
  starter: Relation<Account> | null;

  @Column({ type: 'timestamptz' })
  startedAt: Date;

  @Column({ type: 'timestamptz', nullable: true })
  endedAt: Date | null;

  /** How much of what is to be weighed has been. */
  @Column({ type: 'integer', default: 0 })
  weighed: number;

  @Column({ type: 'integer', default: 0 })
  ofCount: number;

  @Column({ type: 'text', nullable: true })
  failure: string | null;

  /** What the worker found, as `server/jobs` has it. */
  @Column({ type: 'jsonb', nullable: true })
  found: object | null;

  /** The process that works on it; null where none ever did. */
  @Column({ type: 'integer', nullable: true })
  workedBy: number | null;
}
