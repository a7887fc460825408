import { windows as solveWindows, type Fact } from '../network/windows';
import type { Bound } from '../network/network';
import type { Finding, Instant, Window } from '../types';
import { elapsedBounds, type Clocks } from './dated';
import type { Resolved } from './resolve';

export type Facts = Readonly<Record<string, Instant | { earliest: Instant; latest: Instant }>>;

const minute = 60_000;

/**
 * The window of every visit: when it may happen, given that what is done is done and that the other earlier visits
 * go as planned. A first visit has nothing before it: its window is that in which the rest still holds as planned.
 * Facts that leave a visit no window give `windowMissed` with the gap that broke.
 */
export function visitWindows(
  resolved: Resolved,
  times: ReadonlyMap<string, Instant>,
  done: Facts,
  clocks: Clocks,
): { windows: Map<string, Window>; findings: Finding[] } {
  const zero = Math.min(...times.values());
  const bounds = resolved.gaps.map(({ gap, from, to }): Bound => {
    const side = elapsedBounds(factStart(done[from]) ?? times.get(from) ?? zero, { gap, from, to }, clocks);
    return { id: gap.id, from, to, ...side };
  });
  const windows = new Map<string, Window>();
  const findings: Finding[] = [];
  for (const [visit, at] of times) {
    const facts = factsBefore(visit, at, times, done, zero);
    // what lies between two facts is past: a gap broken there must not hide the window of what follows
    const open = bounds.filter((bound) => !(facts.has(bound.from) && facts.has(bound.to)));
    const found = solveWindows({ points: resolved.visits, bounds: open }, facts)?.get(visit);
    const window = found && {
      earliest: finite(found.earliest, at, zero),
      latest: finite(found.latest, at, zero),
    };
    if (!window || at < window.earliest - 1 || at > window.latest + 1) {
      findings.push(missed(visit, at, resolved, times, bounds, done[visit] !== undefined));
    }
    windows.set(visit, window ?? { earliest: at, latest: at });
  }
  return { windows, findings };
}

const factStart = (fact: Facts[string] | undefined): Instant | undefined =>
  typeof fact === 'number' ? fact : fact?.latest;

const finite = (minutes: number, at: Instant, zero: Instant): Instant =>
  Number.isFinite(minutes) ? zero + minutes * minute : at;

/** What stands before a visit: facts as facts, the rest as planned; for a first visit what stands after it. */
function factsBefore(
  visit: string,
  at: Instant,
  times: ReadonlyMap<string, Instant>,
  done: Facts,
  zero: Instant,
): Map<string, Fact> {
  const relative = (fact: Facts[string]): Fact =>
    typeof fact === 'number'
      ? (fact - zero) / minute
      : { earliest: (fact.earliest - zero) / minute, latest: (fact.latest - zero) / minute };
  const others = [...times].filter(([other]) => other !== visit);
  const earlier = others.filter(([other, t]) => t < at || done[other] !== undefined);
  const chosen = earlier.length > 0 ? earlier : others;
  return new Map(chosen.map(([other, t]) => [other, relative(done[other] ?? t)]));
}

/** The gap into the visit that the planned times break the most, in figures. */
function missed(
  visit: string,
  at: Instant,
  resolved: Resolved,
  times: ReadonlyMap<string, Instant>,
  bounds: readonly Bound[],
  isDone: boolean,
): Finding {
  const broken = bounds
    .filter((bound) => bound.to === visit || bound.from === visit)
    .map((bound) => {
      const elapsed = ((times.get(bound.to) ?? at) - (times.get(bound.from) ?? at)) / minute;
      const over = Math.max(elapsed - (bound.most ?? Infinity), (bound.least ?? -Infinity) - elapsed);
      return { bound, elapsed, over };
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
