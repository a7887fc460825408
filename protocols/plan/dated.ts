import type { Bound } from '../network/network';
import { addLocalDays } from '../time/zoned';
import type { ClockTime, Instant, Zone } from '../types';
import { idealOf } from './gaps';
import type { VisitGap } from './resolve';

/** What turns gaps into instants: the zone's clocks, and the herd's milking times for gaps counted in milkings. */
export interface Clocks {
  zone: Zone;
  /** Clock times of the milkings of a day, in order. Absent: two milkings 12 hours apart. */
  milkings?: readonly ClockTime[];
}

const minute = 60_000;
const hour = 3_600_000;

/** The instant `n` milkings after (or before) one: whole days by local date, the rest by the milking times. */
function addMilkings(at: Instant, n: number, clocks: Clocks): Instant {
  const perDay = clocks.milkings?.length ?? 2;
  const days = Math.trunc(n / perDay);
  const rest = n - days * perDay;
  const whole = addLocalDays(at, days, clocks.zone).at;
  return rest === 0 ? whole : whole + (rest * 24 * hour) / perDay;
}

/** The moment that a gap of `n` units leads to, forwards (n > 0) or backwards. */
export function shift(at: Instant, n: number, gap: VisitGap, clocks: Clocks): Instant {
  const { unit, clock } = gap.gap;
  if (unit === 'elapsedHours') return at + n * hour;
  if (unit === 'milkings') return addMilkings(at, n, clocks);
  const whole = Math.trunc(n);
  // backwards the earlier act keeps the later one's clock time: a gap names the clock of its later end only
  const moved = addLocalDays(at, whole, clocks.zone, n > 0 ? clock : undefined).at;
  return moved + (n - whole) * 24 * hour;
}

/** Planned moment at the other end of a gap. */
export const along = (at: Instant, gap: VisitGap, forwards: boolean, clocks: Clocks): Instant =>
  shift(at, forwards ? idealOf(gap.gap) : -idealOf(gap.gap), gap, clocks);

/**
 * A gap as elapsed minutes for a given moment of its earlier end: 7 local days are 167 hours when the clocks go
 * forward in between.
 */
export function elapsedBounds(from: Instant, gap: VisitGap, clocks: Clocks): Pick<Bound, 'least' | 'most'> {
  const { least, most, toleranceMinutes = 0, unit } = gap.gap;
  const tolerance = unit === 'localDays' ? toleranceMinutes : 0;
  const minutes = (n: number) => (shift(from, n, gap, clocks) - from) / minute;
  return {
    ...(least === undefined ? {} : { least: minutes(least) - tolerance }),
    ...(most === undefined ? {} : { most: minutes(most) + tolerance }),
  };
}
