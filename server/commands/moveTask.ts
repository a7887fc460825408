import type { Transaction } from 'sequelize';

import { calendarFindings } from '@/protocols/plan/calendarFindings';
import { replan } from '@/protocols/plan/replan';
import { toInstant } from '@/protocols/time/zoned';
import type { Finding, PlannedVisit } from '@/protocols/types';
import { t } from '@/shared/messages';
import { dayClock } from '@/shared/when';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { AppError, failure } from '../http/errors';
import { Cohort, Group, Task } from '../models';
import type { Actor } from '../policies/actor';
import { presentFindings } from '../presenters/findings';
import { readPlanSource, type PlanSource } from '../queries/planSource';
import { rows } from '../queries/rows';
import { planReminders } from './planReminders';

export interface MoveEffect {
  task: Task;
  visit: PlannedVisit;
}

export interface Move {
  task: Task;
  group: string;
  effects: MoveEffect[];
  /** Tasks that stay where they are but whose window changes. */
  windows: MoveEffect[];
  findings: Finding[];
  canMove: boolean;
  source: PlanSource;
}

/** When each visit of a group was begun: the first animal treated, since times are planned for the first animal. What could not be done is no treatment. */
const doneSql = `
  select t.visit_id as visit, min(r.at) as at from records r join tasks t on t.id = r.task_id
  where t.group_id = $1 and r.outcome in ('done', 'lost') and not exists (select 1 from records u where u.corrects_id = r.id)
  group by t.visit_id`;

/** Works out what moving a task does to the others; nothing is written. */
export async function workOutMove(
  deps: Deps,
  taskId: string,
  input: { dueLocal: string; revision: number },
  tx?: Transaction,
): Promise<Move> {
  const options = tx ? { transaction: tx } : {};
  const task = await Task.findByPk(taskId, { ...options, rejectOnEmpty: true });
  if (task.state === 'done' || task.state === 'cancelled') throw failure('refused', 'server.task.closed');
  if (task.revision !== input.revision) throw failure('stale', 'server.task.stale');
  const source = await readPlanSource(deps, task.cohortId, tx);
  const body = source.cohort.body;
  if (!body || source.cohort.state !== 'running') throw failure('refused', 'server.cohort.notRunning');
  const group = await Group.findByPk(task.groupId, { ...options, rejectOnEmpty: true });
  const tasks = await Task.findAll({ where: { groupId: task.groupId }, ...options });
  const first = tasks.filter((other) => other.occurrence === 1);
  const done = await rows<{ visit: string; at: Date }>(deps, doneSql, [task.groupId], tx);
  const shift = task.dueAt.getTime() - (first.find((other) => other.visitId === task.visitId)?.dueAt.getTime() ?? 0);
  const { at } = toInstant(input.dueLocal, task.zone);
  const result = replan(body, {
    zone: task.zone,
    options: source.cohort.options,
    ...(source.cohort.milkings.length > 0 ? { milkings: source.cohort.milkings } : {}),
    planned: Object.fromEntries(first.map((other) => [other.visitId, other.dueAt.getTime()])),
    done: Object.fromEntries(
      done.filter(({ visit }) => visit !== task.visitId).map(({ visit, at: when }) => [visit, when.getTime()]),
    ),
    move: { visit: task.visitId, to: at - shift },
  });
  const byKey = new Map(result.plan.visits.map((visit) => [`${visit.visit}|${visit.occurrence}`, visit]));
  const open = tasks.filter((other) => other.state === 'planned' || other.state === 'inWork');
  const all = open.flatMap((other): MoveEffect[] => {
    const visit = byKey.get(`${other.visitId}|${other.occurrence}`);
    return visit ? [{ task: other, visit }] : [];
  });
  const isMoved = ({ task: other, visit }: MoveEffect) => visit.at !== other.dueAt.getTime();
  const effects = all
    .filter(isMoved)
    .sort((a, b) => Number(b.task.id === taskId) - Number(a.task.id === taskId) || a.visit.at - b.visit.at);
  const findings = [...result.findings, ...calendar(deps, source, effects)];
  return {
    task,
    group: group.name,
    effects,
    windows: all.filter((effect) => !isMoved(effect)),
    findings,
    canMove: effects.length > 0 && !findings.some((f) => f.severity === 'stop'),
    source,
  };
}

function calendar(deps: Deps, source: PlanSource, effects: readonly MoveEffect[]): Finding[] {
  const { cohort } = source;
  const yarded = new Set(effects.filter(({ task }) => task.yarded).map(({ task }) => task.visitId));
  return calendarFindings(
    effects.map(({ visit }) => visit),
    yarded,
    {
      zone: cohort.zone,
      weekendDays: cohort.weekendDays,
      holidays: source.holidays,
      ...(cohort.yardFrom && cohort.yardTo ? { yardHours: { from: cohort.yardFrom, to: cohort.yardTo } } : {}),
      now: deps.now().getTime(),
    },
  );
}

/** Moves a task and what hangs on it, with reminders and audit entry, in one transaction. To the same time: nothing. */
export async function moveTask(
  deps: Deps,
  actor: Actor,
  taskId: string,
  input: { dueLocal: string; revision: number },
): Promise<string> {
  return deps.sequelize.transaction(async (transaction) => {
    const found = await Task.findByPk(taskId, { transaction, rejectOnEmpty: true });
    const cohort = await Cohort.findByPk(found.cohortId, {
      transaction,
      lock: transaction.LOCK.NO_KEY_UPDATE,
      rejectOnEmpty: true,
    });
    const move = await workOutMove(deps, taskId, input, transaction);
    const [moved] = move.effects;
    if (!moved) return cohort.id;
    if (!move.canMove) {
      const view = presentFindings(move.findings, { zone: cohort.zone, body: move.source.cohort.body });
      throw new AppError('refused', t('server.task.stopped'), undefined, view);
    }
    const from = move.task.dueAt;
    for (const { task, visit } of [...move.effects, ...move.windows]) {
      await task.update(
        {
          dueAt: new Date(visit.at),
          windowFrom: new Date(visit.window.earliest),
          windowTo: new Date(visit.window.latest),
          sinceAnchorMinutes: Math.round(visit.sinceAnchorMinutes),
          ...(visit.at === task.dueAt.getTime() ? {} : { movedFrom: task.movedFrom ?? task.dueAt }),
          revision: task.revision + 1,
          updatedAt: deps.now(),
        },
        { transaction },
      );
    }
    await cohort.update({ revision: cohort.revision + 1, updatedAt: deps.now() }, { transaction });
    await planReminders(
      deps,
      transaction,
      cohort.propertyId,
      [...move.effects, ...move.windows].map(({ task }) => task.id),
    );
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId: cohort.propertyId,
      cohortId: cohort.id,
      action: 'task.move',
      summary: t('cohorts.audit.moved', {
        title: move.task.title,
        group: move.group,
        from: dayClock(from.getTime(), cohort.zone),
        to: dayClock(moved.visit.at, cohort.zone),
        others: move.effects.length - 1,
      }),
      detail: { tasks: move.effects.map(({ task }) => task.id) },
    });
    return cohort.id;
  });
}
