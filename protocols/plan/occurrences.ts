import { addLocalDays, type LocalReading } from '../time/zoned';
import type { Instant, Repeat, Step } from '../types';
import type { Clocks } from './dated';

/** No protocol repeats an act more often; a body that does is cut off here. */
const mostOccurrences = 366;

export const countOf = (repeat: Repeat | undefined): number =>
  Math.min(mostOccurrences, Math.max(1, Math.floor(repeat?.count ?? 1) || 1));

/** Moment of the k-th occurrence (from 0) of a repeated act: local days by the clock, minutes as elapsed. */
export function occurrenceAt(at: Instant, repeat: Repeat | undefined, k: number, clocks: Clocks): LocalReading {
  const { days, minutes } = repeat?.every ?? {};
  if (k === 0 || (days === undefined && minutes === undefined)) return { at, kind: 'exact' };
  if (days === undefined) return { at: at + (minutes ?? 0) * k * 60_000, kind: 'exact' };
  const whole = Math.floor(days * k);
  const reading = addLocalDays(at, whole, clocks.zone);
  return { at: reading.at + (days * k - whole) * 86_400_000, kind: reading.kind };
}

/** Every moment of a visit with the steps done then, in order of time: the steps may repeat at different rates. */
export function occurrences(at: Instant, steps: readonly Step[], clocks: Clocks): { at: Instant; steps: string[] }[] {
  const moments = new Map<Instant, string[]>();
  for (const step of steps)
    for (let k = 0; k < countOf(step.repeat); k += 1) {
      const moment = occurrenceAt(at, step.repeat, k, clocks).at;
      const there = moments.get(moment) ?? [];
      if (!there.includes(step.id)) there.push(step.id);
      moments.set(moment, there);
    }
  return [...moments].map(([moment, ids]) => ({ at: moment, steps: ids })).sort((a, b) => a.at - b.at);
}
