import { Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Maker } from './maker';
import { Stage } from './stage';

/** A maker who works on a stage that has begun. */
@Entity({ name: 'stage_maker' })
export class StageMaker {
  @PrimaryColumn({ type: 'uuid' })
  stageId: string;

  @PrimaryColumn({ type: 'uuid' })
  makerId: string;

  @ManyToOne(() => Stage, (stage) => stage.makers, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @ManyToOne(() => Maker, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'maker_id' })
  maker: Relation<Maker>;
}
