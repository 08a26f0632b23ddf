import { Check, Column, Entity, Index, JoinColumn, ManyToOne, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { Stage } from './stage';

/** How one stage follows another. */
@Entity({ name: 'link' })
@Unique('link_ends_key', ['fromStageId', 'toStageId', 'kind', 'after'])
@Index('link_to_stage_id_idx', ['toStageId'])
@Check('link_self_check', 'from_stage_id <> to_stage_id')
@Check('link_kind_check', `kind in ('finish-start', 'start-start', 'finish-finish', 'start-finish')`)
@Check('link_after_check', `after in ('dwell', 'work')`)
@Check('link_time_check', `time in ('clock', 'working')`)
@Check('link_gaps_check', 'min_gap_minutes <= max_gap_minutes')
export class Link {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid' })
  fromStageId: string;

  @ManyToOne(() => Stage, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'from_stage_id' })
  fromStage: Relation<Stage>;

  @Column({ type: 'uuid' })
  toStageId: string;

  @ManyToOne(() => Stage, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'to_stage_id' })
  toStage: Relation<Stage>;

  @Column({ type: 'text' })
  kind: 'finish-start' | 'start-start' | 'finish-finish' | 'start-finish';

  @Column({ type: 'text' })
  after: 'dwell' | 'work';

  @Column({ type: 'integer' })
  minGapMinutes: number;

  @Column({ type: 'integer', nullable: true })
  maxGapMinutes: number | null;

  @Column({ type: 'text' })
  time: 'clock' | 'working';
}
