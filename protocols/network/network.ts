/**
 * Simple temporal network: points in time and bounds on their differences.
 * Source: Dechter, Meiri & Pearl 1991, "Temporal constraint networks", Artificial Intelligence 49:61-95.
 * Any unit of time may be used as long as it is one; the core uses minutes.
 */

/** `least <= t(to) - t(from) <= most`; an absent side is unbounded. */
export interface Bound {
  id: string;
  from: string;
  to: string;
  least?: number;
  most?: number;
}

export interface Network {
  points: readonly string[];
  bounds: readonly Bound[];
}

/** A network without bounds: every point may be at any time. */
export const createNetwork = (points: readonly string[]): Network => ({ points: [...new Set(points)], bounds: [] });

/** The same network with one bound more. Throws a RangeError for a point that is not in it. */
export function addBound(network: Network, bound: Bound): Network {
  for (const point of [bound.from, bound.to])
    if (!network.points.includes(point)) throw new RangeError(`No point of the network: ${point}`);
  return { points: network.points, bounds: [...network.bounds, bound] };
}

/** One side of a bound as an edge of the distance graph: t(to) - t(from) <= weight. */
export interface Edge {
  from: number;
  to: number;
  weight: number;
  bound: Bound;
  side: 'least' | 'most';
}

/** The distance graph. Bounds that name a point which is not there are left out: the caller checks names. */
export function edgesOf(network: Network): Edge[] {
  const index = new Map(network.points.map((point, i) => [point, i]));
  return network.bounds.flatMap((bound) => {
    const from = index.get(bound.from);
    const to = index.get(bound.to);
    if (from === undefined || to === undefined) return [];
    const edges: Edge[] = [];
    if (bound.most !== undefined) edges.push({ from, to, weight: bound.most, bound, side: 'most' });
    if (bound.least !== undefined) edges.push({ from: to, to: from, weight: 0 - bound.least, bound, side: 'least' });
    return edges;
  });
}
