import { Check, Column, Entity, JoinColumn, ManyToOne, PrimaryColumn, type Relation } from 'typeorm';
import { Craft } from './craft';
import { RecipeStep } from './recipe-step';

/** How many makers with a craft a recipe's step wants at once. */
@Entity({ name: 'recipe_step_crew' })
@Check('recipe_step_crew_least_check', '1 <= least and least <= most and most <= 12')
export class RecipeStepCrew {
  @PrimaryColumn({ type: 'uuid' })
  stepId: string;

  @PrimaryColumn({ type: 'integer' })
  position: number;

  @ManyToOne(() => RecipeStep, (step) => step.crew, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'step_id' })
  step: Relation<RecipeStep>;

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
