import type { Bound, Edge } from './network';

/**
 * A negative cycle of the distance graph, in order: the explanation of a contradiction (Bellman & Ford).
 * Call only when one exists; without one the answer is empty.
 */
export function negativeCycle(points: number, edges: readonly Edge[]): { bound: Bound; side: 'least' | 'most' }[] {
  const distance = new Array<number>(points).fill(0);
  const via = new Array<Edge | undefined>(points).fill(undefined);
  let last: Edge | undefined;
  for (let round = 0; round < points; round += 1) {
    last = undefined;
    for (const edge of edges) {
      const through = (distance[edge.from] ?? 0) + edge.weight;
      if (through < (distance[edge.to] ?? 0) - 1e-9) {
        distance[edge.to] = through;
        via[edge.to] = edge;
        last = edge;
      }
    }
    if (!last) return [];
  }
  return last ? walk(last, via, points) : [];
}

/** Walks back far enough to be on the cycle, then once around it. */
function walk(last: Edge, via: (Edge | undefined)[], points: number): { bound: Bound; side: 'least' | 'most' }[] {
  let at = last.to;
  for (let i = 0; i < points; i += 1) at = via[at]?.from ?? at;
  const start = at;
  const cycle: { bound: Bound; side: 'least' | 'most' }[] = [];
  do {
    const edge = via[at];
    if (!edge) return [];
    cycle.unshift({ bound: edge.bound, side: edge.side });
    at = edge.from;
  } while (at !== start);
  return cycle;
}
