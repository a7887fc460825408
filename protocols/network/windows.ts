import type { Network } from './network';
import { between, solve } from './solve';

/** What is known of a point: a moment, or an interval when the moment is unknown. In the network's own unit. */
export type Fact = number | { earliest: number; latest: number };

const origin = '\u0000origin';

/**
 * The tightest window of every point, counted from an origin of the caller's: facts are imposed, all bounds hold.
 * Null when facts and bounds contradict each other. Unbounded sides are infinite.
 */
export function windows(
  network: Network,
  facts: ReadonlyMap<string, Fact>,
): Map<string, { earliest: number; latest: number }> | null {
  const known = [...facts].map(([to, fact]) => ({
    id: `fact:${to}`,
    from: origin,
    to,
    least: typeof fact === 'number' ? fact : fact.earliest,
    most: typeof fact === 'number' ? fact : fact.latest,
  }));
  const solution = solve({ points: [...network.points, origin], bounds: [...network.bounds, ...known] });
  if (!solution.consistent) return null;
  return new Map(
    network.points.map((point) => {
      const window = between(solution, origin, point) ?? { least: -Infinity, most: Infinity };
      return [point, { earliest: window.least, latest: window.most }];
    }),
  );
}
