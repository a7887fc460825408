import type pg from 'pg';

import { may, type Ability, type Role } from '@/shared/abilities';
import { failure } from '../http/errors';
import type { Actor } from './actor';
import type { Located } from './locate';

/** Properties of a person where they have an ability. */
export const propertiesWith = (actor: Actor, ability: Ability): string[] =>
  [...actor.properties].filter(([, held]) => may(held.roles, ability)).map(([id]) => id);

/** Organisations that are engaged, now, at any property of the person. */
export async function engagedOrganisations(pool: pg.Pool, actor: Actor, now: Date): Promise<Set<string>> {
  const { rows } = await pool.query<{ organisation_id: string }>({
    name: 'engaged',
    text: `select distinct e.organisation_id from engagements e join properties p on p.id = e.property_id
      where e.property_id = any($1) and e.from_date <= ($2::timestamptz at time zone p.zone)::date
        and (e.to_date is null or e.to_date >= ($2::timestamptz at time zone p.zone)::date)`,
    values: [[...actor.properties.keys()], now],
  });
  return new Set(rows.map((row) => row.organisation_id));
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
  const held = place.propertyId
    ? actor.properties.get(place.propertyId)?.roles
    : await organisationRoles(pool, actor, place, now);
  if (!held) throw failure('notFound', 'server.notFound');
  if (!may(held, ability)) throw failure('forbidden', 'server.forbidden');
}

/**
 * Roles towards an organisation's record: one's own roles in it, or, where it is engaged at one's property, those
 * held at the property. Such people never see a working copy.
 */
async function organisationRoles(
  pool: pg.Pool,
  actor: Actor,
  place: Located,
  now: Date,
): Promise<readonly Role[] | undefined> {
  const own = actor.organisations.get(place.organisationId ?? '');
  if (own) return own;
  if (place.signedOff === false) return undefined;
  const engaged = await engagedOrganisations(pool, actor, now);
  if (!place.organisationId || !engaged.has(place.organisationId)) return undefined;
  // a vet of one practice is no vet of another: only what the person is at the property itself counts
  const roles = [...actor.properties.values()].flatMap((held) => held.roles).filter((role) => role !== 'vet');
  return roles.length > 0 ? roles : ['calendarOnly'];
}
