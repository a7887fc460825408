import { t } from '@/shared/messages';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import { Cohort, Task } from '../models';
import type { Actor } from '../policies/actor';
import { planReminders } from './planReminders';

/** Cancels a cohort: what is recorded stays, open tasks are cancelled, and calendars and reminders follow. */
export async function cancelCohort(deps: Deps, actor: Actor, id: string, reason: string): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const cohort = await Cohort.findByPk(id, {
      transaction,
      lock: transaction.LOCK.NO_KEY_UPDATE,
      rejectOnEmpty: true,
    });
    if (cohort.state === 'cancelled') return;
    if (cohort.state === 'finished') throw failure('refused', 'server.cohort.over');
    const open = await Task.findAll({ where: { cohortId: id, state: ['planned', 'inWork'] }, transaction });
    for (const task of open)
      await task.update({ state: 'cancelled', revision: task.revision + 1, updatedAt: deps.now() }, { transaction });
    await cohort.update(
      { state: 'cancelled', cancelledAt: deps.now(), revision: cohort.revision + 1, updatedAt: deps.now() },
      { transaction },
    );
    await planReminders(
      deps,
      transaction,
      cohort.propertyId,
      open.map((task) => task.id),
    );
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId: cohort.propertyId,
      cohortId: id,
      action: 'cohort.cancel',
      summary: t('cohorts.audit.cancelled', { name: cohort.name, reason }),
      detail: { reason, tasks: open.length },
    });
  });
}
