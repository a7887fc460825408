import { describe, expect, it } from 'vitest';

import { addDays, daysBetween, weekday } from '@/protocols/time/dates';
import { addLocalDays, clockChangesBetween, offsetMinutes, toInstant, toLocal } from '@/protocols/time/zoned';

const iso = (at: number) => new Date(at).toISOString();

/** Change days are those of the IANA time zone database. */
describe('wall-clock times', () => {
  it('are read in their zone: 07:00 in Sydney is 21:00 the evening before in UTC, an hour earlier in summer time', () => {
    expect(iso(toInstant('2026-09-29T07:00', 'Australia/Sydney').at)).toBe('2026-09-28T21:00:00.000Z');
    expect(iso(toInstant('2026-10-06T07:00', 'Australia/Sydney').at)).toBe('2026-10-05T20:00:00.000Z');
  });

  it('that the clock jumped over are moved on and said: 02:30 on 4 October 2026 in Sydney', () => {
    const reading = toInstant('2026-10-04T02:30', 'Australia/Sydney');
    expect(reading.kind).toBe('skipped');
    expect(toLocal(reading.at, 'Australia/Sydney')).toBe('2026-10-04T03:30');
  });

  it('that the clock showed twice are the first of the two and said: 01:30 on 25 October 2026 in Dublin', () => {
    const reading = toInstant('2026-10-25T01:30', 'Europe/Dublin');
    expect(reading).toEqual({ at: Date.UTC(2026, 9, 25, 0, 30), kind: 'repeated' });
  });

  it('keep their hour over any number of local days: 167 or 169 hours are still a week', () => {
    const start = toInstant('2026-09-29T07:00', 'Australia/Sydney').at;
    const week = addLocalDays(start, 7, 'Australia/Sydney').at;
    expect((week - start) / 3_600_000).toBe(167);
    const autumn = toInstant('2026-10-21T07:00', 'America/New_York').at;
    expect((addLocalDays(autumn, 14, 'America/New_York').at - autumn) / 3_600_000).toBe(14 * 24 + 1);
  });

  it('know half-hour changes (Lord Howe) and zones without any (São Paulo since 2019)', () => {
    const howe = clockChangesBetween(Date.UTC(2026, 8, 1), Date.UTC(2026, 11, 1), 'Australia/Lord_Howe');
    expect(howe.map((c) => c.afterMinutes - c.beforeMinutes)).toEqual([30]);
    expect(clockChangesBetween(Date.UTC(2020, 0, 1), Date.UTC(2026, 11, 1), 'America/Sao_Paulo')).toEqual([]);
    expect(offsetMinutes(Date.UTC(2026, 6, 1), 'America/Sao_Paulo')).toBe(-180);
  });

  it('find both changes of a year in New York', () => {
    const changes = clockChangesBetween(Date.UTC(2026, 0, 1), Date.UTC(2026, 11, 31), 'America/New_York');
    expect(changes.map((c) => iso(c.at))).toEqual(['2026-03-08T07:00:00.000Z', '2026-11-01T06:00:00.000Z']);
  });
});

/**
 * Worked examples of Clemson Extension, "Gestation and breeding dates", bulletin BC-1001 (2006): read in the
 * reference of the project: bred 10 Feb 1995 + 283 d; 5 Mar 1996 - 283 d (leap year); born 15 Nov 1995, weaned at 229 d.
 */
describe('calendar dates', () => {
  it('count as the handbook does', () => {
    expect(addDays('1995-02-10', 283)).toBe('1995-11-20');
    expect(addDays('1996-03-05', -283)).toBe('1995-05-27');
    expect(daysBetween('1995-11-15', '1996-07-01')).toBe(229);
    expect(daysBetween('1995-01-25', '1996-03-05')).toBe(405);
  });

  it('give 11 October, not the 10 October of copied charts, for 283 days after 1 January of a common year (derived)', () => {
    expect(addDays('2026-01-01', 283)).toBe('2026-10-11');
    expect(addDays('2024-01-01', 283)).toBe('2024-10-10');
  });

  it('know their weekday, 1 Monday to 7 Sunday', () => {
    expect(weekday('2026-05-04')).toBe(1);
    expect(weekday('2026-10-04')).toBe(7);
  });
});
