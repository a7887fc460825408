import { QueryTypes } from 'sequelize';

import { planReminders } from '@/server/commands/planReminders';

import type { JobContext } from '../context';

const AHEAD = 48 * 3_600_000;

/**
 * Derives the reminders of the next 48 hours anew, so that nothing depends on this worker having been up when a plan,
 * a membership, an engagement or somebody's wishes changed.
 */
export async function planAhead(context: JobContext): Promise<void> {
  const { deps } = context;
  const now = deps.now();
  const until = new Date(now.getTime() + AHEAD);
  const rows = await deps.sequelize.query<{ propertyId: string; taskIds: (string | null)[] }>(
    `select property_id as "propertyId", array_agg(id) as "taskIds" from (
       select property_id, id from tasks
       where state in ('planned', 'inWork') and due_at <= :until and window_to >= :now
       union
       select property_id, task_id from messages
       where state = 'waiting' and kind in ('evening', 'morning', 'closing', 'planChanged') and due_at <= :until) due
     group by property_id order by property_id`,
    { type: QueryTypes.SELECT, replacements: { now, until } },
  );
  for (const { propertyId, taskIds } of rows) {
    if (context.stopping()) return;
    try {
      const ids = taskIds.filter((taskId): taskId is string => taskId !== null);
      await deps.sequelize.transaction((tx) => planReminders(deps, tx, propertyId, ids));
    } catch (error) {
      // one property in trouble keeps no other waiting
      deps.log.error({ err: error, propertyId }, 'reminders not planned');
    }
  }
}
