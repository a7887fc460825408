import type { Listener } from '../queries/audience';
import type { TellableTask } from '../queries/tellableTasks';
import { closingMoment, eveningMoment, localDayOf, morningMoment, type Moment } from './moments';

export const reminderKinds = ['evening', 'morning', 'closing', 'planChanged'] as const;
export type ReminderKind = (typeof reminderKinds)[number];

/** A reminder as the plan says it now: one row of the outbox. */
export interface Reminder extends Moment {
  key: string;
  kind: ReminderKind;
  userId: string;
  address: string;
  /** Only for `closing` and `planChanged`; evening and morning speak of every task of a day. */
  taskId: string | null;
  /** Only for `planChanged`: the planned start that the person was last told, ISO 8601. */
  from?: string;
  /** Local day of the tasks, `YYYY-MM-DD`. */
  day: string;
}

/** Open tasks by the local day on which they fall due. */
function byDay(tasks: readonly TellableTask[]): Map<string, TellableTask[]> {
  const days = new Map<string, TellableTask[]>();
  for (const task of tasks) {
    const day = localDayOf(task.dueAt.getTime(), task.zone);
    days.set(day, [...(days.get(day) ?? []), task]);
  }
  return days;
}

/**
 * One evening and one morning mail for each person and local day with open tasks. The key names person, property and
 * day, not the time: a task moved within its day moves the mail, and cannot make a second one.
 */
export function dayReminders(
  propertyId: string,
  tasks: readonly TellableTask[],
  people: readonly Listener[],
): Reminder[] {
  const found: Reminder[] = [];
  for (const [day, ofDay] of byDay(tasks)) {
    const zone = ofDay[0]?.zone ?? 'UTC';
    const dues = ofDay.map((task) => task.dueAt.getTime());
    for (const person of people) {
      const common = { userId: person.userId, address: person.email, taskId: null, day };
      const key = (kind: ReminderKind) => `${kind}:${person.userId}:${propertyId}:${day}`;
      const clocks = { evening: person.eveningAt, morning: person.morningAt };
      if (person.evening)
        found.push({ ...common, ...eveningMoment(day, clocks, zone, dues), kind: 'evening', key: key('evening') });
      if (person.morning)
        found.push({
          ...common,
          ...morningMoment(day, person.morningAt, zone, dues),
          kind: 'morning',
          key: key('morning'),
        });
    }
  }
  return found.filter((reminder) => reminder.dueAt < reminder.staleAt);
}

/** One mail for each person and task with head undone, before the window closes. The key names the closing moment. */
export function closingReminders(tasks: readonly TellableTask[], people: readonly Listener[]): Reminder[] {
  return tasks
    .filter((task) => task.undone > 0 && (task.state === 'planned' || task.state === 'inWork'))
    .flatMap((task) => {
      const windowTo = task.windowTo.getTime();
      const moment = closingMoment({ dueAt: task.dueAt.getTime(), windowTo });
      if (moment.dueAt >= moment.staleAt) return [];
      return people
        .filter((person) => person.closing)
        .map((person) => ({
          ...moment,
          kind: 'closing' as const,
          key: `closing:${person.userId}:${task.id}:${task.windowTo.toISOString()}`,
          userId: person.userId,
          address: person.email,
          taskId: task.id,
          day: localDayOf(windowTo, task.zone),
        }));
    });
}

/** What a person was last told of a task. */
export interface Told {
  userId: string;
  taskId: string;
  /** The planned start in the last mail that named the task. */
  due: Date;
}

/** How long after the start that was told a change is still worth a mail. */
const CHANGE_MATTERS = 12 * 3_600_000;

/**
 * One mail to each person who was told a start that no longer holds: calendars that people subscribe to may show a
 * change a day late. The key names the task's revision, so each change is told once.
 */
export function changeReminders(
  tasks: readonly TellableTask[],
  people: readonly Listener[],
  told: readonly Told[],
): Reminder[] {
  return told.flatMap(({ userId, taskId, due }) => {
    const task = tasks.find((one) => one.id === taskId);
    const person = people.find((one) => one.userId === userId);
    if (!task || !person || task.state === 'done' || !changedSince(task, due)) return [];
    if (!person.evening && !person.morning) return [];
    return {
      kind: 'planChanged' as const,
      key: `planChanged:${userId}:${taskId}:${task.revision}`,
      userId,
      address: person.email,
      taskId,
      from: due.toISOString(),
      day: localDayOf(task.dueAt.getTime(), task.zone),
      dueAt: task.updatedAt.getTime(),
      staleAt: due.getTime() + CHANGE_MATTERS,
    };
  });
}

/** True when the task is no longer what was told: at another time, or cancelled. */
export const changedSince = (task: TellableTask, told: Date): boolean =>
  task.state === 'cancelled' || task.dueAt.getTime() !== told.getTime();
