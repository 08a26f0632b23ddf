/** The PostgreSQL channel on which server processes tell each other what happened. */
export const LIVE_CHANNEL = 'fettle_live';
