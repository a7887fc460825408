import { negativeCycle } from './cycle';
import { edgesOf, type Bound, type Network } from './network';

/** Slack below which a cycle counts as zero: bounds are minutes, rounding is far smaller. */
export const epsilon = 1e-6;

export type Solution =
  | {
      consistent: true;
      /** distance[i][j]: the most that t(j) - t(i) can be; Infinity when nothing bounds it. */
      distance: number[][];
      index: ReadonlyMap<string, number>;
    }
  | { consistent: false; cycle: { bound: Bound; side: 'least' | 'most' }[] };

/**
 * The minimal network by all-pairs shortest paths (Floyd & Warshall), or the contradiction: the bounds along a
 * negative cycle, which together ask for the impossible.
 */
export function solve(network: Network): Solution {
  const n = network.points.length;
  const distance = Array.from({ length: n }, (_, i) =>
    Array.from({ length: n }, (__, j) => (i === j ? 0 : Number.POSITIVE_INFINITY)),
  );
  const edges = edgesOf(network);
  for (const edge of edges) {
    const row = distance[edge.from];
    if (row && edge.weight < (row[edge.to] ?? Infinity)) row[edge.to] = edge.weight;
  }
  if (!shorten(distance)) return { consistent: false, cycle: negativeCycle(n, edges) };
  return { consistent: true, distance, index: new Map(network.points.map((point, i) => [point, i])) };
}

/** Shortens in place; false as soon as a point could be before itself. */
function shorten(distance: number[][]): boolean {
  const n = distance.length;
  for (let k = 0; k < n; k += 1) {
    const through = distance[k] ?? [];
    for (const row of distance) {
      const toK = row[k] ?? Infinity;
      if (toK === Infinity) continue;
      for (let j = 0; j < n; j += 1) {
        const sum = toK + (through[j] ?? Infinity);
        if (sum < (row[j] ?? Infinity)) row[j] = sum;
      }
    }
  }
  return distance.every((row, i) => (row[i] ?? 0) >= -epsilon);
}

/** Tightest bounds on t(to) - t(from). Unbounded sides are infinite. Null for points that the network lacks. */
export function between(
  solution: Extract<Solution, { consistent: true }>,
  from: string,
  to: string,
): { least: number; most: number } | null {
  const i = solution.index.get(from);
  const j = solution.index.get(to);
  if (i === undefined || j === undefined) return null;
  return { least: 0 - (solution.distance[j]?.[i] ?? Infinity), most: solution.distance[i]?.[j] ?? Infinity };
}
