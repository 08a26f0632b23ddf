/** The one public file of the forecast: what a plan's dates are worth when its times are not known for sure. */
export { forecast } from './forecast';
export { fanOf } from './fan';
export type { FinishSpread, Forecast, ForecastOptions, KeyDateForecast } from './forecast';
export { learnOverrun, PRIOR_OVERRUN } from './learn-overrun';
export type { PastStage } from './learn-overrun';
export { NO_FACTOR } from './uncertainty';
export type { LogFactor, Overrun, StageUncertainty, Uncertainty } from './uncertainty';
export { betaPertMoments, betaPertShapes, exactly, pertMoments, triangularMoments } from './three-point';
export type { Moments, ThreePoint } from './three-point';
