import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Bay } from './bay';
import { StagePlace } from './stage-place';

/** One of the bays that a stage may use. */
@Entity({ name: 'stage_place_bay' })
export class StagePlaceBay {
  @PrimaryColumn({ type: 'uuid' })
  stageId: string;

  @PrimaryColumn({ type: 'integer' })
  placePosition: number;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => StagePlace, (place) => place.bays, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'stage_id', referencedColumnName: 'stageId' },
    { name: 'place_position', referencedColumnName: 'position' },
  ])
  place: Relation<StagePlace>;

  @Column({ type: 'uuid' })
  bayId: string;

  @ManyToOne(() => Bay, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'bay_id' })
  bay: Relation<Bay>;
}
