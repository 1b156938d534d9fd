/** When a letter that could not be sent is tried again. */
const MINUTE = 60;
const HOUR = 60 * MINUTE;
const PAUSES_SECONDS = [MINUTE, 5 * MINUTE, 15 * MINUTE, HOUR, 4 * HOUR, 12 * HOUR, 24 * HOUR, 24 * HOUR] as const;

export const TRIES_MOST = PAUSES_SECONDS.length + 1;

/** @param tries that have failed, at least one. @returns null where it is time to give the letter up */
export const pauseAfter = (tries: number): number | null => PAUSES_SECONDS[tries - 1] ?? null;

/** Somebody asked for it this long ago and asks again meanwhile: a link that comes then would only puzzle them. */
export const RESET_AGE_MOST_SECONDS = 24 * HOUR;
