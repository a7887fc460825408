import { describe, expect, it } from 'vitest';

import { authorityCover, authorityFindings, type Permission } from '@/protocols/plan/authorityFindings';
import { calendarFindings } from '@/protocols/plan/calendarFindings';
import { dosesOf, requirements } from '@/protocols/plan/doses';
import { eligibility, type Candidate } from '@/protocols/plan/eligibility';
import { expand } from '@/protocols/plan/expand';
import { toInstant } from '@/protocols/time/zoned';
import type { FactGap } from '@/protocols/types';
import { sevenDay } from '@/tests/support/bodies';

const zone = 'Australia/Sydney';
const planFrom = (local: string) =>
  expand(sevenDay(), { fix: { visit: 'in', at: toInstant(local, zone).at }, zone }).visits;
const yarded = new Set(['in', 'out', 'ai']);
const calendar = { zone, weekendDays: [6, 7], holidays: [] };

describe('the calendar', () => {
  it('notes a weekend and warns of a holiday, which outweighs it', () => {
    // Labour Day in New South Wales: first Monday of October (Public Holidays Act 2010, NSW; from memory)
    const visits = planFrom('2026-09-28T07:00');
    expect(calendarFindings(visits, yarded, calendar)).toEqual([]);
    const found = calendarFindings(visits, yarded, {
      ...calendar,
      holidays: [{ date: '2026-10-05', name: 'Labour Day' }],
    });
    expect(found).toMatchObject([
      { code: 'holiday', severity: 'warn', visits: ['out'], params: { name: 'Labour Day' } },
    ]);
    const saturday = calendarFindings(planFrom('2026-05-02T08:00'), yarded, calendar);
    expect(saturday.map((f) => [f.code, f.visits?.[0]])).toEqual([
      ['weekend', 'in'],
      ['weekend', 'out'],
    ]);
  });

  it('warns outside the yard hours and stops what is past', () => {
    const visits = planFrom('2026-05-04T03:00');
    const hours = calendarFindings(visits, yarded, { ...calendar, yardHours: { from: '05:00', to: '20:00' } });
    expect(hours.map((f) => [f.code, f.visits?.[0]])).toEqual([
      ['outsideYardHours', 'in'],
      ['outsideYardHours', 'out'],
    ]);
    const past = calendarFindings(visits, yarded, { ...calendar, now: toInstant('2026-05-05T00:00', zone).at });
    expect(past).toMatchObject([{ code: 'inThePast', severity: 'stop', visits: ['in'] }]);
  });

  it('leaves out what does not go through the yards', () => {
    expect(calendarFindings(planFrom('2026-05-02T08:00'), new Set(), calendar)).toEqual([]);
  });
});

const animal = (tag: string, more: Partial<Candidate> = {}): Candidate => ({
  id: tag,
  tag,
  class: 'heifer',
  birth: null,
  lastCalving: null,
  lastService: null,
  knownEmpty: true,
  otherCohort: null,
  ...more,
});

describe('which animals may start', () => {
  const visits = planFrom('2026-05-04T08:00');
  const calving: FactGap = { id: 'dim', fact: 'calving', to: 'deviceIn', leastDays: 50, source: 'SDSU Extension' };
  const protocol = sevenDay(52, 54, 56, { classes: ['heifer', 'cow'], factGaps: [calving] });

  it('stops prostaglandin for every animal that is not known empty, by tag', () => {
    const found = eligibility(
      protocol,
      visits,
      [animal('0412', { knownEmpty: null }), animal('0413', { knownEmpty: false }), animal('0414')],
      zone,
    );
    expect(found).toMatchObject([
      { code: 'notKnownEmpty', severity: 'stop', steps: ['pg'], params: { count: 2, tags: ['0412', '0413'] } },
    ]);
  });

  it('counts days since calving at the named step, by local date', () => {
    const cow = (tag: string, lastCalving: string | null) => animal(tag, { class: 'cow', lastCalving });
    // 15 March to 4 May is 50 days
    const found = eligibility(protocol, visits, [cow('A', '2026-03-15'), cow('B', '2026-03-16'), cow('C', null)], zone);
    expect(found.map((f) => [f.code, f.params.tags])).toEqual([
      ['daysSinceCalving', ['B']],
      ['calvingUnknown', ['C']],
    ]);
    expect(found[0]).toMatchObject({ params: { fewestDays: 49, leastDays: 50 }, source: 'SDSU Extension' });
  });

  it('does not ask a heifer for her calving', () => {
    expect(eligibility(protocol, visits, [animal('H')], zone)).toEqual([]);
  });

  it('warns of a class that the protocol does not suit and stops an animal that is in another cohort', () => {
    const found = eligibility(
      protocol,
      visits,
      [animal('D', { class: 'dairyCow', lastCalving: '2025-01-01', otherCohort: 'Autumn' })],
      zone,
    );
    expect(found.map((f) => [f.code, f.severity])).toEqual([
      ['wrongClass', 'warn'],
      ['inAnotherCohort', 'stop'],
    ]);
    expect(found[1]?.params.cohorts).toEqual(['Autumn']);
  });
});

describe('doses and authorities', () => {
  const protocol = sevenDay();
  const groups = [{ class: 'heifer' as const, head: 156 }];
  const visits = planFrom('2026-05-04T08:00');
  const permission = (
    active: Permission['active'],
    amount: number,
    unit: Permission['unit'],
    headLeft: number,
    more: Partial<Permission> = {},
  ): Permission => ({
    active,
    amount,
    unit,
    headLeft,
    classes: ['heifer'],
    validFrom: '2026-05-01',
    validTo: '2026-05-31',
    ...more,
  });
  const all = (pg: Permission) => [
    permission('progesterone', 1, 'device', 156),
    permission('gonadorelin', 100, 'ug', 156),
    pg,
  ];
  const found = (pg: Permission) =>
    authorityFindings(authorityCover(protocol, groups, visits, all(pg), zone), all(pg), zone);

  it('are counted for every time that they are given: GnRH twice, one device each', () => {
    expect(requirements(protocol, groups).map((n) => [n.active, n.amount, n.doses])).toEqual([
      ['progesterone', 1, 156],
      ['gonadorelin', 100, 312],
      ['dinoprost', 25, 156],
    ]);
  });

  it('go by class and by weight', () => {
    const item = {
      active: 'ecg' as const,
      amount: 300,
      unit: 'iu' as const,
      per: 'head' as const,
      route: 'im' as const,
      byClass: { cow: 400 },
    };
    const step = { id: 's', kind: 'ecg' as const, level: 'animal' as const, visit: 'v', items: [item] };
    expect(dosesOf(step, 'cow', 10)).toMatchObject([{ amount: 400, total: 4000 }]);
    expect(dosesOf(step, 'heifer', 10)).toMatchObject([{ amount: 300, total: 3000 }]);
    const perKg = { ...step, items: [{ ...item, amount: 0.5, per: 'kg' as const, byClass: {} }] };
    expect(dosesOf(perKg, 'heifer', 10)).toMatchObject([{ amount: null, total: null }]);
    expect(dosesOf(perKg, 'heifer', 1, 320)).toMatchObject([{ amount: 160 }]);
  });

  it('that cover every head and day stop nothing', () => {
    expect(found(permission('dinoprost', 25, 'mg', 156))).toEqual([]);
  });

  it('two head short are a stop that says two', () => {
    expect(found(permission('dinoprost', 25, 'mg', 154))).toMatchObject([
      { code: 'authorityShort', severity: 'stop', params: { active: 'dinoprost', head: 156, covered: 154, short: 2 } },
    ]);
  });

  it('missing, over before the day, of another class or too small say which', () => {
    expect(found(permission('cloprostenol', 500, 'ug', 156))[0]?.code).toBe('authorityMissing');
    expect(found(permission('dinoprost', 25, 'mg', 156, { validTo: '2026-05-10' }))[0]).toMatchObject({
      code: 'authorityExpired',
      params: { validTo: '2026-05-10' },
    });
    expect(found(permission('dinoprost', 25, 'mg', 156, { classes: ['cow'] }))[0]?.code).toBe('authorityWrongClass');
    expect(found(permission('dinoprost', 10, 'mg', 156))[0]?.code).toBe('authorityWrongActive');
  });

  it('add up when there are two', () => {
    const two = [...all(permission('dinoprost', 25, 'mg', 100)), permission('dinoprost', 25, 'mg', 56)];
    expect(authorityFindings(authorityCover(protocol, groups, visits, two, zone), two, zone)).toEqual([]);
  });
});
