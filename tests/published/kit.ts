import { findLibrary } from '@/protocols/library';
import { expand } from '@/protocols/plan/expand';
import { toInstant, toLocal } from '@/protocols/time/zoned';
import type { ProtocolBody } from '@/protocols/types';

/** A published protocol laid out from a start, read back as wall-clock times. */
export function laidOut(id: string, start: string, zone = 'Europe/Dublin', options: Record<string, string> = {}) {
  const body = bodyOf(id);
  const first = body.visits[0]?.id ?? '';
  const plan = expand(body, { fix: { visit: first, at: toInstant(start, zone).at }, zone, options });
  const find = (visit: string, occurrence = 1) => {
    const found = plan.visits.find((v) => v.visit === visit && v.occurrence === occurrence);
    if (!found) throw new Error(`${id} has no visit ${visit}`);
    return found;
  };
  return {
    plan,
    at: (visit: string, occurrence = 1) => toLocal(find(visit, occurrence).at, zone),
    window: (visit: string) => [toLocal(find(visit).window.earliest, zone), toLocal(find(visit).window.latest, zone)],
    /** Whole days from the start, for day tables. */
    days: (visit: string) => Math.round(find(visit).sinceStartMinutes / 1440),
    hoursFrom: (from: string, to: string) => (find(to).at - find(from).at) / 3_600_000,
  };
}

export function bodyOf(id: string): ProtocolBody {
  const entry = findLibrary(id);
  if (!entry) throw new Error(`the library has no ${id}`);
  return entry.body;
}
