import { solve, type Solution } from '../network/solve';
import type { Bound, Network } from '../network/network';
import { windows } from '../network/windows';
import { nominalMinutes } from './gaps';
import type { Resolved } from './resolve';

/** The network of a protocol without dates: visits as points, gaps as bounds in minutes. */
export function nominalNetwork(resolved: Resolved): Network {
  const bounds = resolved.gaps.map(({ gap, from, to }): Bound => {
    const { least, most } = nominalMinutes(gap);
    return { id: gap.id, from, to, ...(least === undefined ? {} : { least }), ...(most === undefined ? {} : { most }) };
  });
  return { points: resolved.visits, bounds };
}

/** Planned minutes of every visit from the first one, along the tree of ideals. */
export function nominalTimes(resolved: Resolved): Map<string, number> {
  const at = new Map<string, number>(resolved.roots.map((root) => [root, 0]));
  for (const { visit, parent, gap } of resolved.tree) {
    const { ideal } = nominalMinutes(gap.gap);
    at.set(visit, (at.get(parent) ?? 0) + (gap.from === parent ? ideal : -ideal));
  }
  const first = Math.min(...at.values(), 0);
  return new Map([...at].map(([visit, minutes]) => [visit, minutes - first]));
}

export interface NominalVisit {
  visit: string;
  earliestMinutes: number;
  idealMinutes: number;
  latestMinutes: number;
}

/**
 * Every visit in minutes from the first: planned, and the window it has when all earlier visits go as planned (the
 * planned moment itself where nothing bounds it, or nothing is left). In order of time.
 */
export function nominalVisits(resolved: Resolved): NominalVisit[] {
  const times = nominalTimes(resolved);
  const network = nominalNetwork(resolved);
  return resolved.visits
    .map((visit): NominalVisit => {
      const ideal = times.get(visit) ?? 0;
      const earlier = new Map([...times].filter(([other, at]) => other !== visit && at < ideal));
      const window = earlier.size > 0 ? windows(network, earlier).get(visit) : null;
      const [earliest, latest] = [window?.earliest ?? ideal, window?.latest ?? ideal];
      return {
        visit,
        idealMinutes: ideal,
        earliestMinutes: Number.isFinite(earliest) ? Math.min(earliest, ideal) : ideal,
        latestMinutes: Number.isFinite(latest) ? Math.max(latest, ideal) : ideal,
      };
    })
    .sort((a, b) => a.idealMinutes - b.idealMinutes);
}

export const solveNominal = (resolved: Resolved): Solution => solve(nominalNetwork(resolved));
