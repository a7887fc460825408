import { QueryTypes } from 'sequelize';

import { hashSecret, newSecret } from '../auth/secrets';
import type { Deps } from '../deps';

/** Minutes between two notes of when a link was last read: readers ask often, and nobody needs the second. */
const READ_NOTE_MINUTES = 10;

export interface NewCalendarLink {
  id: string;
  label: string;
  propertyId: string | null;
}

/**
 * Makes a calendar link and gives its secret, the only time. A repeat with the same id before anybody has read the
 * calendar makes a new secret for the same link: its first answer may never have arrived, and can't be given again.
 * Null when the id is taken: by another person's link, a revoked one, or one in use.
 */
export async function createCalendarLink(deps: Deps, userId: string, link: NewCalendarLink): Promise<string | null> {
  const secret = newSecret();
  const rows = await deps.sequelize.query(
    `insert into calendar_links (id, user_id, label, property_id, secret_hash, created_at)
     values (:id, :userId, :label, :propertyId, :hash, :now)
     on conflict (id) do update set secret_hash = excluded.secret_hash
     where calendar_links.user_id = excluded.user_id and calendar_links.revoked_at is null
       and calendar_links.last_read_at is null and calendar_links.label = excluded.label
       and calendar_links.property_id is not distinct from excluded.property_id
     returning id`,
    { type: QueryTypes.SELECT, replacements: { ...link, userId, hash: hashSecret(secret), now: deps.now() } },
  );
  return rows.length > 0 ? secret : null;
}

/** Gives a link a new secret; the old address stops at once. Null when the person has no such link. */
export async function replaceCalendarSecret(deps: Deps, userId: string, linkId: string): Promise<string | null> {
  const secret = newSecret();
  const rows = await deps.sequelize.query(
    `update calendar_links set secret_hash = :hash, last_read_at = null
     where id = :linkId and user_id = :userId and revoked_at is null returning id`,
    { type: QueryTypes.SELECT, replacements: { linkId, userId, hash: hashSecret(secret) } },
  );
  return rows.length > 0 ? secret : null;
}

/** Ends a link. True also when it was ended before; false when the person has no such link. */
export async function revokeCalendarLink(deps: Deps, userId: string, linkId: string): Promise<boolean> {
  const rows = await deps.sequelize.query(
    `update calendar_links set revoked_at = coalesce(revoked_at, :now)
     where id = :linkId and user_id = :userId returning id`,
    { type: QueryTypes.SELECT, replacements: { linkId, userId, now: deps.now() } },
  );
  return rows.length > 0;
}

/** Notes that a link was read. */
export async function noteCalendarRead(deps: Deps, linkId: string): Promise<void> {
  const now = deps.now();
  await deps.sequelize.query(
    `update calendar_links set last_read_at = :now
     where id = :linkId and (last_read_at is null or last_read_at <= :before)`,
    { replacements: { linkId, now, before: new Date(now.getTime() - READ_NOTE_MINUTES * 60_000) } },
  );
}
