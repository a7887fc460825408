import { localDate } from '@/protocols/time/zoned';
import type { WorkRecord } from '@/shared/contracts/work';
import type { Output } from '@/shared/routes';
import { t, tData } from '@/shared/messages';
import { clock } from '@/shared/when';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import { presentTask } from '../presenters/tasks';
import { authoritiesOf } from './authorityUse';
import { rows } from './rows';
import { liveRecords, taskById, type TaskRow } from './tasks';

interface RecordRow {
  id: string;
  taskId: string;
  animalId: string | null;
  tag: string | null;
  head: number;
  outcome: WorkRecord['outcome'];
  reason: string | null;
  observed: Record<string, string>;
  at: Date;
  by: string;
  note: string | null;
  undoneBy: string | null;
  exceptions: WorkRecord['exceptions'];
}

const recordSql = `
  select r.id, r.task_id as "taskId", r.animal_id as "animalId", a.tag, r.head, r.outcome, r.reason, r.observed, r.at,
    u.name as by, r.note, undo.id as "undoneBy",
    coalesce((select jsonb_agg(distinct jsonb_build_object('stepId', s.step_id, 'outcome', s.outcome, 'reason', s.reason))
      from record_steps s where s.record_id = r.id and s.outcome <> r.outcome), '[]') as exceptions
  from records r join users u on u.id = r.user_id
  left join animals a on a.id = r.animal_id
  left join records undo on undo.corrects_id = r.id
  where r.task_id = $1 and r.outcome <> 'undone' order by r.at desc, r.id`;

const present = (row: RecordRow, zone: string): WorkRecord => ({
  ...row,
  at: row.at.toISOString(),
  atLocal: clock(row.at.getTime(), zone),
});

interface AnimalRow {
  animalId: string;
  tag: string;
  eid: string | null;
  class: string;
}

const animalSql = `
  select a.id as "animalId", a.tag, a.eid, a.class from enrolments e join animals a on a.id = e.animal_id
  where e.group_id = $1 and (e.left_at is null or exists (
    select 1 from records r where r.task_id = $2 and r.animal_id = a.id and ${liveRecords('r')})) order by a.tag`;

const batchSql = `
  select b.id, p.name || ' · ' || b.number as label, p.active, b.expiry from product_batches b join products p on p.id = b.product_id
  where b.property_id = $1 and p.active = any($2) order by b.expiry, b.number`;

/** A task with its animals, each with its record if it has one, and what a crew needs beside it. */
export async function readTaskWork(deps: Deps, taskId: string): Promise<Output<'GET /api/tasks/:taskId/work'>> {
  const task = await taskById(deps, taskId);
  if (!task) throw failure('notFound', 'server.notFound');
  const actives = [...new Set(task.steps.flatMap((step) => step.doses.map((dose) => dose.active)))];
  const [records, animals, batches, direction] = await Promise.all([
    rows<RecordRow>(deps, recordSql, [taskId]),
    task.headOnly === null ? rows<AnimalRow>(deps, animalSql, [task.groupId, taskId]) : Promise.resolve([]),
    rows<{ id: string; label: string; active: string; expiry: string }>(deps, batchSql, [task.propertyId, actives]),
    directionOf(deps, task),
  ]);
  const views = records.map((row) => present(row, task.zone));
  const live = new Map(views.filter((r) => r.undoneBy === null && r.animalId).map((r) => [r.animalId, r]));
  return {
    task: presentTask(task),
    animals: animals.map((animal) => ({ ...animal, record: live.get(animal.animalId) ?? null })),
    records: views.filter((r) => r.animalId === null || r.undoneBy !== null),
    batches,
    ...direction,
  };
}

/** Whose direction covers the task today, and what of it does not: shown where the act is. */
async function directionOf(
  deps: Deps,
  task: TaskRow,
): Promise<{ authorityNote: string | null; direction: string | null }> {
  const authorities = await authoritiesOf(deps, task.propertyId, task.cohortId);
  const today = localDate(deps.now().getTime(), task.zone);
  const needed: string[] = [...new Set(task.steps.flatMap((step) => step.doses.map((dose) => dose.active)))].filter(
    (a) => a !== 'heatAid',
  );
  const current = authorities.filter(
    (a) => !a.withdrawnAt && a.validFrom <= today && a.validTo >= today && a.classes.includes(task.class),
  );
  const missing = needed.filter((active) => !current.some((a) => String(a.active) === active));
  const names = [...new Set(current.filter((a) => needed.includes(String(a.active))).map((a) => a.issuedByName))];
  return {
    authorityNote:
      missing.length > 0
        ? t('server.record.noAuthority', { actives: missing.map((a) => tData(`active.${a}`, a)) })
        : null,
    direction: names.length > 0 ? names.join(', ') : null,
  };
}
