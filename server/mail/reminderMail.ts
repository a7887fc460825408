import { t } from '@/shared/messages';
import { clock, day as dayWords, dayClock, zoneName } from '@/shared/when';

import type { TellableTask } from '../queries/tellableTasks';
import { appLinks } from './appLinks';
import type { MailPage } from './page';
import { cautionLines, headWords, stepLines, windowLine } from './taskWords';

export interface ReminderWords {
  publicUrl: string;
  /** False for people who see the plan but not the work: their links go to the calendar. */
  mayWork: boolean;
}

function section(task: TellableTask, words: ReminderWords): MailPage['sections'][number] {
  const { locale } = task;
  const part = task.undone < task.head ? [t('telling.undone', { count: task.undone, head: task.head }, locale)] : [];
  return {
    title: t(
      'telling.taskLine',
      {
        time: clock(task.dueAt.getTime(), task.zone),
        title: task.title,
        group: task.group,
        head: headWords(task.head, locale),
      },
      locale,
    ),
    lines: [...part, ...stepLines(task), windowLine(task), ...cautionLines(task)],
    ...(words.mayWork
      ? { link: { words: t('telling.open', {}, locale), url: appLinks.task(words.publicUrl, task.id) } }
      : {}),
  };
}

const foot = (words: ReminderWords, locale: string): string =>
  t('telling.reminder.foot', { link: appLinks.more(words.publicUrl) }, locale);

const openPlan = (words: ReminderWords, locale: string): { words: string; url: string } => ({
  words: t('telling.openApp', {}, locale),
  url: words.mayWork ? appLinks.home(words.publicUrl) : appLinks.calendar(words.publicUrl),
});

/** The evening or morning mail: every open task of one property and day, in the order they fall due. */
export function dayMail(
  kind: 'evening' | 'morning',
  tasks: readonly TellableTask[],
  words: ReminderWords,
): MailPage | null {
  const first = tasks[0];
  if (!first) return null;
  const { property, zone, locale } = first;
  const at = first.dueAt.getTime();
  const day = dayWords(at, zone, locale);
  const what =
    tasks.length === 1 ? `${first.title} · ${first.group}` : t('telling.tasks', { count: tasks.length }, locale);
  const subject = t(`telling.${kind}.subject`, { day, what, property }, locale);
  return {
    subject,
    heading: subject,
    lead: t(`telling.${kind}.lead`, { day, property, zone: `${zoneName(at, zone, locale)} (${zone})` }, locale),
    sections: tasks.map((task) => section(task, words)),
    action: openPlan(words, locale),
    foot: foot(words, locale),
  };
}

/** The window of a task closes soon and head are undone. */
export function closingMail(task: TellableTask, words: ReminderWords): MailPage {
  const { property, zone, locale, title, group, undone } = task;
  const to = task.windowTo.getTime();
  const time = clock(to, zone);
  return {
    subject: t('telling.closing.subject', { time, title, undone, property }, locale),
    heading: t('telling.undone', { count: undone, head: task.head }, locale),
    lead: t(
      'telling.closing.lead',
      { title, group, time, zone: zoneName(to, zone, locale), day: dayWords(to, zone, locale) },
      locale,
    ),
    sections: [section(task, words)],
    action: openPlan(words, locale),
    foot: foot(words, locale),
  };
}

/** A task that the person was told of has another time now, or is cancelled. */
export function changeMail(task: TellableTask, told: Date, words: ReminderWords): MailPage {
  const { property, zone, locale, title, group } = task;
  const moment = (at: number): string => `${dayClock(at, zone, locale)} ${zoneName(at, zone, locale)}`;
  const kind = task.state === 'cancelled' ? 'cancelled' : 'moved';
  const names = { title, group, property, was: moment(told.getTime()), now: moment(task.dueAt.getTime()) };
  return {
    subject: t(`telling.${kind}.subject`, names, locale),
    heading: t(`telling.${kind}.subject`, names, locale),
    lead: t(`telling.${kind}.lead`, names, locale),
    sections: kind === 'moved' ? [section(task, words)] : [],
    action: openPlan(words, locale),
    foot: foot(words, locale),
  };
}
