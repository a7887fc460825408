import { clockMs, dayMs } from '../time/civil';
import { readWall, toWall, type LocalReading } from '../time/zoned';
import type { ClockTime, Instant, Zone } from '../types';

/** Two milkings twelve hours apart stand for a herd whose times are not written. */
const usual: readonly ClockTime[] = ['06:00', '18:00'];

/**
 * The moment `n` milkings after (n > 0) or before one, counted in the herd's own milking times: from a milking to a
 * milking. A moment between two of them keeps its share of the interval, so that there and back is the same moment.
 */
export function addMilkings(at: Instant, n: number, zone: Zone, milkings: readonly ClockTime[] = usual): LocalReading {
  if (n === 0) return { at, kind: 'exact' };
  const clocks = [...new Set(milkings.length > 0 ? milkings : usual)].map(clockMs).sort((a, b) => a - b);
  const perDay = clocks.length;
  /** Wall-clock milliseconds of the k-th milking since 1970. */
  const wallOf = (k: number) => Math.floor(k / perDay) * dayMs + (clocks[((k % perDay) + perDay) % perDay] ?? 0);
  const wall = toWall(at, zone);
  let last = (Math.floor(wall / dayMs) + 1) * perDay;
  while (wallOf(last) > wall) last -= 1;
  const share = (wall - wallOf(last)) / (wallOf(last + 1) - wallOf(last)) + n;
  const whole = last + Math.floor(share);
  const rest = share - Math.floor(share);
  return readWall(Math.round(wallOf(whole) + rest * (wallOf(whole + 1) - wallOf(whole))), zone);
}
