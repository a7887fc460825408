import type pg from 'pg';

import type { Role } from '@/shared/abilities';
import type { Actor } from './actor';

interface Row {
  role: Role;
  organisation_id: string | null;
  property_id: string | null;
  through: string | null;
}

/** Roles held now. An engagement is in force by the property's own date, so it begins and ends at its midnight. */
const sql = `
  select m.role, null::uuid as organisation_id, m.property_id, null::text as through
    from memberships m where m.user_id = $1 and m.ended_at is null and m.property_id is not null
  union all
  select m.role, m.organisation_id, null::uuid, null::text
    from memberships m where m.user_id = $1 and m.ended_at is null and m.organisation_id is not null
  union all
  select m.role, null::uuid, e.property_id, o.name
    from memberships m
    join engagements e on e.organisation_id = m.organisation_id
    join organisations o on o.id = e.organisation_id
    join properties p on p.id = e.property_id
   where m.user_id = $1 and m.ended_at is null
     and (m.role <> 'vet' or e.scope = 'veterinary')
     and e.from_date <= ($2::timestamptz at time zone p.zone)::date
     and (e.to_date is null or e.to_date >= ($2::timestamptz at time zone p.zone)::date)`;

/** Works out everything that a person holds at a moment. Called for every request: a change counts at once. */
export async function loadActor(
  pool: pg.Pool,
  user: { id: string; name: string; email: string },
  now: Date,
): Promise<Actor> {
  const { rows } = await pool.query<Row>({ name: 'actor', text: sql, values: [user.id, now] });
  const properties = new Map<string, { roles: Role[]; through: string | null }>();
  const organisations = new Map<string, Role[]>();
  for (const row of rows) {
    if (row.organisation_id)
      organisations.set(row.organisation_id, [...(organisations.get(row.organisation_id) ?? []), row.role]);
    if (!row.property_id) continue;
    const held = properties.get(row.property_id) ?? { roles: [], through: row.through };
    if (!held.roles.includes(row.role)) held.roles.push(row.role);
    properties.set(row.property_id, { roles: held.roles, through: held.through === null ? null : row.through });
  }
  return { userId: user.id, name: user.name, email: user.email, properties, organisations };
}
