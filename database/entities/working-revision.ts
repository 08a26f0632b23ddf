import { Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import type { Measure } from '@common/rescue';
import { Account } from './account';

/** Where one stage stands in a plan, as the engine's `Placement` has it; minutes since 1970-01-01T00:00Z. */
export interface PlacementValue {
  readonly stageId: string;
  readonly work: readonly { readonly start: number; readonly end: number }[];
  readonly crew: readonly { readonly makerId: string; readonly craftId: string }[];
  readonly bayIds: readonly string[];
  readonly dwellEnd: number;
}

/** A stage held where the manager put it. */
export interface PinValue {
  readonly start: number | null;
  readonly makerIds: readonly string[] | null;
  readonly bayIds: readonly string[] | null;
}

/** A measure that a working plan counts on, as the engine's `Measure` has it. */
export type MeasureValue = Measure;

/** A whole working plan: placements, pins by stage, and the measures that it counts on (none where it is absent). */
export interface LayoutValue {
  readonly plan: { readonly placements: readonly PlacementValue[] };
  readonly pins: Readonly<Record<string, PinValue>>;
  readonly measures?: readonly MeasureValue[];
}

/** One state of the working plan. Undo goes to the parent, redo to the child laid out last; nothing is ever rewritten. */
@Entity({ name: 'working_revision' })
@Unique('working_revision_seq_key', ['seq'])
@Index('working_revision_parent_id_idx', ['parentId'])
export class WorkingRevision {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  /** The order in which revisions were made. */
  @Column({ type: 'integer' })
  seq: number;

  @Column({ type: 'uuid', nullable: true })
  parentId: string | null;

  @ManyToOne(() => WorkingRevision, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'parent_id' })
  parent: Relation<WorkingRevision> | null;

  @Column({ type: 'text' })
  label: string;

  @Column({ type: 'jsonb' })
  layout: LayoutValue;

  /** Name of the problem that it answers. */
  @Column({ type: 'text' })
  fingerprint: string;

  /** The minute at which it was laid out: where its problem's horizon begins. */
  @Column({ type: 'integer' })
  plannedFrom: number;

  @Column({ type: 'uuid', nullable: true })
  changedBy: string | null;

  @ManyToOne(() => Account, { onDelete: 'SET NULL' })
  @JoinColumn({ name: 'changed_by' })
  changer: Relation<Account> | null;

  @Column({ type: 'timestamptz' })
  changedAt: Date;
}
