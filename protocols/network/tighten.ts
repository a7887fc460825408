import { epsilon, type Solution } from './solve';
import type { Bound } from './network';

type Solved = Extract<Solution, { consistent: true }>;

/**
 * One bound more on a network that is solved, without solving it anew: every shortest path either stays or goes over
 * the new edge once (n² instead of n³). Null when the bound contradicts the others; solve then for the explanation.
 * A bound that names a point which is not there changes nothing, as in `solve`.
 */
export function tighten(solution: Solved, bound: Bound): Solved | null {
  const from = solution.index.get(bound.from);
  const to = solution.index.get(bound.to);
  if (from === undefined || to === undefined) return solution;
  const upper = bound.most === undefined ? solution.distance : over(solution.distance, from, to, bound.most);
  const both = upper && bound.least !== undefined ? over(upper, to, from, 0 - bound.least) : upper;
  return both && { ...solution, distance: both };
}

function over(distance: number[][], from: number, to: number, weight: number): number[][] | null {
  const back = distance[to]?.[from] ?? Infinity;
  if (back + weight < -epsilon) return null;
  if (weight >= (distance[from]?.[to] ?? Infinity)) return distance;
  const onwards = distance[to] ?? [];
  return distance.map((row) => {
    const there = (row[from] ?? Infinity) + weight;
    return there === Infinity ? row : row.map((d, j) => Math.min(d, there + (onwards[j] ?? Infinity)));
  });
}
