import { describe, expect, it } from 'vitest';

import { expand } from '@/protocols/plan/expand';
import { replan } from '@/protocols/plan/replan';
import { toInstant, toLocal } from '@/protocols/time/zoned';
import { sevenDay } from '@/tests/support/bodies';

const zone = 'Australia/Sydney';
const at = (local: string) => toInstant(local, zone).at;
const start = expand(sevenDay(), { fix: { visit: 'in', at: at('2026-05-04T08:00') }, zone });
const planned = Object.fromEntries(start.visits.map((v) => [v.visit, v.at]));
const local = (moved: { visit: string; to: number }[]) => moved.map(({ visit, to }) => [visit, toLocal(to, zone)]);

describe('moving a visit', () => {
  it('takes along what hangs on it, at its ideal gap', () => {
    const { moved, findings } = replan(sevenDay(), {
      zone,
      planned,
      done: { in: planned.in ?? 0 },
      move: { visit: 'out', to: at('2026-05-11T08:45') },
    });
    expect(local(moved)).toEqual([
      ['out', '2026-05-11T08:45'],
      ['ai', '2026-05-13T14:45'],
    ]);
    expect(findings).toEqual([]);
  });

  it('leaves what came before where it is', () => {
    const { moved } = replan(sevenDay(), { zone, planned, move: { visit: 'ai', to: at('2026-05-13T15:00') } });
    expect(local(moved)).toEqual([['ai', '2026-05-13T15:00']]);
  });

  it('stops when a gap no longer holds, and says by how much', () => {
    const { findings } = replan(sevenDay(), {
      zone,
      planned,
      done: { in: planned.in ?? 0, out: planned.out ?? 0 },
      move: { visit: 'ai', to: at('2026-05-13T18:30') },
    });
    expect(findings).toHaveLength(1);
    expect(findings[0]).toMatchObject({
      code: 'windowMissed',
      severity: 'stop',
      params: { gap: 'deviceOut-service', elapsedMinutes: 58 * 60 + 30, overMinutes: 150, mostMinutes: 56 * 60 },
    });
  });

  it('counts from when a visit was really done, not from when it was planned', () => {
    const done = { in: planned.in ?? 0, out: at('2026-05-11T11:00') };
    const { plan, findings } = replan(sevenDay(), {
      zone,
      planned,
      done,
      move: { visit: 'ai', to: at('2026-05-13T17:00') },
    });
    expect(plan.visits.find((v) => v.visit === 'ai')?.window.latest).toBe(at('2026-05-13T19:00'));
    expect(findings.filter((f) => f.severity === 'stop')).toEqual([]);
  });

  it('takes the whole program along when the first visit moves by a day', () => {
    const { moved, findings } = replan(sevenDay(), {
      zone,
      planned,
      move: { visit: 'in', to: at('2026-05-05T08:00') },
    });
    expect(local(moved)).toEqual([
      ['in', '2026-05-05T08:00'],
      ['out', '2026-05-12T08:00'],
      ['ai', '2026-05-14T14:00'],
    ]);
    expect(findings).toEqual([]);
  });

  it('of a plan that lacks it, or of a protocol that does, moves nothing and says so', () => {
    const to = at('2026-05-11T09:00');
    for (const request of [
      { zone, planned, move: { visit: 'nowhere', to } },
      { zone, planned: {}, move: { visit: 'out', to } },
    ]) {
      const { moved, plan, findings } = replan(sevenDay(), request);
      expect([moved, plan.visits]).toEqual([[], []]);
      expect(findings).toMatchObject([{ code: 'unknownVisit', severity: 'stop' }]);
    }
  });

  it('over a clock change keeps the clock hour of what follows by days', () => {
    const spring = expand(sevenDay(), { fix: { visit: 'in', at: at('2026-09-28T07:00') }, zone });
    const before = Object.fromEntries(spring.visits.map((v) => [v.visit, v.at]));
    const { moved } = replan(sevenDay(), { zone, planned: before, move: { visit: 'in', to: at('2026-09-30T07:30') } });
    expect(local(moved)).toEqual([
      ['in', '2026-09-30T07:30'],
      ['out', '2026-10-07T07:30'],
      ['ai', '2026-10-09T13:30'],
    ]);
  });

  it('does not reach through what is done: service stays where it was agreed, although the start moves', () => {
    const agreed = { ...planned, ai: at('2026-05-13T15:30') };
    const { moved } = replan(sevenDay(), {
      zone,
      planned: agreed,
      done: { out: planned.out ?? 0 },
      move: { visit: 'in', to: at('2026-05-04T08:30') },
    });
    expect(local(moved)).toEqual([['in', '2026-05-04T08:30']]);
  });
});
