import { clockChangesBetween, toInstant, toLocal } from '../time/zoned';
import type { Finding, Instant } from '../types';
import type { Clocks } from './dated';
import { idealOf } from './gaps';
import type { Resolved, VisitGap } from './resolve';

const minute = 60_000;

/** What a change of the clocks does to a plan: said, so that nobody is surprised by 6 days and 23 hours. */
export function clockFindings(resolved: Resolved, times: ReadonlyMap<string, Instant>, clocks: Clocks): Finding[] {
  const moments = [...times.values()];
  if (clockChangesBetween(Math.min(...moments), Math.max(...moments), clocks.zone).length === 0) {
    return [...times].flatMap(([visit, at]) => doubtful(visit, at, clocks));
  }
  return [
    ...resolved.gaps.flatMap((gap) => acrossChange(gap, times, clocks)),
    ...[...times].flatMap(([visit, at]) => doubtful(visit, at, clocks)),
  ];
}

function acrossChange(gap: VisitGap, times: ReadonlyMap<string, Instant>, clocks: Clocks): Finding[] {
  const [from, to] = [times.get(gap.from), times.get(gap.to)];
  if (from === undefined || to === undefined || to <= from) return [];
  return clockChangesBetween(from, to, clocks.zone).map((change): Finding => {
    const elapsedMinutes = Math.round((to - from) / minute);
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
        shiftMinutes: change.afterMinutes - change.beforeMinutes,
        unit: gap.gap.unit,
        elapsedMinutes,
        nominalMinutes: idealOf(gap.gap) * (gap.gap.unit === 'elapsedHours' ? 60 : 1440),
      },
      source: 'IANA time zone database',
    };
  });
}

/** A planned clock time that the zone's clocks show twice on that day: both readings are possible, so it is said. */
function doubtful(visit: string, at: Instant, clocks: Clocks): Finding[] {
  const reading = toInstant(toLocal(at, clocks.zone), clocks.zone);
  if (reading.kind !== 'repeated') return [];
  return [{ code: 'clockTimeTwice', severity: 'warn', steps: [], visits: [visit], params: { visit, dueAt: at } }];
}
