import type { LocalDate } from '../types';
import { dateOfDay, dayNumber } from './civil';

/**
 * Calendar dates without time or zone, in the proleptic Gregorian calendar.
 * Errors: anything but `YYYY-MM-DD` of a day that exists throws a RangeError.
 */

export const addDays = (date: LocalDate, days: number): LocalDate => dateOfDay(dayNumber(date) + days);

/** Days from one date to another; negative when `to` is earlier. */
export const daysBetween = (from: LocalDate, to: LocalDate): number => dayNumber(to) - dayNumber(from);

/** ISO 8601 weekday: 1 Monday to 7 Sunday. */
export const weekday = (date: LocalDate): number => ((((dayNumber(date) + 3) % 7) + 7) % 7) + 1;
