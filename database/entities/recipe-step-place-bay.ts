import { Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Bay } from './bay';
import { RecipeStepPlace } from './recipe-step-place';

/** One of the bays that a recipe's step may use. */
@Entity({ name: 'recipe_step_place_bay' })
export class RecipeStepPlaceBay {
  @PrimaryColumn({ type: 'uuid' })
  stepId: string;

  @PrimaryColumn({ type: 'integer' })
  placePosition: number;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => RecipeStepPlace, (place) => place.bays, { onDelete: 'CASCADE' })
  @JoinColumn([
    { name: 'step_id', referencedColumnName: 'stepId' },
    { name: 'place_position', referencedColumnName: 'position' },
  ])
  place: Relation<RecipeStepPlace>;

  @Column({ type: 'uuid' })
  bayId: string;

  @ManyToOne(() => Bay, { onDelete: 'RESTRICT' })
  @JoinColumn({ name: 'bay_id' })
  bay: Relation<Bay>;
}
