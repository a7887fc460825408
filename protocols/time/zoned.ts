import type { ClockTime, Instant, LocalDate, LocalDateTime, Zone } from '../types';
import { clockMs, dayMs, wallMs, wallText } from './civil';
import { segmentAt, segmentsBetween } from './segments';

/**
 * Instants and wall-clock times. Zones are IANA ids and always an argument.
 * Errors: an unknown zone, a malformed date or a time that is none throws a RangeError.
 */

export interface LocalReading {
  at: Instant;
  /**
   * skipped: the clock jumped over this time (it is moved on by the jump); repeated: the clock showed it twice
   * (the first of the two is taken, unless the later one is asked for).
   */
  kind: 'exact' | 'skipped' | 'repeated';
}

export interface Disambiguation {
  /**
   * Which of two readings: of a repeated time the first (`earlier`, the default) or the second; of a skipped one as
   * far before the jump (`earlier`) or after it (`later`, the default) as the clock would have been.
   */
  disambiguation?: 'earlier' | 'later';
}

/** No offset is further from UTC than 14 hours, nor does any change by more than a day. */
const reach = 26 * 3_600_000;

/** The instant of a wall-clock time in a zone, and whether that time exists once, never or twice. */
export const toInstant = (local: LocalDateTime, zone: Zone, options: Disambiguation = {}): LocalReading =>
  readWall(wallMs(local), zone, options.disambiguation);

/** As `toInstant`, for wall-clock milliseconds (as if the zone were UTC). */
export function readWall(wall: number, zone: Zone, choose?: 'earlier' | 'later'): LocalReading {
  const segments = segmentsBetween(wall - reach, wall + reach, zone);
  const readings = segments
    .map((segment) => ({ at: wall - segment.offset, segment }))
    .filter(({ at, segment }) => segment.from <= at && at < segment.to);
  const [first, second] = [readings[0], readings[1]];
  if (first && second) return { at: choose === 'later' ? second.at : first.at, kind: 'repeated' };
  if (first) return { at: first.at, kind: 'exact' };
  // the change that jumped over it: the segment before it ends too early, the one after it begins too late
  const after = segments.findIndex((segment) => wall - segment.offset < segment.from);
  const from = segments[choose === 'earlier' ? after : after - 1];
  return { at: wall - (from?.offset ?? 0), kind: 'skipped' };
}

/** Wall-clock milliseconds of an instant, as if the zone were UTC. */
export const toWall = (at: Instant, zone: Zone): number => at + segmentAt(at, zone).offset;

/** `YYYY-MM-DDTHH:MM` on the clocks of the zone; seconds are cut off. */
export const toLocal = (at: Instant, zone: Zone): LocalDateTime => wallText(toWall(at, zone));

export const localDate = (at: Instant, zone: Zone): LocalDate => toLocal(at, zone).slice(0, 10);
export const clockOf = (at: Instant, zone: Zone): ClockTime => toLocal(at, zone).slice(11, 16);

/** Offset from UTC in minutes, east positive. */
export const offsetMinutes = (at: Instant, zone: Zone): number => segmentAt(at, zone).offset / 60_000;

/**
 * The same clock time (or `clock`) a whole number of local days later, whatever the clocks did in between.
 * A clock time that does not exist on that day is moved on by the jump; no days and no clock is the moment itself.
 */
export function addLocalDays(at: Instant, days: number, zone: Zone, clock?: ClockTime): LocalReading {
  if (days === 0 && clock === undefined) return { at, kind: 'exact' };
  const wall = toWall(at, zone);
  if (clock === undefined) return readWall(wall + days * dayMs, zone);
  return readWall((Math.floor(wall / dayMs) + days) * dayMs + clockMs(clock), zone);
}

export interface ClockChange {
  at: Instant;
  beforeMinutes: number;
  afterMinutes: number;
}

/** Every change of the zone's offset after `from` and not after `to`. */
export function clockChangesBetween(from: Instant, to: Instant, zone: Zone): ClockChange[] {
  if (!(to > from)) return [];
  const segments = segmentsBetween(from, to, zone);
  return segments.slice(1).flatMap((segment, i): ClockChange[] => {
    const before = segments[i]?.offset ?? segment.offset;
    // zones also change their name or law without moving the clock
    if (before === segment.offset) return [];
    return [{ at: segment.from, beforeMinutes: before / 60_000, afterMinutes: segment.offset / 60_000 }];
  });
}
