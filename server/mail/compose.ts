import { may } from '@/shared/abilities';

import type { Deps } from '../deps';
import { audienceOf, zoneOf, type Listener } from '../queries/audience';
import { tellableTasks, type TellableTask } from '../queries/tellableTasks';
import { accountMail } from './accountMail';
import { localDayOf } from './moments';
import type { Mail } from './transport';
import type { MailPage } from './page';
import { changeMail, closingMail, dayMail } from './reminderMail';
import { changedSince, closingReminders, dayReminders, type ReminderKind } from './reminders';
import { render } from './render';

/** The part of an outbox row that its words are made from. */
export interface OutboxMessage {
  id: string;
  kind: ReminderKind | 'invitation' | 'passwordReset';
  userId: string | null;
  address: string;
  taskId: string | null;
  propertyId: string | null;
  params: Record<string, unknown>;
}

/**
 * `told`: the planned start that the mail names, by task. `nothing`: there is nothing left to say. `later`: its moment
 * has moved.
 */
export type Composed = { mail: Mail; told: Record<string, string> } | { nothing: true } | { later: Date };

/**
 * Writes a message from the plan as it is at this moment: whoever lost access, no longer wants it, or has nothing left
 * to be told gets nothing.
 */
export async function compose(deps: Deps, message: OutboxMessage): Promise<Composed> {
  const { kind } = message;
  if (kind === 'invitation' || kind === 'passwordReset')
    return finish(message, message.address, accountMail(kind, message.params, deps.env.PUBLIC_URL), []);
  const person = await listenerOf(deps, message);
  if (!person || !message.propertyId) return { nothing: true };
  if (kind === 'planChanged') return composeChange(deps, message, person);
  if (!person[kind]) return { nothing: true };
  if (kind === 'closing') return composeClosing(deps, message, person);
  return composeDay(deps, kind, message, message.propertyId, person);
}

/** The person of the message, if they may still be told of the property. */
async function listenerOf(deps: Deps, message: OutboxMessage): Promise<Listener | null> {
  if (!message.propertyId) return null;
  const zone = await zoneOf(deps.sequelize, message.propertyId);
  const people = await audienceOf(deps.sequelize, message.propertyId, localDayOf(deps.now().getTime(), zone));
  return people.find((one) => one.userId === message.userId) ?? null;
}

function finish(message: OutboxMessage, to: string, page: MailPage | null, tasks: readonly TellableTask[]): Composed {
  if (!page) return { nothing: true };
  const told = Object.fromEntries(tasks.map((task) => [task.id, task.dueAt.toISOString()]));
  return { mail: { ...render(page), id: message.id, to }, told };
}

const words = (deps: Deps, person: Listener) => ({
  publicUrl: deps.env.PUBLIC_URL,
  mayWork: may(person.roles, 'work.read'),
});

async function composeDay(
  deps: Deps,
  kind: 'evening' | 'morning',
  message: OutboxMessage,
  propertyId: string,
  person: Listener,
): Promise<Composed> {
  const now = deps.now().getTime();
  const open = await tellableTasks(deps.sequelize, { propertyIds: [propertyId], open: true });
  const ofDay = open.filter((task) => localDayOf(task.dueAt.getTime(), task.zone) === message.params['day']);
  const planned = dayReminders(propertyId, ofDay, [person]).find((reminder) => reminder.kind === kind);
  if (!planned || planned.staleAt <= now) return { nothing: true };
  if (planned.dueAt > now) return { later: new Date(planned.dueAt) };
  const stillOpen = ofDay.filter((task) => task.windowTo.getTime() > now && (task.undone > 0 || task.head === 0));
  return finish(message, person.email, dayMail(kind, stillOpen, words(deps, person)), stillOpen);
}

async function composeClosing(deps: Deps, message: OutboxMessage, person: Listener): Promise<Composed> {
  const now = deps.now().getTime();
  const [task] = await tellableTasks(deps.sequelize, { ids: message.taskId ? [message.taskId] : [], open: true });
  if (!task) return { nothing: true };
  const [planned] = closingReminders([task], [person]);
  if (!planned || planned.staleAt <= now) return { nothing: true };
  if (planned.dueAt > now) return { later: new Date(planned.dueAt) };
  return finish(message, person.email, closingMail(task, words(deps, person)), [task]);
}

async function composeChange(deps: Deps, message: OutboxMessage, person: Listener): Promise<Composed> {
  const told = new Date(String(message.params['from']));
  const [task] = await tellableTasks(deps.sequelize, { ids: message.taskId ? [message.taskId] : [] });
  if (!task || task.state === 'done' || !changedSince(task, told)) return { nothing: true };
  return finish(message, person.email, changeMail(task, told, words(deps, person)), [task]);
}
