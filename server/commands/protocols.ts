import { findLibrary } from '@/protocols/library';
import { checkProtocol } from '@/protocols/plan/check';
import type { ProtocolBody } from '@/protocols/types';
import { asProtocolBody } from '@/shared/contracts/protocols';
import { t } from '@/shared/messages';
import type { Input } from '@/shared/routes';
import { dayClock } from '@/shared/when';
import { audit } from '../audit';
import type { Deps } from '../deps';
import { AppError, badField, failure } from '../http/errors';
import { AuditEntry, Protocol, ProtocolVersion, User } from '../models';
import type { Actor } from '../policies/actor';
import { presentFindings } from '../presenters/findings';
import { signOffStops } from '../presenters/protocols';

type Create = Input<'POST /api/protocols'>['body'];

/** What a protocol from nothing begins with: a start, and a service a week later. */
const starter = (name: string): ProtocolBody => ({
  schema: 1,
  name,
  summary: '',
  family: 'gnrhDevice',
  classes: ['cow'],
  biology: 'any',
  options: [],
  observations: [],
  visits: [
    { id: 'start', label: t('protocols.starterStart'), yarded: true },
    { id: 'ai', label: t('protocols.starterService'), yarded: true },
  ],
  steps: [
    { id: 'start', kind: 'other', level: 'animal', visit: 'start', items: [] },
    { id: 'service', kind: 'fixedTimeService', level: 'animal', visit: 'ai', items: [] },
  ],
  gaps: [
    {
      id: 'start-service',
      from: 'start',
      to: 'service',
      unit: 'localDays',
      least: 7,
      ideal: 7,
      most: 7,
      toleranceMinutes: 60,
    },
  ],
  factGaps: [],
  deadlines: [],
  timingAnchor: 'start',
  serviceStep: 'service',
  exits: ['withdrawn'],
  sources: [],
  notes: [],
});

async function bodyFor(input: Create): Promise<{ body: ProtocolBody; libraryId: string | null }> {
  if (!input.from) return { body: starter(input.name), libraryId: null };
  if ('libraryId' in input.from) {
    const entry = findLibrary(input.from.libraryId);
    if (!entry) throw badField('from.libraryId', t('server.protocol.noLibrary'));
    return { body: { ...entry.body, name: input.name }, libraryId: entry.id };
  }
  const version = await ProtocolVersion.findByPk(input.from.versionId);
  const owner = version && (await Protocol.findByPk(version.protocolId));
  if (!version || owner?.organisationId !== input.organisationId)
    throw badField('from.versionId', t('server.protocol.noVersion'));
  return { body: { ...version.body, name: input.name }, libraryId: owner.libraryId };
}

/** Makes a protocol with its first working copy. The same ids again are the same protocol. */
export async function createProtocol(deps: Deps, actor: Actor, input: Create): Promise<string> {
  const again = await Protocol.findByPk(input.id);
  if (again?.organisationId === input.organisationId && again.createdBy === actor.userId) return again.id;
  if (again) throw failure('conflict', 'server.sameId');
  const { body, libraryId } = await bodyFor(input);
  return deps.sequelize.transaction(async (transaction) => {
    const { id, organisationId, name } = input;
    await Protocol.create({ id, organisationId, name, libraryId, createdBy: actor.userId }, { transaction });
    await ProtocolVersion.create(
      { id: input.versionId, protocolId: id, number: 1, state: 'workingCopy', body, updatedAt: deps.now() },
      { transaction },
    );
    const summary = t('protocols.audit.created', { name });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      organisationId,
      action: 'protocol.create',
      summary,
      detail: { protocolId: id, libraryId },
    });
    return id;
  });
}

/** A version for changing, locked; with the organisation that owns it. */
async function locked(
  deps: Deps,
  id: string,
  work: (version: ProtocolVersion, organisationId: string, tx: Parameters<typeof audit>[0]) => Promise<void>,
): Promise<void> {
  await deps.sequelize.transaction(async (transaction) => {
    const version = await ProtocolVersion.findByPk(id, {
      transaction,
      lock: transaction.LOCK.UPDATE,
      rejectOnEmpty: true,
    });
    const protocol = await Protocol.findByPk(version.protocolId, { transaction, rejectOnEmpty: true });
    await work(version, protocol.organisationId, transaction);
  });
}

async function stale(version: ProtocolVersion): Promise<AppError> {
  const last = await AuditEntry.findOne({
    where: { action: 'protocol.save', detail: { versionId: version.id } },
    order: [['at', 'DESC']],
  });
  const who = last?.userId ? await User.findByPk(last.userId) : null;
  return failure('stale', 'server.protocol.stale', {
    name: who?.name ?? t('protocols.somebody'),
    when: dayClock(version.updatedAt.getTime(), 'UTC'),
  });
}

/** Saves a working copy: the whole body, if nobody saved it since the revision that was opened. */
export async function saveVersion(
  deps: Deps,
  actor: Actor,
  id: string,
  input: Input<'PUT /api/protocol-versions/:versionId'>['body'],
): Promise<void> {
  await locked(deps, id, async (version, organisationId, transaction) => {
    if (version.state !== 'workingCopy') throw failure('refused', 'server.protocol.signedOff');
    if (version.revision !== input.revision) throw await stale(version);
    const body = asProtocolBody(input.body);
    await version.update({ body, revision: version.revision + 1, updatedAt: deps.now() }, { transaction });
    const summary = t('protocols.audit.saved', { name: body.name, number: version.number });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      organisationId,
      action: 'protocol.save',
      summary,
      detail: { versionId: id },
    });
  });
}

/** Signs a working copy off: from then on it never changes. Refused while a stop stands. */
export async function signOffVersion(deps: Deps, actor: Actor, id: string, revision: number): Promise<void> {
  await locked(deps, id, async (version, organisationId, transaction) => {
    if (version.state === 'signedOff' && version.signedBy === actor.userId) return;
    if (version.state !== 'workingCopy') throw failure('refused', 'server.protocol.notWorkingCopy');
    if (version.revision !== revision) throw await stale(version);
    const stops = signOffStops(checkProtocol(version.body).findings);
    if (stops.length > 0)
      throw new AppError(
        'refused',
        t('server.protocol.stopped'),
        undefined,
        presentFindings(stops, { body: version.body }),
      );
    await version.update(
      { state: 'signedOff', signedBy: actor.userId, signedAt: deps.now(), updatedAt: deps.now() },
      { transaction },
    );
    const summary = t('protocols.audit.signedOff', { name: version.body.name, number: version.number });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      organisationId,
      action: 'protocol.signOff',
      summary,
      detail: { versionId: id },
    });
  });
}

/** Opens the next working copy from the newest version. There is one at a time. */
export async function openWorkingCopy(deps: Deps, actor: Actor, protocolId: string, id: string): Promise<string> {
  return deps.sequelize.transaction(async (transaction) => {
    const protocol = await Protocol.findByPk(protocolId, {
      transaction,
      lock: transaction.LOCK.UPDATE,
      rejectOnEmpty: true,
    });
    const versions = await ProtocolVersion.findAll({ where: { protocolId }, order: [['number', 'DESC']], transaction });
    const open = versions.find((version) => version.state === 'workingCopy');
    if (open?.id === id) return id;
    if (open) throw failure('conflict', 'server.protocol.alreadyWorkingCopy');
    const newest = versions[0];
    if (!newest) throw failure('notFound', 'server.notFound');
    await ProtocolVersion.create(
      { id, protocolId, number: newest.number + 1, state: 'workingCopy', body: newest.body, updatedAt: deps.now() },
      { transaction },
    );
    const summary = t('protocols.audit.opened', { name: newest.body.name, number: newest.number + 1 });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      organisationId: protocol.organisationId,
      action: 'protocol.open',
      summary,
      detail: { versionId: id },
    });
    return id;
  });
}

/** Discards a working copy. A protocol that was never signed off goes with it. */
export async function discardVersion(deps: Deps, actor: Actor, id: string): Promise<void> {
  await locked(deps, id, async (version, organisationId, transaction) => {
    if (version.state !== 'workingCopy') throw failure('refused', 'server.protocol.signedOff');
    const { protocolId } = version;
    await version.destroy({ transaction });
    if ((await ProtocolVersion.count({ where: { protocolId }, transaction })) === 0)
      await Protocol.destroy({ where: { id: protocolId }, transaction });
    const summary = t('protocols.audit.discarded', { name: version.body.name, number: version.number });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      organisationId,
      action: 'protocol.discard',
      summary,
      detail: { versionId: id },
    });
  });
}

/** Retires a signed-off version: cohorts on it go on, no new one starts. */
export async function retireVersion(deps: Deps, actor: Actor, id: string): Promise<void> {
  await locked(deps, id, async (version, organisationId, transaction) => {
    if (version.state === 'retired') return;
    if (version.state !== 'signedOff') throw failure('refused', 'server.protocol.notSignedOff');
    await version.update({ state: 'retired', updatedAt: deps.now() }, { transaction });
    const summary = t('protocols.audit.retired', { name: version.body.name, number: version.number });
    await audit(transaction, {
      at: deps.now(),
      userId: actor.userId,
      organisationId,
      action: 'protocol.retire',
      summary,
      detail: { versionId: id },
    });
  });
}
