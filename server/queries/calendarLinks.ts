import { QueryTypes } from 'sequelize';

import { hashSecret } from '../auth/secrets';
import { secretOf } from '../calendar/secret';
import type { Deps } from '../deps';

export interface CalendarLinkRow {
  id: string;
  userId: string;
  /** Name and e-mail of the person whose link it is. */
  owner: { name: string; email: string };
  label: string;
  propertyId: string | null;
  property: string | null;
  createdAt: Date;
  lastReadAt: Date | null;
}

const columns = `l.id, l.user_id as "userId", l.label, l.property_id as "propertyId", p.name as property,
  json_build_object('name', u.name, 'email', u.email) as owner, l.created_at as "createdAt", l.last_read_at as "lastReadAt"
  from calendar_links l join users u on u.id = l.user_id left join properties p on p.id = l.property_id`;

/** Links of a person that still work, newest first. */
export const calendarLinksOf = (deps: Deps, userId: string): Promise<CalendarLinkRow[]> =>
  deps.sequelize.query<CalendarLinkRow>(
    `select ${columns} where l.user_id = :userId and l.revoked_at is null order by l.created_at desc, l.id`,
    { type: QueryTypes.SELECT, replacements: { userId } },
  );

/** One link of a person that still works. */
export async function ownCalendarLink(deps: Deps, userId: string, linkId: string): Promise<CalendarLinkRow | null> {
  const [row] = await deps.sequelize.query<CalendarLinkRow>(
    `select ${columns} where l.id = :linkId and l.user_id = :userId and l.revoked_at is null`,
    { type: QueryTypes.SELECT, replacements: { userId, linkId } },
  );
  return row ?? null;
}

/** The link behind the last part of a calendar address; null for unknown and revoked ones alike. */
export async function calendarLinkBySecret(deps: Deps, part: string): Promise<CalendarLinkRow | null> {
  const secret = secretOf(part);
  if (!secret) return null;
  const [row] = await deps.sequelize.query<CalendarLinkRow>(
    `select ${columns} where l.secret_hash = :hash and l.revoked_at is null`,
    { type: QueryTypes.SELECT, replacements: { hash: hashSecret(secret) } },
  );
  return row ?? null;
}
