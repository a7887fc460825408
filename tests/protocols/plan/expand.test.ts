import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { checkProtocol } from '@/protocols/plan/check';
import { expand } from '@/protocols/plan/expand';
import { toInstant, toLocal } from '@/protocols/time/zoned';
import type { Plan, ProtocolBody } from '@/protocols/types';
import { body, days, hours, sevenDay, step } from '@/tests/support/bodies';

const sydney = 'Australia/Sydney';
const at = (local: string, zone = sydney) => toInstant(local, zone).at;
const visit = (plan: Plan, id: string) => {
  const found = plan.visits.find((v) => v.visit === id);
  if (!found) throw new Error(`no visit ${id}`);
  return found;
};
const local = (plan: Plan, id: string, zone = sydney) => toLocal(visit(plan, id).at, zone);
const fixed = (b: ProtocolBody, id: string, when: string, zone = sydney) =>
  expand(b, { fix: { visit: id, at: at(when, zone) }, zone });

describe('expanding from the start', () => {
  it('keeps day gaps at the clock hour and counts hour gaps as elapsed hours', () => {
    const plan = fixed(sevenDay(), 'in', '2026-05-04T08:00');
    expect(local(plan, 'out')).toBe('2026-05-11T08:00');
    expect(local(plan, 'ai')).toBe('2026-05-13T14:00');
    expect(visit(plan, 'ai').sinceAnchorMinutes).toBe(54 * 60);
  });

  it('gives each visit the window that its gaps leave after the earlier ones', () => {
    const { window } = visit(fixed(sevenDay(), 'in', '2026-05-04T08:00'), 'ai');
    expect([toLocal(window.earliest, sydney), toLocal(window.latest, sydney)]).toEqual([
      '2026-05-13T12:00',
      '2026-05-13T16:00',
    ]);
  });

  it('gives the first visit the window in which the rest still holds as planned', () => {
    const { window } = visit(fixed(sevenDay(), 'in', '2026-05-04T08:00'), 'in');
    expect([toLocal(window.earliest, sydney), toLocal(window.latest, sydney)]).toEqual([
      '2026-05-04T07:00',
      '2026-05-04T09:00',
    ]);
  });

  it('tightens a window by a gap that spans more than one visit', () => {
    const spanned = sevenDay(48, 54, 72);
    spanned.gaps.push(hours('deviceIn', 'service', 0, 222, 224));
    const { window } = visit(fixed(spanned, 'in', '2026-05-04T08:00'), 'ai');
    expect(toLocal(window.latest, sydney)).toBe('2026-05-13T16:00');
  });
});

describe('two visits planned at the same moment', () => {
  const together = () => {
    const protocol = sevenDay();
    protocol.visits.push({ id: 'calves', label: 'Calves off', yarded: false });
    protocol.steps.push(step('calvesOff', 'calvesOff', 'calves', { level: 'group' }));
    protocol.gaps.push(hours('deviceOut', 'calvesOff', 0, 0, 6));
    return protocol;
  };

  it('do not pin each other: what comes before both decides, and the gap between them', () => {
    const plan = fixed(together(), 'in', '2026-05-04T08:00');
    const shown = (id: string) => {
      const { window } = visit(plan, id);
      return [toLocal(window.earliest, sydney), toLocal(window.latest, sydney)];
    };
    expect(shown('out')).toEqual(['2026-05-11T07:00', '2026-05-11T09:00']);
    expect(shown('calves')).toEqual(['2026-05-11T07:00', '2026-05-11T15:00']);
  });

  it('nor without dates', () => {
    const calves = checkProtocol(together()).scenarios[0]?.visits.find((v) => v.visit === 'calves');
    expect(calves).toMatchObject({
      earliestMinutes: 7 * 1440 - 60,
      idealMinutes: 7 * 1440,
      latestMinutes: 7 * 1440 + 7 * 60,
    });
  });
});

describe('a day gap with a clock time of its own', () => {
  const seven = (n: number, clock: string) =>
    sevenDay(52, 54, 56, {
      gaps: [days('deviceIn', 'deviceOut', n, 60, { clock }), hours('deviceOut', 'service', 52, 54, 56)],
    });

  it('sets the clock of its end, on the same day too', () => {
    expect(local(fixed(seven(7, '06:30'), 'in', '2026-05-04T08:00'), 'out')).toBe('2026-05-11T06:30');
    expect(local(fixed(seven(0, '16:00'), 'in', '2026-05-04T08:00'), 'out')).toBe('2026-05-04T16:00');
  });

  it('never sets that of its start: backwards the start has the clock time of the end', () => {
    expect(local(fixed(seven(7, '06:30'), 'out', '2026-05-11T06:30'), 'in')).toBe('2026-05-04T06:30');
  });

  it('may point back in time: a gap of minus two days ends before it starts', () => {
    expect(local(fixed(seven(-2, '06:30'), 'in', '2026-05-04T08:00'), 'out')).toBe('2026-05-02T06:30');
    expect(local(fixed(seven(-2, '06:30'), 'out', '2026-05-02T06:30'), 'in')).toBe('2026-05-04T06:30');
  });

  it('is missed by an end at another time of day', () => {
    const plan = fixed(seven(7, '06:30'), 'out', '2026-05-11T08:00');
    const found = plan.findings.filter((f) => f.code === 'windowMissed');
    expect(found[0]).toMatchObject({ params: { gap: 'deviceIn-deviceOut', overMinutes: 30 } });
  });
});

describe('a clock change inside a program', () => {
  const plan = fixed(sevenDay(), 'in', '2026-09-29T07:00');

  it('leaves the devices at seven on the clock although only 6 days 23 hours have gone by', () => {
    expect(local(plan, 'out')).toBe('2026-10-06T07:00');
    expect(visit(plan, 'out').sinceStartMinutes).toBe(167 * 60);
    expect(visit(plan, 'out').window.earliest).toBe(at('2026-10-06T06:00'));
  });

  it('is said once, with both figures', () => {
    const said = plan.findings.filter((f) => f.code === 'clockChange');
    expect(said).toHaveLength(1);
    expect(said[0]).toMatchObject({
      severity: 'note',
      params: {
        changeAt: Date.UTC(2026, 9, 3, 16),
        shiftMinutes: 60,
        elapsedMinutes: 167 * 60,
        nominalMinutes: 168 * 60,
      },
    });
  });

  it('moves the clock time of an hour gap, not its hours', () => {
    const across = fixed(sevenDay(), 'out', '2026-10-03T07:00');
    expect(local(across, 'ai')).toBe('2026-10-05T14:00');
    expect(visit(across, 'ai').sinceAnchorMinutes).toBe(54 * 60);
  });

  it('makes a week 169 hours in autumn (Dublin, 25 October 2026)', () => {
    const dublin = fixed(sevenDay(), 'in', '2026-10-20T07:00', 'Europe/Dublin');
    expect(visit(dublin, 'out').sinceStartMinutes).toBe(169 * 60);
  });

  it('says when a planned clock time exists twice', () => {
    const twice = fixed(sevenDay(), 'out', '2026-10-25T01:30', 'Europe/Dublin');
    expect(twice.findings.filter((f) => f.code === 'clockTimeTwice').map((f) => f.visits)).toEqual([['out']]);
  });

  it('is not mentioned where there is none', () => {
    expect(fixed(sevenDay(), 'in', '2026-09-29T07:00', 'America/Sao_Paulo').findings).toEqual([]);
  });
});

describe('forwards and backwards', () => {
  const zones = [
    'Australia/Sydney',
    'Europe/Dublin',
    'America/New_York',
    'America/Sao_Paulo',
    'Australia/Lord_Howe',
    'Pacific/Auckland',
  ];
  const protocol = fc
    .record({
      steps: fc.array(
        fc.record({
          days: fc.boolean(),
          n: fc.integer({ min: 1, max: 20 }),
          width: fc.integer({ min: 0, max: 6 }),
          from: fc.nat(),
        }),
        { minLength: 1, maxLength: 7 },
      ),
    })
    .map(({ steps }) => {
      const ids = Array.from({ length: steps.length + 1 }, (_, i) => `s${i}`);
      return body({
        visits: ids.map((id) => ({ id: `v${id}`, label: id, yarded: true })),
        steps: ids.map((id) => step(id, 'other', `v${id}`)),
        gaps: steps.map((s, i) => {
          const from = `s${s.from % (i + 1)}`;
          return s.days
            ? days(from, `s${i + 1}`, s.n, s.width * 30)
            : hours(from, `s${i + 1}`, s.n, s.n + s.width / 2, s.n + s.width);
        }),
        timingAnchor: 's0',
        serviceStep: ids.at(-1) ?? 's0',
      });
    });
  // hours at which no zone changes its clocks: a skipped time has no way back, and is said instead
  const start = fc.record({ day: fc.integer({ min: 0, max: 1100 }), hour: fc.integer({ min: 5, max: 21 }) });
  const startOf = (s: { day: number; hour: number }, zone: string) => {
    const date = new Date(Date.UTC(2025, 0, 1) + s.day * 86_400_000).toISOString().slice(0, 10);
    return toInstant(`${date}T${String(s.hour).padStart(2, '0')}:00`, zone).at;
  };
  const unambiguous = (plan: Plan, zone: string) =>
    plan.visits.every((v) => {
      const clock = toLocal(v.at, zone).slice(11, 13);
      return clock >= '04' && clock <= '22';
    });

  it('are each other’s inverse, from whichever visit is fixed', () => {
    fc.assert(
      fc.property(protocol, start, fc.constantFrom(...zones), fc.nat(), (b, s, zone, pick) => {
        const first = b.visits[0]?.id ?? '';
        const there = expand(b, { fix: { visit: first, at: startOf(s, zone) }, zone });
        fc.pre(unambiguous(there, zone));
        const other = there.visits[pick % there.visits.length];
        if (!other) return;
        const back = expand(b, { fix: { visit: other.visit, at: other.at }, zone });
        expect(new Map(back.visits.map((v) => [v.visit, v.at]))).toEqual(
          new Map(there.visits.map((v) => [v.visit, v.at])),
        );
      }),
      { numRuns: 3000, seed: 7 },
    );
  });

  it('always put the planned moment inside its window', () => {
    fc.assert(
      fc.property(protocol, start, fc.constantFrom(...zones), (b, s, zone) => {
        const plan = expand(b, { fix: { visit: b.visits[0]?.id ?? '', at: startOf(s, zone) }, zone });
        for (const v of plan.visits) {
          expect(v.window.earliest).toBeLessThanOrEqual(v.at + 1);
          expect(v.window.latest).toBeGreaterThanOrEqual(v.at - 1);
        }
      }),
      { numRuns: 2000, seed: 11 },
    );
  });

  it('plan from the service morning: AI Thursday 14:00 means devices in Tuesday week before at eight', () => {
    const plan = fixed(sevenDay(), 'ai', '2026-05-13T14:00');
    expect([local(plan, 'in'), local(plan, 'out')]).toEqual(['2026-05-04T08:00', '2026-05-11T08:00']);
  });
});

describe('what is done', () => {
  it('moves the window of what follows: devices out at 10:20, not at eight', () => {
    const late = at('2026-05-11T10:20');
    const plan = expand(sevenDay(), {
      fix: { visit: 'in', at: at('2026-05-04T08:00') },
      zone: sydney,
      done: { out: late },
    });
    expect(visit(plan, 'ai').window).toEqual({ earliest: late + 52 * 3_600_000, latest: late + 56 * 3_600_000 });
  });

  it('as an interval leaves only what holds for all of it: a device lost some time between two and five', () => {
    const out = { earliest: at('2026-05-11T02:00'), latest: at('2026-05-11T05:00') };
    const done = { in: at('2026-05-04T04:00'), out };
    const plan = expand(sevenDay(), { fix: { visit: 'in', at: at('2026-05-04T04:00') }, zone: sydney, done });
    // 52 h after five to 56 h after two; planned 54 h after the middle of the interval
    const { window } = visit(plan, 'ai');
    expect([toLocal(window.earliest, sydney), toLocal(window.latest, sydney)]).toEqual([
      '2026-05-13T09:00',
      '2026-05-13T10:00',
    ]);
    expect(local(plan, 'ai')).toBe('2026-05-13T09:30');
    expect(plan.findings.filter((f) => f.severity === 'stop')).toEqual([]);
  });

  it('as an interval too wide for any moment leaves no window, and says by how much at the worst', () => {
    const done = { out: { earliest: at('2026-05-11T00:00'), latest: at('2026-05-11T08:00') } };
    const plan = expand(sevenDay(), { fix: { visit: 'in', at: at('2026-05-04T04:00') }, zone: sydney, done });
    const missed = plan.findings.filter((f) => f.code === 'windowMissed' && f.visits?.includes('ai'));
    // planned 54 h after 04:00: 58 h if it was lost at midnight, 2 h more than the most
    expect(missed).toMatchObject([{ severity: 'stop', params: { elapsedMinutes: 58 * 60, overMinutes: 120 } }]);
  });
});

describe('a gap that was broken', () => {
  it('is told once, of its later end, as a fact and not as a stop', () => {
    const done = { in: at('2026-05-04T08:00'), out: at('2026-05-11T12:00') };
    const plan = expand(sevenDay(), { fix: { visit: 'in', at: done.in }, zone: sydney, done });
    expect(plan.findings).toMatchObject([
      { code: 'windowMissed', severity: 'warn', visits: ['out'], params: { overMinutes: 180 } },
    ]);
    expect(visit(plan, 'ai').window.earliest).toBe(done.out + 52 * 3_600_000);
  });
});

describe('repeats and options', () => {
  it('expand a feeding of 14 days into 14 mornings, 13 days apart from first to last', () => {
    const fed = body({
      visits: [
        { id: 'feed', label: 'Feed', yarded: false },
        { id: 'pg', label: 'Prostaglandin', yarded: true },
      ],
      steps: [
        step('feed', 'progestagenFeed', 'feed', { level: 'group', repeat: { every: { days: 1 }, count: 14 } }),
        step('pg', 'prostaglandin', 'pg'),
      ],
      gaps: [days('feed', 'pg', 32)],
      timingAnchor: 'pg',
      serviceStep: 'pg',
    });
    const plan = fixed(fed, 'feed', '2026-05-04T08:00');
    const feedings = plan.visits.filter((v) => v.visit === 'feed');
    expect(feedings.map((v) => v.occurrence)).toEqual(Array.from({ length: 14 }, (_, i) => i + 1));
    expect(toLocal(feedings.at(-1)?.at ?? 0, sydney)).toBe('2026-05-17T08:00');
    expect(local(plan, 'pg')).toBe('2026-06-05T08:00');
  });

  it('of two rates in one visit make one list of moments, each with its own steps', () => {
    const flush = body({
      visits: [{ id: 'v', label: 'Flush', yarded: true }],
      steps: [
        step('fsh', 'fsh', 'v', { repeat: { every: { minutes: 720 }, count: 4 } }),
        step('scan', 'ovarianScan', 'v', { repeat: { every: { days: 1 }, count: 2 } }),
        step('in', 'deviceIn', 'v'),
      ],
      timingAnchor: 'fsh',
      serviceStep: 'fsh',
    });
    const plan = fixed(flush, 'v', '2026-05-04T06:00');
    expect(plan.visits.map((v) => [v.occurrence, toLocal(v.at, sydney).slice(8), v.steps])).toEqual([
      [1, '04T06:00', ['fsh', 'scan', 'in']],
      [2, '04T18:00', ['fsh']],
      [3, '05T06:00', ['fsh', 'scan']],
      [4, '05T18:00', ['fsh']],
    ]);
  });

  it('that make no sense still give the first occurrence, and never a list without end', () => {
    const count = (n: number) =>
      fixed(
        body({
          visits: [{ id: 'v', label: 'V', yarded: true }],
          steps: [step('s', 'fsh', 'v', { repeat: { every: { days: 1 }, count: n } })],
        }),
        'v',
        '2026-05-04T06:00',
      ).visits.length;
    expect([count(0), count(-3), count(Number.NaN), count(1e12)]).toEqual([1, 1, 1, 366]);
  });

  it('take the chosen option, and the default when none is chosen', () => {
    const choice = sevenDay();
    choice.options = [
      {
        id: 'second',
        label: 'Second prostaglandin',
        values: [
          { id: 'h8', label: '8 h' },
          { id: 'h24', label: '24 h' },
        ],
        default: 'h8',
      },
    ];
    choice.visits.push({ id: 'pg2', label: 'Second', yarded: true });
    choice.steps.push(step('pg2', 'prostaglandin', 'pg2'));
    choice.gaps.push(
      { ...hours('pg', 'pg2', 6, 8, 10), id: 'a', when: { option: 'second', is: 'h8' } },
      { ...hours('pg', 'pg2', 22, 24, 26), id: 'b', when: { option: 'second', is: 'h24' } },
    );
    const request = { fix: { visit: 'in', at: at('2026-05-04T08:00') }, zone: sydney };
    expect(local(expand(choice, request), 'pg2')).toBe('2026-05-11T16:00');
    expect(local(expand(choice, { ...request, options: { second: 'h24' } }), 'pg2')).toBe('2026-05-12T08:00');
  });

  it('leave a visit without any gap out of the plan, and stop it', () => {
    const loose = sevenDay();
    loose.gaps.pop();
    const plan = fixed(loose, 'in', '2026-05-04T08:00');
    expect(plan.visits.map((v) => v.visit)).toEqual(['in', 'out']);
    expect(plan.findings).toMatchObject([{ code: 'unreachable', severity: 'stop', visits: ['ai'] }]);
  });

  it('answer a clock time that is none with a finding, not with an exception', () => {
    const bad = sevenDay();
    bad.gaps[0] = days('deviceIn', 'deviceOut', 7, 60, { clock: '7am' });
    expect(fixed(bad, 'in', '2026-05-04T08:00')).toMatchObject({ visits: [], findings: [{ code: 'badClock' }] });
  });

  it('answer an unknown visit with a finding, not with an exception', () => {
    const plan = fixed(sevenDay(), 'nowhere', '2026-05-04T08:00');
    expect(plan.visits).toEqual([]);
    expect(plan.findings[0]).toMatchObject({ code: 'unknownVisit', severity: 'stop' });
  });
});
