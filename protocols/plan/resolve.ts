import type { Gap, ProtocolBody, Step } from '../types';
import { holds, resolveOptions, type Known } from './conditions';

/** A gap between the visits that its steps belong to. */
export interface VisitGap {
  gap: Gap;
  from: string;
  to: string;
}

/** A protocol with its options chosen: what may happen to some animal, visit by visit. */
export interface Resolved {
  options: Record<string, string>;
  /** Visits in the protocol's order, those without a step that can apply left out. */
  visits: string[];
  stepsOf: ReadonlyMap<string, Step[]>;
  gaps: VisitGap[];
  /**
   * How the planned times hang together: each visit but the roots has one gap to a visit placed before it. One tree
   * for planning forwards and backwards, so that there and back again is the same plan.
   */
  tree: { visit: string; parent: string; gap: VisitGap }[];
  roots: string[];
}

/**
 * Chooses options and drops what cannot apply. With `known.observed` only that scenario's steps and gaps are kept;
 * without it those of all scenarios, since the time of a visit must not depend on what is not yet seen.
 */
export function resolve(body: ProtocolBody, given?: Readonly<Record<string, string>>, known: Known = {}): Resolved {
  const options = resolveOptions(body, given);
  const applies = (when: Step['when']) => holds(when, { ...known, options }) !== false;
  const steps = body.steps.filter((step) => applies(step.when));
  const stepsOf = new Map<string, Step[]>();
  for (const step of steps) stepsOf.set(step.visit, [...(stepsOf.get(step.visit) ?? []), step]);
  const visits = body.visits.map((visit) => visit.id).filter((id) => stepsOf.has(id));
  const visitOf = new Map(steps.map((step) => [step.id, step.visit]));
  const gaps = body.gaps.flatMap((gap): VisitGap[] => {
    const from = visitOf.get(gap.from);
    const to = visitOf.get(gap.to);
    return from && to && from !== to && applies(gap.when) ? [{ gap, from, to }] : [];
  });
  return { options, visits, stepsOf, gaps, ...span(visits, gaps) };
}

/** Grows the tree from the first visit, gaps in the protocol's order; what is not reached starts a tree of its own. */
function span(visits: readonly string[], gaps: readonly VisitGap[]): Pick<Resolved, 'tree' | 'roots'> {
  const placed = new Set<string>();
  const tree: Resolved['tree'] = [];
  const roots: string[] = [];
  for (const visit of visits) {
    if (placed.has(visit)) continue;
    roots.push(visit);
    placed.add(visit);
    for (let grown = true; grown;) {
      grown = false;
      for (const gap of gaps) {
        const forwards = placed.has(gap.from) && !placed.has(gap.to);
        if (!forwards && !(placed.has(gap.to) && !placed.has(gap.from))) continue;
        const [parent, child] = forwards ? [gap.from, gap.to] : [gap.to, gap.from];
        tree.push({ visit: child, parent, gap });
        placed.add(child);
        grown = true;
      }
    }
  }
  return { tree, roots };
}
