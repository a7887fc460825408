import type { Transaction } from 'sequelize';

import { t } from '@/shared/messages';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { Cohort, Task } from '../models';
import { taskById, tasksWhere, type TaskRow } from '../queries/tasks';
import { planReminders, withdrawReminders } from './planReminders';

/**
 * Brings a task's and its cohort's state in step with the records: planned, in work or done; a cohort is finished
 * when nothing is open, and runs again when a record is taken back. Reminders follow.
 */
export async function settleTask(deps: Deps, before: TaskRow, transaction: Transaction): Promise<void> {
  const after = await taskById(deps, before.id, transaction);
  if (!after || after.state === 'cancelled') return;
  const state = after.done >= after.head ? 'done' : after.done > 0 ? 'inWork' : 'planned';
  if (state === after.state) return;
  await Task.update(
    { state, revision: after.revision + 1, updatedAt: deps.now() },
    { where: { id: after.id }, transaction },
  );
  if (state === 'done') await withdrawReminders(deps, transaction, after.id);
  else if (before.state === 'done') await planReminders(deps, transaction, after.propertyId, [after.id]);
  await settleCohort(deps, after.cohortId, transaction);
}

/** The same for every task of the group: an animal that leaves, or comes back, counts in all of them. */
export async function settleGroup(deps: Deps, groupId: string, transaction: Transaction): Promise<void> {
  const tasks = await tasksWhere(deps, `t.group_id = $1 and t.state <> 'cancelled'`, [groupId], transaction);
  for (const task of tasks) await settleTask(deps, task, transaction);
}

async function settleCohort(deps: Deps, id: string, transaction: Transaction): Promise<void> {
  const cohort = await Cohort.findByPk(id, { transaction, lock: transaction.LOCK.NO_KEY_UPDATE });
  if (!cohort || (cohort.state !== 'running' && cohort.state !== 'finished')) return;
  const open = await Task.count({ where: { cohortId: id, state: ['planned', 'inWork'] }, transaction });
  const state = open === 0 ? 'finished' : 'running';
  if (state === cohort.state) return;
  await cohort.update({ state, updatedAt: deps.now() }, { transaction });
  if (state === 'finished')
    await audit(transaction, {
      at: deps.now(),
      userId: null,
      propertyId: cohort.propertyId,
      cohortId: id,
      action: 'cohort.finish',
      summary: t('cohorts.audit.finished', { name: cohort.name }),
    });
}
