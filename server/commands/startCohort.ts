import { randomUUID } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { t } from '@/shared/messages';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { AppError, failure } from '../http/errors';
import { Cohort, Property, Task } from '../models';
import type { Actor } from '../policies/actor';
import { presentFindings } from '../presenters/findings';
import { headOf, readPlanSource } from '../queries/planSource';
import { rows } from '../queries/rows';
import { makePlan, type MadeTask } from './makePlan';
import { planReminders } from './planReminders';

/**
 * Starts a cohort from the plan that was looked at: in one transaction its tasks, reminders and audit entry. Refused
 * when the plan has become another since, or while a stop stands. Starting it again from the same plan changes nothing.
 */
export async function startCohort(
  deps: Deps,
  actor: Actor,
  id: string,
  seen: { fingerprint: string; revision: number },
): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const found = await Cohort.findByPk(id, { transaction, rejectOnEmpty: true });
    // one start at a time at a property, or two could take the same animal
    await Property.findByPk(found.propertyId, { transaction, lock: transaction.LOCK.NO_KEY_UPDATE });
    const cohort = await Cohort.findByPk(id, {
      transaction,
      lock: transaction.LOCK.NO_KEY_UPDATE,
      rejectOnEmpty: true,
    });
    if (cohort.state === 'running' && (await startedFrom(deps, id, seen.fingerprint, transaction))) return;
    if (cohort.state !== 'planning') throw failure('refused', 'server.cohort.notPlanning');
    if (cohort.revision !== seen.revision) throw failure('stale', 'server.cohort.stale');
    const source = await readPlanSource(deps, id, transaction);
    const plan = makePlan(source, deps.now());
    if (plan.tasks.length === 0) throw failure('refused', 'server.cohort.noPlan');
    if (plan.fingerprint !== seen.fingerprint) throw failure('stale', 'server.cohort.planChanged');
    if (!plan.canStart) {
      const view = presentFindings(plan.findings, { zone: cohort.zone, body: source.cohort.body });
      throw new AppError('refused', t('server.cohort.stopped'), undefined, view);
    }
    await cohort.update(
      {
        state: 'running',
        startedBy: actor.userId,
        startedAt: deps.now(),
        findings: plan.findings,
        revision: cohort.revision + 1,
        updatedAt: deps.now(),
      },
      { transaction },
    );
    const ids = await writeTasks(deps, cohort, plan.tasks, transaction);
    await planReminders(deps, transaction, cohort.propertyId, ids);
    const head = source.groups.reduce((sum, group) => sum + headOf(group), 0);
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId: cohort.propertyId,
      cohortId: id,
      action: 'cohort.start',
      summary: t('cohorts.audit.started', { name: cohort.name, head, tasks: ids.length }),
      detail: { fingerprint: plan.fingerprint },
    });
  });
}

/** Whether it was this very plan that the cohort was started from: then the request is a repeat. */
async function startedFrom(deps: Deps, id: string, fingerprint: string, tx: Transaction): Promise<boolean> {
  const found = await rows<{ id: string }>(
    deps,
    `select id from audit_entries where cohort_id = $1 and action = 'cohort.start' and detail->>'fingerprint' = $2`,
    [id, fingerprint],
    tx,
  );
  return found.length > 0;
}

async function writeTasks(
  deps: Deps,
  cohort: Cohort,
  tasks: readonly MadeTask[],
  transaction: Transaction,
): Promise<string[]> {
  const written = tasks.map((task) => ({
    id: randomUUID(),
    cohortId: cohort.id,
    groupId: task.groupId,
    propertyId: cohort.propertyId,
    visitId: task.visit.visit,
    occurrence: task.visit.occurrence,
    title: task.title,
    yarded: task.yarded,
    dueAt: new Date(task.visit.at),
    windowFrom: new Date(task.visit.window.earliest),
    windowTo: new Date(task.visit.window.latest),
    zone: cohort.zone,
    sinceAnchorMinutes: Math.round(task.visit.sinceAnchorMinutes),
    anchorLabel: task.anchorLabel,
    steps: task.steps,
    state: 'planned' as const,
    revision: 0,
    createdAt: deps.now(),
    updatedAt: deps.now(),
  }));
  await Task.bulkCreate(written, { transaction });
  return written.map((task) => task.id);
}
