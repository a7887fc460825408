import { randomUUID } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { t } from '@/shared/messages';
import type { Input } from '@/shared/routes';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { badField, failure } from '../http/errors';
import { Cohort, Enrolment, Group, Property } from '../models';
import type { Actor } from '../policies/actor';
import { rows } from '../queries/rows';

type Create = Input<'POST /api/properties/:propertyId/cohorts'>['body'];
type Patch = Input<'PATCH /api/cohorts/:cohortId'>['body'];
type GroupInput = NonNullable<Create['groups']>[number];

/** Begins a cohort that is being planned. The same id again is the same cohort. */
export async function createCohort(deps: Deps, actor: Actor, propertyId: string, input: Create): Promise<string> {
  return deps.sequelize.transaction(async (transaction) => {
    const again = await Cohort.findByPk(input.id, { transaction });
    if (again?.propertyId === propertyId) return again.id;
    if (again) throw failure('conflict', 'server.sameId');
    const property = await Property.findByPk(propertyId, { transaction, rejectOnEmpty: true });
    await mustBeUsable(deps, propertyId, input.protocolVersionId ?? null, transaction);
    const visit = input.anchor?.visit ?? null;
    if (!(await hasVisit(deps, input.protocolVersionId ?? null, visit, transaction)))
      throw badField('anchor.visit', t('server.cohort.unknownVisit'));
    await Cohort.create(
      {
        id: input.id,
        propertyId,
        name: input.name,
        protocolVersionId: input.protocolVersionId ?? null,
        options: input.options ?? {},
        anchorVisit: visit,
        anchorLocal: input.anchor?.local ?? null,
        zone: property.zone,
        createdBy: actor.userId,
        createdAt: deps.now(),
        updatedAt: deps.now(),
      },
      { transaction },
    );
    if (input.groups) await writeGroups(deps, input.id, propertyId, input.groups, transaction);
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId,
      cohortId: input.id,
      action: 'cohort.create',
      summary: t('cohorts.audit.created', { name: input.name }),
    });
    return input.id;
  });
}

/** Changes a cohort that is being planned: absent leaves, null clears, groups are replaced as a whole. */
export async function patchCohort(deps: Deps, actor: Actor, id: string, patch: Patch): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const cohort = await Cohort.findByPk(id, {
      transaction,
      lock: transaction.LOCK.NO_KEY_UPDATE,
      rejectOnEmpty: true,
    });
    if (cohort.state !== 'planning') throw failure('refused', 'server.cohort.notPlanning');
    if (cohort.revision !== patch.revision) throw failure('stale', 'server.cohort.stale');
    if (patch.protocolVersionId) await mustBeUsable(deps, cohort.propertyId, patch.protocolVersionId, transaction);
    const versionId = patch.protocolVersionId === undefined ? cohort.protocolVersionId : patch.protocolVersionId;
    const visit = patch.anchor === undefined ? cohort.anchorVisit : (patch.anchor?.visit ?? null);
    const known = await hasVisit(deps, versionId, visit, transaction);
    if (!known && patch.anchor) throw badField('anchor.visit', t('server.cohort.unknownVisit'));
    await cohort.update(
      {
        ...(patch.name === undefined ? {} : { name: patch.name }),
        ...(patch.protocolVersionId === undefined ? {} : { protocolVersionId: patch.protocolVersionId }),
        ...(patch.options === undefined ? {} : { options: patch.options }),
        // another protocol may lack the visit that was fixed: then its service is
        anchorVisit: known ? visit : null,
        ...(patch.anchor === undefined ? {} : { anchorLocal: patch.anchor?.local ?? null }),
        revision: cohort.revision + 1,
        updatedAt: deps.now(),
      },
      { transaction },
    );
    if (patch.groups) await writeGroups(deps, id, cohort.propertyId, patch.groups, transaction);
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId: cohort.propertyId,
      cohortId: id,
      action: 'cohort.change',
      summary: t('cohorts.audit.changed', { name: cohort.name }),
      detail: { fields: Object.keys(patch).filter((key) => key !== 'revision') },
    });
  });
}

/** Only a signed-off version of an organisation that is engaged at the property now can be planned. */
async function mustBeUsable(deps: Deps, propertyId: string, versionId: string | null, tx: Transaction): Promise<void> {
  if (!versionId) return;
  const found = await rows<{ ok: number }>(
    deps,
    `select 1 as ok from protocol_versions v join protocols p on p.id = v.protocol_id
       join engagements e on e.organisation_id = p.organisation_id join properties f on f.id = e.property_id
      where v.id = $1 and v.state = 'signedOff' and e.property_id = $2
        and e.from_date <= ($3::timestamptz at time zone f.zone)::date
        and (e.to_date is null or e.to_date >= ($3::timestamptz at time zone f.zone)::date)`,
    [versionId, propertyId, deps.now()],
    tx,
  );
  if (found.length === 0) throw badField('protocolVersionId', t('server.cohort.notSignedOff'));
}

/** Whether the visit that a plan hangs on is one of the protocol's; without one, or without a protocol, nothing is wrong. */
async function hasVisit(deps: Deps, versionId: string | null, visit: string | null, tx: Transaction): Promise<boolean> {
  if (!versionId || visit === null) return true;
  const found = await rows<{ ok: number }>(
    deps,
    `select 1 as ok from protocol_versions where id = $1 and body->'visits' @> jsonb_build_array(jsonb_build_object('id', $2::text))`,
    [versionId, visit],
    tx,
  );
  return found.length > 0;
}

/** Checks every group before any is written, and names the one that is wrong. */
async function mustBeAnimals(
  deps: Deps,
  propertyId: string,
  groups: readonly GroupInput[],
  tx: Transaction,
): Promise<void> {
  const all = new Set<string>();
  for (const [i, group] of groups.entries()) {
    const animals = group.animalIds ?? [];
    if (animals.length > 0 === (group.head !== undefined))
      throw badField(`groups.${i}.head`, t('server.cohort.animalOrHead'));
    for (const animal of animals) {
      if (all.has(animal)) throw badField(`groups.${i}.animalIds`, t('server.cohort.twice'));
      all.add(animal);
    }
  }
  const known = await rows<{ id: string }>(
    deps,
    `select id from animals where property_id = $1 and state = 'present' and id = any($2::uuid[])`,
    [propertyId, [...all]],
    tx,
  );
  if (known.length !== all.size) {
    const found = new Set(known.map((row) => row.id));
    const i = groups.findIndex((group) => group.animalIds?.some((animal) => !found.has(animal)));
    throw badField(`groups.${i}.animalIds`, t('server.cohort.unknownAnimal'));
  }
}

async function writeGroups(
  deps: Deps,
  cohortId: string,
  propertyId: string,
  groups: readonly GroupInput[],
  transaction: Transaction,
): Promise<void> {
  await mustBeAnimals(deps, propertyId, groups, transaction);
  await Group.destroy({ where: { cohortId }, transaction });
  for (const [position, group] of groups.entries()) {
    await Group.create(
      {
        id: group.id,
        cohortId,
        position,
        name: group.name,
        class: group.class,
        headOnly: group.head ?? null,
        anchorLocal: group.local ?? null,
      },
      { transaction },
    );
    const enrolments = (group.animalIds ?? []).map((animalId) => ({ id: randomUUID(), groupId: group.id, animalId }));
    await Enrolment.bulkCreate(enrolments, { transaction, fields: ['id', 'groupId', 'animalId'] });
  }
}
