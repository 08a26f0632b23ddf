import { Check, Column, Entity, Exclusion, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { minuteRange, type MinuteRangeValue } from '../column-values';
import { Bay } from './bay';
import { IssuedPlan } from './issued-plan';
import { Stage } from './stage';

/**
 * One unit of a bay taken by a stage for a while. A bay of capacity n has the slots 0 to n − 1, and a slot holds one stage at a
 * time: so capacity is kept by the same kind of constraint as a maker's time.
 */
@Entity({ name: 'issued_occupancy' })
@Index('issued_occupancy_bay_id_idx', ['bayId'])
@Index('issued_occupancy_stage_id_idx', ['stageId'])
@Check('issued_occupancy_during_check', 'not isempty(during)')
@Check('issued_occupancy_slot_check', '0 <= slot and slot < capacity')
@Exclusion(
  'issued_occupancy_one_stage_a_slot',
  'USING gist (plan_number WITH =, bay_id WITH =, slot WITH =, during WITH &&)',
)
export class IssuedOccupancy {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'integer' })
  planNumber: number;

  @ManyToOne(() => IssuedPlan, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'plan_number' })
  plan: Relation<IssuedPlan>;

  @Column({ type: 'uuid' })
  bayId: string;

  @ManyToOne(() => Bay, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'bay_id' })
  bay: Relation<Bay>;

  @Column({ type: 'uuid' })
  stageId: string;

  @ManyToOne(() => Stage, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @Column({ type: 'integer' })
  slot: number;

  /** The bay's capacity when the plan was issued. */
  @Column({ type: 'integer' })
  capacity: number;

  @Column({ type: 'tstzrange', transformer: minuteRange })
  during: MinuteRangeValue;
}
