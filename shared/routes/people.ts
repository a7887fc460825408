import { z } from 'zod';

import * as c from '../contracts/common';
import * as p from '../contracts/people';
import { part } from './spec';

const token = z.object({ token: z.string().min(20).max(200) });

export const peopleRoutes = part({
  'GET /api/health': {
    summary: 'Whether the server and its database answer',
    who: 'anyone',
    output: z.object({ ok: z.boolean(), database: z.boolean(), time: c.instant }),
  },
  'GET /api/openapi.json': {
    summary: 'This interface as OpenAPI 3.1',
    who: 'anyone',
    output: { media: 'application/json' },
  },
  'POST /api/session': { summary: 'Sign in', who: 'anyone', limit: 'auth', body: p.signIn, output: p.me },
  'DELETE /api/session': { summary: 'Sign out', who: 'anyone', output: c.ok },
  'GET /api/me': { summary: 'The person signed in, with places and abilities', who: 'signedIn', output: p.me },
  'PATCH /api/me': {
    summary: 'Change own name or reminders',
    who: 'signedIn',
    body: z.object({ name: c.name.optional(), preferences: p.preferences.partial().optional() }),
    output: p.me,
  },
  'POST /api/password-resets': {
    summary: 'Ask for a password reset by e-mail; the answer is the same for unknown people',
    who: 'anyone',
    limit: 'auth',
    body: z.object({ email: c.email }),
    output: c.ok,
    status: 202,
  },
  'POST /api/password-resets/:token': {
    summary: 'Set a new password; ends every session of the person',
    who: 'anyone',
    limit: 'auth',
    params: token,
    body: z.object({ password: p.password }),
    output: c.ok,
  },
  'GET /api/invitations/:token': {
    summary: 'What an invitation is for',
    who: 'anyone',
    limit: 'auth',
    params: token,
    output: p.invitationLook,
  },
  'POST /api/invitations/:token': {
    summary: 'Accept an invitation: makes the account, or joins the existing one by its password',
    who: 'anyone',
    limit: 'auth',
    params: token,
    body: p.invitationAccept,
    output: p.me,
  },
  'GET /api/properties/:propertyId': {
    summary: 'A property',
    who: { ability: 'property.read', at: 'propertyId' },
    params: z.object({ propertyId: c.id }),
    output: p.property,
  },
  'PATCH /api/properties/:propertyId': {
    summary: 'Change yard hours, milkings, weekend days',
    who: { ability: 'property.edit', at: 'propertyId' },
    params: z.object({ propertyId: c.id }),
    body: p.propertyPatch,
    output: p.property,
  },
  'GET /api/properties/:propertyId/people': {
    summary: 'People and open invitations of a property',
    who: { ability: 'people.read', at: 'propertyId' },
    params: z.object({ propertyId: c.id }),
    output: p.people,
  },
  'POST /api/properties/:propertyId/invitations': {
    summary: 'Invite a person by e-mail',
    who: { ability: 'people.manage', at: 'propertyId' },
    params: z.object({ propertyId: c.id }),
    body: p.invitationCreate,
    output: p.invitation,
    status: 201,
  },
  'DELETE /api/property-invitations/:invitationId': {
    summary: 'Withdraw an invitation',
    who: { ability: 'people.manage', at: 'invitationId' },
    params: z.object({ invitationId: c.id }),
    output: c.ok,
  },
  'DELETE /api/memberships/:membershipId': {
    summary: "End a person's membership of a property",
    who: { ability: 'people.manage', at: 'membershipId' },
    params: z.object({ membershipId: c.id }),
    output: c.ok,
  },
  'GET /api/calendar-links': {
    summary: 'Own calendar links',
    who: 'signedIn',
    output: z.object({ items: z.array(p.calendarLink) }),
  },
  'POST /api/calendar-links': {
    summary: 'Make a calendar link; its secret address is shown this once',
    who: 'signedIn',
    body: p.calendarLinkCreate,
    output: p.calendarLinkWithUrl,
    status: 201,
  },
  'POST /api/calendar-links/:linkId/replace': {
    summary: 'Replace the secret address; the old one stops at once',
    who: 'signedIn',
    params: z.object({ linkId: c.id }),
    output: p.calendarLinkWithUrl,
  },
  'DELETE /api/calendar-links/:linkId': {
    summary: 'Revoke a calendar link',
    who: 'signedIn',
    params: z.object({ linkId: c.id }),
    output: c.ok,
  },
  'GET /api/calendar/:secret': {
    summary: 'The iCalendar behind a calendar link (the path ends in .ics)',
    who: 'anyone',
    params: z.object({ secret: z.string().min(10).max(200) }),
    output: { media: 'text/calendar' },
  },
});
