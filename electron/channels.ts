/** The channels between main and preload; the pages never see a channel's name. */
export const CALL_CHANNEL = 'stillbed:call'
export const EVENT_CHANNEL = 'stillbed:event'
/** the preload's answer to the event `window:closing` */
export const CLOSING_CHANNEL = 'stillbed:closing-answer'
