import { windows as windowsGiven, type Fact } from '../network/windows';
import type { Bound } from '../network/network';
import type { Finding, Instant, Window } from '../types';
import { elapsedBounds, type Clocks } from './dated';
import type { Resolved } from './resolve';

export type Facts = Readonly<Record<string, Instant | { earliest: Instant; latest: Instant }>>;

const minute = 60_000;

/** The moment that stands for a fact: itself, or the middle of an interval, a whole minute. */
export const momentOf = (fact: Facts[string]): Instant =>
  typeof fact === 'number' ? fact : Math.floor((fact.earliest + fact.latest) / 2 / minute) * minute;

/**
 * The window of every visit: when it may happen, given that what is done is done and that the other earlier visits
 * go as planned. A first visit has nothing before it: its window is that in which the rest still holds as planned.
 * A side that nothing bounds is the planned moment itself.
 * Facts that leave a visit no window, or a planned moment outside it, give `windowMissed` with the gap that broke.
 */
export function visitWindows(
  resolved: Resolved,
  times: ReadonlyMap<string, Instant>,
  done: Facts,
  clocks: Clocks,
): { windows: Map<string, Window>; findings: Finding[] } {
  const zero = Math.min(...times.values());
  const bounds = resolved.gaps.map(({ gap, from, to }): Bound => {
    const side = elapsedBounds(times.get(from) ?? zero, { gap, from, to }, clocks);
    return { id: gap.id, from, to, ...side };
  });
  const known = new Map([...times].map(([visit, at]): [string, Fact] => [visit, minutesOf(done[visit] ?? at, zero)]));
  const windows = new Map<string, Window>();
  const findings: Finding[] = [];
  const windowAt = (visit: string, at: Instant, facts: ReadonlyMap<string, Fact>): Window | null => {
    const found = windowsGiven({ points: resolved.visits, bounds }, facts).get(visit);
    return found ? { earliest: finite(found.earliest, at, zero), latest: finite(found.latest, at, zero) } : null;
  };
  for (const [visit, at] of times) {
    const facts = factsBefore(visit, at, times, done, known);
    const window = windowAt(visit, at, facts);
    windows.set(visit, window ?? { earliest: at, latest: at });
    const isDone = done[visit] !== undefined;
    // a gap that was broken is told of its later end: what was done first was not wrong when it was done
    const judged = isDone ? new Map([...facts].filter(([other]) => (times.get(other) ?? at) < at)) : facts;
    const fits = isDone ? judged.size === 0 || inside(at, windowAt(visit, at, judged)) : inside(at, window);
    if (!fits) findings.push(missed(visit, at, resolved, judged, bounds, zero, isDone));
  }
  return { windows, findings };
}

const inside = (at: Instant, window: Window | null): boolean =>
  window !== null && at >= window.earliest - 1 && at <= window.latest + 1;

const minutesOf = (fact: Facts[string], zero: Instant): Fact =>
  typeof fact === 'number'
    ? (fact - zero) / minute
    : { earliest: (fact.earliest - zero) / minute, latest: (fact.latest - zero) / minute };

const finite = (minutes: number, at: Instant, zero: Instant): Instant =>
  Number.isFinite(minutes) ? Math.round(zero + minutes * minute) : at;

/** What stands before a visit: facts as facts, the rest as planned; for a first visit what stands after it. */
function factsBefore(
  visit: string,
  at: Instant,
  times: ReadonlyMap<string, Instant>,
  done: Facts,
  known: ReadonlyMap<string, Fact>,
): Map<string, Fact> {
  const others = [...known].filter(([other]) => other !== visit);
  const earlier = others.filter(([other]) => (times.get(other) ?? at) < at || done[other] !== undefined);
  return new Map(earlier.length > 0 ? earlier : others);
}

const spanOf = (fact: Fact) => (typeof fact === 'number' ? { earliest: fact, latest: fact } : fact);

/** The gap at the visit that is broken the most, in figures; of an interval the end that breaks it counts. */
function missed(
  visit: string,
  at: Instant,
  resolved: Resolved,
  facts: ReadonlyMap<string, Fact>,
  bounds: readonly Bound[],
  zero: Instant,
  isDone: boolean,
): Finding {
  const here = spanOf((at - zero) / minute);
  const place = (point: string) => (point === visit ? here : facts.has(point) ? spanOf(facts.get(point) ?? 0) : null);
  const broken = bounds
    .filter((bound) => bound.to === visit || bound.from === visit)
    .flatMap((bound) => {
      const [from, to] = [place(bound.from), place(bound.to)];
      if (!from || !to) return [];
      const [shortest, longest] = [to.earliest - from.latest, to.latest - from.earliest];
      const [above, below] = [longest - (bound.most ?? Infinity), (bound.least ?? -Infinity) - shortest];
      return [{ bound, elapsed: above >= below ? longest : shortest, over: Math.max(above, below) }];
    })
    .sort((a, b) => b.over - a.over)[0];
  const gap = resolved.gaps.find((g) => g.gap.id === broken?.bound.id)?.gap;
  return {
    code: 'windowMissed',
    // what is done outside its window is a fact to be told; what is planned outside it must not start
    severity: isDone ? 'warn' : 'stop',
    steps: gap ? [gap.from, gap.to] : [],
    visits: [visit],
    params: {
      visit,
      dueAt: at,
      ...(gap ? { gap: gap.id, from: gap.from, to: gap.to } : {}),
      ...(broken ? { elapsedMinutes: Math.round(broken.elapsed), overMinutes: Math.round(broken.over) } : {}),
      ...(broken?.bound.least === undefined ? {} : { leastMinutes: broken.bound.least }),
      ...(broken?.bound.most === undefined ? {} : { mostMinutes: broken.bound.most }),
    },
  };
}
