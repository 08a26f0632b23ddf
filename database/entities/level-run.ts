import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Account } from './account';
import type { PlacementValue } from './working-revision';
import { WorkingRevision } from './working-revision';

/** A levelling in the background, and what it found. */
@Entity({ name: 'level_run' })
@Index('level_run_started_at_idx', ['startedAt'])
@Check('level_run_state_check', `state in ('waiting', 'running', 'found', 'taken', 'left', 'cancelled', 'failed')`)
@Check('level_run_mode_check', `mode in ('dates', 'within-dates')`)
export class LevelRun {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  state: 'waiting' | 'running' | 'found' | 'taken' | 'left' | 'cancelled' | 'failed';

  @Column({ type: 'text' })
  mode: 'dates' | 'within-dates';

  /** The working plan's count when it began. */
  @Column({ type: 'integer' })
  revision: number;

  @Column({ type: 'uuid' })
  baseId: string;

  @ManyToOne(() => WorkingRevision, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'base_id' })
  base: Relation<WorkingRevision>;

  @Column({ type: 'double precision' })
  seconds: number;

  @Column({ type: 'integer' })
  seed: number;

  @Column({ type: 'integer' })
  plannedFrom: number;

  @Column({ type: 'text' })
  fingerprint: string;

  @Column({ type: 'uuid', nullable: true })
  startedBy: string | null;

  @ManyToOne(() => Account, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'started_by' })
  starter: Relation<Account> | null;

  @Column({ type: 'timestamptz' })
  startedAt: Date;

  @Column({ type: 'timestamptz', nullable: true })
  endedAt: Date | null;

  @Column({ type: 'integer', default: 0 })
  schedules: number;

  @Column({ type: 'jsonb', nullable: true })
  objective: Readonly<Record<string, number>> | null;

  @Column({ type: 'jsonb', nullable: true })
  bound: Readonly<Record<string, number | null>> | null;

  @Column({ type: 'text', nullable: true })
  stop: string | null;

  @Column({ type: 'text', nullable: true })
  failure: string | null;

  /** The plan that it found. */
  @Column({ type: 'jsonb', nullable: true })
  found: { readonly placements: readonly PlacementValue[] } | null;

  /** The server process that works on it, by the number that it holds a lock on while it lives; see `ProcessMark`. */
  @Column({ type: 'integer', nullable: true })
  workedBy: number | null;
}
