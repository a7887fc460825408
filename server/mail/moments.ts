import { Temporal } from 'temporal-polyfill';

const HOUR = 3_600_000;

/** When a message is due, and from when on it is no longer worth sending; epoch milliseconds. */
export interface Moment {
  dueAt: number;
  staleAt: number;
}

/** Local date in the zone, `YYYY-MM-DD`. */
export const localDayOf = (at: number, zone: string): string =>
  Temporal.Instant.fromEpochMilliseconds(at).toZonedDateTimeISO(zone).toPlainDate().toString();

/** `YYYY-MM-DD` that many days on. */
export const dayPlus = (day: string, days: number): string => Temporal.PlainDate.from(day).add({ days }).toString();

/**
 * A clock time on a local day as an instant. A time that a clock change leaves out is read as the same time after it,
 * one that happens twice as the first (the `compatible` rule of Temporal, as RFC 5545 section 3.3.5 reads them).
 */
export const localInstant = (day: string, clock: string, zone: string): number =>
  Temporal.PlainDateTime.from(`${day}T${clock}`).toZonedDateTime(zone, { disambiguation: 'compatible' })
    .epochMilliseconds;

/** Morning of the day: at the person's time, but an hour before the first thing due when that is earlier. */
export function morningMoment(day: string, clock: string, zone: string, dues: readonly number[]): Moment {
  return { dueAt: Math.min(localInstant(day, clock, zone), Math.min(...dues) - HOUR), staleAt: Math.max(...dues) };
}

/** Evening before: at the person's time on the day before; stale at the morning, when the next mail says it better. */
export function eveningMoment(
  day: string,
  clocks: { evening: string; morning: string },
  zone: string,
  dues: readonly number[],
): Moment {
  return {
    dueAt: localInstant(dayPlus(day, -1), clocks.evening, zone),
    staleAt: morningMoment(day, clocks.morning, zone, dues).dueAt,
  };
}

/**
 * An hour before the window closes, stale when it has closed. In a window that closes less than an hour after the
 * planned start, at that start: before it nobody can be behind.
 */
export const closingMoment = (task: { dueAt: number; windowTo: number }): Moment => ({
  dueAt: Math.max(task.windowTo - HOUR, Math.min(task.dueAt, task.windowTo)),
  staleAt: task.windowTo,
});
