import { clockChangesBetween, clockOf, localDate, toInstant, toLocal } from '../time/zoned';
import type { Finding, Instant, PlannedVisit } from '../types';
import { along, type Clocks } from './dated';
import { idealOf, minutesPerUnit } from './gaps';
import { occurrenceAt, countOf } from './occurrences';
import type { Resolved, VisitGap } from './resolve';

const minute = 60_000;
const day = 1440 * minute;

/** What a change of the clocks does to a plan: said, so that nobody is surprised by 6 days and 23 hours. */
export function clockFindings(
  resolved: Resolved,
  times: ReadonlyMap<string, Instant>,
  visits: readonly PlannedVisit[],
  clocks: Clocks,
): Finding[] {
  const moments = visits.map((visit) => visit.at);
  // a time that is skipped or repeated lies within a day of its change
  const changes = clockChangesBetween(Math.min(...moments) - day, Math.max(...moments) + day, clocks.zone);
  if (changes.length === 0) return [];
  return [
    ...resolved.gaps.flatMap((gap) => acrossChange(gap, times, clocks)),
    ...skippedEnds(resolved, times, clocks),
    ...skippedOccurrences(resolved, times, clocks),
    ...visits.flatMap((visit) => repeated(visit, clocks)),
  ];
}

function acrossChange(gap: VisitGap, times: ReadonlyMap<string, Instant>, clocks: Clocks): Finding[] {
  const [from, to] = [times.get(gap.from), times.get(gap.to)];
  if (from === undefined || to === undefined || to <= from) return [];
  return clockChangesBetween(from, to, clocks.zone).map((change): Finding => {
    const shiftMinutes = change.afterMinutes - change.beforeMinutes;
    return {
      code: 'clockChange',
      severity: 'note',
      steps: [gap.gap.from, gap.gap.to],
      visits: [gap.from, gap.to],
      params: {
        from: gap.gap.from,
        to: gap.gap.to,
        changeAt: change.at,
        // positive: clocks go forward
        shiftMinutes,
        unit: gap.gap.unit,
        elapsedMinutes: Math.round((to - from) / minute),
        nominalMinutes: idealOf(gap.gap) * minutesPerUnit[gap.gap.unit],
        clock: clockOf(to, clocks.zone),
        // what the clock would show after the same hours if it had not been changed
        unchangedClock: toLocal(to - shiftMinutes * minute, clocks.zone).slice(11),
      },
      source: 'IANA time zone database',
    };
  });
}

const skipped = (visit: string, clock: string, at: Instant, steps: string[], clocks: Clocks): Finding => ({
  code: 'clockTimeSkipped',
  severity: 'warn',
  steps,
  visits: [visit],
  // the clock jumps within a day, so the time asked for is of the date that it was moved on to
  params: { visit, local: `${localDate(at, clocks.zone)}T${clock}`, dueAt: at },
});

/** Visits that a day gap puts at a clock time which the clocks jump over: they are planned later by the jump. */
function skippedEnds(resolved: Resolved, times: ReadonlyMap<string, Instant>, clocks: Clocks): Finding[] {
  return resolved.tree.flatMap(({ gap }) => {
    if (gap.gap.unit === 'elapsedHours') return [];
    return [true, false].flatMap((forwards) => {
      const [start, end] = forwards ? [gap.from, gap.to] : [gap.to, gap.from];
      const [at, planned] = [times.get(start), times.get(end)];
      if (at === undefined || planned === undefined) return [];
      const reading = along(at, gap, forwards, clocks);
      if (reading.kind !== 'skipped' || reading.at !== planned) return [];
      const clock = (forwards ? gap.gap.clock : undefined) ?? clockOf(at, clocks.zone);
      return [skipped(end, clock, planned, [forwards ? gap.gap.to : gap.gap.from], clocks)];
    });
  });
}

function skippedOccurrences(resolved: Resolved, times: ReadonlyMap<string, Instant>, clocks: Clocks): Finding[] {
  return [...times].flatMap(([visit, at]) =>
    (resolved.stepsOf.get(visit) ?? []).flatMap((step) =>
      Array.from({ length: countOf(step.repeat) }, (_, k) => occurrenceAt(at, step.repeat, k, clocks))
        .filter((reading) => reading.kind === 'skipped')
        .map((reading) => skipped(visit, clockOf(at, clocks.zone), reading.at, [step.id], clocks)),
    ),
  );
}

/** A planned clock time that the zone's clocks show twice on that day: which of the two is meant is said. */
function repeated(visit: PlannedVisit, clocks: Clocks): Finding[] {
  const reading = toInstant(toLocal(visit.at, clocks.zone), clocks.zone);
  if (reading.kind !== 'repeated') return [];
  return [
    {
      code: 'clockTimeTwice',
      severity: 'warn',
      steps: [],
      visits: [visit.visit],
      params: { visit: visit.visit, dueAt: visit.at, reading: visit.at - reading.at < minute ? 'first' : 'second' },
    },
  ];
}
