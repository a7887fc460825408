import { weekday } from '../time/dates';
import { clockOf, localDate } from '../time/zoned';
import type { ClockTime, Finding, Instant, LocalDate, PlannedVisit, Zone } from '../types';

export interface Calendar {
  zone: Zone;
  /** ISO weekdays that people would rather not work, 1 Monday to 7 Sunday. */
  weekendDays: readonly number[];
  holidays: readonly { date: LocalDate; name: string }[];
  /** From later than to: they work through midnight. */
  yardHours?: { from: ClockTime; to: ClockTime };
  /** Absent: nothing is past. */
  now?: Instant;
}

/** Weekend, holiday, yard hours and the past, for the visits that go through the yards: every time that they do. */
export function calendarFindings(
  visits: readonly PlannedVisit[],
  yarded: ReadonlySet<string>,
  calendar: Calendar,
): Finding[] {
  return visits
    .filter((visit) => yarded.has(visit.visit))
    .flatMap((visit) => {
      const date = localDate(visit.at, calendar.zone);
      const clock = clockOf(visit.at, calendar.zone);
      const found: Finding[] = [];
      const add = (code: Finding['code'], severity: Finding['severity'], params: Finding['params'] = {}) =>
        found.push({
          code,
          severity,
          steps: visit.steps,
          visits: [visit.visit],
          params: { visit: visit.visit, dueAt: visit.at, ...params },
        });
      const holidays = calendar.holidays.filter((h) => h.date === date).map((h) => h.name);
      if (holidays.length > 0) add('holiday', 'warn', { name: [...new Set(holidays)].join(', ') });
      else if (calendar.weekendDays.includes(weekday(date))) add('weekend', 'note');
      const hours = calendar.yardHours;
      if (hours && !within(clock, hours.from, hours.to))
        add('outsideYardHours', 'warn', { clock, from: hours.from, to: hours.to });
      if (calendar.now !== undefined && visit.window.latest < calendar.now) add('inThePast', 'stop');
      return found;
    });
}

const within = (clock: ClockTime, from: ClockTime, to: ClockTime): boolean =>
  from <= to ? clock >= from && clock <= to : clock >= from || clock <= to;
