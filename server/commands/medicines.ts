import type { Transaction } from 'sequelize';

import { localDate } from '@/protocols/time/zoned';
import { t, tData } from '@/shared/messages';
import type { Input } from '@/shared/routes';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { badField, failure } from '../http/errors';
import { Authority, Cohort, Product, ProductBatch } from '../models';
import type { Actor } from '../policies/actor';
import { rows } from '../queries/rows';

/** Organisations engaged at a property now. */
async function engagedAt(deps: Deps, propertyId: string, tx: Transaction): Promise<Set<string>> {
  const found = await rows<{ id: string }>(
    deps,
    `select e.organisation_id as id from engagements e join properties p on p.id = e.property_id
      where e.property_id = $1 and e.from_date <= ($2::timestamptz at time zone p.zone)::date
        and (e.to_date is null or e.to_date >= ($2::timestamptz at time zone p.zone)::date)`,
    [propertyId, deps.now()],
    tx,
  );
  return new Set(found.map((row) => row.id));
}

type NewProduct = Input<'POST /api/properties/:propertyId/products'>['body'];

export async function createProduct(deps: Deps, actor: Actor, propertyId: string, input: NewProduct): Promise<Product> {
  return deps.sequelize.transaction(async (transaction) => {
    const again = await Product.findByPk(input.id, { transaction });
    if (again?.organisationId === input.organisationId) return again;
    if (again) throw failure('conflict', 'server.sameId');
    if (!(await engagedAt(deps, propertyId, transaction)).has(input.organisationId))
      throw badField('organisationId', t('server.medicine.notEngaged'));
    if (await Product.findOne({ where: { organisationId: input.organisationId, name: input.name }, transaction }))
      throw badField('name', t('server.medicine.nameTaken'));
    const product = await Product.create(input, { transaction });
    const summary = t('medicines.audit.product', { name: input.name });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId,
      organisationId: input.organisationId,
      action: 'product.create',
      summary,
    });
    return product;
  });
}

type NewBatch = Input<'POST /api/properties/:propertyId/product-batches'>['body'];

export async function createBatch(deps: Deps, actor: Actor, propertyId: string, input: NewBatch): Promise<string> {
  return deps.sequelize.transaction(async (transaction) => {
    const again = await ProductBatch.findByPk(input.id, { transaction });
    if (again?.propertyId === propertyId) return again.id;
    if (again) throw failure('conflict', 'server.sameId');
    const product = await Product.findByPk(input.productId, { transaction });
    if (!product || !(await engagedAt(deps, propertyId, transaction)).has(product.organisationId))
      throw badField('productId', t('server.medicine.noProduct'));
    const same = { propertyId, productId: input.productId, number: input.number };
    if (await ProductBatch.findOne({ where: same, transaction }))
      throw badField('number', t('server.medicine.batchTaken'));
    await ProductBatch.create({ ...input, propertyId }, { transaction });
    const summary = t('medicines.audit.batch', { name: product.name, number: input.number });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId,
      action: 'productBatch.create',
      summary,
    });
    return input.id;
  });
}

type NewAuthority = Input<'POST /api/cohorts/:cohortId/authorities'>['body'];

/** Issues a vet's direction for a cohort, in the name of a practice that is engaged at the property. */
export async function issueAuthority(deps: Deps, actor: Actor, cohortId: string, input: NewAuthority): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const again = await Authority.findByPk(input.id, { transaction });
    if (again?.cohortId === cohortId) return;
    if (again) throw failure('conflict', 'server.sameId');
    const cohort = await Cohort.findByPk(cohortId, { transaction, rejectOnEmpty: true });
    if (cohort.state === 'cancelled' || cohort.state === 'finished')
      throw failure('refused', 'server.medicine.cohortOver');
    const { propertyId } = cohort;
    const engaged = await engagedAt(deps, propertyId, transaction);
    const practice = [...actor.organisations].find(([id, held]) => engaged.has(id) && held.includes('vet'))?.[0];
    if (!practice) throw failure('forbidden', 'server.medicine.notPractice');
    await mustFit(deps, input, cohort.zone, transaction);
    const { productId = null, meatDays = null, milkHours = null, ...rest } = input;
    await Authority.create(
      {
        ...rest,
        productId,
        meatDays,
        milkHours,
        propertyId,
        cohortId,
        organisationId: practice,
        issuedBy: actor.userId,
        issuedAt: deps.now(),
      },
      { transaction },
    );
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId,
      cohortId,
      action: 'authority.issue',
      summary: t('medicines.audit.issued', {
        active: tData(`active.${input.active}`, input.active),
        head: input.head,
        to: input.validTo,
      }),
      detail: { authorityId: input.id },
    });
  });
}

async function mustFit(deps: Deps, input: NewAuthority, zone: string, transaction: Transaction): Promise<void> {
  if (input.validTo < input.validFrom) throw badField('validTo', t('server.medicine.validTo'));
  if (input.validTo < localDate(deps.now().getTime(), zone)) throw badField('validTo', t('server.medicine.validPast'));
  if (!input.productId) return;
  const product = await Product.findByPk(input.productId, { transaction });
  if (!product) throw badField('productId', t('server.medicine.noProduct'));
  if (product.active !== input.active) throw badField('productId', t('server.medicine.wrongActive'));
}

/** Withdraws an authority from now on; what was recorded under it stays. */
export async function withdrawAuthority(deps: Deps, actor: Actor, id: string): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const authority = await Authority.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE, rejectOnEmpty: true });
    if (authority.withdrawnAt) return;
    await authority.update({ withdrawnAt: deps.now() }, { transaction });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      propertyId: authority.propertyId,
      cohortId: authority.cohortId,
      action: 'authority.withdraw',
      summary: t('medicines.audit.withdrawn', { active: tData(`active.${authority.active}`, authority.active) }),
      detail: { authorityId: id },
    });
  });
}
