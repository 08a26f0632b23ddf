import type { StageDraft } from './stage-draft';

/** For what a step is repeated: not at all, for each cast, for each coat, or for each mould. */
export const REPEATS = ['once', 'cast', 'coat', 'mould'] as const;
export type Repeat = (typeof REPEATS)[number];

/** What a step has to do with moulds: nothing, `makes` one, or `fills` one and keeps it. */
export type MouldUse = 'none' | 'makes' | 'fills';

/** One step of a recipe: a stage before it belongs to a piece, in minutes for one unit of the recipe's size. */
export interface RecipeStep {
  readonly stage: StageDraft;
  /** Earlier steps that it waits for, by their place in the list from 0. */
  readonly after: readonly number[];
  readonly each: Repeat;
  readonly mould: MouldUse;
  /** The later step whose end lets go of the mould and of places held `until-stage`; null for the end of the own dwell. */
  readonly untilStep: number | null;
}

/** A known way to make a kind of piece. */
export interface RecipeDraft {
  readonly name: string;
  readonly makes: string;
  readonly sizeUnit: string;
  readonly usualSize: number;
  readonly usualCasts: number;
  readonly usualMoulds: number;
  readonly usualCoats: number;
  readonly steps: readonly RecipeStep[];
}

/** How large, and how many times, a recipe is made this time. */
export interface RecipeAmounts {
  /** In units of the recipe; hands-on minutes of what is made grow with it. */
  readonly size: number;
  readonly casts: number;
  readonly moulds: number;
  readonly coats: number;
}

/** What is wrong with a recipe's steps, as sentences; none where all is well. */
export function recipeFaults(recipe: RecipeDraft): readonly string[] {
  return recipe.steps.flatMap((step, index) => stepFaults(step, index, recipe.steps));
}

/** What forbids making a recipe in these amounts, as a sentence; null where nothing does. */
export function recipeAmountsFault(recipe: RecipeDraft, amounts: RecipeAmounts): string | null {
  if (!(amounts.size > 0) || !Number.isFinite(amounts.size)) {
    return 'Say how large the piece is.';
  }
  const counts = [amounts.casts, amounts.moulds, amounts.coats];
  if (!counts.every((count) => Number.isInteger(count) && count >= 0) || amounts.casts < 1 || amounts.coats < 1) {
    return 'Casts and coats are whole numbers of one or more, moulds of none or more.';
  }
  const needsMould = recipe.steps.some((step) => step.mould !== 'none' || step.each === 'mould');
  return needsMould && amounts.moulds < 1 ? 'This recipe casts from moulds: it needs one at least.' : null;
}

function stepFaults(step: RecipeStep, index: number, steps: readonly RecipeStep[]): readonly string[] {
  const name = `“${step.stage.name}”`;
  const faults: string[] = [];
  if (step.after.some((other) => !Number.isInteger(other) || other < 0 || other >= index)) {
    faults.push(`${name} may wait only for steps before it.`);
  }
  const last = step.untilStep === null ? null : steps[step.untilStep];
  if (step.untilStep !== null && (step.untilStep <= index || !last)) {
    faults.push(`${name} may be kept only until a step after it.`);
  } else if (last && last.each !== step.each) {
    faults.push(`${name} and “${last.stage.name}”, which lets go of its place, must be repeated alike.`);
  }
  if (step.mould === 'fills' && step.each !== 'cast') {
    faults.push(`${name} fills a mould, so it is done for each cast.`);
  }
  if (step.mould === 'makes' && step.each !== 'mould') {
    faults.push(`${name} makes a mould, so it is done for each mould.`);
  }
  if (step.mould === 'fills' && !steps.some((other) => other.mould === 'makes')) {
    faults.push(`${name} fills a mould, but no step makes one.`);
  }
  if (step.untilStep === null && step.stage.places.some((place) => place.hold === 'until-stage')) {
    faults.push(`${name} keeps its place until a later step: name that step.`);
  }
  return faults;
}
