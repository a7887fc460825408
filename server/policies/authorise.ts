import type pg from 'pg';

import { may, type Ability } from '@/shared/abilities';
import { failure } from '../http/errors';
import type { Actor } from './actor';
import type { Located } from './locate';

/** Properties of a person where they have an ability. */
export const propertiesWith = (actor: Actor, ability: Ability): string[] =>
  [...actor.properties].filter(([, held]) => may(held.roles, ability)).map(([id]) => id);

/** An organisation that is engaged now at a property. */
interface Engaged {
  organisationId: string;
  propertyId: string;
}

async function engagements(pool: pg.Pool, actor: Actor, now: Date): Promise<Engaged[]> {
  const { rows } = await pool.query<Engaged>({
    name: 'engaged',
    text: `select e.organisation_id as "organisationId", e.property_id as "propertyId"
      from engagements e join properties p on p.id = e.property_id
      where e.property_id = any($1) and e.from_date <= ($2::timestamptz at time zone p.zone)::date
        and (e.to_date is null or e.to_date >= ($2::timestamptz at time zone p.zone)::date)`,
    values: [[...actor.properties.keys()], now],
  });
  return rows;
}

/** Organisations that are engaged, now, at any property of the person. */
export async function engagedOrganisations(pool: pg.Pool, actor: Actor, now: Date): Promise<Set<string>> {
  return new Set((await engagements(pool, actor, now)).map(({ organisationId }) => organisationId));
}

/**
 * Judges an ability at the place that owns a record. Who can't see the place at all is told that there is no such
 * thing; who sees it and lacks the ability is told so.
 */
export async function authorise(
  pool: pg.Pool,
  actor: Actor,
  ability: Ability,
  place: Located | null,
  now: Date,
): Promise<void> {
  if (!place) throw failure('notFound', 'server.notFound');
  if (place.propertyId) {
    const held = actor.properties.get(place.propertyId)?.roles;
    if (!held) throw failure('notFound', 'server.notFound');
    if (!may(held, ability)) throw failure('forbidden', 'server.forbidden');
    return;
  }
  const own = actor.organisations.get(place.organisationId ?? '');
  if (own ? may(own, ability) : await readsAsClient(pool, actor, ability, place, now)) return;
  throw failure('forbidden', 'server.forbidden');
}

/**
 * People at a property that engages the organisation see what it signed off, never a working copy, and may read it by
 * the roles that they have at that very property. Nothing of the organisation is theirs to change.
 */
async function readsAsClient(
  pool: pg.Pool,
  actor: Actor,
  ability: Ability,
  place: Located,
  now: Date,
): Promise<boolean> {
  if (place.signedOff === false) throw failure('notFound', 'server.notFound');
  const there = (await engagements(pool, actor, now)).filter((held) => held.organisationId === place.organisationId);
  if (there.length === 0) throw failure('notFound', 'server.notFound');
  const roles = there.flatMap(({ propertyId }) => actor.properties.get(propertyId)?.roles ?? []);
  return ability === 'protocol.read' && may(roles, ability);
}
