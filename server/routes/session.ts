import { setTimeout as wait } from 'node:timers/promises';

import type { Request, Response } from 'express';

import { acceptInvitation, askPasswordReset, openInvitation, resetPassword } from '../commands/account';
import { checkPassword } from '../auth/password';
import { createLucia } from '../auth/sessions';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import type { Handlers } from '../http/handler';
import { Organisation, Property, User } from '../models';
import { loadActor } from '../policies/loadActor';
import { readMe } from '../queries/me';
import { withinTries } from './tries';

const sessionsOf = (deps: Deps) => createLucia(deps.pool, deps.env.NODE_ENV === 'production');

/** Milliseconds before a request for a reset is answered: writing the mail takes far less, so its time tells nothing. */
const resetTakes = 150;

/** Opens a session for a person and answers what they may see. The session that the browser had before ends. */
async function begin(deps: Deps, req: Request, res: Response, user: User) {
  const sessions = sessionsOf(deps);
  const before = sessions.readSessionCookie(req.headers.cookie ?? '');
  if (before) await sessions.invalidateSession(before);
  const session = await sessions.createSession(user.id, {});
  res.append('Set-Cookie', sessions.createSessionCookie(session.id).serialize());
  const actor = await loadActor(deps.pool, { id: user.id, name: user.name, email: user.email }, deps.now());
  return readMe(deps.pool, actor);
}

/** Signing in and out, forgotten passwords, invitations. */
export const sessionHandlers: Handlers<
  | 'POST /api/session'
  | 'DELETE /api/session'
  | 'POST /api/password-resets'
  | 'POST /api/password-resets/:token'
  | 'GET /api/invitations/:token'
  | 'POST /api/invitations/:token'
> = {
  'POST /api/session': async ({ input, deps, req, res }) => {
    const { email, password } = input.body;
    withinTries(email, deps.now());
    const user = await User.findOne({ where: { email } });
    const fits = await checkPassword(user?.passwordHash ?? null, password);
    if (!user || !fits) throw failure('unauthenticated', 'server.badCredentials');
    return begin(deps, req, res, user);
  },
  'DELETE /api/session': async ({ deps, req, res }) => {
    const sessions = sessionsOf(deps);
    const id = sessions.readSessionCookie(req.headers.cookie ?? '');
    if (id) await sessions.invalidateSession(id);
    res.append('Set-Cookie', sessions.createBlankSessionCookie().serialize());
    return { ok: true };
  },
  'POST /api/password-resets': async ({ input, deps }) => {
    const { email } = input.body;
    withinTries(`reset ${email}`, deps.now());
    await Promise.all([askPasswordReset(deps, email), wait(resetTakes)]);
    return { ok: true };
  },
  'POST /api/password-resets/:token': async ({ input, deps }) => {
    await resetPassword(deps, input.params.token, input.body.password);
    return { ok: true };
  },
  'GET /api/invitations/:token': async ({ input, deps }) => {
    const invitation = await openInvitation(deps, input.params.token);
    const [place, by, known] = await Promise.all([
      invitation.propertyId
        ? Property.findByPk(invitation.propertyId)
        : Organisation.findByPk(invitation.organisationId ?? ''),
      User.findByPk(invitation.invitedBy),
      User.findOne({ where: { email: invitation.email } }),
    ]);
    return {
      email: invitation.email,
      role: invitation.role,
      place: place?.name ?? '',
      invitedBy: by?.name ?? '',
      known: known !== null,
    };
  },
  'POST /api/invitations/:token': async ({ input, deps, req, res }) => {
    const { name, password } = input.body;
    // whoever holds the link could otherwise guess the password of its address
    const { email } = await openInvitation(deps, input.params.token);
    withinTries(email, deps.now());
    const user = await acceptInvitation(deps, input.params.token, { password, ...(name ? { name } : {}) });
    return begin(deps, req, res, user);
  },
};
