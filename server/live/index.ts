/** The public file of live events. */
export { LiveHub } from './live-hub';
export { mountLive } from './live-routes';
