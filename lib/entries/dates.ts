/** Dates as the book writes them. Times are ISO 8601 and shown in UTC, so that server and browser agree. */
const LONG = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' });
const SHORT = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', timeZone: 'UTC' });
const MOMENT = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
  timeZone: 'UTC',
});

/** "11 March 2026" */
export const longDate = (iso: string) => LONG.format(new Date(iso));
/** "11 March" */
export const shortDate = (iso: string) => SHORT.format(new Date(iso));
/** "11 March 2026 at 09:41 UTC" */
export const moment = (iso: string) => `${MOMENT.format(new Date(iso))} UTC`;
