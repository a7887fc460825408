import { createHash } from 'node:crypto';

import { QueryTypes } from 'sequelize';

import { may } from '@/shared/abilities';
import { t } from '@/shared/messages';

import type { Deps } from '../deps';
import type { Actor } from '../policies/actor';
import type { CalendarLinkRow } from '../queries/calendarLinks';
import { selectionSql, tellableTasks, type TaskSelection } from '../queries/tellableTasks';
import { CalendarCache } from './cache';
import { calendarEntry } from './entry';
import { writeCalendar } from './write';

const DAY = 86_400_000;
/** What a calendar holds. Cancelled entries stay a week: some readers look every second day only. */
const HORIZON = { back: 30 * DAY, ahead: 400 * DAY, cancelled: 7 * DAY };

const cache = new CalendarCache();

export interface CalendarAnswer {
  text: string;
  etag: string;
  lastModified: Date;
}

/** The calendar behind a link, with what its owner may see at this very moment. */
export async function readCalendar(deps: Deps, link: CalendarLinkRow, actor: Actor): Promise<CalendarAnswer> {
  const now = deps.now().getTime();
  const propertyIds = [...actor.properties]
    .filter(([id, { roles }]) => may(roles, 'calendar.read') && (link.propertyId === null || link.propertyId === id))
    .map(([id]) => id)
    .sort();
  const selection: TaskSelection = {
    propertyIds,
    dueFrom: new Date(now - HORIZON.back),
    dueTo: new Date(now + HORIZON.ahead),
    cancelledSince: new Date(now - HORIZON.cancelled),
  };
  const workAt = propertyIds.filter((id) => may(actor.properties.get(id)?.roles ?? [], 'work.read'));
  const plan = await planState(deps, selection);
  const state = JSON.stringify([link.label, propertyIds, workAt, plan.hash]);
  const written = await cache.get(link.id, state, async () => {
    const tasks = await tellableTasks(deps.sequelize, selection);
    const entries = tasks.map((task) =>
      calendarEntry(task, { publicUrl: deps.env.PUBLIC_URL, mayWork: workAt.includes(task.propertyId) }),
    );
    const text = writeCalendar(t('telling.calendarName', { label: link.label }), entries);
    return { text, etag: `"${createHash('sha256').update(text).digest('base64url')}"` };
  });
  const access = await accessChangedAt(deps, link.userId);
  const moments = [link.createdAt, plan.changedAt, access].filter((moment) => moment !== null);
  return { ...written, lastModified: new Date(Math.max(...moments.map((moment) => moment.getTime()))) };
}

/** Whether anything that the entries say has changed: cheap beside writing them. */
async function planState(deps: Deps, selection: TaskSelection): Promise<{ hash: string; changedAt: Date | null }> {
  const { where, replacements } = selectionSql(selection);
  const [row] = await deps.sequelize.query<{ hash: string; changedAt: Date | null }>(
    `select md5(coalesce(string_agg(concat_ws('|', t.id, t.updated_at, p.updated_at, c.updated_at, e.head, e.left_at), ','
         order by t.id), '')) as hash,
       max(greatest(t.updated_at, p.updated_at, c.updated_at, e.left_at)) as "changedAt"
     from tasks t join properties p on p.id = t.property_id join cohorts c on c.id = t.cohort_id
     cross join lateral (
       select count(*) filter (where n.left_at is null) as head, max(n.left_at) as left_at
       from enrolments n where n.group_id = t.group_id) e
     where ${where}`,
    { type: QueryTypes.SELECT, replacements },
  );
  return row ?? { hash: '', changedAt: null };
}

/** When the person last gained or lost a place: a reader that only asks "changed since?" must hear of that too. */
async function accessChangedAt(deps: Deps, userId: string): Promise<Date | null> {
  const [row] = await deps.sequelize.query<{ at: Date | null }>(
    `select max(moment) as at from (
       select unnest(array[created_at, ended_at]) as moment from memberships where user_id = :userId
       union all
       select unnest(array[e.created_at, e.from_date::timestamp at time zone p.zone, (e.to_date + 1)::timestamp at time zone p.zone])
       from engagements e join properties p on p.id = e.property_id
       where e.organisation_id in (select organisation_id from memberships where user_id = :userId)) changes
     where moment <= :now`,
    { type: QueryTypes.SELECT, replacements: { userId, now: deps.now() } },
  );
  return row?.at ?? null;
}
