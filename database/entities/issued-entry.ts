import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { IssuedPlan } from './issued-plan';
import { Stage } from './stage';

/** One stage of an issued plan: its hands-on spans, crew and bays as issued, and when its dwell is over. */
@Entity({ name: 'issued_entry' })
@Index('issued_entry_stage_id_idx', ['stageId'])
@Check('issued_entry_times_check', 'starts_at <= ends_at and ends_at <= dwell_ends_at')
export class IssuedEntry {
  @PrimaryColumn({ type: 'integer' })
  planNumber: number;

  @PrimaryColumn({ type: 'uuid' })
  stageId: string;

  @ManyToOne(() => IssuedPlan, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'plan_number' })
  plan: Relation<IssuedPlan>;

  @ManyToOne(() => Stage, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @Column({ type: 'timestamptz' })
  startsAt: Date;

  /** End of the hands-on work. */
  @Column({ type: 'timestamptz' })
  endsAt: Date;

  @Column({ type: 'timestamptz' })
  dwellEndsAt: Date;

  /** Sorted, disjoint spans in minutes since 1970-01-01T00:00Z; the first may be empty for work done before. */
  @Column({ type: 'jsonb' })
  work: readonly { readonly start: number; readonly end: number }[];

  /** Who works on it and as what; the shifts hold the same under constraint. */
  @Column({ type: 'jsonb' })
  crew: readonly { readonly makerId: string; readonly craftId: string }[];

  /** The chosen bay for each of the stage's places; the occupancies hold the same under constraint. */
  @Column({ type: 'jsonb' })
  bayIds: readonly string[];
}
