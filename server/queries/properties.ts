import type pg from 'pg';

import { t } from '@/shared/messages';
import type { Input, Output } from '@/shared/routes';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import { Property } from '../models';
import type { Actor } from '../policies/actor';

/** A property with the organisations that it engages. */
export async function readProperty(pool: pg.Pool, id: string): Promise<Output<'GET /api/properties/:propertyId'>> {
  const property = await Property.findByPk(id);
  if (!property) throw failure('notFound', 'server.notFound');
  const { rows } = await pool.query<{
    organisation_id: string;
    name: string;
    scope: string;
    from_date: string;
    to_date: string | null;
  }>(
    `select e.organisation_id, o.name, e.scope, e.from_date, e.to_date
       from engagements e join organisations o on o.id = e.organisation_id
      where e.property_id = $1 order by o.name`,
    [id],
  );
  return {
    id: property.id,
    name: property.name,
    zone: property.zone,
    country: property.country,
    region: property.region,
    locale: property.locale,
    latitude: property.latitude,
    longitude: property.longitude,
    yardHours: property.yardFrom && property.yardTo ? { from: property.yardFrom, to: property.yardTo } : null,
    milkings: property.milkings,
    weekendDays: property.weekendDays,
    engagements: rows.map((row) => ({
      organisationId: row.organisation_id,
      organisation: row.name,
      scope: row.scope,
      from: row.from_date,
      to: row.to_date,
    })),
  };
}

type Patch = Input<'PATCH /api/properties/:propertyId'>['body'];

/** Absent leaves, null clears; written with its audit entry. */
export async function writeProperty(deps: Deps, actor: Actor, id: string, patch: Patch): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    await Property.update(
      {
        ...(patch.name === undefined ? {} : { name: patch.name }),
        ...(patch.yardHours === undefined
          ? {}
          : { yardFrom: patch.yardHours?.from ?? null, yardTo: patch.yardHours?.to ?? null }),
        ...(patch.milkings === undefined ? {} : { milkings: patch.milkings }),
        ...(patch.weekendDays === undefined ? {} : { weekendDays: patch.weekendDays }),
        updatedAt: deps.now(),
      },
      { where: { id }, transaction },
    );
    await audit(transaction, {
      userId: actor.userId,
      propertyId: id,
      action: 'property.edit',
      summary: t('people.audit.property'),
      detail: { ...patch },
    });
  });
}
