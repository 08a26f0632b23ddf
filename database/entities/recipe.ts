import { Check, Column, Entity, OneToMany, PrimaryColumn, Unique, type Relation } from 'typeorm';
import { RecipeStep } from './recipe-step';

/** A way to make a kind of piece. */
@Entity({ name: 'recipe' })
@Unique('recipe_name_key', ['name'])
@Check('recipe_usual_size_check', 'usual_size > 0')
@Check('recipe_usual_casts_check', 'usual_casts between 1 and 200')
@Check('recipe_usual_moulds_check', 'usual_moulds between 0 and 20')
@Check('recipe_usual_coats_check', 'usual_coats between 1 and 20')
export class Recipe {
  @PrimaryColumn({ type: 'uuid' })
  id: string;

  @Column({ type: 'text' })
  name: string;

  @Column({ type: 'text' })
  makes: string;

  @Column({ type: 'text' })
  sizeUnit: string;

  @Column({ type: 'double precision' })
  usualSize: number;

  @Column({ type: 'integer' })
  usualCasts: number;

  @Column({ type: 'integer' })
  usualMoulds: number;

  @Column({ type: 'integer' })
  usualCoats: number;

  @Column({ type: 'integer', default: 1 })
  version: number;

  @OneToMany(() => RecipeStep, (step) => step.recipe)
  steps: Relation<RecipeStep>[];
}
