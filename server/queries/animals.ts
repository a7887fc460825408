import type { Transaction } from 'sequelize';

import type { Animal } from '@/shared/contracts/herd';
import { t, tData } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import type { HerdAnimal } from '../sheets/import/types';
import { rows } from './rows';
import { liveRecords } from './tasks';

interface Row extends Omit<Animal, 'updatedAt' | 'cohort'> {
  propertyId: string;
  updatedAt: Date;
  cohortId: string | null;
  cohortName: string | null;
}

const columns = `a.id, a.property_id as "propertyId", a.tag, a.eid, a.class, a.breed, a.birth, a.sire, a.dam,
  a.last_calving as "lastCalving", a.last_service as "lastService", a.known_empty as "knownEmpty",
  a.weight_kg as "weightKg", a.condition, a.paddock, a.note, a.state, a.updated_at as "updatedAt"`;

/** The cohort that an animal is in now: running before planning. */
const inCohort = `left join lateral (
  select c.id, c.name from enrolments e join groups g on g.id = e.group_id join cohorts c on c.id = g.cohort_id
  where e.animal_id = a.id and e.left_at is null and c.state in ('planning', 'running')
  order by c.state desc, c.name limit 1) c on true`;

const sql = `select ${columns}, c.id as "cohortId", c.name as "cohortName" from animals a ${inCohort}`;

function present(row: Row): Animal {
  const { propertyId: _, cohortId, cohortName, updatedAt, ...rest } = row;
  return {
    ...rest,
    cohort: cohortId && cohortName ? { id: cohortId, name: cohortName } : null,
    updatedAt: updatedAt.toISOString(),
  };
}

interface Filter {
  search?: string | undefined;
  class?: string | undefined;
  available?: 'yes' | undefined;
  after?: string | undefined;
  limit: number;
}

const encode = (row: Row) => Buffer.from(JSON.stringify([row.tag, row.id])).toString('base64url');
function decode(after: string): [string, string] {
  try {
    const [tag, id] = JSON.parse(Buffer.from(after, 'base64url').toString()) as unknown[];
    if (typeof tag === 'string' && typeof id === 'string' && /^[0-9a-f-]{36}$/.test(id)) return [tag, id];
  } catch {
    // said below, as for anything else that is no place to go on from
  }
  throw failure('invalid', 'server.invalid');
}

/** `%` and `_` are characters of a tag, not wildcards. */
const literal = (text: string): string => text.replace(/[\\%_]/g, (c) => `\\${c}`);

/** Animals by tag, page by page. A search finds any part of the tag, or of the EID with or without spaces. */
export async function listAnimals(
  deps: Deps,
  propertyId: string,
  filter: Filter,
): Promise<Output<'GET /api/properties/:propertyId/animals'>> {
  const [tag, id] = filter.after ? decode(filter.after) : [null, null];
  const wanted = filter.search?.trim();
  const found = await rows<Row>(
    deps,
    `${sql} where a.property_id = $1 and a.state = 'present'
      and ($2::text is null or a.tag ilike $2 or a.eid like $3)
      and ($4::text is null or a.class = $4) and (not $5::boolean or c.id is null)
      and ($6::text is null or (a.tag, a.id) > ($6, $7::uuid)) order by a.tag, a.id limit $8`,
    [
      propertyId,
      wanted ? `%${literal(wanted)}%` : null,
      wanted ? `%${literal(wanted.replace(/\s/g, ''))}%` : null,
      filter.class ?? null,
      filter.available === 'yes',
      tag,
      id,
      filter.limit + 1,
    ],
  );
  const page = found.slice(0, filter.limit);
  const last = page.at(-1);
  return { items: page.map(present), next: found.length > filter.limit && last ? encode(last) : null };
}

interface EventRow {
  at: Date;
  title: string;
  cohort: string;
  outcome: string;
  reason: string | null;
  by: string;
  note: string | null;
}

/** An animal with its history, newest first. */
export async function readAnimal(deps: Deps, id: string): Promise<Output<'GET /api/animals/:animalId'>> {
  const [row] = await rows<Row>(deps, `${sql} where a.id = $1`, [id]);
  if (!row) throw failure('notFound', 'server.notFound');
  const records = await rows<EventRow>(
    deps,
    `select r.at, t.title, c.name as cohort, r.outcome, r.reason, u.name as by, r.note from records r
      join tasks t on t.id = r.task_id join cohorts c on c.id = t.cohort_id join users u on u.id = r.user_id
      where r.animal_id = $1 and ${liveRecords('r')} order by r.at desc limit 200`,
    [id],
  );
  const imports = await rows<{ at: Date; file: string; by: string }>(
    deps,
    `select i.created_at as at, i.file_name as file, u.name as by from animal_imports i join users u on u.id = i.user_id
      where i.property_id = $2 and $1::uuid = any(i.animal_ids) order by i.created_at desc limit 20`,
    [id, row.propertyId],
  );
  const events = [
    ...records.map((record) => ({
      at: record.at.toISOString(),
      kind: 'record',
      title: record.title,
      detail: [
        tData(`task.outcome.${record.outcome}`, record.outcome),
        record.reason ? tData(`task.reason.${record.reason}`, record.reason) : null,
        record.cohort,
        record.note,
      ]
        .filter(Boolean)
        .join(' · '),
      by: record.by,
    })),
    ...imports.map((one) => ({
      at: one.at.toISOString(),
      kind: 'import',
      title: t('herd.imported'),
      detail: one.file,
      by: one.by,
    })),
  ];
  return { ...present(row), propertyId: row.propertyId, events: events.sort((a, b) => b.at.localeCompare(a.at)) };
}

/** The herd as an import sees it; locked in a transaction, so that what is planned is what is written. */
export const herdForImport = (deps: Deps, propertyId: string, tx?: Transaction): Promise<HerdAnimal[]> =>
  rows<HerdAnimal>(
    deps,
    `select ${columns} from animals a where a.property_id = $1${tx ? ' for update' : ''}`,
    [propertyId],
    tx,
  );
