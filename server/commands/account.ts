import { randomUUID } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { audit } from '../audit';
import { hashPassword, checkPassword } from '../auth/password';
import { hashSecret, newSecret } from '../auth/secrets';
import type { Deps } from '../deps';
import { badField, failure } from '../http/errors';
import { Invitation, Membership, Message, PasswordReset, User } from '../models';
import { t } from '@/shared/messages';

const hour = 3_600_000;

/** Puts an account e-mail into the outbox, in the transaction of what it is about. */
export async function accountMail(
  deps: Deps,
  transaction: Transaction,
  mail: {
    kind: 'invitation' | 'passwordReset';
    subjectId: string;
    address: string;
    userId?: string;
    params: Record<string, unknown>;
    staleAt: Date;
  },
): Promise<void> {
  await Message.create(
    {
      id: randomUUID(),
      dedupeKey: `${mail.kind}:${mail.subjectId}`,
      channel: 'email',
      kind: mail.kind,
      userId: mail.userId ?? null,
      address: mail.address,
      params: mail.params,
      dueAt: deps.now(),
      nextTryAt: deps.now(),
      staleAt: mail.staleAt,
    },
    { transaction },
  );
}

/** Asks for a reset. Does the same for unknown people, except for the mail: the answer tells nothing. */
export async function askPasswordReset(deps: Deps, email: string): Promise<void> {
  const user = await User.findOne({ where: { email } });
  if (!user) return;
  await deps.sequelize.transaction(async (transaction) => {
    const secret = newSecret();
    const id = randomUUID();
    const expiresAt = new Date(deps.now().getTime() + hour);
    await PasswordReset.create({ id, userId: user.id, tokenHash: hashSecret(secret), expiresAt }, { transaction });
    const params = { link: `${deps.env.PUBLIC_URL}/reset/${secret}`, name: user.name };
    await accountMail(deps, transaction, {
      kind: 'passwordReset',
      subjectId: id,
      address: email,
      userId: user.id,
      params,
      staleAt: expiresAt,
    });
  });
}

/** Sets a new password by a single-use token; every session and every other open link of the person ends with it. */
export async function resetPassword(deps: Deps, secret: string, password: string): Promise<void> {
  const passwordHash = await hashPassword(password);
  await deps.sequelize.transaction(async (transaction) => {
    const reset = await PasswordReset.findOne({ where: { tokenHash: hashSecret(secret) }, lock: true, transaction });
    if (!reset || reset.usedAt || reset.expiresAt <= deps.now()) throw failure('gone', 'server.badToken');
    const { userId } = reset;
    await PasswordReset.update({ usedAt: deps.now() }, { where: { userId, usedAt: null }, transaction });
    await User.update({ passwordHash, updatedAt: deps.now() }, { where: { id: userId }, transaction });
    const replacements = { userId };
    await deps.sequelize.query('delete from sessions where user_id = :userId', { replacements, transaction });
    await audit(transaction, {
      userId,
      action: 'password.reset',
      summary: t('people.audit.passwordReset'),
    });
  });
}

/** An invitation that can still be accepted, by its secret. */
export async function openInvitation(deps: Deps, secret: string, transaction?: Transaction): Promise<Invitation> {
  const invitation = await Invitation.findOne({
    where: { tokenHash: hashSecret(secret) },
    ...(transaction ? { transaction, lock: true } : {}),
  });
  if (!invitation || invitation.acceptedAt || invitation.withdrawnAt || invitation.expiresAt <= deps.now())
    throw failure('gone', 'server.invitationUsed');
  return invitation;
}

/** Accepts an invitation: a new account, or the existing one of that address proven by its password. */
export async function acceptInvitation(
  deps: Deps,
  secret: string,
  input: { name?: string; password: string },
): Promise<User> {
  const passwordHash = await hashPassword(input.password);
  return deps.sequelize.transaction(async (transaction) => {
    const invitation = await openInvitation(deps, secret, transaction);
    const known = await User.findOne({ where: { email: invitation.email }, transaction });
    if (known && !(await checkPassword(known.passwordHash, input.password)))
      throw badField('password', t('server.invitationPassword'));
    if (!known && !input.name) throw badField('name', t('server.invitationName'));
    const user =
      known ??
      (await User.create(
        { id: randomUUID(), email: invitation.email, name: input.name ?? invitation.email, passwordHash },
        { transaction },
      ));
    await invitation.update({ acceptedAt: deps.now() }, { transaction });
    await Membership.findOrCreate({
      where: {
        userId: user.id,
        propertyId: invitation.propertyId,
        organisationId: invitation.organisationId,
        role: invitation.role,
        endedAt: null,
      },
      defaults: {
        id: randomUUID(),
        userId: user.id,
        propertyId: invitation.propertyId,
        organisationId: invitation.organisationId,
        role: invitation.role,
      },
      transaction,
    });
    await audit(transaction, {
      userId: user.id,
      propertyId: invitation.propertyId,
      organisationId: invitation.organisationId,
      action: 'invitation.accept',
      summary: t('people.audit.joined', { name: user.name }),
    });
    return user;
  });
}
