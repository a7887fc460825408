import { createHash, randomUUID } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { localDate } from '@/protocols/time/zoned';
import type { ImportPreview, ImportRequest } from '@/shared/contracts/herd';
import { t, tData } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { AppError, badField, failure } from '../http/errors';
import { Animal, AnimalImport, Property } from '../models';
import type { Actor } from '../policies/actor';
import { herdForImport } from '../queries/animals';
import { doubleFields, planImport, type ImportPlan, type PlannedRow } from '../sheets/import/plan';
import { readSheet } from '../sheets/import/sheet';
import type { Sheet } from '../sheets/import/types';

/** The file as a sheet; what can't be read says why, at the field. */
function sheetOf(request: ImportRequest): Sheet {
  const sheet = readSheet(Buffer.from(request.contentBase64, 'base64'));
  if ('unreadable' in sheet) throw badField('contentBase64', t(sheet.unreadable.key, sheet.unreadable.params));
  const twice = request.mapping ? doubleFields(request.mapping) : [];
  if (twice.length > 0)
    throw badField(
      'mapping',
      t('server.import.doubleField', { fields: twice.map((field) => tData(`herd.${field}`, field)) }),
    );
  return sheet;
}

async function planOf(
  deps: Deps,
  propertyId: string,
  request: ImportRequest,
  sheet: Sheet,
  tx?: Transaction,
): Promise<ImportPlan> {
  const property = await Property.findByPk(propertyId, { ...(tx ? { transaction: tx } : {}), rejectOnEmpty: true });
  return planImport({
    sheet,
    mapping: request.mapping,
    dateOrder: request.dateOrder,
    defaultClass: request.defaultClass,
    herd: await herdForImport(deps, propertyId, tx),
    today: localDate(deps.now().getTime(), property.zone),
  });
}

const show = (value: unknown): string | null => (value === null || value === undefined ? null : String(value));

const presentRow = (row: PlannedRow): ImportPreview['rows'][number] => ({
  line: row.line,
  action: row.action,
  tag: row.tag,
  eid: row.values.eid ?? null,
  changes: row.changes.map(({ field, from, to }) => ({ field, from: show(from), to: show(to) })),
  problems: row.problems.map((problem) => ({ field: problem.field, message: t(problem.key, problem.params) })),
});

/** Row by row, what an import would do. Nothing is written. */
export async function previewImport(deps: Deps, propertyId: string, request: ImportRequest): Promise<ImportPreview> {
  const sheet = sheetOf(request);
  const plan = await planOf(deps, propertyId, request, sheet);
  return {
    fileName: request.fileName,
    encoding: sheet.encoding,
    delimiter: sheet.delimiter,
    columns: plan.columns,
    mapping: plan.mapping,
    questions: plan.questions.map(({ kind, key, params, columns }) => ({ kind, message: t(key, params), columns })),
    counts: plan.counts,
    rows: plan.rows.map(presentRow),
  };
}

type Result = Output<'POST /api/properties/:propertyId/animal-imports'>;

/**
 * Imports animals in one transaction: everything is looked at again inside it, and a stop anywhere leaves nothing.
 * The same id again answers what was done the first time; the same id with another file is a conflict.
 */
export async function importAnimals(
  deps: Deps,
  actor: Actor,
  propertyId: string,
  request: ImportRequest,
): Promise<Result> {
  const sheet = sheetOf(request);
  const fileHash = createHash('sha256').update(request.contentBase64).digest('hex');
  return deps.sequelize.transaction(async (transaction) => {
    // one import at a time at a property
    await Property.findByPk(propertyId, { transaction, lock: transaction.LOCK.UPDATE });
    const before = await AnimalImport.findByPk(request.id, { transaction });
    if (before && (before.propertyId !== propertyId || before.fileHash !== fileHash))
      throw failure('conflict', 'server.sameId');
    if (before) return { id: before.id, counts: before.counts, animalIds: before.animalIds, repeated: true };
    const plan = await planOf(deps, propertyId, request, sheet, transaction);
    const open = plan.questions[0];
    if (open) throw new AppError('refused', t(open.key, open.params));
    const animalIds = await writeAnimals(deps, propertyId, plan, transaction);
    await AnimalImport.create(
      {
        id: request.id,
        propertyId,
        userId: actor.userId,
        fileName: request.fileName,
        fileHash,
        counts: plan.counts,
        animalIds,
        createdAt: deps.now(),
      },
      { transaction },
    );
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId,
      action: 'animal.import',
      summary: t('herd.audit.imported', { file: request.fileName, ...plan.counts }),
      detail: { importId: request.id, counts: plan.counts },
    });
    return { id: request.id, counts: plan.counts, animalIds, repeated: false };
  });
}

/** Writes what is to be created and updated; gives the ids of every animal that the file holds. */
async function writeAnimals(
  deps: Deps,
  propertyId: string,
  plan: ImportPlan,
  transaction: Transaction,
): Promise<string[]> {
  const created = plan.rows
    .filter((row) => row.action === 'create')
    .map((row) => ({
      id: randomUUID(),
      propertyId,
      tag: row.tag,
      state: 'present' as const,
      ...row.values,
      class: row.values.class ?? ('cow' as const),
      createdAt: deps.now(),
      updatedAt: deps.now(),
    }));
  await Animal.bulkCreate(created, { transaction });
  for (const row of plan.rows.filter((r) => r.action === 'update' && r.animalId))
    await Animal.update(
      { ...Object.fromEntries(row.changes.map(({ field, to }) => [field, to])), updatedAt: deps.now() },
      { where: { id: row.animalId ?? '' }, transaction },
    );
  const known = plan.rows.flatMap((row) => (row.action !== 'refuse' && row.animalId ? [row.animalId] : []));
  return [...created.map((animal) => animal.id), ...known];
}
