/** The public file of the bays. */
export { Bays } from './bays';
export { mountBays } from './bay-routes';
