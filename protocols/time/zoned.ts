import type { ClockTime, Instant, LocalDate, LocalDateTime, Zone } from '../types';
import { Temporal } from './temporal';

/**
 * Instants and wall-clock times. Zones are IANA ids and always an argument.
 * Errors: an unknown zone or a malformed date throws a RangeError of the time library.
 */

export interface LocalReading {
  at: Instant;
  /**
   * skipped: the clock jumped over this time (it is moved on by the jump); repeated: the clock showed it twice
   * (the first of the two is taken).
   */
  kind: 'exact' | 'skipped' | 'repeated';
}

const plain = (local: LocalDateTime) => Temporal.PlainDateTime.from(local);

/** The instant of a wall-clock time in a zone, and whether that time exists once, never or twice. */
export function toInstant(local: LocalDateTime, zone: Zone): LocalReading {
  const wanted = plain(local);
  const earlier = wanted.toZonedDateTime(zone, { disambiguation: 'earlier' });
  const later = wanted.toZonedDateTime(zone, { disambiguation: 'later' });
  if (earlier.epochMilliseconds === later.epochMilliseconds) return { at: earlier.epochMilliseconds, kind: 'exact' };
  if (earlier.toPlainDateTime().equals(wanted)) return { at: earlier.epochMilliseconds, kind: 'repeated' };
  return { at: later.epochMilliseconds, kind: 'skipped' };
}

const zoned = (at: Instant, zone: Zone) => Temporal.Instant.fromEpochMilliseconds(at).toZonedDateTimeISO(zone);

/** `YYYY-MM-DDTHH:MM` on the clocks of the zone; seconds are cut off. */
export const toLocal = (at: Instant, zone: Zone): LocalDateTime =>
  zoned(at, zone).toPlainDateTime().toString({ smallestUnit: 'minute' });

export const localDate = (at: Instant, zone: Zone): LocalDate => toLocal(at, zone).slice(0, 10);
export const clockOf = (at: Instant, zone: Zone): ClockTime => toLocal(at, zone).slice(11, 16);

/** Offset from UTC in minutes, east positive. */
export const offsetMinutes = (at: Instant, zone: Zone): number => zoned(at, zone).offsetNanoseconds / 60_000_000_000;

/**
 * The same clock time (or `clock`) a number of local days later, whatever the clocks did in between.
 * A clock time that does not exist on that day is moved on by the jump.
 */
export function addLocalDays(at: Instant, days: number, zone: Zone, clock?: ClockTime): LocalReading {
  const local = toLocal(at, zone);
  const date = Temporal.PlainDate.from(local.slice(0, 10)).add({ days });
  return toInstant(`${date.toString()}T${clock ?? local.slice(11, 16)}`, zone);
}

export interface ClockChange {
  at: Instant;
  beforeMinutes: number;
  afterMinutes: number;
}

/** Every change of the zone's offset after `from` and not after `to`. */
export function clockChangesBetween(from: Instant, to: Instant, zone: Zone): ClockChange[] {
  const changes: ClockChange[] = [];
  let next = zoned(from, zone).getTimeZoneTransition('next');
  while (next && next.epochMilliseconds <= to) {
    const at = next.epochMilliseconds;
    const beforeMinutes = offsetMinutes(at - 1, zone);
    const afterMinutes = offsetMinutes(at, zone);
    // zones also change their name or law without moving the clock
    if (beforeMinutes !== afterMinutes) changes.push({ at, beforeMinutes, afterMinutes });
    next = next.getTimeZoneTransition('next');
  }
  return changes;
}
