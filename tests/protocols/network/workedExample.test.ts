import { describe, expect, it } from 'vitest';

import type { Bound } from '@/protocols/network/network';
import { between, solve } from '@/protocols/network/solve';

/**
 * The worked example of Dechter, Meiri & Pearl 1991, "Temporal constraint networks", Artificial Intelligence
 * 49:61-95 (John and Fred on their way to work), in the form with one choice taken: John by car, Fred by car pool.
 * Every figure here is from memory. Minutes after 7:00. T1 John leaves, T2 John arrives, T3 Fred leaves, T4 Fred arrives.
 */
const points = ['T0', 'T1', 'T2', 'T3', 'T4'];
const bound = (from: string, to: string, least: number, most: number): Bound => ({
  id: `${from}${to}`,
  from,
  to,
  least,
  most,
});
const bounds = [
  bound('T0', 'T1', 10, 20),
  bound('T1', 'T2', 30, 40),
  bound('T3', 'T2', 10, 20),
  bound('T3', 'T4', 40, 50),
  bound('T0', 'T4', 60, 70),
];

const solved = (list: Bound[]) => {
  const solution = solve({ points, bounds: list });
  if (!solution.consistent) throw new Error('should be consistent');
  return (from: string, to: string) => {
    const found = between(solution, from, to);
    return [found?.least, found?.most];
  };
};

describe('the worked example of 1991 (from memory)', () => {
  it('gives the minimal network as printed: each departure and arrival in its tightest window', () => {
    const window = solved(bounds);
    expect(window('T0', 'T1')).toEqual([10, 20]);
    expect(window('T0', 'T2')).toEqual([40, 50]);
    expect(window('T0', 'T3')).toEqual([20, 30]);
    expect(window('T0', 'T4')).toEqual([60, 70]);
  });

  it('tightens between events too: Fred leaves at most 20 minutes after John', () => {
    const window = solved(bounds);
    expect(window('T1', 'T2')).toEqual([30, 40]);
    expect(window('T1', 'T3')).toEqual([10, 20]);
    expect(window('T2', 'T4')).toEqual([20, 30]);
    expect(window('T1', 'T4')).toEqual([50, 60]);
  });

  it('is impossible when John takes the bus that needs at least an hour, and says by which bounds', () => {
    const bus = bounds.map((b) => (b.id === 'T1T2' ? { ...bound('T1', 'T2', 60, 500), id: 'T1T2' } : b));
    const solution = solve({ points, bounds: bus });
    expect(solution.consistent).toBe(false);
    if (solution.consistent) return;
    const slack = solution.cycle.reduce(
      (sum, { bound: b, side }) => sum + (side === 'most' ? (b.most ?? 0) : -(b.least ?? 0)),
      0,
    );
    expect(slack).toBeLessThan(0);
    expect(solution.cycle.map(({ bound: b }) => b.id)).toContain('T1T2');
  });
});
