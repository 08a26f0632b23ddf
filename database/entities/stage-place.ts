import { Check, Column, Entity, JoinColumn, ManyToOne, OneToMany, PrimaryColumn, type Relation } from 'typeorm';
import { Stage } from './stage';
import { StagePlaceBay } from './stage-place-bay';

/** Where a stage works, and how long it keeps the place. */
@Entity({ name: 'stage_place' })
@Check('stage_place_units_check', 'units between 1 and 50')
@Check('stage_place_hold_check', `hold in ('work', 'dwell', 'until-stage')`)
@Check('stage_place_until_check', `(hold = 'until-stage') = (until_stage_id is not null)`)
export class StagePlace {
  @PrimaryColumn({ type: 'uuid' })
  stageId: string;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => Stage, (stage) => stage.places, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'stage_id' })
  stage: Relation<Stage>;

  @Column({ type: 'integer' })
  units: number;

  @Column({ type: 'text' })
  hold: 'work' | 'dwell' | 'until-stage';

  /** The later stage at whose end of work the place is let go. */
  @Column({ type: 'uuid', nullable: true })
  untilStageId: string | null;

  @ManyToOne(() => Stage, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'until_stage_id' })
  untilStage: Relation<Stage> | null;

  @OneToMany(() => StagePlaceBay, (bay) => bay.place)
  bays: Relation<StagePlaceBay>[];
}
