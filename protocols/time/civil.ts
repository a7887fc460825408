/**
 * Calendar dates as day numbers (days since 1970-01-01, proleptic Gregorian), by arithmetic alone: plans convert
 * thousands of moments, and a date object for each would be most of the work.
 */

const datePattern = /^(\d{4})-(\d{2})-(\d{2})$/;
const localPattern = /^(\d{4}-\d{2}-\d{2})T([01]\d|2[0-3]):([0-5]\d)$/;
const clockPattern = /^([01]\d|2[0-3]):([0-5]\d)$/;

export const dayMs = 86_400_000;
const minuteMs = 60_000;

/** Day number of `YYYY-MM-DD`. Throws a RangeError for anything else and for dates such as 30 February. */
export function dayNumber(date: string): number {
  const match = datePattern.exec(date);
  if (!match) throw new RangeError(`No date: ${date}`);
  const day = Date.UTC(Number(match[1]), Number(match[2]) - 1, Number(match[3])) / dayMs;
  // the years 0 to 99 come out as 1900 to 1999, and 30 February as a day of March
  if (dateOfDay(day) !== date) throw new RangeError(`No date: ${date}`);
  return day;
}

const two = (n: number): string => String(n).padStart(2, '0');

/** `YYYY-MM-DD` of a day number: eras of 400 years, years that begin in March so that the leap day comes last. */
export function dateOfDay(day: number): string {
  const shifted = day + 719_468;
  const era = Math.floor(shifted / 146_097);
  const ofEra = shifted - era * 146_097;
  const yearOfEra = Math.floor(
    (ofEra - Math.floor(ofEra / 1460) + Math.floor(ofEra / 36_524) - Math.floor(ofEra / 146_096)) / 365,
  );
  const ofYear = ofEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const marchMonth = Math.floor((5 * ofYear + 2) / 153);
  const dayOfMonth = ofYear - Math.floor((153 * marchMonth + 2) / 5) + 1;
  const month = marchMonth < 10 ? marchMonth + 3 : marchMonth - 9;
  const year = yearOfEra + era * 400 + (month <= 2 ? 1 : 0);
  return `${String(year).padStart(4, '0')}-${two(month)}-${two(dayOfMonth)}`;
}

/** Milliseconds since midnight of `HH:MM`. Throws a RangeError for anything else. */
export function clockMs(clock: string): number {
  const match = clockPattern.exec(clock);
  if (!match) throw new RangeError(`No time of day: ${clock}`);
  return (Number(match[1]) * 60 + Number(match[2])) * minuteMs;
}

/** Wall-clock milliseconds of `YYYY-MM-DDTHH:MM`, as if the zone were UTC. Throws a RangeError for anything else. */
export function wallMs(local: string): number {
  const match = localPattern.exec(local);
  if (!match) throw new RangeError(`No local date and time: ${local}`);
  return dayNumber(match[1] ?? '') * dayMs + (Number(match[2]) * 60 + Number(match[3])) * minuteMs;
}

/** `YYYY-MM-DDTHH:MM` of wall-clock milliseconds; seconds are cut off. */
export function wallText(wall: number): string {
  const day = Math.floor(wall / dayMs);
  const minutes = Math.floor((wall - day * dayMs) / minuteMs);
  return `${dateOfDay(day)}T${two(Math.floor(minutes / 60))}:${two(minutes % 60)}`;
}
