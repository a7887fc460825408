import type { Instant, Zone } from '../types';
import { Temporal } from './temporal';

/** A stretch of time in which a zone keeps one offset from UTC: `from <= at < to`, infinite at the ends. */
export interface Segment {
  from: Instant;
  to: Instant;
  /** Milliseconds to add to UTC, east positive. */
  offset: number;
}

/** What has been asked of the time library before: the rules of a zone do not change while a program runs. */
const known = new Map<Zone, Segment[]>();

/** The segment that an instant lies in. Throws a RangeError for an unknown zone or an instant that is none. */
export function segmentAt(at: Instant, zone: Zone): Segment {
  const segments = known.get(zone) ?? [];
  const found = segments.find((segment) => segment.from <= at && at < segment.to);
  if (found) return found;
  const zoned = Temporal.Instant.fromEpochMilliseconds(Math.floor(at)).toZonedDateTimeISO(zone);
  // "previous" looks strictly before: a millisecond later finds the change at this very instant
  const previous = zoned.add({ milliseconds: 1 }).getTimeZoneTransition('previous');
  const next = zoned.getTimeZoneTransition('next');
  const segment = {
    from: previous?.epochMilliseconds ?? -Infinity,
    to: next?.epochMilliseconds ?? Infinity,
    offset: zoned.offsetNanoseconds / 1_000_000,
  };
  segments.push(segment);
  known.set(zone, segments);
  return segment;
}

/** The segments that a stretch of time touches, in order. */
export function segmentsBetween(from: Instant, to: Instant, zone: Zone): Segment[] {
  const first = segmentAt(from, zone);
  const list = [first];
  for (let last = first; last.to <= to;) {
    last = segmentAt(last.to, zone);
    list.push(last);
  }
  return list;
}
