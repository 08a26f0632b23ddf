import { Check, Column, Entity, Exclusion, Index, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { minuteRange, type MinuteRangeValue } from '../column-values';
import { Craft } from './craft';
import { IssuedPlan } from './issued-plan';
import { Maker } from './maker';
import { Stage } from './stage';

/** A stretch of a maker's issued work. In one plan nobody is at two places at once: the database sees to it. */
@Entity({ name: 'issued_shift' })
@Index('issued_shift_maker_id_idx', ['makerId'])
@Index('issued_shift_stage_id_idx', ['stageId'])
@Check('issued_shift_during_check', 'not isempty(during)')
@Exclusion('issued_shift_one_place_at_once', 'USING gist (plan_number WITH =, maker_id WITH =, during WITH &&)')
export class IssuedShift {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'integer' })
  planNumber: number;

  @ManyToOne(() => IssuedPlan, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'plan_number' })
  plan: Relation<IssuedPlan>;

  @Column({ type: 'uuid' })
  makerId: string;

  @ManyToOne(() => Maker, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'maker_id' })
  maker: Relation<Maker>;

  @Column({ type: 'uuid' })
  stageId: string;

  @ManyToOne(() => Stage, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @Column({ type: 'uuid' })
  craftId: string;

  @ManyToOne(() => Craft, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'craft_id' })
  craft: Relation<Craft>;

  @Column({ type: 'tstzrange', transformer: minuteRange })
  during: MinuteRangeValue;
}
