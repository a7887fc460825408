import { addLocalDays } from '../time/zoned';
import type { Finding, Instant, Plan, PlannedVisit, ProtocolBody } from '../types';
import { clockFindings } from './clockFindings';
import { along, type Clocks } from './dated';
import { resolve, type Resolved } from './resolve';
import { visitWindows, type Facts } from './visitWindows';

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
 * `unknownVisit`; nothing is thrown for what a person can type.
 */
export function expand(body: ProtocolBody, request: ExpandRequest): Plan {
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
  return assemble(body, resolved, times, request);
}

/** Planned moments along the tree of ideals, outwards from the fixed visit; what is done or adjusted stays. */
export function plannedTimes(resolved: Resolved, request: ExpandRequest): Map<string, Instant> {
  const fixed = new Map<string, Instant>([[request.fix.visit, request.fix.at]]);
  for (const [visit, at] of Object.entries(request.adjust ?? {})) fixed.set(visit, at);
  for (const [visit, fact] of Object.entries(request.done ?? {}))
    fixed.set(visit, typeof fact === 'number' ? fact : fact.latest);
  const times = new Map([...fixed].filter(([visit]) => resolved.visits.includes(visit)));
  for (let grown = true; grown;) {
    grown = false;
    for (const { visit, parent, gap } of resolved.tree) {
      const [a, b] = [times.get(parent), times.get(visit)];
      if (a !== undefined && b === undefined) {
        times.set(visit, along(a, gap, gap.from === parent, request));
        grown = true;
      } else if (b !== undefined && a === undefined) {
        times.set(parent, along(b, gap, gap.from === visit, request));
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
      const repeats = Math.max(...steps.map((step) => step.repeat?.count ?? 1));
      return Array.from({ length: repeats }, (_, k) => {
        const ids = steps.filter((step) => (step.repeat?.count ?? 1) > k).map((step) => step.id);
        return one(occurrenceAt(at, steps, k, request), k + 1, ids);
      });
    })
    .sort((a, b) => a.at - b.at || resolved.visits.indexOf(a.visit) - resolved.visits.indexOf(b.visit));
  return { visits, findings: [...findings, ...clockFindings(resolved, times, request)] };
}

/** Moment of the k-th occurrence (from 0) of a repeated act: local days by the clock, minutes as elapsed. */
function occurrenceAt(
  at: Instant,
  steps: { repeat?: { every: { days?: number; minutes?: number } } }[],
  k: number,
  clocks: Clocks,
): Instant {
  const every = steps.find((step) => step.repeat)?.repeat?.every;
  if (k === 0 || !every) return at;
  if (every.days !== undefined) return addLocalDays(at, every.days * k, clocks.zone).at;
  return at + (every.minutes ?? 0) * k * 60_000;
}
