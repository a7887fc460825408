import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { expand } from '@/protocols/plan/expand';
import { addMilkings } from '@/protocols/plan/milkings';
import { toInstant, toLocal } from '@/protocols/time/zoned';
import type { Gap } from '@/protocols/types';
import { body, step } from '@/tests/support/bodies';

const zone = 'Europe/Dublin';
const at = (local: string) => toInstant(local, zone).at;
const later = (local: string, n: number, milkings?: string[]) =>
  toLocal(addMilkings(at(local), n, zone, milkings).at, zone);

describe('gaps counted in milkings', () => {
  const herd = ['05:30', '15:00'];

  it('go from milking to milking, though the intervals are unequal', () => {
    expect(later('2026-05-04T05:30', 1, herd)).toBe('2026-05-04T15:00');
    expect(later('2026-05-04T05:30', 2, herd)).toBe('2026-05-05T05:30');
    expect(later('2026-05-04T15:00', 1, herd)).toBe('2026-05-05T05:30');
    expect(later('2026-05-04T15:00', -3, herd)).toBe('2026-05-03T05:30');
  });

  it('take the milking times in any order, and three a day', () => {
    expect(later('2026-05-04T05:00', 4, ['21:00', '05:00', '13:00'])).toBe('2026-05-05T13:00');
  });

  it('are twelve hours without milking times', () => {
    expect(later('2026-05-04T08:00', 3)).toBe('2026-05-05T20:00');
    expect(later('2026-05-04T08:00', 3, [])).toBe('2026-05-05T20:00');
  });

  it('keep the clock of the milking when the clocks change', () => {
    expect(later('2026-10-24T05:30', 4, herd)).toBe('2026-10-26T05:30');
  });

  it('keep the share of the interval between two milkings: half way stays half way', () => {
    // 10:15 is half of the nine and a half hours; half of the fourteen and a half is 22:15
    expect(later('2026-05-04T10:15', 1, herd)).toBe('2026-05-04T22:15');
  });

  it('lead back to where they came from, whatever the herd’s times', () => {
    const clock = fc.integer({ min: 0, max: 95 }).map((q) => {
      const pad = (n: number) => String(n).padStart(2, '0');
      return `${pad(Math.floor(q / 4))}:${pad((q % 4) * 15)}`;
    });
    fc.assert(
      fc.property(
        fc.uniqueArray(clock, { minLength: 1, maxLength: 4 }),
        fc.integer({ min: 0, max: 525_600 }),
        fc.integer({ min: -40, max: 40 }),
        (milkings, minute, n) => {
          // a zone without changes: a skipped milking has no way back
          const start = Date.UTC(2026, 0, 1) + minute * 60_000;
          const there = addMilkings(start, n, 'UTC', milkings).at;
          // shares of an interval are rounded to milliseconds, which a longer interval can multiply
          expect(Math.abs(addMilkings(there, -n, 'UTC', milkings).at - start)).toBeLessThanOrEqual(200);
          const from = Math.sign(there - start);
          expect(from).toBe(Math.sign(n));
        },
      ),
      { numRuns: 2000, seed: 31 },
    );
  });

  it('make windows of a plan: served at the second milking after heat aids are read, one either side', () => {
    const gap: Gap = { id: 'g', from: 'read', to: 'serve', unit: 'milkings', least: 1, ideal: 2, most: 3 };
    const protocol = body({
      visits: ['read', 'serve'].map((id) => ({ id, label: id, yarded: true })),
      steps: [step('read', 'heatAidRead', 'read'), step('serve', 'serviceOnHeat', 'serve')],
      gaps: [gap],
      timingAnchor: 'read',
      serviceStep: 'serve',
    });
    const plan = expand(protocol, { fix: { visit: 'read', at: at('2026-05-04T05:30') }, zone, milkings: herd });
    const serve = plan.visits.find((v) => v.visit === 'serve');
    expect([serve?.at, serve?.window.earliest, serve?.window.latest].map((t) => toLocal(t ?? 0, zone))).toEqual([
      '2026-05-05T05:30',
      '2026-05-04T15:00',
      '2026-05-05T15:00',
    ]);
  });
});
