import { createHash } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { t, type MessageKey, type MessageParams } from '@/shared/messages';
import type { Input } from '@/shared/routes';
import { clock } from '@/shared/when';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import { Cohort, Enrolment, Task, WorkRecord } from '../models';
import type { Actor } from '../policies/actor';
import { rows } from '../queries/rows';
import { liveRecords, taskById, type TaskRow } from '../queries/tasks';
import { recordSteps } from './recordSteps';
import { settleGroup, settleTask } from './settleTask';

type RecordInput = Input<'POST /api/tasks/:taskId/records'>['body']['records'][number];
export interface Recorded {
  accepted: string[];
  refused: { id: string; message: string }[];
}

/**
 * Locks the cohort and the task, so that two phones can't record the same animal at once, and reads where it stands.
 * The cohort comes first, as it does for whoever moves or cancels, or the two could wait for each other.
 */
export async function lockedTask(deps: Deps, taskId: string, transaction: Transaction): Promise<TaskRow> {
  const found = await Task.findByPk(taskId, { transaction, rejectOnEmpty: true });
  await Cohort.findByPk(found.cohortId, { transaction, lock: transaction.LOCK.NO_KEY_UPDATE });
  await Task.findByPk(taskId, { transaction, lock: transaction.LOCK.NO_KEY_UPDATE, rejectOnEmpty: true });
  const task = await taskById(deps, taskId, transaction);
  if (!task) throw failure('notFound', 'server.notFound');
  return task;
}

interface Standing {
  task: TaskRow;
  animals: Set<string>;
  recorded: Map<string, { by: string; at: Date }>;
  known: Map<string, { taskId: string; animalId: string | null }>;
  batches: Set<string>;
  left: number;
}

async function standing(deps: Deps, task: TaskRow, ids: readonly string[], tx: Transaction): Promise<Standing> {
  const animals = await rows<{ id: string }>(
    deps,
    'select animal_id as id from enrolments where group_id = $1 and left_at is null',
    [task.groupId],
    tx,
  );
  const recorded = await rows<{ animalId: string; by: string; at: Date }>(
    deps,
    `select r.animal_id as "animalId", u.name as by, r.at from records r join users u on u.id = r.user_id
      where r.task_id = $1 and r.animal_id is not null and ${liveRecords('r')}`,
    [task.id],
    tx,
  );
  const known = await rows<{ id: string; taskId: string; animalId: string | null }>(
    deps,
    'select id, task_id as "taskId", animal_id as "animalId" from records where id = any($1::uuid[])',
    [ids],
    tx,
  );
  const batches = await rows<{ id: string }>(
    deps,
    'select id from product_batches where property_id = $1',
    [task.propertyId],
    tx,
  );
  return {
    task,
    batches: new Set(batches.map((row) => row.id)),
    animals: new Set(animals.map((row) => row.id)),
    recorded: new Map(recorded.map((row) => [row.animalId, row])),
    known: new Map(known.map((row) => [row.id, row])),
    left: task.head - task.done,
  };
}

/** Phones whose clocks run ahead by more than this are told; what they recorded stays on them. */
const clockAhead = 10 * 60_000;

/** Why a record can't be taken, or null. What the server has already is no reason: a repeat is taken again. */
function refusal(record: RecordInput, s: Standing, now: Date): [MessageKey, MessageParams] | null {
  if (s.task.state === 'cancelled') return ['server.record.taskCancelled', {}];
  if (Date.parse(record.at) > now.getTime() + clockAhead) return ['server.record.future', {}];
  const steps = new Set(s.task.steps.map((step) => step.id));
  if (record.exceptions?.some((exception) => !steps.has(exception.stepId))) return ['server.record.unknownStep', {}];
  if (record.batchId && !s.batches.has(record.batchId)) return ['server.record.unknownBatch', {}];
  if (!isSeenRightly(record, s.task)) return ['server.record.unknownResult', {}];
  if (s.task.headOnly !== null) {
    if (record.animalId !== null) return ['server.record.noAnimal', {}];
    return record.head > s.left ? ['server.record.tooMany', { left: s.left }] : null;
  }
  if (record.animalId === null) return ['server.record.needsAnimal', {}];
  const before = s.recorded.get(record.animalId);
  if (before) return ['server.record.already', { name: before.by, clock: clock(before.at.getTime(), s.task.zone) }];
  return s.animals.has(record.animalId) ? null : ['server.record.notInGroup', {}];
}

/** What was seen must be one of the results that this visit looks for. */
function isSeenRightly(record: RecordInput, task: TaskRow): boolean {
  const looks = new Map(task.steps.flatMap(({ observation }) => (observation ? [[observation.id, observation]] : [])));
  return Object.entries(record.observed ?? {}).every(([id, result]) =>
    looks.get(id)?.results.some((known) => known.id === result),
  );
}

/**
 * Records acts of one task. Good ones are kept even when others of the same request are refused; a repeated id
 * changes nothing and is accepted again.
 */
export async function recordWork(
  deps: Deps,
  actor: Actor,
  taskId: string,
  records: readonly RecordInput[],
): Promise<Recorded> {
  return deps.sequelize.transaction(async (transaction) => {
    const task = await lockedTask(deps, taskId, transaction);
    const result = await take(deps, actor, task, records, transaction);
    await settleTask(deps, task, transaction);
    return result;
  });
}

async function take(
  deps: Deps,
  actor: Actor,
  task: TaskRow,
  records: readonly RecordInput[],
  tx: Transaction,
): Promise<Recorded> {
  const s = await standing(
    deps,
    task,
    records.map((record) => record.id),
    tx,
  );
  const result: Recorded = { accepted: [], refused: [] };
  const good: RecordInput[] = [];
  for (const record of records) {
    const known = s.known.get(record.id);
    if (known && (known.taskId !== task.id || known.animalId !== record.animalId)) {
      result.refused.push({ id: record.id, message: t('server.record.sameId') });
      continue;
    }
    const why = known ? null : refusal(record, s, deps.now());
    if (why) {
      result.refused.push({ id: record.id, message: t(...why) });
      continue;
    }
    result.accepted.push(record.id);
    if (known) continue;
    good.push(record);
    s.left -= record.head;
    s.known.set(record.id, { taskId: task.id, animalId: record.animalId });
    if (record.animalId) s.recorded.set(record.animalId, { by: actor.name, at: new Date(record.at) });
  }
  await write(deps, actor, task, good, tx);
  return result;
}

async function write(
  deps: Deps,
  actor: Actor,
  task: TaskRow,
  records: readonly RecordInput[],
  transaction: Transaction,
): Promise<void> {
  if (records.length === 0) return;
  const allocation = await recordSteps(deps, task, records, transaction);
  await WorkRecord.bulkCreate(
    records.map((record) => ({
      id: record.id,
      taskId: task.id,
      propertyId: task.propertyId,
      animalId: record.animalId,
      head: record.head,
      outcome: record.outcome,
      reason: record.reason ?? null,
      observed: record.observed ?? {},
      at: new Date(record.at),
      receivedAt: deps.now(),
      userId: actor.userId,
      directionUserId: allocation.directionOf.get(record.id) ?? null,
      correctsId: null,
      note: record.note ?? null,
    })),
    { transaction },
  );
  await allocation.write(transaction);
  await leave(deps, task, records, transaction);
}

/** Animals that leave the program are out of every task in which they are not recorded. */
async function leave(
  deps: Deps,
  task: TaskRow,
  records: readonly RecordInput[],
  transaction: Transaction,
): Promise<void> {
  const left = records.filter((record) => record.outcome === 'withdrawn' && record.animalId);
  for (const record of left)
    await Enrolment.update(
      { leftAt: deps.now(), leftReason: record.reason ?? 'other' },
      { where: { groupId: task.groupId, animalId: record.animalId ?? '' }, transaction },
    );
  if (left.length > 0) await settleGroup(deps, task.groupId, transaction);
}

/** A name-based UUID (RFC 9562, version 8, SHA-256): the same act on the same animal always has the same id. */
export function derivedId(base: string, name: string): string {
  const hex = createHash('sha256').update(`${base}|${name}`).digest('hex');
  const variant = ((parseInt(hex.slice(16, 18), 16) & 0x3f) | 0x80).toString(16);
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-8${hex.slice(13, 16)}-${variant}${hex.slice(18, 20)}-${hex.slice(20, 32)}`;
}

type Rest = Input<'POST /api/tasks/:taskId/rest'>['body'];

/** Records everything that has no record yet as done. Refused when the number left is not the one that was seen. */
export async function recordRest(deps: Deps, actor: Actor, taskId: string, input: Rest): Promise<Recorded> {
  return deps.sequelize.transaction(async (transaction) => {
    const task = await lockedTask(deps, taskId, transaction);
    const open =
      task.headOnly === null
        ? await rows<{ id: string }>(
            deps,
            `select e.animal_id as id from enrolments e where e.group_id = $1 and e.left_at is null
              and not exists (select 1 from records r where r.task_id = $2 and r.animal_id = e.animal_id and ${liveRecords('r')})`,
            [task.groupId, task.id],
            transaction,
          )
        : [];
    const left = task.head - task.done;
    const before = await WorkRecord.findAll({
      attributes: ['id'],
      where: { id: await repeatIds(deps, task, input.id, transaction) },
      transaction,
    });
    if (before.length > 0) return { accepted: before.map((record) => record.id), refused: [] };
    if (left !== input.expectedHead) throw failure('conflict', 'server.record.restChanged', { left });
    const common = { outcome: 'done' as const, at: input.at, ...(input.batchId ? { batchId: input.batchId } : {}) };
    const records =
      task.headOnly === null
        ? open.map(({ id }) => ({ ...common, id: derivedId(input.id, id), animalId: id, head: 1 }))
        : [{ ...common, id: derivedId(input.id, 'rest'), animalId: null, head: left }];
    const result = left > 0 ? await take(deps, actor, task, records, transaction) : { accepted: [], refused: [] };
    await settleTask(deps, task, transaction);
    return result;
  });
}

async function repeatIds(deps: Deps, task: TaskRow, base: string, tx: Transaction): Promise<string[]> {
  if (task.headOnly !== null) return [derivedId(base, 'rest')];
  const all = await rows<{ id: string }>(
    deps,
    'select animal_id as id from enrolments where group_id = $1',
    [task.groupId],
    tx,
  );
  return all.map(({ id }) => derivedId(base, id));
}

type Undo = Input<'POST /api/records/:recordId/undo'>['body'];

/** Takes a record back by a later record that names it. The same id again changes nothing. */
export async function undoRecord(deps: Deps, actor: Actor, recordId: string, input: Undo): Promise<string> {
  return deps.sequelize.transaction(async (transaction) => {
    const record = await WorkRecord.findByPk(recordId, { transaction, rejectOnEmpty: true });
    const task = await lockedTask(deps, record.taskId, transaction);
    const before = await WorkRecord.findOne({ where: { correctsId: recordId }, transaction });
    if (before?.id === input.id) return task.id;
    if (before || record.outcome === 'undone') throw failure('conflict', 'server.record.undone');
    await WorkRecord.create(
      {
        id: input.id,
        taskId: record.taskId,
        propertyId: record.propertyId,
        animalId: record.animalId,
        head: record.head,
        outcome: 'undone',
        at: new Date(input.at),
        receivedAt: deps.now(),
        userId: actor.userId,
        correctsId: recordId,
        note: input.reason ?? null,
      },
      { transaction },
    );
    if (record.outcome === 'withdrawn' && record.animalId)
      await Enrolment.update(
        { leftAt: null, leftReason: null },
        { where: { groupId: task.groupId, animalId: record.animalId }, transaction },
      );
    if (record.outcome === 'withdrawn') await settleGroup(deps, task.groupId, transaction);
    await settleTask(deps, task, transaction);
    return task.id;
  });
}
