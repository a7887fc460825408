import fc from 'fast-check';
import loadHighs from 'highs';
import { beforeAll, describe, expect, it } from 'vitest';

import type { Bound } from '@/protocols/network/network';
import { between, epsilon, solve } from '@/protocols/network/solve';

/** Random networks against HiGHS, a linear-programming solver that nobody here wrote. */
let highs: Awaited<ReturnType<typeof loadHighs>>;
beforeAll(async () => {
  highs = await loadHighs();
});

const network = fc.integer({ min: 2, max: 6 }).chain((n) =>
  fc.record({
    points: fc.constant(Array.from({ length: n }, (_, i) => `p${i}`)),
    bounds: fc.array(
      fc
        .record({
          from: fc.integer({ min: 0, max: n - 1 }),
          to: fc.integer({ min: 0, max: n - 1 }),
          least: fc.integer({ min: -60, max: 60 }),
          width: fc.integer({ min: 0, max: 50 }),
          sides: fc.constantFrom('both', 'least', 'most'),
        })
        .filter(({ from, to }) => from !== to),
      { minLength: 1, maxLength: 9 },
    ),
  }),
);

const toBounds = (list: { from: number; to: number; least: number; width: number; sides: string }[]): Bound[] =>
  list.map(({ from, to, least, width, sides }, i) => ({
    id: `b${i}`,
    from: `p${from}`,
    to: `p${to}`,
    ...(sides === 'most' ? {} : { least }),
    ...(sides === 'least' ? {} : { most: least + width }),
  }));

/** The bounds as a linear program in the solver's text form, with p0 fixed at 0. */
function program(points: string[], bounds: Bound[], aim: string, goal: 'Maximize' | 'Minimize'): string {
  const rows = bounds.flatMap((b, i) => [
    ...(b.most === undefined ? [] : [` u${i}: ${b.to} - ${b.from} <= ${b.most}`]),
    ...(b.least === undefined ? [] : [` l${i}: ${b.to} - ${b.from} >= ${b.least}`]),
  ]);
  const free = points.map((p) => ` ${p} free`);
  return `${goal}\n obj: ${aim}\nSubject To\n${rows.join('\n')}\n zero: p0 = 0\nBounds\n${free.join('\n')}\nEnd\n`;
}

describe('the minimal network and the linear-programming solver', () => {
  it('agree on whether it is possible and on the tightest window of every point', () => {
    fc.assert(
      fc.property(network, ({ points, bounds: raw }) => {
        const bounds = toBounds(raw);
        const solution = solve({ points, bounds });
        for (const point of points.slice(1)) {
          for (const goal of ['Maximize', 'Minimize'] as const) {
            const answer = highs.solve(program(points, bounds, point, goal));
            if (!solution.consistent) {
              expect(answer.Status).toMatch(/Infeasible/i);
              continue;
            }
            const window = between(solution, 'p0', point);
            const side = goal === 'Maximize' ? window?.most : window?.least;
            if (Number.isFinite(side)) {
              expect(answer.Status).toBe('Optimal');
              expect(answer.ObjectiveValue).toBeCloseTo(side ?? NaN, 6);
            } else expect(answer.Status).toMatch(/Unbounded/i);
          }
        }
      }),
      { numRuns: 300, seed: 1991 },
    );
  });

  it('never widens a window when a bound is added, and its contradictions are real', () => {
    fc.assert(
      fc.property(network, ({ points, bounds: raw }) => {
        const bounds = toBounds(raw);
        const [before, after] = [solve({ points, bounds: bounds.slice(0, -1) }), solve({ points, bounds })];
        if (!after.consistent) {
          const sum = after.cycle.reduce(
            (s, { bound, side }) => s + (side === 'most' ? (bound.most ?? NaN) : -(bound.least ?? NaN)),
            0,
          );
          expect(after.cycle.length).toBeGreaterThan(0);
          expect(sum).toBeLessThan(-epsilon);
          return;
        }
        if (!before.consistent) throw new Error('a bound more cannot mend a contradiction');
        for (const i of points)
          for (const j of points) {
            const [wide, tight] = [between(before, i, j), between(after, i, j)];
            expect(tight?.most ?? NaN).toBeLessThanOrEqual((wide?.most ?? NaN) + epsilon);
            expect(tight?.least ?? NaN).toBeGreaterThanOrEqual((wide?.least ?? NaN) - epsilon);
          }
      }),
      { numRuns: 2000, seed: 61 },
    );
  });
});
