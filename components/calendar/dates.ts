/** Calendar dates as text, without any zone. */

/** A number of days later; dates are whole days, so UTC noon is safe. */
export const addDays = (date: string, days: number): string =>
  new Date(Date.parse(`${date}T12:00:00Z`) + days * 86_400_000).toISOString().slice(0, 10);

/** ISO weekday, 1 Monday to 7 Sunday. */
export const weekdayOf = (date: string): number => new Date(`${date}T12:00:00Z`).getUTCDay() || 7;

/** The Monday on or before a date. */
export const mondayOf = (date: string): string => addDays(date, 1 - weekdayOf(date));
