import { randomUUID } from 'node:crypto';

import { QueryTypes, type Transaction } from 'sequelize';

import type { Deps } from '../deps';
import { localDayOf } from '../mail/moments';
import { changeReminders, closingReminders, dayReminders, type Reminder, type Told } from '../mail/reminders';
import { audienceOf } from '../queries/audience';
import { tellableTasks } from '../queries/tellableTasks';

const DAY = 86_400_000;

/**
 * Brings the outbox in step with the plan of a property, inside the transaction that changed it: the evening and
 * morning mails of every day that has open tasks (a moved task leaves a day behind and comes to another), and the
 * closing mails of the tasks named; and whoever was told a time that no longer holds is told the new one. What no longer matches is withdrawn; what was sent is never sent again, for the
 * key of a sent row stays taken.
 */
export async function planReminders(
  deps: Deps,
  tx: Transaction,
  propertyId: string,
  taskIds: readonly string[],
): Promise<void> {
  // one planner a property at a time, or the older reading of the plan could be written last
  await deps.sequelize.query('select pg_advisory_xact_lock(hashtextextended(:name, 0))', {
    replacements: { name: `reminders:${propertyId}` },
    transaction: tx,
  });
  const now = deps.now().getTime();
  const open = await tellableTasks(
    deps.sequelize,
    { propertyIds: [propertyId], open: true, dueFrom: new Date(now - 2 * DAY) },
    tx,
  );
  const named = await tellableTasks(deps.sequelize, { ids: taskIds, propertyIds: [propertyId] }, tx);
  const zone = (open[0] ?? named[0])?.zone ?? 'UTC';
  const people = await audienceOf(deps.sequelize, propertyId, localDayOf(now, zone), tx);
  const wanted = [
    ...dayReminders(propertyId, open, people),
    ...closingReminders(named, people),
    ...changeReminders(named, people, await lastTold(deps, tx, taskIds)),
  ].filter((reminder) => reminder.staleAt > now);
  await write(deps, tx, propertyId, wanted);
  await withdrawOthers(deps, tx, propertyId, taskIds, wanted);
}

/** Withdraws what waits for a task that is done or cancelled, and the mails of its day when nothing else is due then. */
export async function withdrawReminders(deps: Deps, tx: Transaction, taskId: string): Promise<void> {
  const [task] = await tellableTasks(deps.sequelize, { ids: [taskId] }, tx);
  if (task) await planReminders(deps, tx, task.propertyId, [taskId]);
}

/** The start that each person was last told of each task. */
const lastTold = (deps: Deps, tx: Transaction, taskIds: readonly string[]): Promise<Told[]> =>
  deps.sequelize.query<Told>(
    `select distinct on (m.user_id, told.key) m.user_id as "userId", told.key as "taskId", told.value::timestamptz as due
     from messages m cross join lateral jsonb_each_text(m.params -> 'told') told
     where m.state = 'sent' and jsonb_typeof(m.params -> 'told') = 'object'
       and m.property_id in (select property_id from tasks where id::text in (select jsonb_array_elements_text(:taskIds::jsonb)))
       and told.key in (select jsonb_array_elements_text(:taskIds::jsonb))
     order by m.user_id, told.key, m.sent_at desc`,
    { type: QueryTypes.SELECT, replacements: { taskIds: JSON.stringify(taskIds) }, transaction: tx },
  );

/** Writes all rows in one statement, in the order of their keys so that two writers can't wait for each other. */
async function write(deps: Deps, tx: Transaction, propertyId: string, wanted: readonly Reminder[]): Promise<void> {
  if (wanted.length === 0) return;
  const rows = [...wanted]
    .sort((a, b) => (a.key < b.key ? -1 : 1))
    .map((reminder) => ({
      id: randomUUID(),
      key: reminder.key,
      kind: reminder.kind,
      user_id: reminder.userId,
      address: reminder.address,
      task_id: reminder.taskId,
      params: { day: reminder.day, ...(reminder.from ? { from: reminder.from } : {}) },
      due_at: new Date(reminder.dueAt).toISOString(),
      stale_at: new Date(reminder.staleAt).toISOString(),
    }));
  await deps.sequelize.query(
    `insert into messages (id, dedupe_key, channel, kind, user_id, address, task_id, property_id, params, due_at, stale_at, next_try_at)
     select r.id, r.key, 'email', r.kind, r.user_id, r.address, r.task_id, :propertyId, r.params,
       r.due_at, r.stale_at, r.due_at
     from jsonb_to_recordset(:rows::jsonb) as r (id uuid, key text, kind text, user_id uuid, address text, task_id uuid,
       params jsonb, due_at timestamptz, stale_at timestamptz)
     on conflict (dedupe_key) do update set
       state = 'waiting', address = excluded.address, due_at = excluded.due_at, stale_at = excluded.stale_at,
       next_try_at = case when messages.due_at = excluded.due_at and messages.state = 'waiting'
         then messages.next_try_at else excluded.due_at end,
       updated_at = now()
     where messages.state in ('waiting', 'withdrawn')
       and (messages.state, messages.address, messages.due_at, messages.stale_at)
       is distinct from ('waiting', excluded.address, excluded.due_at, excluded.stale_at)`,
    { replacements: { propertyId, rows: JSON.stringify(rows) }, transaction: tx },
  );
}

/** Waiting rows that the plan no longer asks for. */
async function withdrawOthers(
  deps: Deps,
  tx: Transaction,
  propertyId: string,
  taskIds: readonly string[],
  wanted: readonly Reminder[],
): Promise<void> {
  await deps.sequelize.query(
    `update messages set state = 'withdrawn', updated_at = now()
     where state = 'waiting' and property_id = :propertyId
       and (kind in ('evening', 'morning') or (kind in ('closing', 'planChanged') and task_id in (select jsonb_array_elements_text(:taskIds::jsonb)::uuid)))
       and dedupe_key not in (select jsonb_array_elements_text(:keys::jsonb))`,
    {
      replacements: {
        propertyId,
        taskIds: JSON.stringify(taskIds),
        keys: JSON.stringify(wanted.map((reminder) => reminder.key)),
      },
      transaction: tx,
    },
  );
}
