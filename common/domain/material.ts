import type { ThreePoint } from './hands-on';
import type { DwellLaw } from '../dwell/law';

/** What a dwell waits for, in the order in which a material gets there; `next-layer-until` is the end of a window. */
export const MATERIAL_MILESTONES = [
  'pot-life',
  'touch',
  'demould',
  'next-layer',
  'next-layer-until',
  'sandable',
  'full-cure',
] as const;
export type MaterialMilestone = (typeof MATERIAL_MILESTONES)[number];

/** How a milestone is written in sentences. */
export const MILESTONE_NAMES: Readonly<Record<MaterialMilestone, string>> = {
  'pot-life': 'pot life',
  touch: 'dry to the touch',
  demould: 'ready to demould or handle',
  'next-layer': 'ready for the next layer',
  'next-layer-until': 'too late for the next layer',
  sandable: 'ready to sand',
  'full-cure': 'fully cured',
};

/** Minutes to one milestone of a material, how they move with the climate, and where the figure comes from. */
export interface MaterialDwell {
  readonly milestone: MaterialMilestone;
  readonly minutes: ThreePoint;
  readonly law: DwellLaw;
  readonly minimumCelsius: number | null;
  readonly maximumCelsius: number | null;
  readonly source: string;
}

/** A material of the library before it has an id. */
export interface MaterialDraft {
  readonly name: string;
  readonly family: string;
  readonly referenceCelsius: number;
  readonly referenceHumidityPercent: number;
  /** Minutes that somebody stays by a fresh batch. */
  readonly attendedMinutes: number;
  readonly dwells: readonly MaterialDwell[];
  readonly cautions: readonly string[];
  readonly note: string;
}
