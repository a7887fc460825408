import { edgesOf, type Edge, type Network } from './network';
import { epsilon } from './solve';

/** What is known of a point: a moment, or an interval when the moment is unknown. In the network's own unit. */
export type Fact = number | { earliest: number; latest: number };

/** Unbounded sides are infinite. */
export interface Span {
  earliest: number;
  latest: number;
}

/**
 * The tightest window of every point that is no fact, counted from an origin of the caller's.
 *
 * A fact that is an interval happened at some moment of it that nobody knows: the window is what holds for all of
 * them (the intersection, not the union). Bounds between two facts are past and are not asked: a gap that was broken
 * there does not hide the window of what follows. A window is null when nothing is left of it.
 */
export function windows(network: Network, facts: ReadonlyMap<string, Fact>): Map<string, Span | null> {
  const known = network.points.map((point) => facts.get(point));
  const edges = edgesOf(network);
  const latest = known.map((fact) => (fact === undefined ? Infinity : typeof fact === 'number' ? fact : fact.earliest));
  const earliest = known.map((fact) =>
    fact === undefined ? -Infinity : typeof fact === 'number' ? fact : fact.latest,
  );
  const settled = relax(edges, known, earliest, latest, network.points.length);
  return new Map(
    network.points.flatMap((point, i): [string, Span | null][] => {
      if (known[i] !== undefined) return [];
      const span = { earliest: earliest[i] ?? -Infinity, latest: latest[i] ?? Infinity };
      return [[point, settled && span.earliest <= span.latest + epsilon ? span : null]];
    }),
  );
}

/**
 * Shortest paths from the facts in both directions (Bellman & Ford), in place; false on a contradiction. Facts are
 * never moved, so that no path leads through one and no bound between two of them is asked.
 */
function relax(
  edges: readonly Edge[],
  known: readonly (Fact | undefined)[],
  earliest: number[],
  latest: number[],
  points: number,
): boolean {
  for (let round = 0; round <= points; round += 1) {
    let changed = false;
    for (const { from, to, weight } of edges) {
      const upper = (latest[from] ?? Infinity) + weight;
      if (known[to] === undefined && upper < (latest[to] ?? Infinity) - epsilon / points) {
        latest[to] = upper;
        changed = true;
      }
      const lower = (earliest[to] ?? -Infinity) - weight;
      if (known[from] === undefined && lower > (earliest[from] ?? -Infinity) + epsilon / points) {
        earliest[from] = lower;
        changed = true;
      }
    }
    if (!changed) return true;
  }
  return false;
}
