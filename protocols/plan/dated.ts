import type { Bound } from '../network/network';
import { addLocalDays, type LocalReading } from '../time/zoned';
import type { ClockTime, Instant, Zone } from '../types';
import { idealOf } from './gaps';
import { addMilkings } from './milkings';
import type { VisitGap } from './resolve';

/** What turns gaps into instants: the zone's clocks, and the herd's milking times for gaps counted in milkings. */
export interface Clocks {
  zone: Zone;
  /** Clock times of the milkings of a day. Absent: two milkings 12 hours apart. */
  milkings?: readonly ClockTime[];
}

const minute = 60_000;
const hour = 3_600_000;

/** Part of a day beyond whole local days, as elapsed time: half a day is twelve hours. */
const restOfDay = (n: number): number => (n - Math.trunc(n)) * 24 * hour;

/**
 * The other end of a gap of `n` units (negative: the end lies before the start), from its start to its end or, when
 * not `forwards`, from its end to its start. The gap's clock time is that of its end only: backwards the start has
 * the end's clock time.
 */
export function shift(at: Instant, n: number, gap: VisitGap, clocks: Clocks, forwards = true): LocalReading {
  const { unit, clock } = gap.gap;
  if (unit === 'elapsedHours') return { at: at + (forwards ? n : -n) * hour, kind: 'exact' };
  if (unit === 'milkings') return addMilkings(at, forwards ? n : -n, clocks.zone, clocks.milkings);
  if (!forwards) return addLocalDays(at - restOfDay(n), -Math.trunc(n), clocks.zone);
  const whole = addLocalDays(at, Math.trunc(n), clocks.zone, clock);
  return { at: whole.at + restOfDay(n), kind: whole.kind };
}

/** Planned moment at the other end of a gap. */
export const along = (at: Instant, gap: VisitGap, forwards: boolean, clocks: Clocks): LocalReading =>
  shift(at, idealOf(gap.gap), gap, clocks, forwards);

/**
 * A gap as elapsed minutes for a given moment of its start: 7 local days are 167 hours when the clocks go forward in
 * between.
 */
export function elapsedBounds(from: Instant, gap: VisitGap, clocks: Clocks): Pick<Bound, 'least' | 'most'> {
  const { least, most, toleranceMinutes = 0, unit } = gap.gap;
  const tolerance = unit === 'localDays' ? toleranceMinutes : 0;
  const minutes = (n: number) => (shift(from, n, gap, clocks).at - from) / minute;
  return {
    ...(least === undefined ? {} : { least: minutes(least) - tolerance }),
    ...(most === undefined ? {} : { most: minutes(most) + tolerance }),
  };
}
