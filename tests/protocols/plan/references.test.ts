import { describe, expect, it } from 'vitest';

import { library } from '@/protocols/library';
import { calendarFindings } from '@/protocols/plan/calendarFindings';
import { checkProtocol } from '@/protocols/plan/check';
import { expand } from '@/protocols/plan/expand';
import { findingParams } from '@/protocols/plan/findingParams';
import { toInstant } from '@/protocols/time/zoned';
import { findingCodes, type Finding, type FindingCode, type ProtocolBody } from '@/protocols/types';
import { days, hours, sevenDay, step } from '@/tests/support/bodies';

const melengestrol = { active: 'melengestrolAcetate', amount: 0.5, unit: 'mg', per: 'head', route: 'oral' } as const;
const two = [
  { id: 'y', label: 'y' },
  { id: 'n', label: 'n' },
];

/** One fault each, the code it gives and where it points. */
const faults: [FindingCode, string, (b: ProtocolBody) => unknown][] = [
  [
    'unknownStep',
    'deadlines.0.step',
    (b) => b.deadlines.push({ id: 'd', event: 'heatSeen', step: 'gone', mostHours: 24 }),
  ],
  ['unknownStep', 'factGaps.0.to', (b) => b.factGaps.push({ id: 'f', fact: 'calving', to: 'gone', leastDays: 50 })],
  ['unknownStep', 'lateChoices.gone', (b) => (b.lateChoices = { gone: 'Ask the vet' })],
  ['unknownOption', 'options.0.default', (b) => b.options.push({ id: 'o', label: 'o', values: two, default: 'maybe' })],
  [
    'unknownObservation',
    'observations.0.onUnknown',
    (b) => b.observations.push({ id: 'o', label: 'o', results: two, onUnknown: 'maybe' }),
  ],
  [
    'unknownObservation',
    'steps.2.observe',
    (b) => (b.steps[2] = step('deviceOut', 'deviceOut', 'out', { observe: 'gone' })),
  ],
  [
    'unknownOption',
    'gaps.1.when',
    (b) => (b.gaps[1] = hours('deviceOut', 'service', 52, 54, 56, { when: { not: { option: 'x', is: 'y' } } })),
  ],
  ['gapEmpty', 'factGaps.0', (b) => b.factGaps.push({ id: 'f', fact: 'calving', to: 'deviceIn' })],
  [
    'gapBounds',
    'factGaps.0',
    (b) => b.factGaps.push({ id: 'f', fact: 'birth', to: 'deviceIn', leastDays: 9, mostDays: 8 }),
  ],
  [
    'gapBounds',
    'deadlines.0',
    (b) => b.deadlines.push({ id: 'd', event: 'heatSeen', step: 'service', idealHours: 30, mostHours: 24 }),
  ],
  ['gapEmpty', 'deadlines.0', (b) => b.deadlines.push({ id: 'd', event: 'heatSeen', step: 'service' })],
  [
    'duplicateId',
    'deadlines.1.id',
    (b) =>
      b.deadlines.push(...[1, 2].map((n) => ({ id: 'd', event: 'heatSeen' as const, step: 'service', mostHours: n }))),
  ],
  [
    'gapReversed',
    'gaps.2.to',
    (b) => b.gaps.push({ id: 'x', from: 'deviceOut', to: 'pg', unit: 'elapsedHours', least: 0, ideal: 2, most: 5 }),
  ],
  ['gapReversed', 'gaps.2.to', (b) => b.gaps.push({ id: 'x', from: 'pg', to: 'pg', unit: 'elapsedHours', least: 0 })],
  ['badClock', 'gaps.0.clock', (b) => (b.gaps[0] = days('deviceIn', 'deviceOut', 7, 60, { clock: '7:00' }))],
  [
    'fromMemory',
    '',
    (b) => b.deadlines.push({ id: 'd', event: 'heatSeen', step: 'service', mostHours: 24, mark: 'memory' }),
  ],
  [
    'oestradiolLaw',
    '',
    (b) =>
      (b.steps[1] = step('gnrh1', 'other', 'in', {
        items: [{ active: 'oestradiolBenzoate', amount: 2, unit: 'mg', per: 'head', route: 'im' }],
      })),
  ],
];

describe('faults of a body', () => {
  it.each(faults)('%s at %s', (code, path, spoil) => {
    const spoilt = sevenDay();
    const before = checkProtocol(spoilt).findings.map((f) => f.code);
    spoil(spoilt);
    const found = checkProtocol(spoilt).findings.filter((f) => f.code === code);
    expect(before).not.toContain(code);
    expect(found.map((f) => f.path ?? '')).toContain(path);
  });

  it('leave a gap that allows the same moment within one visit alone', () => {
    const fine = sevenDay();
    fine.gaps.push({ id: 'same', from: 'deviceOut', to: 'pg', unit: 'elapsedHours', least: -1, most: 1 });
    expect(checkProtocol(fine).findings.filter((f) => f.severity === 'stop')).toEqual([]);
  });

  it('are none in any protocol of the library', () => {
    for (const { id, body } of library)
      expect([id, ...checkProtocol(body).findings.filter((f) => f.severity === 'stop')]).toEqual([id]);
  });
});

describe('melengestrol in feed', () => {
  it('is stopped for the adult classes that it would be fed to, not for a step that only heifers get', () => {
    const mixed = sevenDay(52, 54, 56, { classes: ['heifer', 'cow', 'firstCalver'] });
    mixed.steps.push(step('mga', 'progestagenFeed', 'in', { items: [melengestrol] }));
    const stopped = checkProtocol(mixed).findings.find((f) => f.code === 'progestagenFeedAdultCows');
    expect(stopped?.params.classes).toEqual(['cow', 'firstCalver']);
    mixed.steps = mixed.steps.map((s) => (s.id === 'mga' ? { ...s, when: { class: ['heifer' as const] } } : s));
    expect(checkProtocol(mixed).findings.map((f) => f.code)).not.toContain('progestagenFeedAdultCows');
  });
});

const zone = 'Australia/Sydney';
const planFrom = (local: string, body = sevenDay()) =>
  expand(body, { fix: { visit: 'in', at: toInstant(local, zone).at }, zone });

describe('the calendar of repeated and late work', () => {
  const calendar = { zone, weekendDays: [6, 7], holidays: [] };

  it('looks at every time through the yards: injections from Friday to Sunday', () => {
    const flush = sevenDay();
    flush.visits.push({ id: 'fsh', label: 'FSH', yarded: true });
    flush.steps.push(step('fsh', 'fsh', 'fsh', { repeat: { every: { days: 1 }, count: 3 } }));
    flush.gaps.push(days('deviceIn', 'fsh', 4));
    const found = calendarFindings(planFrom('2026-05-04T08:00', flush).visits, new Set(['fsh']), calendar);
    expect(found.map((f) => [f.code, new Date(Number(f.params.dueAt)).toISOString().slice(0, 10)])).toEqual([
      ['weekend', '2026-05-08'], // 08:00 on Saturday the 9th in Sydney
      ['weekend', '2026-05-09'],
    ]);
  });

  it('knows yards that work through midnight', () => {
    const night = { ...calendar, yardHours: { from: '20:00', to: '06:00' } };
    const codes = (local: string) =>
      calendarFindings(planFrom(local).visits, new Set(['in']), night).map((f) => f.code);
    expect(codes('2026-05-04T21:00')).toEqual([]);
    expect(codes('2026-05-04T05:30')).toEqual([]);
    expect(codes('2026-05-04T12:00')).toEqual(['outsideYardHours']);
  });

  it('names every holiday of a day, each once', () => {
    const holidays = ['King’s Birthday', 'Show Day', 'Show Day'].map((name) => ({ date: '2026-05-04', name }));
    const found = calendarFindings(planFrom('2026-05-04T08:00').visits, new Set(['in']), { ...calendar, holidays });
    expect(found.map((f) => f.params.name)).toEqual(['King’s Birthday, Show Day']);
  });
});

/** The table that the message catalogue is written from must be what the core really says. */
describe('the params of findings', () => {
  const collected: Finding[] = [
    ...library.flatMap(({ body }) => checkProtocol(body).findings),
    ...faults.flatMap(([, , spoil]) => {
      const spoilt = sevenDay();
      spoil(spoilt);
      return checkProtocol(spoilt).findings;
    }),
    ...['2026-09-27T02:30', '2026-09-29T07:00', '2026-03-29T02:30'].flatMap((local) => planFrom(local).findings),
    ...expand(sevenDay(), {
      fix: { visit: 'in', at: toInstant('2026-05-04T08:00', zone).at },
      adjust: { ai: toInstant('2026-05-20T08:00', zone).at },
      zone,
    }).findings,
    ...calendarFindings(planFrom('2026-05-02T03:00').visits, new Set(['in', 'out', 'ai']), {
      zone,
      weekendDays: [6, 7],
      holidays: [{ date: '2026-05-09', name: 'Holiday' }],
      yardHours: { from: '05:00', to: '20:00' },
      now: toInstant('2026-05-10T00:00', zone).at,
    }),
  ];

  it('cover at least twenty codes here', () => {
    expect(new Set(collected.map((f) => f.code)).size).toBeGreaterThanOrEqual(20);
  });

  it('are those of the table: all that it promises, nothing else', () => {
    for (const { code, params } of collected) {
      const keys = Object.keys(params);
      const promised = findingParams[code].filter((key) => !key.endsWith('?'));
      const allowed = findingParams[code].map((key) => key.replace('?', ''));
      expect([code, ...keys.filter((key) => !allowed.includes(key))]).toEqual([code]);
      expect([code, ...promised.filter((key) => !keys.includes(key))]).toEqual([code]);
    }
  });

  it('are in the table for every code', () => {
    expect(Object.keys(findingParams).sort()).toEqual([...findingCodes].sort());
  });
});
