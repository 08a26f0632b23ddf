/** The one public file of the step from the studio's words to the engine's integers. */
export * from './studio-snapshot';
export { buildProblem, usualHorizonEnd, type BuildOptions } from './build-problem';
export { buildUncertainty, USUAL_SPREADS, type UsualSpreads } from './build-uncertainty';
