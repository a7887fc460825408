import type { Role } from '@/shared/abilities';
import type { Output } from '@/shared/routes';
import type { Deps } from '../deps';

interface PersonRow {
  membership_id: string | null;
  user_id: string;
  name: string;
  email: string;
  role: Role;
  through: string | null;
}

const peopleSql = `
  select m.id as membership_id, u.id as user_id, u.name, u.email, m.role, null::text as through
    from memberships m join users u on u.id = m.user_id
   where m.property_id = $1 and m.ended_at is null
  union all
  select null::uuid, u.id, u.name, u.email, m.role, o.name
    from engagements e
    join organisations o on o.id = e.organisation_id
    join memberships m on m.organisation_id = o.id and m.ended_at is null
    join users u on u.id = m.user_id
    join properties p on p.id = e.property_id
   where e.property_id = $1 and (m.role <> 'vet' or e.scope = 'veterinary')
     and e.from_date <= ($2::timestamptz at time zone p.zone)::date
     and (e.to_date is null or e.to_date >= ($2::timestamptz at time zone p.zone)::date)
   order by through nulls first, name`;

interface InvitationRow {
  id: string;
  email: string;
  role: Role;
  expires_at: Date;
  invited_by: string;
}

/** People of a property, its own and those of engaged organisations, and invitations that are still open. */
export async function readPeople(
  deps: Deps,
  propertyId: string,
): Promise<Output<'GET /api/properties/:propertyId/people'>> {
  const [people, invitations] = await Promise.all([
    deps.pool.query<PersonRow>(peopleSql, [propertyId, deps.now()]),
    deps.pool.query<InvitationRow>(
      `select i.id, i.email, i.role, i.expires_at, u.name as invited_by
         from invitations i join users u on u.id = i.invited_by
        where i.property_id = $1 and i.accepted_at is null and i.withdrawn_at is null and i.expires_at > $2
        order by i.created_at`,
      [propertyId, deps.now()],
    ),
  ]);
  return {
    people: people.rows.map((row) => ({
      membershipId: row.membership_id,
      userId: row.user_id,
      name: row.name,
      email: row.email,
      role: row.role,
      through: row.through,
    })),
    invitations: invitations.rows.map((row) => ({
      id: row.id,
      email: row.email,
      role: row.role,
      expiresAt: row.expires_at.toISOString(),
      invitedBy: row.invited_by,
    })),
  };
}
