/** The PostgreSQL channel on which server processes tell each other what happened. */
export const LIVE_CHANNEL = 'fettle_live';

/** The channel on which a levelling (by its id) or a forecast is stopped, whichever process it runs in. */
export const CANCEL_CHANNEL = 'fettle_cancel';
