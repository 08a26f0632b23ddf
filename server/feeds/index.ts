/** The public file of calendars. */
export { mountFeeds } from './feed-routes';
