import type { Finding, Instant, Plan, PlannedVisit, ProtocolBody } from '../types';
import { checkClocks } from './checkReferences';
import { clockFindings } from './clockFindings';
import { along, type Clocks } from './dated';
import { occurrences } from './occurrences';
import { resolve, type Resolved } from './resolve';
import { momentOf, visitWindows, type Facts } from './visitWindows';

export interface ExpandRequest extends Clocks {
  /** The visit whose moment is given; every other one follows from it, forwards and backwards. */
  fix: { visit: string; at: Instant };
  options?: Readonly<Record<string, string>>;
  /** Visits planned at another moment than their gaps' ideal. */
  adjust?: Readonly<Record<string, Instant>>;
  /** What has been done, and when; an interval where the moment is unknown. */
  done?: Facts;
}

/** The visit of a step, for fixing a plan by its service or its first treatment. Undefined for an unknown step. */
export const visitOfStep = (body: ProtocolBody, step: string): string | undefined =>
  body.steps.find((s) => s.id === step)?.visit;

/**
 * Every visit of one animal or group with its moment and window.
 * A `fix.visit` that is not in the protocol (or is dropped by an option) gives no visits and the finding
 * `unknownVisit`, a gap's clock time that is none the finding `badClock`; nothing is thrown for what a person can
 * type. An unknown zone throws a RangeError.
 */
export function expand(body: ProtocolBody, request: ExpandRequest): Plan {
  const badClocks = checkClocks(body);
  if (badClocks.length > 0) return { visits: [], findings: badClocks };
  const resolved = resolve(body, request.options);
  if (!resolved.visits.includes(request.fix.visit)) {
    const finding: Finding = {
      code: 'unknownVisit',
      severity: 'stop',
      steps: [],
      params: { visit: request.fix.visit },
    };
    return { visits: [], findings: [finding] };
  }
  const times = plannedTimes(resolved, request);
  const plan = assemble(body, resolved, times, request);
  return { visits: plan.visits, findings: [...loose(resolved, times), ...plan.findings] };
}

/** Visits that no chain of gaps ties to the fixed one: they have no moment, and that must not go unsaid. */
const loose = (resolved: Resolved, times: ReadonlyMap<string, Instant>): Finding[] =>
  resolved.visits
    .filter((visit) => !times.has(visit))
    .map((visit): Finding => ({
      code: 'unreachable',
      severity: 'stop',
      steps: (resolved.stepsOf.get(visit) ?? []).map((step) => step.id),
      visits: [visit],
      params: { visit },
    }));

/** Planned moments along the tree of ideals, outwards from the fixed visit; what is done or adjusted stays. */
export function plannedTimes(resolved: Resolved, request: ExpandRequest): Map<string, Instant> {
  const fixed = new Map<string, Instant>([[request.fix.visit, request.fix.at]]);
  for (const [visit, at] of Object.entries(request.adjust ?? {})) fixed.set(visit, at);
  for (const [visit, fact] of Object.entries(request.done ?? {})) fixed.set(visit, momentOf(fact));
  const times = new Map([...fixed].filter(([visit]) => resolved.visits.includes(visit)));
  for (let grown = true; grown;) {
    grown = false;
    for (const { visit, parent, gap } of resolved.tree) {
      const [a, b] = [times.get(parent), times.get(visit)];
      if (a !== undefined && b === undefined) {
        times.set(visit, along(a, gap, gap.from === parent, request).at);
        grown = true;
      } else if (b !== undefined && a === undefined) {
        times.set(parent, along(b, gap, gap.from === visit, request).at);
        grown = true;
      }
    }
  }
  return times;
}

/** Windows, repeats, intervals and findings for moments that are settled. */
export function assemble(
  body: ProtocolBody,
  resolved: Resolved,
  times: ReadonlyMap<string, Instant>,
  request: ExpandRequest,
): Plan {
  if (times.size === 0) return { visits: [], findings: [] };
  const { windows, findings } = visitWindows(resolved, times, request.done ?? {}, request);
  const anchorVisit = visitOfStep(body, body.timingAnchor);
  const anchor = anchorVisit === undefined ? undefined : times.get(anchorVisit);
  const first = Math.min(...times.values());
  const visits = [...times]
    .filter(([visit]) => resolved.stepsOf.has(visit))
    .flatMap(([visit, at]): PlannedVisit[] => {
      const steps = resolved.stepsOf.get(visit) ?? [];
      const window = windows.get(visit) ?? { earliest: at, latest: at };
      const one = (moment: Instant, occurrence: number, ids: string[]): PlannedVisit => ({
        visit,
        at: moment,
        window: { earliest: window.earliest + (moment - at), latest: window.latest + (moment - at) },
        steps: ids,
        occurrence,
        sinceAnchorMinutes: anchor === undefined ? 0 : (moment - anchor) / 60_000,
        sinceStartMinutes: (moment - first) / 60_000,
      });
      return occurrences(at, steps, request).map((moment, k) => one(moment.at, k + 1, moment.steps));
    })
    .sort((a, b) => a.at - b.at || resolved.visits.indexOf(a.visit) - resolved.visits.indexOf(b.visit));
  return { visits, findings: [...findings, ...clockFindings(resolved, times, visits, request)] };
}
