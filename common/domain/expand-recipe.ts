import { type LinkDraft, PLAIN_LINK, type StageDraft } from './stage-draft';
import { type RecipeAmounts, recipeAmountsFault, type RecipeDraft, recipeFaults, type RecipeStep } from './recipe';
import type { HandsOn } from './hands-on';

/** Scaled minutes are rounded up to this: nobody estimates by the minute. */
const MINUTES_GRAIN = 5;

/** A stage that a recipe asks for. Other stages and moulds are named by their place in the lists, from 0. */
export interface ExpandedStage {
  readonly draft: StageDraft;
  /** The step that it comes from. */
  readonly step: number;
  /** Which repeat it is, and of how many; both null where it stands alone. */
  readonly nth: number | null;
  readonly of: number | null;
  /** The mould that it fills and keeps, or null. */
  readonly mould: number | null;
  /** The stage whose end lets go of the mould and of places held `until-stage`; null for the own dwell. */
  readonly untilStage: number | null;
}

/** One stage after another, by their places in the list of stages. */
export interface ExpandedLink extends LinkDraft {
  readonly from: number;
  readonly to: number;
}

/** What a recipe comes to: the moulds to enter as bays, stages in order, and links. */
export interface ExpandedRecipe {
  readonly moulds: number;
  readonly stages: readonly ExpandedStage[];
  readonly links: readonly ExpandedLink[];
}

/** One repeat of one step; `nth` from 0. */
interface Instance {
  readonly step: number;
  readonly nth: number;
}

/**
 * Lays a recipe out in stages and links. Hands-on minutes of what is made grow with the size; checks, sign-offs, journeys and
 * dwells do not. Casts take the moulds in turn and wait for their own; coats follow each other. A step repeated for one thing
 * waits for all repeats of a step repeated for another, except that it waits only for the last coat. Throws on a fault.
 */
export function expandRecipe(recipe: RecipeDraft, amounts: RecipeAmounts): ExpandedRecipe {
  const fault = recipeAmountsFault(recipe, amounts) ?? recipeFaults(recipe).at(0);
  if (fault) {
    throw new RangeError(fault);
  }
  const instances = instancesInOrder(recipe.steps, amounts);
  const placeOf = new Map(instances.map((instance, place) => [keyOf(instance), place]));
  const find = (step: number, nth: number) => placeOf.get(keyOf({ step, nth })) as number;
  const stages = instances.map(({ step, nth }) => {
    const { stage, each, mould, untilStep } = recipe.steps[step];
    const of = repeatsOf(recipe.steps[step], amounts);
    return {
      draft: stage.kind === 'make' ? { ...stage, handsOn: scaled(stage.handsOn, amounts.size) } : stage,
      step,
      nth: each === 'once' || of === 1 ? null : nth + 1,
      of: each === 'once' || of === 1 ? null : of,
      mould: mould === 'fills' ? nth % amounts.moulds : null,
      untilStage: untilStep === null ? null : find(untilStep, nth),
    };
  });
  const links = instances.flatMap((instance, to) =>
    sourcesOf(instance, recipe.steps, amounts).map(({ step, nth }) => ({ from: find(step, nth), to, ...PLAIN_LINK })),
  );
  return { moulds: recipe.steps.some((step) => step.mould === 'makes') ? amounts.moulds : 0, stages, links };
}

/** Steps in order; a run of steps that are repeated alike comes repeat by repeat: cast 1 to its end, then cast 2. */
function instancesInOrder(steps: readonly RecipeStep[], amounts: RecipeAmounts): readonly Instance[] {
  const instances: Instance[] = [];
  for (let first = 0; first < steps.length;) {
    let end = first + 1;
    while (end < steps.length && steps[end].each === steps[first].each) {
      end += 1;
    }
    for (let nth = 0; nth < repeatsOf(steps[first], amounts); nth += 1) {
      for (let step = first; step < end; step += 1) {
        instances.push({ step, nth });
      }
    }
    first = end;
  }
  return instances;
}

function repeatsOf(step: RecipeStep, amounts: RecipeAmounts): number {
  switch (step.each) {
    case 'once':
      return 1;
    case 'cast':
      return amounts.casts;
    case 'coat':
      return amounts.coats;
    case 'mould':
      return amounts.moulds;
  }
}

function sourcesOf(instance: Instance, steps: readonly RecipeStep[], amounts: RecipeAmounts): readonly Instance[] {
  const own = steps[instance.step];
  const isLaterCoat = own.each === 'coat' && instance.nth > 0;
  // What comes before the first coat is before the others too.
  const after = isLaterCoat ? own.after.filter((step) => steps[step].each === 'coat') : own.after;
  const sources = after.flatMap((step) => repeatsBefore(step, instance, steps, amounts));
  return isLaterCoat && after.length === 0 ? [...sources, ...lastOfCoat(instance.nth - 1, steps)] : sources;
}

function repeatsBefore(
  step: number,
  { step: ownStep, nth }: Instance,
  steps: readonly RecipeStep[],
  amounts: RecipeAmounts,
): readonly Instance[] {
  const each = steps[step].each;
  const ownEach = steps[ownStep].each;
  if (each === ownEach) {
    return [{ step, nth }];
  }
  if (each === 'mould' && ownEach === 'cast') {
    return [{ step, nth: nth % amounts.moulds }];
  }
  const count = repeatsOf(steps[step], amounts);
  return each === 'coat' ? [{ step, nth: count - 1 }] : Array.from({ length: count }, (_, n) => ({ step, nth: n }));
}

/** The stages of a coat that no other of the same coat waits for: the next coat begins after them. */
function lastOfCoat(nth: number, steps: readonly RecipeStep[]): readonly Instance[] {
  const coatSteps = steps.flatMap((step, index) => (step.each === 'coat' ? [index] : []));
  const waitedFor = new Set(coatSteps.flatMap((index) => steps[index].after));
  return coatSteps.filter((index) => !waitedFor.has(index)).map((step) => ({ step, nth }));
}

function scaled(handsOn: HandsOn, size: number): HandsOn {
  const grow = (minutes: number) => Math.ceil((minutes * size) / MINUTES_GRAIN - 1e-9) * MINUTES_GRAIN;
  return {
    lowMinutes: grow(handsOn.lowMinutes),
    likelyMinutes: grow(handsOn.likelyMinutes),
    highMinutes: grow(handsOn.highMinutes),
  };
}

function keyOf({ step, nth }: Instance): string {
  return `${step}/${nth}`;
}
