import { Check, Column, Entity, JoinColumn, ManyToOne, OneToMany, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { DraftColumns } from './draft-columns';
import { Recipe } from './recipe';
import { RecipeStepCrew } from './recipe-step-crew';
import { RecipeStepPlace } from './recipe-step-place';

/** A stage of a recipe. `after` names earlier steps by their position. */
@Entity({ name: 'recipe_step' })
@Unique('recipe_step_position_key', ['recipeId', 'position'])
@Check('recipe_step_each_check', `each in ('once', 'cast', 'coat', 'mould')`)
@Check('recipe_step_mould_check', `mould in ('none', 'makes', 'fills')`)
@Check('recipe_step_until_position_check', 'until_position > position')
@Check('recipe_step_kind_check', `kind in ('make', 'sign-off', 'check', 'transport')`)
@Check('recipe_step_continuity_check', `continuity in ('session', 'shifts', 'free', 'clock')`)
@Check(
  'recipe_step_hands_on_check',
  '0 <= low_minutes and low_minutes <= likely_minutes and likely_minutes <= high_minutes',
)
@Check('recipe_step_crew_loss_permille_check', 'crew_loss_permille between 0 and 500')
@Check('recipe_step_dwell_minutes_check', 'dwell_minutes >= 0 and dwell_attended_minutes >= 0')
@Check('recipe_step_dwell_check', '(dwell_minutes is null) = (dwell_attended_minutes is null)')
export class RecipeStep extends DraftColumns {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'uuid' })
  recipeId: string;

  @ManyToOne(() => Recipe, (recipe) => recipe.steps, { onDelete: 'CASCADE' })
  @JoinColumn({ name: 'recipe_id' })
  recipe: Relation<Recipe>;

  @Column({ type: 'integer' })
  position: number;

  @Column({ type: 'integer', array: true, default: () => `'{}'` })
  after: number[];

  @Column({ type: 'text' })
  each: 'once' | 'cast' | 'coat' | 'mould';

  @Column({ type: 'text', default: 'none' })
  mould: 'none' | 'makes' | 'fills';

  /** The later step whose end lets go of the mould and of places held until a stage; null for the own dwell's end. */
  @Column({ type: 'integer', nullable: true })
  untilPosition: number | null;

  @OneToMany(() => RecipeStepCrew, (crew) => crew.step)
  crew: Relation<RecipeStepCrew>[];

  @OneToMany(() => RecipeStepPlace, (place) => place.step)
  places: Relation<RecipeStepPlace>[];
}
