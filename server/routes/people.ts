import type { Role } from '@/shared/abilities';
import { endMembership, invite, withdrawInvitation } from '../commands/people';
import { failure } from '../http/errors';
import type { Handlers } from '../http/handler';
import { Invitation, User } from '../models';
import type { Actor } from '../policies/actor';
import { readMe } from '../queries/me';
import { readPeople } from '../queries/people';
import { readProperty, writeProperty } from '../queries/properties';

/** Routes that need a person have one; this says so to the compiler. */
export function signedIn(actor: Actor | null): Actor {
  if (!actor) throw failure('unauthenticated', 'server.signIn');
  return actor;
}

const present = (invitation: Invitation, by: string) => ({
  id: invitation.id,
  email: invitation.email,
  role: invitation.role as Role,
  expiresAt: invitation.expiresAt.toISOString(),
  invitedBy: by,
});

/** Oneself, a property, and the people of a property. */
export const peopleHandlers: Handlers<
  | 'GET /api/me'
  | 'PATCH /api/me'
  | 'GET /api/properties/:propertyId'
  | 'PATCH /api/properties/:propertyId'
  | 'GET /api/properties/:propertyId/people'
  | 'POST /api/properties/:propertyId/invitations'
  | 'DELETE /api/property-invitations/:invitationId'
  | 'DELETE /api/memberships/:membershipId'
> = {
  'GET /api/me': async ({ actor, deps }) => readMe(deps.pool, signedIn(actor)),
  'PATCH /api/me': async ({ actor, input, deps }) => {
    const { name, preferences = {} } = input.body;
    await User.update(
      {
        ...(name === undefined ? {} : { name }),
        ...(preferences.evening === undefined ? {} : { remindEvening: preferences.evening }),
        ...(preferences.morning === undefined ? {} : { remindMorning: preferences.morning }),
        ...(preferences.closing === undefined ? {} : { remindClosing: preferences.closing }),
        ...(preferences.eveningAt === undefined ? {} : { eveningAt: preferences.eveningAt }),
        ...(preferences.morningAt === undefined ? {} : { morningAt: preferences.morningAt }),
        updatedAt: deps.now(),
      },
      { where: { id: signedIn(actor).userId } },
    );
    return readMe(deps.pool, signedIn(actor));
  },
  'GET /api/properties/:propertyId': ({ input, deps }) => readProperty(deps.pool, input.params.propertyId),
  'PATCH /api/properties/:propertyId': async ({ actor, input, deps }) => {
    await writeProperty(deps, signedIn(actor), input.params.propertyId, input.body);
    return readProperty(deps.pool, input.params.propertyId);
  },
  'GET /api/properties/:propertyId/people': ({ input, deps }) => readPeople(deps, input.params.propertyId),
  'POST /api/properties/:propertyId/invitations': async ({ actor, input, deps }) => {
    const by = signedIn(actor);
    return present(await invite(deps, by, input.params.propertyId, input.body), by.name);
  },
  'DELETE /api/property-invitations/:invitationId': async ({ actor, input, deps }) => {
    await withdrawInvitation(deps, signedIn(actor), input.params.invitationId);
    return { ok: true };
  },
  'DELETE /api/memberships/:membershipId': async ({ actor, input, deps }) => {
    await endMembership(deps, signedIn(actor), input.params.membershipId);
    return { ok: true };
  },
};
