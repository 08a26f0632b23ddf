import { Check, Column, Entity, JoinColumn, ManyToOne, OneToMany, PrimaryColumn, type Relation } from 'typeorm';
import { RecipeStep } from './recipe-step';
import { RecipeStepPlaceBay } from './recipe-step-place-bay';

/** Where a recipe's step works. */
@Entity({ name: 'recipe_step_place' })
@Check('recipe_step_place_units_check', 'units between 1 and 50')
@Check('recipe_step_place_hold_check', `hold in ('work', 'dwell', 'until-stage')`)
export class RecipeStepPlace {
  @PrimaryColumn({ type: 'uuid' })
  stepId: string;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => RecipeStep, (step) => step.places, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'step_id' })
  step: Relation<RecipeStep>;

  @Column({ type: 'integer' })
  units: number;

  @Column({ type: 'text' })
  hold: 'work' | 'dwell' | 'until-stage';

  @OneToMany(() => RecipeStepPlaceBay, (bay) => bay.place)
  bays: Relation<RecipeStepPlaceBay>[];
}
