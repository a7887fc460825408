import { describe, expect, it } from 'vitest';

import { dosesOf, requirements, totalsByActive } from '@/protocols/plan/doses';
import { eligibility, reasonsByAnimal, type Candidate } from '@/protocols/plan/eligibility';
import { expand } from '@/protocols/plan/expand';
import { toInstant } from '@/protocols/time/zoned';
import type { ProtocolBody } from '@/protocols/types';
import { sevenDay, step } from '@/tests/support/bodies';

const zone = 'Australia/Sydney';
const visitsOf = (body: ProtocolBody, local = '2026-05-04T08:00', options?: Record<string, string>) =>
  expand(body, { fix: { visit: 'in', at: toInstant(local, zone).at }, zone, ...(options ? { options } : {}) }).visits;

const animal = (tag: string, more: Partial<Candidate> = {}): Candidate => ({
  id: `id-${tag}`,
  tag,
  class: 'heifer',
  birth: null,
  lastCalving: null,
  lastService: null,
  knownEmpty: true,
  otherCohort: null,
  ...more,
});

describe('prostaglandin and animals not known empty', () => {
  const maybe = [animal('1', { knownEmpty: null })];
  const codes = (body: ProtocolBody, options?: Record<string, string>) =>
    eligibility(body, visitsOf(body, undefined, options), maybe, zone).map((f) => f.code);

  it('is asked of what is given, under whatever kind of step', () => {
    const other = sevenDay();
    other.steps = other.steps.map((s) => (s.kind === 'prostaglandin' ? { ...s, kind: 'other' as const } : s));
    expect(codes(other)).toEqual(['notKnownEmpty']);
  });

  it('is not asked where the chosen option, or the class, gets none', () => {
    const optional = sevenDay(52, 54, 56, {
      options: [
        {
          id: 'pg',
          label: 'Prostaglandin',
          values: [
            { id: 'yes', label: 'yes' },
            { id: 'no', label: 'no' },
          ],
          default: 'yes',
        },
      ],
    });
    optional.steps = optional.steps.map((s) => (s.id === 'pg' ? { ...s, when: { option: 'pg', is: 'yes' } } : s));
    expect(codes(optional)).toEqual(['notKnownEmpty']);
    expect(codes(optional, { pg: 'no' })).toEqual([]);
    const cowsOnly = sevenDay();
    cowsOnly.steps = cowsOnly.steps.map((s) => (s.id === 'pg' ? { ...s, when: { class: ['cow' as const] } } : s));
    expect(codes(cowsOnly)).toEqual([]);
  });
});

describe('facts of an animal', () => {
  const body = sevenDay(52, 54, 56, {
    classes: ['heifer', 'cow'],
    factGaps: [
      { id: 'age', fact: 'birth', to: 'service', leastDays: 400 },
      { id: 'served', fact: 'lastService', to: 'deviceIn', leastDays: 18, mostDays: 60 },
    ],
  });

  it('count to the named step by local date: 400 days old on 13 May 2026 is born on 8 April 2025', () => {
    const found = eligibility(
      body,
      visitsOf(body),
      [animal('old', { birth: '2025-04-08' }), animal('young', { birth: '2025-04-09' }), animal('unknown')],
      zone,
    );
    expect(found).toMatchObject([
      { code: 'tooYoung', severity: 'warn', steps: ['service'], params: { tags: ['young'], fewestDays: 399 } },
    ]);
  });

  it('have two ends: served too recently and too long ago, both figures said', () => {
    const found = eligibility(
      body,
      visitsOf(body),
      [
        animal('recent', { lastService: '2026-04-20' }),
        animal('right', { lastService: '2026-04-16' }),
        animal('long', { lastService: '2026-01-04' }),
      ],
      zone,
    );
    expect(found).toMatchObject([
      { params: { fact: 'lastService', tags: ['recent', 'long'], fewestDays: 14, greatestDays: 120 } },
    ]);
  });

  it('count the date of the property, not of Greenwich: at 08:00 in Sydney it is still the day before there', () => {
    const edge = animal('edge', { birth: '2025-03-30' });
    const onService = sevenDay(52, 54, 56, { factGaps: [{ id: 'a', fact: 'birth', to: 'deviceIn', leastDays: 400 }] });
    expect(eligibility(onService, visitsOf(onService), [edge], zone)).toEqual([]);
    expect(eligibility(onService, visitsOf(onService, '2026-05-03T23:00'), [edge], zone)).toHaveLength(1);
  });
});

describe('findings and reasons', () => {
  const body = sevenDay(52, 54, 56, {
    classes: ['heifer'],
    factGaps: [{ id: 'dim', fact: 'calving', to: 'deviceIn', leastDays: 50 }],
  });
  const mob = [
    ...Array.from({ length: 23 }, (_, i) => animal(`h${i}`, { knownEmpty: null })),
    animal('cow', { class: 'cow', lastCalving: '2026-04-04', otherCohort: 'Autumn' }),
    animal('cow2', { class: 'cow' }),
    animal('good'),
  ];

  it('name twenty tags and count the rest', () => {
    const [empty] = eligibility(body, visitsOf(body), mob, zone);
    expect(empty?.params.count).toBe(23);
    expect(empty?.params.tags).toHaveLength(20);
  });

  it('are the same, animal by animal', () => {
    const reasons = reasonsByAnimal(body, visitsOf(body), mob, zone);
    expect(reasons.get('id-cow')).toEqual([
      { code: 'wrongClass', severity: 'warn' },
      { code: 'inAnotherCohort', severity: 'stop' },
      { code: 'daysSinceCalving', severity: 'warn', days: 30 },
    ]);
    expect(reasons.get('id-cow2')?.map((r) => r.code)).toEqual(['wrongClass', 'calvingUnknown']);
    expect(reasons.has('id-good')).toBe(false);
    const counted = eligibility(body, visitsOf(body), mob, zone).reduce((n, f) => n + Number(f.params.count), 0);
    expect([...reasons.values()].flat()).toHaveLength(counted);
  });
});

describe('doses', () => {
  const fsh = step('fsh', 'fsh', 'in', {
    items: [{ active: 'fsh', amount: 40, unit: 'mg', per: 'head', route: 'im' }],
    repeat: { every: { minutes: 720 }, count: 4, amounts: [60, 60, 40] },
  });

  it('fall by the table of a repeated act; past its end the usual amount holds', () => {
    const amounts = [1, 2, 3, 4].map((n) => dosesOf(fsh, 'cow', 5, undefined, n).map((d) => [d.amount, d.total]));
    expect(amounts).toEqual([[[60, 300]], [[60, 300]], [[40, 200]], [[40, 200]]]);
  });

  it('are added up by amount, and over all classes by active', () => {
    const body = sevenDay(52, 54, 56, { steps: [...sevenDay().steps, fsh] });
    const needs = requirements(body, [
      { class: 'heifer', head: 10 },
      { class: 'cow', head: 2 },
    ]);
    const lines = needs.filter((n) => n.active === 'fsh').map((n) => [n.class, n.amount, n.doses, n.total]);
    expect(lines).toEqual([
      ['heifer', 60, 20, 1200],
      ['heifer', 40, 20, 800],
      ['cow', 60, 4, 240],
      ['cow', 40, 4, 160],
    ]);
    const totals = new Map(totalsByActive(needs).map((t) => [t.active, [t.doses, t.total]]));
    expect(totals.get('fsh')).toEqual([48, 2400]);
    expect(totals.get('gonadorelin')).toEqual([24, 2400]);
    expect(totals.get('dinoprost')).toEqual([12, 300]);
  });

  it('whose amount nobody has written have no total', () => {
    const body = sevenDay();
    body.steps.push(
      step('ecg', 'ecg', 'out', { items: [{ active: 'ecg', unit: 'iu', per: 'head', route: 'im' }] }),
      step('ecg2', 'ecg', 'ai', { items: [{ active: 'ecg', amount: 300, unit: 'iu', per: 'head', route: 'im' }] }),
    );
    const totals = totalsByActive(requirements(body, [{ class: 'heifer', head: 10 }]));
    expect(totals.find((t) => t.active === 'ecg')).toMatchObject({ doses: 20, total: null });
  });
});
