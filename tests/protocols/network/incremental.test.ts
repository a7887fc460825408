import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { addBound, createNetwork, type Bound } from '@/protocols/network/network';
import { between, epsilon, solve } from '@/protocols/network/solve';
import { tighten } from '@/protocols/network/tighten';
import { windows, type Fact } from '@/protocols/network/windows';

const network = fc.integer({ min: 2, max: 7 }).chain((n) =>
  fc.record({
    points: fc.constant(Array.from({ length: n }, (_, i) => `p${i}`)),
    bounds: fc
      .array(
        fc
          .record({
            from: fc.integer({ min: 0, max: n - 1 }),
            to: fc.integer({ min: 0, max: n - 1 }),
            least: fc.integer({ min: -60, max: 60 }),
            width: fc.integer({ min: 0, max: 60 }),
            sides: fc.constantFrom('both', 'least', 'most'),
          })
          .filter(({ from, to }) => from !== to),
        { minLength: 1, maxLength: 10 },
      )
      .map((list) =>
        list.map(({ from, to, least, width, sides }, i): Bound => ({
          id: `b${i}`,
          from: `p${from}`,
          to: `p${to}`,
          ...(sides === 'most' ? {} : { least }),
          ...(sides === 'least' ? {} : { most: least + width }),
        })),
      ),
  }),
);

describe('building a network', () => {
  it('keeps each point once and takes bounds one by one, the first network unchanged', () => {
    const empty = createNetwork(['a', 'b', 'a']);
    const one = addBound(empty, { id: 'x', from: 'a', to: 'b', least: 1, most: 2 });
    expect(empty).toEqual({ points: ['a', 'b'], bounds: [] });
    expect(one.bounds.map((bound) => bound.id)).toEqual(['x']);
    const solution = solve(one);
    expect(solution.consistent && between(solution, 'a', 'b')).toEqual({ least: 1, most: 2 });
    expect(solution.consistent && between(solution, 'a', 'c')).toBeNull();
  });

  it('refuses a bound on a point that is not in it', () => {
    expect(() => addBound(createNetwork(['a']), { id: 'x', from: 'a', to: 'z', most: 1 })).toThrow(RangeError);
  });
});

describe('one bound more', () => {
  it('gives the network that solving anew gives, and null when that has a contradiction', () => {
    let contradictions = 0;
    fc.assert(
      fc.property(network, ({ points, bounds }) => {
        const last = bounds.at(-1);
        const before = solve({ points, bounds: bounds.slice(0, -1) });
        if (!before.consistent || !last) return;
        const anew = solve({ points, bounds });
        const added = tighten(before, last);
        if (!anew.consistent) {
          contradictions += 1;
          expect(added).toBeNull();
        } else expect(added?.distance).toEqual(anew.distance);
      }),
      { numRuns: 3000, seed: 17 },
    );
    expect(contradictions).toBeGreaterThan(50);
  });

  it('on an unknown point changes nothing', () => {
    const solution = solve(createNetwork(['a', 'b']));
    if (!solution.consistent) throw new Error('an empty network holds');
    expect(tighten(solution, { id: 'x', from: 'a', to: 'z', most: 1 })).toBe(solution);
  });
});

/** Whether all bounds hold with these points pinned: by solving with an origin, which `windows` does not do. */
function holds(points: string[], bounds: Bound[], pinned: [string, number][]): boolean {
  const pins = pinned.map(([to, at], i): Bound => ({ id: `pin${i}`, from: 'zero', to, least: at, most: at }));
  return solve({ points: [...points, 'zero'], bounds: [...bounds, ...pins] }).consistent;
}

describe('windows given facts', () => {
  const facts = fc.array(fc.record({ at: fc.integer({ min: -80, max: 80 }), width: fc.integer({ min: 0, max: 30 }) }), {
    minLength: 1,
    maxLength: 3,
  });

  it('are exactly the moments that hold with the facts, as solving with each moment pinned shows', () => {
    let open = 0;
    fc.assert(
      fc.property(network, facts, ({ points, bounds }, list) => {
        const known = list.slice(0, points.length - 1).map(({ at }, i): [string, number] => [`p${i}`, at]);
        const past = new Set(known.map(([point]) => point));
        const free = bounds.filter((bound) => !(past.has(bound.from) && past.has(bound.to)));
        const all = windows({ points, bounds }, new Map(known));
        expect([...all.keys()]).toEqual(points.filter((point) => !past.has(point)));
        const possible = holds(points, free, known);
        for (const [point, window] of all) {
          if (!possible) continue;
          expect(window).not.toBeNull();
          if (!window) continue;
          for (const [edge, out] of [
            [window.earliest, -0.5],
            [window.latest, 0.5],
          ] as const) {
            if (!Number.isFinite(edge)) continue;
            open += 1;
            expect(holds(points, free, [...known, [point, edge]])).toBe(true);
            expect(holds(points, free, [...known, [point, edge + out]])).toBe(false);
          }
        }
      }),
      { numRuns: 1500, seed: 23 },
    );
    expect(open).toBeGreaterThan(500);
  });

  it('of an interval hold for every moment of it: a point later by 10 to 20 of one between 0 and 6', () => {
    const simple = { points: ['a', 'b'], bounds: [{ id: 'x', from: 'a', to: 'b', least: 10, most: 20 }] };
    const of = (fact: Fact) => windows(simple, new Map([['a', fact]])).get('b');
    expect(of({ earliest: 0, latest: 6 })).toEqual({ earliest: 16, latest: 20 });
    expect(of(3)).toEqual({ earliest: 13, latest: 23 });
    expect(of({ earliest: 0, latest: 11 })).toBeNull();
  });

  it('never widen when an interval widens', () => {
    fc.assert(
      fc.property(network, facts, fc.integer({ min: 0, max: 20 }), ({ points, bounds }, list, more) => {
        const known = (extra: number) =>
          new Map(
            list
              .slice(0, points.length - 1)
              .map(({ at, width }, i): [string, Fact] => [
                `p${i}`,
                { earliest: at - extra, latest: at + width + extra },
              ]),
          );
        const [narrow, wide] = [windows({ points, bounds }, known(0)), windows({ points, bounds }, known(more))];
        for (const [point, window] of wide) {
          if (!window) continue;
          expect(narrow.get(point)).not.toBeNull();
          expect(window.earliest).toBeGreaterThanOrEqual((narrow.get(point)?.earliest ?? NaN) - epsilon);
          expect(window.latest).toBeLessThanOrEqual((narrow.get(point)?.latest ?? NaN) + epsilon);
        }
      }),
      { numRuns: 1500, seed: 29 },
    );
  });

  it('of what follows are not hidden by a gap that was broken between facts', () => {
    const bounds = [
      { id: 'ab', from: 'a', to: 'b', least: 10, most: 11 },
      { id: 'bc', from: 'b', to: 'c', least: 5, most: 6 },
    ];
    const late = new Map<string, Fact>([
      ['a', 0],
      ['b', 99],
    ]);
    expect(windows({ points: ['a', 'b', 'c'], bounds }, late).get('c')).toEqual({ earliest: 104, latest: 105 });
  });

  it('are null where bounds among the open points contradict each other', () => {
    const bounds = [
      { id: '1', from: 'b', to: 'c', least: 5 },
      { id: '2', from: 'b', to: 'c', most: 4 },
      { id: '3', from: 'a', to: 'b', least: 0, most: 9 },
    ];
    expect(windows({ points: ['a', 'b', 'c'], bounds }, new Map([['a', 0]])).get('c')).toBeNull();
  });
});
