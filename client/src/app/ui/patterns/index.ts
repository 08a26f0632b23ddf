export { patternOf, patternRow, usualPattern, type PatternRow, type PatternRows } from './pattern-form';
export { PatternsField } from './patterns-field';
export { sayPattern } from './say-rule';
export type { Away } from './week-of';
export { WeekStrip } from './week-strip';
