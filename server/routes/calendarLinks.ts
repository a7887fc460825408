import { may } from '@/shared/abilities';
import type { Output } from '@/shared/routes';

import { readCalendar } from '../calendar/read';
import { calendarUrl } from '../calendar/secret';
import {
  createCalendarLink,
  noteCalendarRead,
  replaceCalendarSecret,
  revokeCalendarLink,
} from '../commands/calendarLinks';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import type { Handlers } from '../http/handler';
import type { Actor } from '../policies/actor';
import { loadActor } from '../policies/loadActor';
import { calendarLinkBySecret, calendarLinksOf, ownCalendarLink, type CalendarLinkRow } from '../queries/calendarLinks';

const notFound = () => failure('notFound', 'server.notFound');

type Link = Output<'GET /api/calendar-links'>['items'][number];

const present = (row: CalendarLinkRow): Link => ({
  id: row.id,
  label: row.label,
  propertyId: row.propertyId,
  property: row.property,
  createdAt: row.createdAt.toISOString(),
  lastReadAt: row.lastReadAt?.toISOString() ?? null,
});

async function presentWithUrl(
  deps: Deps,
  actor: Actor,
  linkId: string,
  secret: string,
): Promise<Link & { url: string }> {
  const row = await ownCalendarLink(deps, actor.userId, linkId);
  if (!row) throw notFound();
  return { ...present(row), url: calendarUrl(deps.env.PUBLIC_URL, secret) };
}

const signedIn = (actor: Actor | null): Actor => {
  if (!actor) throw notFound();
  return actor;
};

export const calendarLinkHandlers: Handlers<
  | 'GET /api/calendar-links'
  | 'POST /api/calendar-links'
  | 'POST /api/calendar-links/:linkId/replace'
  | 'DELETE /api/calendar-links/:linkId'
  | 'GET /api/calendar/:secret'
> = {
  'GET /api/calendar-links': async ({ deps, actor }) => ({
    items: (await calendarLinksOf(deps, signedIn(actor).userId)).map(present),
  }),

  'POST /api/calendar-links': async ({ deps, actor, input }) => {
    const person = signedIn(actor);
    const { id, label, propertyId } = input.body;
    if (propertyId && !may(person.properties.get(propertyId)?.roles ?? [], 'calendar.read')) throw notFound();
    const secret = await createCalendarLink(deps, person.userId, { id, label, propertyId });
    if (!secret) throw failure('conflict', 'server.alreadyThere');
    return presentWithUrl(deps, person, id, secret);
  },

  'POST /api/calendar-links/:linkId/replace': async ({ deps, actor, input }) => {
    const person = signedIn(actor);
    const secret = await replaceCalendarSecret(deps, person.userId, input.params.linkId);
    if (!secret) throw notFound();
    return presentWithUrl(deps, person, input.params.linkId, secret);
  },

  'DELETE /api/calendar-links/:linkId': async ({ deps, actor, input }) => {
    if (!(await revokeCalendarLink(deps, signedIn(actor).userId, input.params.linkId))) throw notFound();
    return { ok: true };
  },

  'GET /api/calendar/:secret': async ({ deps, input, res }) => {
    const link = await calendarLinkBySecret(deps, input.params.secret);
    // unknown and revoked addresses look the same
    if (!link) throw notFound();
    const person = await loadActor(deps.pool, { id: link.userId, ...link.owner }, deps.now());
    const calendar = await readCalendar(deps, link, person);
    await noteCalendarRead(deps, link.id);
    // kept by the reader alone and asked for again each time: a revoked link stops at once
    res.set({
      'Cache-Control': 'private, no-cache',
      'Content-Type': 'text/calendar; charset=utf-8',
      'Content-Disposition': 'inline; filename="yardbell.ics"',
      'X-Robots-Tag': 'noindex',
      ETag: calendar.etag,
    });
    // HTTP dates have whole seconds: a plan that changed within this one can change again in it (RFC 9110, 8.8.2.1)
    if (deps.now().getTime() - calendar.lastModified.getTime() >= 1000)
      res.set('Last-Modified', calendar.lastModified.toUTCString());
    return calendar.text;
  },
};
