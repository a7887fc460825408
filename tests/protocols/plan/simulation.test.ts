import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { library } from '@/protocols/library';
import { checkProtocol } from '@/protocols/plan/check';
import { expand, type ExpandRequest } from '@/protocols/plan/expand';
import { elapsedBounds } from '@/protocols/plan/dated';
import { resolve } from '@/protocols/plan/resolve';
import { replan } from '@/protocols/plan/replan';
import type { Instant } from '@/protocols/types';

/**
 * The windows are a promise: whoever does each visit at any moment of its window, one after the other, keeps every
 * gap and never comes to a visit that has no moment left.
 */
const zone = fc.constantFrom('Australia/Sydney', 'Europe/Dublin', 'America/New_York', 'Australia/Lord_Howe');
const protocol = fc.constantFrom(...library.map((entry) => entry.body));
const minute = 60_000;

/** Starts at forenoon hours, where no zone changes its clocks. */
const start = fc.integer({ min: 0, max: 730 }).map((day) => Date.UTC(2026, 0, 1) + day * 1440 * minute);

describe('a program carried out at any moments of its windows', () => {
  it('keeps every gap of the protocol, whichever moments they are', () => {
    let judged = 0;
    fc.assert(
      fc.property(
        protocol,
        zone,
        start,
        fc.array(fc.nat(1000), { minLength: 40, maxLength: 40 }),
        (body, id, at, dice) => {
          const resolved = resolve(body);
          const first = resolved.visits[0];
          if (first === undefined) throw new Error('a protocol of the library has visits');
          const done: Record<string, Instant> = { [first]: at };
          let request: ExpandRequest = { fix: { visit: first, at }, zone: id, done };
          for (let k = 0; k < resolved.visits.length; k += 1) {
            const plan = expand(body, request);
            const next = plan.visits.find((v) => v.occurrence === 1 && done[v.visit] === undefined);
            if (!next) break;
            const { earliest, latest } = next.window;
            expect(latest).toBeGreaterThanOrEqual(earliest - 1);
            const chosen = earliest + Math.round(((latest - earliest) * (dice[k] ?? 0)) / 1000 / minute) * minute;
            done[next.visit] = Math.max(earliest, Math.min(latest, chosen));
            request = { fix: { visit: first, at }, zone: id, done: { ...done } };
          }
          for (const gap of resolved.gaps) {
            const [from, to] = [done[gap.from], done[gap.to]];
            if (from === undefined || to === undefined) throw new Error('every visit is done');
            const { least = -Infinity, most = Infinity } = elapsedBounds(from, gap, { zone: id });
            const elapsed = (to - from) / minute;
            expect(elapsed).toBeGreaterThanOrEqual(least - 0.01);
            expect(elapsed).toBeLessThanOrEqual(most + 0.01);
            judged += 1;
          }
        },
      ),
      { numRuns: 400, seed: 1991 },
    );
    expect(judged).toBeGreaterThan(1000);
  });

  it('is planned inside its own windows, from every visit of every protocol of the library', () => {
    fc.assert(
      fc.property(protocol, zone, start, fc.nat(), (body, id, at, pick) => {
        const { visits } = resolve(body);
        const plan = expand(body, { fix: { visit: visits[pick % visits.length] ?? '', at }, zone: id });
        expect(plan.findings.filter((f) => f.severity === 'stop')).toEqual([]);
        for (const v of plan.visits) {
          expect(v.window.earliest).toBeLessThanOrEqual(v.at + 1);
          expect(v.window.latest).toBeGreaterThanOrEqual(v.at - 1);
        }
      }),
      { numRuns: 600, seed: 41 },
    );
  });

  it('moved inside a window stops nothing; moved far beyond the window of a bounded visit stops', () => {
    let stopped = 0;
    fc.assert(
      fc.property(protocol, start, fc.nat(), fc.integer({ min: 0, max: 1000 }), (body, at, pick, share) => {
        const { visits } = resolve(body);
        const plan = expand(body, { fix: { visit: visits[0] ?? '', at }, zone: 'Europe/Dublin' });
        const planned = Object.fromEntries(plan.visits.filter((v) => v.occurrence === 1).map((v) => [v.visit, v.at]));
        // the last visit has nothing after it that would be moved out of its own window
        const last = plan.visits.filter((v) => v.occurrence === 1).at(-1);
        if (!last || last.visit === plan.visits[0]?.visit) return;
        const { earliest, latest } = last.window;
        const to = earliest + Math.round(((latest - earliest) * share) / 1000);
        const request = { zone: 'Europe/Dublin', planned, done: {}, move: { visit: last.visit, to } };
        expect(replan(body, request).findings.filter((f) => f.severity === 'stop')).toEqual([]);
        const bound = resolve(body).gaps.some((gap) => gap.to === last.visit && gap.gap.most !== undefined);
        if (!bound) return;
        const far = { ...request, move: { visit: last.visit, to: latest + (1 + (pick % 90)) * 1440 * minute } };
        expect(replan(body, far).findings.map((f) => f.code)).toContain('windowMissed');
        stopped += 1;
      }),
      { numRuns: 300, seed: 43 },
    );
    expect(stopped).toBeGreaterThan(50);
  });
});

describe('speed', () => {
  it('plans a seven-day program in well under a millisecond, at the median of 400', () => {
    const body = library.find((entry) => checkProtocol(entry.body).lengthDays <= 11)?.body ?? library[0]?.body;
    if (!body) throw new Error('the library is empty');
    const visit = resolve(body).visits[0] ?? '';
    const times = Array.from({ length: 400 }, (_, i) => {
      const began = performance.now();
      expand(body, { fix: { visit, at: Date.UTC(2026, 8, 1) + i * 1440 * minute }, zone: 'Australia/Sydney' });
      return performance.now() - began;
    }).sort((a, b) => a - b);
    expect(times[200]).toBeLessThan(1);
  });
});
