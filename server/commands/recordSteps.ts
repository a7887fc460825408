import type { CreationAttributes, Transaction } from 'sequelize';

import { holds } from '@/protocols/plan/conditions';
import { localDate } from '@/protocols/time/zoned';
import type { AnimalClass, Condition } from '@/protocols/types';
import type { Input } from '@/shared/routes';
import type { Deps } from '../deps';
import { RecordStep } from '../models';
import { authoritiesOf, type AuthorityUse } from '../queries/authorityUse';
import { rows } from '../queries/rows';
import { liveRecords, type TaskRow } from '../queries/tasks';
import { readBalances, type Balances, type Given } from './authorityBalance';

type RecordInput = Input<'POST /api/tasks/:taskId/records'>['body']['records'][number];
type Written = CreationAttributes<RecordStep>;

export interface Allocation {
  /** Vet under whose direction a record was made, by record id. */
  directionOf: Map<string, string>;
  write(transaction: Transaction): Promise<void>;
}

interface Known {
  authorities: AuthorityUse[];
  balances: Balances;
  /** Class and what was seen in earlier visits, by animal. */
  classes: Map<string, AnimalClass>;
  seen: Map<string, Record<string, string>>;
  /** Active of each product batch. */
  batches: Map<string, string>;
}

/**
 * What each record gave: the doses of its visit for the animal's class, each set against the oldest authority in
 * force that still has head left. Nothing is refused for want of one: what was done is a fact, and the missing
 * authority shows.
 */
export async function recordSteps(
  deps: Deps,
  task: TaskRow,
  records: readonly RecordInput[],
  tx: Transaction,
): Promise<Allocation> {
  const authorities = await authoritiesOf(deps, task.propertyId, task.cohortId, tx);
  const known: Known = {
    authorities,
    balances: await readBalances(deps, authorities, tx),
    classes: await classesOf(deps, records, tx),
    seen: await seenBefore(deps, task, records, tx),
    batches: await activesOfBatches(deps, task.propertyId, records, tx),
  };
  const directionOf = new Map<string, string>();
  const written = records.flatMap((record) => stepsOf(task, record, known, directionOf));
  return {
    directionOf,
    write: async (transaction) => {
      await RecordStep.bulkCreate(written, { transaction });
    },
  };
}

function stepsOf(task: TaskRow, record: RecordInput, known: Known, directionOf: Map<string, string>): Written[] {
  const animalClass = known.classes.get(record.animalId ?? '') ?? task.class;
  const day = localDate(Date.parse(record.at), task.zone);
  const observed = observedIn(task, record, known.seen.get(record.animalId ?? '') ?? {});
  return task.steps
    .filter((step) => holds(step.when as Condition | undefined, { class: animalClass, observed }) !== false)
    .flatMap((step): Written[] => {
      const exception = record.exceptions?.find((e) => e.stepId === step.id);
      const outcome = exception?.outcome ?? outcomeOf(record, step.kind);
      const base = {
        recordId: record.id,
        stepId: step.id,
        kind: step.kind,
        outcome,
        reason: exception?.reason ?? null,
      };
      if (step.doses.length === 0) return [{ ...base, ...nothingGiven }];
      return step.doses.map((dose, item) => {
        const given = {
          animalId: record.animalId,
          head: record.head,
          groupId: task.groupId,
          act: `${task.id} ${step.id} ${item}`,
        };
        const authority = outcome === 'done' ? allot(known, given, dose.active, animalClass, day) : null;
        if (authority) directionOf.set(record.id, authority.issuedBy);
        return {
          ...base,
          item,
          active: dose.active,
          amount: outcome === 'done' ? dose.amount : null,
          unit: dose.unit,
          route: dose.route,
          productBatchId: record.batchId && known.batches.get(record.batchId) === dose.active ? record.batchId : null,
          authorityId: authority?.id ?? null,
        };
      });
    });
}

/** Only a device can be lost: where a whole act is called lost, nothing else was given. */
const outcomeOf = (record: RecordInput, kind: string): RecordInput['outcome'] =>
  record.outcome === 'lost' && !kind.startsWith('device') ? 'notDone' : record.outcome;

const nothingGiven = {
  item: 0,
  active: null,
  amount: null,
  unit: null,
  route: null,
  productBatchId: null,
  authorityId: null,
};

/** What was seen in the animal, now or in an earlier visit; what was not seen counts as the protocol says. */
const observedIn = (task: TaskRow, record: RecordInput, before: Record<string, string>): Record<string, string> => ({
  ...Object.fromEntries(
    task.steps.flatMap((step) =>
      step.observation && step.observation.onUnknown !== 'askVet'
        ? [[step.observation.id, step.observation.onUnknown]]
        : [],
    ),
  ),
  ...before,
  ...record.observed,
});

/** The oldest authority that covers it and has head left. */
function allot(known: Known, given: Given, active: string, animalClass: AnimalClass, day: string): AuthorityUse | null {
  const fits = (a: AuthorityUse) =>
    a.active === active && a.classes.includes(animalClass) && !a.withdrawnAt && a.validFrom <= day && a.validTo >= day;
  return known.authorities.find((authority) => fits(authority) && known.balances.take(authority, given)) ?? null;
}

const animalsOf = (records: readonly RecordInput[]): string[] =>
  records.flatMap((record) => (record.animalId ? [record.animalId] : []));

async function classesOf(
  deps: Deps,
  records: readonly RecordInput[],
  tx: Transaction,
): Promise<Map<string, AnimalClass>> {
  const found = await rows<{ id: string; class: AnimalClass }>(
    deps,
    'select id, class from animals where id = any($1::uuid[])',
    [animalsOf(records)],
    tx,
  );
  return new Map(found.map((row) => [row.id, row.class]));
}

/**
 * What the group's other visits saw in each animal, the latest of each observation. An animal that was looked at and
 * said nothing of counts as the protocol says, as its own visit counted it.
 */
async function seenBefore(
  deps: Deps,
  task: TaskRow,
  records: readonly RecordInput[],
  tx: Transaction,
): Promise<Map<string, Record<string, string>>> {
  const found = await rows<{ animalId: string; observed: Record<string, string>; steps: TaskRow['steps'] }>(
    deps,
    `select r.animal_id as "animalId", r.observed, t.steps from records r join tasks t on t.id = r.task_id
      where t.group_id = $1 and t.id <> $2 and r.animal_id = any($3::uuid[]) and r.outcome = 'done'
        and t.steps @? '$[*].observation' and ${liveRecords('r')} order by r.at`,
    [task.groupId, task.id, animalsOf(records)],
    tx,
  );
  const seen = new Map<string, Record<string, string>>();
  for (const { animalId, observed, steps } of found)
    for (const { observation } of steps) {
      const result = observation && (observed[observation.id] ?? unknownOf(observation));
      if (observation && result) seen.set(animalId, { ...seen.get(animalId), [observation.id]: result });
    }
  return seen;
}

const unknownOf = (observation: { onUnknown: string }): string | undefined =>
  observation.onUnknown === 'askVet' ? undefined : observation.onUnknown;

async function activesOfBatches(
  deps: Deps,
  propertyId: string,
  records: readonly RecordInput[],
  tx: Transaction,
): Promise<Map<string, string>> {
  const ids = [...new Set(records.flatMap((record) => (record.batchId ? [record.batchId] : [])))];
  if (ids.length === 0) return new Map();
  const found = await rows<{ id: string; active: string }>(
    deps,
    `select b.id, p.active from product_batches b join products p on p.id = b.product_id
      where b.property_id = $1 and b.id = any($2::uuid[])`,
    [propertyId, ids],
    tx,
  );
  return new Map(found.map((row) => [row.id, row.active]));
}
