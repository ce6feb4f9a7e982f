/** Moments and days for people, in one form everywhere. The server renders them, so they are in UTC and say so where it matters. */

const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', timeZone: 'UTC' });
const date = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' });
const longDay = new Intl.DateTimeFormat('en-GB', { weekday: 'long', day: 'numeric', month: 'long', timeZone: 'UTC' });

/** `09:12` */
export const clockText = (instant: string): string => time.format(new Date(instant));
/** `1 Dec 2026` from an instant or a day */
export const dayText = (instant: string): string => date.format(new Date(instant));
/** `Tuesday 1 December` */
export const weekdayText = (moment: Date): string => longDay.format(moment);
