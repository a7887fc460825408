import type { CreationAttributes, Transaction } from 'sequelize';

import { holds } from '@/protocols/plan/conditions';
import { localDate } from '@/protocols/time/zoned';
import type { AnimalClass, Condition } from '@/protocols/types';
import type { Input } from '@/shared/routes';
import type { Deps } from '../deps';
import { RecordStep } from '../models';
import { authoritiesOf, type AuthorityUse } from '../queries/authorityUse';
import { rows } from '../queries/rows';
import type { TaskRow } from '../queries/tasks';

type RecordInput = Input<'POST /api/tasks/:taskId/records'>['body']['records'][number];

export interface Allocation {
  /** Vet under whose direction a record was made, by record id. */
  directionOf: Map<string, string>;
  write(transaction: Transaction): Promise<void>;
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
  const treated = await treatedUnder(
    deps,
    authorities.map((a) => a.id),
    tx,
  );
  const classes = await classesOf(deps, records, tx);
  const batches = await activesOfBatches(deps, records, tx);
  const directionOf = new Map<string, string>();
  const written = records.flatMap((record) => {
    const animalClass = classes.get(record.animalId ?? '') ?? task.class;
    const day = localDate(Date.parse(record.at), task.zone);
    const observed = observedIn(task, record);
    return task.steps
      .filter((step) => holds(step.when as Condition | undefined, { class: animalClass, observed }) !== false)
      .flatMap((step): Written[] => {
        const exception = record.exceptions?.find((e) => e.stepId === step.id);
        const outcome = exception?.outcome ?? record.outcome;
        const base = {
          recordId: record.id,
          stepId: step.id,
          kind: step.kind,
          outcome,
          reason: exception?.reason ?? null,
        };
        if (step.doses.length === 0) return [{ ...base, ...nothingGiven }];
        return step.doses.map((dose, item) => {
          const authority =
            outcome === 'done' ? allot(authorities, treated, record, dose.active, animalClass, day) : null;
          if (authority) directionOf.set(record.id, authority.issuedBy);
          const productBatchId = record.batchId && batches.get(record.batchId) === dose.active ? record.batchId : null;
          const amount = outcome === 'done' ? dose.amount : null;
          return {
            ...base,
            item,
            active: dose.active,
            amount,
            unit: dose.unit,
            route: dose.route,
            productBatchId,
            authorityId: authority?.id ?? null,
          };
        });
      });
  });
  return {
    directionOf,
    write: async (transaction) => {
      await RecordStep.bulkCreate(written, { transaction });
    },
  };
}

type Written = CreationAttributes<RecordStep>;

const nothingGiven = {
  item: 0,
  active: null,
  amount: null,
  unit: null,
  route: null,
  productBatchId: null,
  authorityId: null,
};

/** What was seen in the animal; what was not seen counts as the protocol says. */
const observedIn = (task: TaskRow, record: RecordInput): Record<string, string> => ({
  ...Object.fromEntries(
    task.steps.flatMap((step) =>
      step.observation && step.observation.onUnknown !== 'askVet'
        ? [[step.observation.id, step.observation.onUnknown]]
        : [],
    ),
  ),
  ...record.observed,
});

/** The oldest authority that covers it; the animal is counted against it unless it was already. */
function allot(
  authorities: readonly AuthorityUse[],
  treated: Map<string, Set<string>>,
  record: RecordInput,
  active: string,
  animalClass: AnimalClass,
  day: string,
): AuthorityUse | null {
  const who = record.animalId ?? record.id;
  for (const a of authorities) {
    const seen = treated.get(a.id) ?? new Set();
    const fits =
      a.active === active &&
      a.classes.includes(animalClass) &&
      !a.withdrawnAt &&
      a.validFrom <= day &&
      a.validTo >= day;
    if (!fits || (!seen.has(who) && a.used + record.head > a.head)) continue;
    if (!seen.has(who)) a.used += record.head;
    treated.set(a.id, seen.add(who));
    return a;
  }
  return null;
}

async function treatedUnder(deps: Deps, ids: readonly string[], tx: Transaction): Promise<Map<string, Set<string>>> {
  const found = await rows<{ id: string; animals: string[] }>(
    deps,
    `select s.authority_id as id, array_agg(distinct r.animal_id::text) as animals from record_steps s
      join records r on r.id = s.record_id where s.authority_id = any($1::uuid[]) and r.animal_id is not null
      and not exists (select 1 from records u where u.corrects_id = r.id) group by s.authority_id`,
    [ids],
    tx,
  );
  return new Map(found.map((row) => [row.id, new Set(row.animals)]));
}

async function classesOf(
  deps: Deps,
  records: readonly RecordInput[],
  tx: Transaction,
): Promise<Map<string, AnimalClass>> {
  const ids = records.flatMap((record) => (record.animalId ? [record.animalId] : []));
  const found = await rows<{ id: string; class: AnimalClass }>(
    deps,
    'select id, class from animals where id = any($1::uuid[])',
    [ids],
    tx,
  );
  return new Map(found.map((row) => [row.id, row.class]));
}

async function activesOfBatches(
  deps: Deps,
  records: readonly RecordInput[],
  tx: Transaction,
): Promise<Map<string, string>> {
  const ids = [...new Set(records.flatMap((record) => (record.batchId ? [record.batchId] : [])))];
  if (ids.length === 0) return new Map();
  const found = await rows<{ id: string; active: string }>(
    deps,
    'select b.id, p.active from product_batches b join products p on p.id = b.product_id where b.id = any($1::uuid[])',
    [ids],
    tx,
  );
  return new Map(found.map((row) => [row.id, row.active]));
}
