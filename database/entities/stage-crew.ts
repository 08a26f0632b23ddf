import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Craft } from './craft';
import { Stage } from './stage';

/** How many makers with a craft a stage wants at once. */
@Entity({ name: 'stage_crew' })
@Check('stage_crew_least_check', '1 <= least and least <= most and most <= 12')
export class StageCrew {
  @PrimaryColumn({ type: 'uuid' })
  stageId: string;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => Stage, (stage) => stage.crew, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @Column({ type: 'uuid' })
  craftId: string;

  @ManyToOne(() => Craft, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'craft_id' })
  craft: Relation<Craft>;

  @Column({ type: 'integer' })
  least: number;

  @Column({ type: 'integer' })
  most: number;
}
