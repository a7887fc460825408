import type { Finding, Instant, Plan, ProtocolBody } from '../types';
import { assemble, plannedTimes, type ExpandRequest } from './expand';
import type { Clocks } from './dated';
import { resolve } from './resolve';
import type { Facts } from './visitWindows';

export interface ReplanRequest extends Clocks {
  options?: Readonly<Record<string, string>>;
  /** The plan as it stands: first occurrence of every visit. */
  planned: Readonly<Record<string, Instant>>;
  /** What has been done: these stay, whatever moves. */
  done?: Facts;
  move: { visit: string; to: Instant };
}

export interface Replan {
  plan: Plan;
  /** Visits whose moment changed, the moved one first. */
  moved: { visit: string; from: Instant; to: Instant }[];
  findings: Finding[];
}

/**
 * What moving one visit does to the others: later visits that hang on it go along with their ideal gaps, earlier
 * ones and those done stay where they are. Windows are worked out anew; a gap that no longer holds is a stop.
 * A visit that is not in the plan (or not in the protocol) moves nothing and gives the finding `unknownVisit`.
 */
export function replan(body: ProtocolBody, request: ReplanRequest): Replan {
  const resolved = resolve(body, request.options);
  const { move, planned } = request;
  if (planned[move.visit] === undefined || !resolved.visits.includes(move.visit))
    return refused({ code: 'unknownVisit', severity: 'stop', steps: [], params: { visit: move.visit } });
  const follow = followers(resolved.tree, move.visit, planned, request.done ?? {});
  const stay = Object.fromEntries(
    Object.entries(planned).filter(([visit]) => visit !== move.visit && !follow.has(visit)),
  );
  const expandRequest: ExpandRequest = {
    zone: request.zone,
    ...(request.milkings ? { milkings: request.milkings } : {}),
    ...(request.options ? { options: request.options } : {}),
    fix: { visit: move.visit, at: move.to },
    adjust: stay,
    ...(request.done ? { done: request.done } : {}),
  };
  const times = plannedTimes(resolved, expandRequest);
  const plan = assemble(body, resolved, times, expandRequest);
  const moved = [...times].flatMap(([visit, to]) => {
    const from = planned[visit];
    return from !== undefined && from !== to ? [{ visit, from, to }] : [];
  });
  moved.sort((a, b) => Number(b.visit === move.visit) - Number(a.visit === move.visit) || a.to - b.to);
  return { plan, moved, findings: plan.findings };
}

const refused = (finding: Finding): Replan => ({
  plan: { visits: [], findings: [finding] },
  moved: [],
  findings: [finding],
});

/** Later visits that hang on the moved one in the tree of ideals, directly or through others that move. */
function followers(
  tree: ReturnType<typeof resolve>['tree'],
  visit: string,
  planned: Readonly<Record<string, Instant>>,
  done: Facts,
): Set<string> {
  const found = new Set<string>();
  const origin = planned[visit] ?? 0;
  const reach = (at: string) => {
    for (const edge of tree) {
      const other = edge.parent === at ? edge.visit : edge.visit === at ? edge.parent : undefined;
      if (other === undefined || other === visit || found.has(other) || done[other] !== undefined) continue;
      if ((planned[other] ?? 0) <= origin) continue;
      found.add(other);
      reach(other);
    }
  };
  reach(visit);
  return found;
}
