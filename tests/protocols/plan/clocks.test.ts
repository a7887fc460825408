import { describe, expect, it } from 'vitest';

import { expand } from '@/protocols/plan/expand';
import { toInstant, toLocal } from '@/protocols/time/zoned';
import type { Finding, FindingCode, Plan } from '@/protocols/types';
import { body, days, hours, sevenDay, step } from '@/tests/support/bodies';

/** Change days are those of the IANA time zone database. */
const sydney = 'Australia/Sydney';
const plan = (visit: string, local: string, zone = sydney, protocol = sevenDay()) =>
  expand(protocol, { fix: { visit, at: toInstant(local, zone).at }, zone });
const of = (made: Plan, code: FindingCode): Finding[] => made.findings.filter((f) => f.code === code);
const shown = (made: Plan, visit: string, zone = sydney) =>
  toLocal(made.visits.find((v) => v.visit === visit)?.at ?? 0, zone);

describe('an hour gap over a change of the clocks', () => {
  it('says what the clock will show and what it would have shown: 14:00, not 13:00', () => {
    const [said] = of(plan('out', '2026-10-03T07:00'), 'clockChange').filter((f) => f.params.to === 'service');
    expect(said?.params).toMatchObject({
      unit: 'elapsedHours',
      elapsedMinutes: 54 * 60,
      nominalMinutes: 54 * 60,
      shiftMinutes: 60,
      clock: '14:00',
      unchangedClock: '13:00',
    });
  });

  it('counts back an hour in autumn: New York, 1 November 2026', () => {
    const [said] = of(plan('out', '2026-10-31T07:00', 'America/New_York'), 'clockChange').filter(
      (f) => f.params.to === 'service',
    );
    expect(said?.params).toMatchObject({ shiftMinutes: -60, clock: '12:00', unchangedClock: '13:00' });
  });

  it('counts half an hour on Lord Howe', () => {
    const [said] = of(plan('in', '2026-09-29T07:00', 'Australia/Lord_Howe'), 'clockChange');
    expect(said?.params).toMatchObject({ shiftMinutes: 30, elapsedMinutes: 168 * 60 - 30, nominalMinutes: 168 * 60 });
  });

  it('counts a milking as half a day', () => {
    const milked = sevenDay();
    milked.gaps[1] = { ...hours('deviceOut', 'service', 4, 4, 4), unit: 'milkings' };
    const said = of(plan('out', '2026-10-03T07:00', sydney, milked), 'clockChange');
    expect(said.find((f) => f.params.unit === 'milkings')?.params.nominalMinutes).toBe(4 * 720);
  });
});

describe('a clock time that the clocks jump over', () => {
  it('is named and planned later by the jump: devices out at 02:30 on 4 October 2026 in Sydney', () => {
    const made = plan('in', '2026-09-27T02:30');
    expect(shown(made, 'out')).toBe('2026-10-04T03:30');
    expect(of(made, 'clockTimeSkipped')).toMatchObject([
      { severity: 'warn', visits: ['out'], steps: ['deviceOut'], params: { local: '2026-10-04T02:30' } },
    ]);
  });

  it('is named backwards too', () => {
    const made = plan('out', '2026-10-11T02:30');
    expect(shown(made, 'in')).toBe('2026-10-04T03:30');
    expect(of(made, 'clockTimeSkipped')).toMatchObject([{ visits: ['in'], params: { local: '2026-10-04T02:30' } }]);
  });

  it('is named for a gap’s own clock time and for an occurrence of a repeated act', () => {
    const clocked = sevenDay();
    clocked.gaps[0] = days('deviceIn', 'deviceOut', 7, 60, { clock: '02:15' });
    expect(of(plan('in', '2026-09-27T08:00', sydney, clocked), 'clockTimeSkipped')[0]?.params.local).toBe(
      '2026-10-04T02:15',
    );
    const fed = body({
      visits: [{ id: 'feed', label: 'Feed', yarded: false }],
      steps: [step('feed', 'progestagenFeed', 'feed', { repeat: { every: { days: 1 }, count: 5 } })],
      timingAnchor: 'feed',
      serviceStep: 'feed',
    });
    expect(of(plan('feed', '2026-10-02T02:30', sydney, fed), 'clockTimeSkipped')).toMatchObject([
      { visits: ['feed'], params: { local: '2026-10-04T02:30' } },
    ]);
  });

  it('is not named for a visit that was set to the later hour itself, nor on any other day', () => {
    expect(of(plan('out', '2026-10-04T03:30'), 'clockTimeSkipped')).toEqual([]);
    expect(of(plan('in', '2026-09-26T02:30'), 'clockTimeSkipped')).toEqual([]);
  });
});

describe('a clock time that the clocks show twice', () => {
  const zone = 'Europe/Dublin';

  it('is named with the reading that is meant', () => {
    const [first] = of(plan('out', '2026-10-25T01:30', zone), 'clockTimeTwice');
    expect(first?.params.reading).toBe('first');
    const second = expand(sevenDay(), {
      fix: { visit: 'out', at: toInstant('2026-10-25T01:30', zone, { disambiguation: 'later' }).at },
      zone,
    });
    expect(of(second, 'clockTimeTwice')[0]?.params.reading).toBe('second');
  });

  it('is not named a day later', () => {
    expect(of(plan('out', '2026-10-26T01:30', zone), 'clockTimeTwice')).toEqual([]);
  });
});
