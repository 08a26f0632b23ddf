/** The public file of the crew. */
export { Crafts } from './crafts';
export { Makers } from './makers';
export { Leaves } from './leaves';
export { mountCrew } from './crew-routes';
