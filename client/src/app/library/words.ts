import type { MaterialView, RecipeView } from '@common/contract';
import { MILESTONE_NAMES } from '@common/domain/material';

type Dwell = MaterialView['dwells'][number];

/** How a dwell's law is chosen. */
export const LAW_WORDS: Readonly<Record<Dwell['law']['kind'], string>> = {
  none: 'Not moved by the climate',
  'factor-per-10-degrees': 'So many times faster for every 10 °C',
  arrhenius: 'By activation energy (Arrhenius)',
  'nurse-saul': 'By degrees above a datum (Nurse-Saul)',
  evaporation: 'By evaporation: temperature and humidity',
};

/** How often a recipe's step is done. */
export const EACH_WORDS: Readonly<Record<RecipeView['steps'][number]['each'], string>> = {
  once: 'once',
  cast: 'for each cast',
  coat: 'for each coat',
  mould: 'for each mould',
};

/** "Twice as fast for every 10 °C": a law in words. */
export function sayLaw(law: Dwell['law']): string {
  switch (law.kind) {
    case 'none':
      return 'the climate does not move it';
    case 'factor-per-10-degrees':
      return `${law.factor} times as fast for every 10 °C warmer`;
    case 'arrhenius':
      return `activation energy ${Math.round(law.activationEnergyJPerMol / 100) / 10} kJ/mol`;
    case 'nurse-saul':
      return `degrees above ${law.datumCelsius} °C add up`;
    case 'evaporation':
      return 'by evaporation: warmer and drier is faster';
  }
}

/** "Ready to demould", with its first letter large. */
export function sayMilestone(milestone: Dwell['milestone']): string {
  const words = MILESTONE_NAMES[milestone];
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** "10 to 35 °C": between which temperatures a dwell holds; empty where nothing is said. */
export function sayLimits({ minimumCelsius, maximumCelsius }: Dwell): string {
  if (minimumCelsius === null && maximumCelsius === null) {
    return '';
  }
  if (maximumCelsius === null) {
    return `not below ${minimumCelsius} °C`;
  }
  return minimumCelsius === null ? `not above ${maximumCelsius} °C` : `${minimumCelsius} to ${maximumCelsius} °C`;
}
