import { t } from '@/shared/messages';
import { dayClock } from '@/shared/when';

import { appLinks } from '../mail/appLinks';
import { cautionLines, sinceLine, stepLines, taskSummary, windowLine } from '../mail/taskWords';
import type { TellableTask } from '../queries/tellableTasks';
import { plain, plainLine } from './text';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
/** Head through the crush in an hour, for the length of an entry only. Common practice, no source. */
const HEAD_PER_HOUR = 60;

/** What a task is in a calendar. */
export interface CalendarEntry {
  uid: string;
  sequence: number;
  /** When it last changed: DTSTAMP and LAST-MODIFIED (RFC 5545 section 3.8.7.2), never the moment of reading. */
  stamp: Date;
  start: Date;
  end: Date;
  summary: string;
  description: string;
  location: string;
  category: string;
  cancelled: boolean;
  url: string;
}

/** Planned start, and an estimated end: by head, at least half an hour, at most ten hours or the window's end. */
export function entryTimes(task: { dueAt: Date; windowTo: Date; head: number }): { start: Date; end: Date } {
  const start = task.dueAt.getTime();
  const length = Math.min(Math.max((task.head / HEAD_PER_HOUR) * HOUR, HOUR / 2), 10 * HOUR);
  const end = Math.max(Math.min(start + length, task.windowTo.getTime()), start + HOUR / 2);
  // whole minutes read better
  return { start: task.dueAt, end: new Date(Math.ceil(end / MINUTE) * MINUTE) };
}

export function calendarEntry(task: TellableTask, link: { publicUrl: string; mayWork: boolean }): CalendarEntry {
  const { locale, zone } = task;
  const cancelled = task.state === 'cancelled';
  const url = link.mayWork ? appLinks.task(link.publicUrl, task.id) : appLinks.calendar(link.publicUrl);
  const moved = task.movedFrom
    ? t('telling.movedEntry', { from: dayClock(task.movedFrom.getTime(), zone, locale) }, locale)
    : null;
  const summary = taskSummary(task);
  const lines = [task.cohort, ...stepLines(task), windowLine(task), sinceLine(task), moved, ...cautionLines(task), url];
  return {
    ...entryTimes(task),
    uid: `${task.id}@yardbell`,
    sequence: task.revision,
    stamp: task.updatedAt,
    summary: plainLine(cancelled ? t('telling.cancelledEntry', { title: summary }, locale) : summary),
    description: plain(lines.filter((line) => line !== null).join('\n')),
    location: plainLine(task.property),
    category: plainLine(task.cohort),
    cancelled,
    url,
  };
}
