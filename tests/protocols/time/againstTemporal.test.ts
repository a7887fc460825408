import fc from 'fast-check';
import { Temporal } from 'temporal-polyfill';
import { describe, expect, it } from 'vitest';

import { dateOfDay, dayNumber } from '@/protocols/time/civil';
import { addDays, daysBetween, weekday } from '@/protocols/time/dates';
import { addLocalDays, clockChangesBetween, clockOf, localDate, toInstant, toLocal } from '@/protocols/time/zoned';

/** The core's arithmetic against the time library's own answers, with zones of every odd kind of change. */
const zones = [
  'Australia/Sydney',
  'Australia/Lord_Howe', // half an hour
  'Europe/Dublin', // summer time is the standard
  'America/New_York',
  'America/Sao_Paulo', // none since 2019; changed at midnight before
  'America/St_Johns', // 3 h 30; changed at one minute past midnight until 2011
  'Africa/Casablanca', // clocks go back for Ramadan
  'Antarctica/Troll', // two hours
  'Pacific/Apia', // left out 30 December 2011
  'Asia/Kathmandu',
  'UTC',
];
const zone = fc.constantFrom(...zones);
const minute = 60_000;
const instant = fc
  .integer({ min: Date.UTC(1995, 0, 1) / minute, max: Date.UTC(2045, 0, 1) / minute })
  .map((n) => n * minute);

/** Instants within a day and a half of a change of the clocks: where the two could differ. */
const nearChange = fc
  .tuple(zone, instant, fc.integer({ min: -2160, max: 2160 }))
  .map(([id, at, off]): [string, number] => {
    const next = Temporal.Instant.fromEpochMilliseconds(at).toZonedDateTimeISO(id).getTimeZoneTransition('next');
    return [id, (next?.epochMilliseconds ?? at) + off * minute];
  });
const anywhere = fc.oneof(fc.tuple(zone, instant), nearChange);

const kindOf = (wanted: Temporal.PlainDateTime, id: string) => {
  const [a, b] = (['earlier', 'later'] as const).map((disambiguation) =>
    wanted.toZonedDateTime(id, { disambiguation }),
  );
  if (a?.epochMilliseconds === b?.epochMilliseconds) return 'exact';
  return a?.toPlainDateTime().equals(wanted) ? 'repeated' : 'skipped';
};

describe('wall-clock times and the time library', () => {
  it('agree on what the clock shows', () => {
    fc.assert(
      fc.property(anywhere, ([id, at]) => {
        const wanted = Temporal.Instant.fromEpochMilliseconds(at).toZonedDateTimeISO(id).toPlainDateTime();
        expect(toLocal(at, id)).toBe(wanted.toString({ smallestUnit: 'minute' }));
        expect(`${localDate(at, id)}T${clockOf(at, id)}`).toBe(toLocal(at, id));
      }),
      { numRuns: 1500, seed: 1 },
    );
  });

  it('agree on the instant of a clock time, on whether it exists, and on both of its readings', () => {
    fc.assert(
      fc.property(anywhere, ([id, at]) => {
        // a clock time taken from UTC: near a change it is skipped or repeated often enough
        const local = new Date(at).toISOString().slice(0, 16);
        const wanted = Temporal.PlainDateTime.from(local);
        const shown = Temporal.Instant.fromEpochMilliseconds(at).toZonedDateTimeISO(id).toPlainDateTime();
        for (const plain of [wanted, shown, shown.add({ minutes: 45 })]) {
          const text = plain.toString({ smallestUnit: 'minute' });
          const reading = toInstant(text, id);
          expect(reading).toEqual({
            at: plain.toZonedDateTime(id, { disambiguation: 'compatible' }).epochMilliseconds,
            kind: kindOf(plain, id),
          });
          for (const disambiguation of ['earlier', 'later'] as const)
            expect(toInstant(text, id, { disambiguation }).at).toBe(
              plain.toZonedDateTime(id, { disambiguation }).epochMilliseconds,
            );
        }
      }),
      { numRuns: 1500, seed: 2 },
    );
  });

  it('agree on local days later and earlier, seconds kept', () => {
    fc.assert(
      fc.property(anywhere, fc.integer({ min: -60, max: 60 }), fc.nat(59_999), ([id, at], days, part) => {
        const wanted = Temporal.Instant.fromEpochMilliseconds(at + part)
          .toZonedDateTimeISO(id)
          .add({ days });
        // no days at all is the moment itself, for the library too
        expect(addLocalDays(at + part, days, id).at).toBe(wanted.epochMilliseconds);
      }),
      { numRuns: 1500, seed: 3 },
    );
  });

  it('agree on every change of the clocks', () => {
    fc.assert(
      fc.property(zone, instant, fc.integer({ min: 1, max: 900 }), (id, from, days) => {
        const to = from + days * 1440 * minute;
        const wanted: number[] = [];
        let next = Temporal.Instant.fromEpochMilliseconds(from).toZonedDateTimeISO(id).getTimeZoneTransition('next');
        while (next && next.epochMilliseconds <= to) {
          if (next.subtract({ milliseconds: 1 }).offset !== next.offset) wanted.push(next.epochMilliseconds);
          next = next.getTimeZoneTransition('next');
        }
        expect(clockChangesBetween(from, to, id).map((change) => change.at)).toEqual(wanted);
      }),
      { numRuns: 300, seed: 4 },
    );
  });

  it('read the second of two times when asked, and move a skipped one to before the jump', () => {
    const dublin = '2026-10-25T01:30';
    const [first, second] = (['earlier', 'later'] as const).map(
      (disambiguation) => toInstant(dublin, 'Europe/Dublin', { disambiguation }).at,
    );
    expect((second ?? 0) - (first ?? 0)).toBe(60 * minute);
    const before = toInstant('2026-10-04T02:30', 'Australia/Sydney', { disambiguation: 'earlier' });
    expect(toLocal(before.at, 'Australia/Sydney')).toBe('2026-10-04T01:30');
  });

  it('know the day that Samoa left out', () => {
    expect(toInstant('2011-12-30T08:00', 'Pacific/Apia').kind).toBe('skipped');
    const before = toInstant('2011-12-29T08:00', 'Pacific/Apia').at;
    expect(toLocal(addLocalDays(before, 2, 'Pacific/Apia').at, 'Pacific/Apia')).toBe('2011-12-31T08:00');
  });

  it.each(['2026-02-30T08:00', '2026-10-04T24:00', '2026-10-04 08:00', '', '2026-10-04'])('refuse %j', (local) => {
    expect(() => toInstant(local, 'UTC')).toThrow(RangeError);
  });

  it('refuse a zone that is none, every time it is asked', () => {
    expect(() => toLocal(0, 'Nowhere/Atlantis')).toThrow(RangeError);
    expect(() => toLocal(0, 'Nowhere/Atlantis')).toThrow(RangeError);
  });

  it('have no change in a stretch that is none', () => {
    expect(clockChangesBetween(Date.UTC(2027, 0, 1), Date.UTC(2026, 0, 1), 'Australia/Sydney')).toEqual([]);
  });
});

describe('calendar dates and the time library', () => {
  const day = fc.integer({ min: dayNumber('1600-01-01'), max: dayNumber('2400-12-31') });

  it('agree on days later, days between and weekdays over eight centuries', () => {
    fc.assert(
      fc.property(day, fc.integer({ min: -40_000, max: 40_000 }), (n, days) => {
        const date = dateOfDay(n);
        const plain = Temporal.PlainDate.from(date);
        const later = plain.add({ days });
        expect(addDays(date, days)).toBe(later.toString());
        expect(daysBetween(date, later.toString())).toBe(days);
        expect(weekday(date)).toBe(plain.dayOfWeek);
        expect(dayNumber(date)).toBe(n);
      }),
      { numRuns: 2000, seed: 5 },
    );
  });

  it.each(['2026-02-29', '2026-13-01', '0099-01-01x', '26-01-01', '2026-1-1'])('refuse %j', (date) => {
    expect(() => addDays(date, 1)).toThrow(RangeError);
  });
});
