/** The one public file of rescues: changes that would save a key date, with their price. */
export { FIRST_TERMS } from './first-terms';
export { MEASURE_KINDS, type MeasureKind } from '../domain/measure-kind';
export type { Measure, RescueTerms } from './measure';
export { applyMeasures } from './apply-measures';
export { priceOf } from './price-of';
export { proposeMeasures } from './propose-measures';
export type { AtRisk } from './propose-measures';
export { cautionOf, sayMeasure } from './say-measure';
export type { MeasureNames } from './say-measure';
export { searchRescues } from './search-rescues';
export type { DateOdds, Rescue, RescueHooks, RescueQuestion, RescuesFound } from './search-rescues';
