import type { MaterialView, RecipeView } from '@common/contract';
import type { Material, Recipe, RecipeStep } from '@database/entities';
import { draftOf } from '../storage/drafts';

export function materialView(material: Material): MaterialView {
  return {
    id: material.id,
    name: material.name,
    family: material.family,
    referenceCelsius: material.referenceCelsius,
    referenceHumidityPercent: material.referenceHumidityPercent,
    attendedMinutes: material.attendedMinutes,
    dwells: inOrder(material.dwells).map((dwell) => ({
      milestone: dwell.milestone,
      minutes: { low: dwell.lowMinutes, likely: dwell.likelyMinutes, high: dwell.highMinutes },
      law: dwell.law,
      minimumCelsius: dwell.minimumCelsius,
      maximumCelsius: dwell.maximumCelsius,
      source: dwell.source,
    })),
    cautions: material.cautions,
    note: material.note,
    version: material.version,
  };
}

export function recipeView(recipe: Recipe): RecipeView {
  return {
    id: recipe.id,
    name: recipe.name,
    makes: recipe.makes,
    sizeUnit: recipe.sizeUnit,
    usualSize: recipe.usualSize,
    usualCasts: recipe.usualCasts,
    usualMoulds: recipe.usualMoulds,
    usualCoats: recipe.usualCoats,
    steps: inOrder(recipe.steps).map(stepView),
    version: recipe.version,
  };
}

function stepView(step: RecipeStep): RecipeView['steps'][number] {
  return {
    stage: {
      ...draftOf(step),
      crew: inOrder(step.crew).map(({ craftId, least, most }) => ({ craftId, least, most })),
      places: inOrder(step.places).map(({ bays, units, hold }) => ({
        bayIds: inOrder(bays).map((bay) => bay.bayId),
        units,
        hold,
        // A recipe has no stages yet; `untilStep` says which of its steps lets go.
        untilStageId: null,
      })),
    },
    after: step.after,
    each: step.each,
    mould: step.mould,
    untilStep: step.untilPosition,
  };
}

function inOrder<T extends { readonly position: number }>(rows: readonly T[]): T[] {
  return [...rows].sort((a, b) => a.position - b.position);
}
