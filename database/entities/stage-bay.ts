import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Bay } from './bay';
import { Stage } from './stage';

/** The bay that a stage which has begun took, one for each of its places in their order. */
@Entity({ name: 'stage_bay' })
export class StageBay {
  @PrimaryColumn({ type: 'uuid' })
  stageId: string;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => Stage, (stage) => stage.bays, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @Column({ type: 'uuid' })
  bayId: string;

  @ManyToOne(() => Bay, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'bay_id' })
  bay: Relation<Bay>;
}
