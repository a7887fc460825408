import { t, tData } from '@/shared/messages';
import { audit } from '../audit';
import { hashSecret, newSecret } from '../auth/secrets';
import type { Deps } from '../deps';
import { badField, failure } from '../http/errors';
import { Invitation, Membership, Message, Property, User } from '../models';
import type { Actor } from '../policies/actor';
import { accountMail } from './account';

const day = 86_400_000;

type PropertyRole = 'manager' | 'staff' | 'calendarOnly';

/** Invites a person to a property by e-mail. The same id again is the same invitation. */
export async function invite(
  deps: Deps,
  actor: Actor,
  propertyId: string,
  input: { id: string; email: string; role: PropertyRole },
): Promise<Invitation> {
  return deps.sequelize.transaction(async (transaction) => {
    const again = await Invitation.findByPk(input.id, { transaction });
    if (again?.propertyId === propertyId) return again;
    if (again) throw failure('conflict', 'server.sameId');
    const user = await User.findOne({ where: { email: input.email }, transaction });
    const member =
      user &&
      (await Membership.findOne({
        where: { userId: user.id, propertyId, role: input.role, endedAt: null },
        transaction,
      }));
    if (member) throw badField('email', t('server.alreadyMember'));
    const property = await Property.findByPk(propertyId, { transaction, rejectOnEmpty: true });
    const secret = newSecret();
    const expiresAt = new Date(deps.now().getTime() + 14 * day);
    const invitation = await Invitation.create(
      { ...input, propertyId, tokenHash: hashSecret(secret), invitedBy: actor.userId, expiresAt },
      { transaction },
    );
    await accountMail(deps, transaction, {
      kind: 'invitation',
      subjectId: input.id,
      address: input.email,
      params: {
        link: `${deps.env.PUBLIC_URL}/invitation/${secret}`,
        invitedBy: actor.name,
        place: property.name,
        role: tData(`people.role.${input.role}`, input.role),
      },
      staleAt: expiresAt,
    });
    await audit(transaction, {
      userId: actor.userId,
      propertyId,
      action: 'invitation.create',
      summary: t('people.audit.invited', { email: input.email }),
    });
    return invitation;
  });
}

export async function withdrawInvitation(deps: Deps, actor: Actor, id: string): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const invitation = await Invitation.findByPk(id, { transaction, lock: true });
    if (!invitation) throw failure('notFound', 'server.notFound');
    await invitation.update({ withdrawnAt: deps.now() }, { transaction });
    // what was not sent yet is not sent any more
    await Message.update(
      { state: 'withdrawn', params: {}, updatedAt: deps.now() },
      { where: { dedupeKey: `invitation:${id}`, state: 'waiting' }, transaction },
    );
    await audit(transaction, {
      userId: actor.userId,
      propertyId: invitation.propertyId,
      action: 'invitation.withdraw',
      summary: t('people.audit.withdrawn', { email: invitation.email }),
    });
  });
}

/** Ends a membership of a property. The last manager stays: a property must not be left without one. */
export async function endMembership(deps: Deps, actor: Actor, id: string): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const found = await Membership.findByPk(id, { transaction });
    if (!found?.propertyId) throw failure('notFound', 'server.notFound');
    // one at a time for a property: two managers who remove each other must not both succeed
    await Property.findByPk(found.propertyId, { transaction, lock: true });
    const membership = await found.reload({ transaction });
    if (membership.endedAt) throw failure('notFound', 'server.notFound');
    if (membership.role === 'manager') {
      const managers = await Membership.count({
        where: { propertyId: found.propertyId, role: 'manager', endedAt: null },
        transaction,
      });
      if (managers <= 1) throw failure('refused', 'server.lastManager');
    }
    await membership.update({ endedAt: deps.now() }, { transaction });
    const user = await User.findByPk(membership.userId, { transaction });
    await audit(transaction, {
      userId: actor.userId,
      propertyId: membership.propertyId,
      action: 'membership.end',
      summary: t('people.audit.ended', { name: user?.name ?? '' }),
      detail: { membershipId: id },
    });
  });
}
