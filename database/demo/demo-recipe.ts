import type { CraftKey } from '@common/domain/craft';
import type { MaterialMilestone } from '@common/domain/material';
import type { MouldUse, RecipeStep, Repeat } from '@common/domain/recipe';
import { cautionsForHazard, type Hazard } from '@common/domain/safety';
import type {
  Continuity,
  CrewWanted,
  PlaceWanted,
  StageDraft,
  StageDwell,
  StageKind,
} from '@common/domain/stage-draft';
import type { DemoRecipe } from './demo-studio-types';
import { MATERIALS } from './materials';

/** Low, likely and high hours; person-hours for one unit of size where the stage is made, hours in all otherwise. */
export type Hours = readonly [number, number, number];

/** Where a step works: a bay or either of several, and how long it stays. */
export interface StepPlace {
  readonly bays: readonly string[];
  readonly units?: number;
  readonly hold?: 'work' | 'dwell';
}

/** A dwell from the library: material, what is waited for, and whether the next step has a window. */
export interface StepDwell {
  readonly material: string;
  readonly milestone: MaterialMilestone;
  readonly window?: { readonly extraMinutes: number; readonly costMinor: number };
}

/** One step as recipes are written down here; `expand` to the contract's words by `demoRecipe`. */
export interface Step {
  readonly key: string;
  readonly name: string;
  readonly hours: Hours;
  readonly kind?: StageKind;
  /** Crafts wanted at once; a bare key means one maker. None for what needs nobody's hands. */
  readonly crew?: readonly (CraftKey | readonly [CraftKey, number, number])[];
  readonly continuity?: Continuity;
  readonly places?: readonly StepPlace[];
  readonly dwell?: StepDwell;
  readonly each?: Repeat;
  /** Keys of steps waited for; the step before where it is not said. */
  readonly after?: readonly string[];
  readonly mould?: MouldUse;
  /** Key of the step that lets go of the mould. */
  readonly until?: string;
  readonly hazards?: readonly Hazard[];
  readonly replyHours?: number;
  readonly note?: string;
}

/** Loss of output for each maker after the first: they share a table and a pot. Common practice, no source. */
const CREW_LOSS_PERMILLE = 50;

/** Builds a recipe from steps that name each other by key. */
export function demoRecipe(
  key: string,
  about: Omit<DemoRecipe, 'id' | 'steps'>,
  steps: readonly Step[],
): DemoRecipe & { readonly stepKeys: readonly string[] } {
  const stepKeys = steps.map((step) => step.key);
  const indexOf = (wanted: string) => {
    const index = stepKeys.indexOf(wanted);
    if (index < 0) {
      throw new RangeError(`Recipe ${key} has no step ${wanted}.`);
    }
    return index;
  };
  const recipeSteps = steps.map((step, index): RecipeStep => {
    const before = index === 0 ? [] : [stepKeys[index - 1]];
    return {
      stage: stageOf(step),
      after: (step.after ?? before).map(indexOf),
      each: step.each ?? 'once',
      mould: step.mould ?? 'none',
      untilStep: step.until === undefined ? null : indexOf(step.until),
    };
  });
  return { id: `recipe:${key}`, ...about, steps: recipeSteps, stepKeys };
}

/** Bays by their key. */
export function at(...bays: readonly string[]): StepPlace {
  return { bays: bays.map((bay) => `bay:${bay}`) };
}

/** The same, kept until the dwell is over. */
export function keeping(...bays: readonly string[]): StepPlace {
  return { ...at(...bays), hold: 'dwell' };
}

function stageOf(step: Step): StageDraft {
  const [lowMinutes, likelyMinutes, highMinutes] = step.hours.map((hours) => Math.round(hours * 60));
  const material = step.dwell && materialOf(step.dwell.material);
  const cautions = [...(material?.cautions ?? []), ...(step.hazards ?? []).flatMap(cautionsForHazard)];
  return {
    name: step.name,
    kind: step.kind ?? 'make',
    handsOn: { lowMinutes, likelyMinutes, highMinutes },
    crew: (step.crew ?? []).map(crewOf),
    crewLossPermille: CREW_LOSS_PERMILLE,
    continuity: step.continuity ?? (step.crew ? 'shifts' : 'clock'),
    places: (step.places ?? []).map(placeOf),
    dwell: step.dwell ? dwellOf(step.dwell) : null,
    cautions,
    note: step.note ?? '',
    visitAt: null,
    replyMinutes: Math.round((step.replyHours ?? 0) * 60),
  };
}

function crewOf(wanted: CraftKey | readonly [CraftKey, number, number]): CrewWanted {
  const [craft, least, most] = typeof wanted === 'string' ? [wanted, 1, 1] : wanted;
  return { craftId: `craft:${craft}`, least, most };
}

function placeOf({ bays, units, hold }: StepPlace): PlaceWanted {
  return { bayIds: bays, units: units ?? 1, hold: hold ?? 'work', untilStageId: null };
}

function dwellOf({ material: key, milestone, window }: StepDwell): StageDwell {
  const material = materialOf(key);
  return {
    materialId: material.id,
    milestone,
    minutes: likelyMinutes(key, milestone),
    attendedMinutes: material.attendedMinutes,
    window: window ? { kind: 'soft', minutes: likelyMinutes(key, 'next-layer-until'), ...window } : null,
  };
}

function likelyMinutes(key: string, milestone: MaterialMilestone): number {
  const dwell = materialOf(key).dwells.find((one) => one.milestone === milestone);
  if (!dwell) {
    throw new RangeError(`Material ${key} says nothing of ${milestone}.`);
  }
  return dwell.minutes.likely;
}

function materialOf(key: string): (typeof MATERIALS)[number] {
  const material = MATERIALS.find((one) => one.id === `material:${key}`);
  if (!material) {
    throw new RangeError(`No material ${key} in the library.`);
  }
  return material;
}
