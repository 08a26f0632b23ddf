/** The public file of climates. */
export { mountClimates } from './climate-routes';
export { Climates } from './climates';
