import type { LocalDate } from '../types';
import { Temporal } from './temporal';

/** Calendar dates without time or zone, in the proleptic Gregorian calendar. */

export const addDays = (date: LocalDate, days: number): LocalDate =>
  Temporal.PlainDate.from(date).add({ days }).toString();

/** Days from one date to another; negative when `to` is earlier. */
export const daysBetween = (from: LocalDate, to: LocalDate): number =>
  Temporal.PlainDate.from(from).until(Temporal.PlainDate.from(to), { largestUnit: 'days' }).days;

/** ISO 8601 weekday: 1 Monday to 7 Sunday. */
export const weekday = (date: LocalDate): number => Temporal.PlainDate.from(date).dayOfWeek;
