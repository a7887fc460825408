import { findLibrary, library } from '@/protocols/library';
import type { ProtocolBody } from '@/protocols/types';
import { may } from '@/shared/abilities';
import type { ProtocolSummary, VersionDetail } from '@/shared/contracts/protocols';
import type { Output } from '@/shared/routes';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import type { Actor } from '../policies/actor';
import { engagedOrganisations } from '../policies/authorise';
import { findingsOf, presentLibrary } from '../presenters/protocols';
import { rows } from './rows';

type VersionView = VersionDetail['body'];
/** The type and the schema say the same; the schema's condition is recursive and so loosely typed. */
const asView = (body: ProtocolBody): VersionView => body as VersionView;

let summaries: Output<'GET /api/library'>['items'] | undefined;

/** Published protocols; worked out once, since they never change while the server runs. */
export function listLibrary(): Output<'GET /api/library'> {
  summaries ??= library.map(({ id, body }) => presentLibrary(id, body));
  return { items: summaries };
}

export function readLibrary(id: string): Output<'GET /api/library/:libraryId'> {
  const entry = findLibrary(id);
  if (!entry) throw failure('notFound', 'server.protocol.noLibrary');
  return { ...presentLibrary(id, entry.body), body: asView(entry.body), findings: findingsOf(entry.body) };
}

interface Row {
  id: string;
  protocolId: string;
  organisationId: string;
  organisation: string;
  name: string;
  libraryId: string | null;
  number: number;
  state: 'workingCopy' | 'signedOff' | 'retired';
  revision: number;
  updatedAt: Date;
  signedBy: string | null;
  signedAt: Date | null;
  body: ProtocolBody;
}

const sql = `
  select v.id, v.protocol_id as "protocolId", p.organisation_id as "organisationId", o.name as organisation, p.name,
    p.library_id as "libraryId", v.number, v.state, v.revision, v.updated_at as "updatedAt", u.name as "signedBy",
    v.signed_at as "signedAt", v.body
  from protocol_versions v join protocols p on p.id = v.protocol_id join organisations o on o.id = p.organisation_id
  left join users u on u.id = v.signed_by`;

const version = (row: Row) => ({
  id: row.id,
  number: row.number,
  state: row.state,
  revision: row.revision,
  updatedAt: row.updatedAt.toISOString(),
  signedBy: row.signedBy,
  signedAt: row.signedAt?.toISOString() ?? null,
});

/** Whether the person belongs to the organisation; only then are working copies shown. */
const isOwn = (actor: Actor, organisationId: string): boolean => actor.organisations.has(organisationId);
const canEdit = (actor: Actor, organisationId: string): boolean =>
  may(actor.organisations.get(organisationId) ?? [], 'protocol.edit');

function summary(actor: Actor, all: readonly Row[]): ProtocolSummary | null {
  const first = all[0];
  if (!first) return null;
  const current = all.find((row) => row.state === 'signedOff');
  const working = isOwn(actor, first.organisationId) ? all.find((row) => row.state === 'workingCopy') : undefined;
  const shown = current ?? working;
  if (!shown) return null;
  return {
    id: first.protocolId,
    organisationId: first.organisationId,
    organisation: first.organisation,
    name: shown.body.name,
    summary: shown.body.summary,
    classes: shown.body.classes,
    libraryId: first.libraryId,
    current: current ? version(current) : null,
    workingCopy: working ? version(working) : null,
  };
}

/** Protocols of own organisations, and signed-off ones of organisations engaged at the person's properties. */
export async function listProtocols(deps: Deps, actor: Actor): Promise<Output<'GET /api/protocols'>> {
  const reads = [...actor.properties]
    .filter(([, held]) => may(held.roles, 'protocol.read'))
    .map(([id, held]) => [id, held] as const);
  const engaged = await engagedOrganisations(deps.pool, { ...actor, properties: new Map(reads) }, deps.now());
  const ids = [...new Set([...actor.organisations.keys(), ...engaged])];
  const all = await rows<Row>(deps, `${sql} where p.organisation_id = any($1) order by p.name, p.id, v.number desc`, [
    ids,
  ]);
  const byProtocol = new Map<string, Row[]>();
  for (const row of all) byProtocol.set(row.protocolId, [...(byProtocol.get(row.protocolId) ?? []), row]);
  return { items: [...byProtocol.values()].flatMap((list) => summary(actor, list) ?? []) };
}

export async function readProtocol(
  deps: Deps,
  actor: Actor,
  id: string,
): Promise<Output<'GET /api/protocols/:protocolId'>> {
  const all = await rows<Row>(deps, `${sql} where p.id = $1 order by v.number desc`, [id]);
  const seen = all.filter((row) => isOwn(actor, row.organisationId) || row.state !== 'workingCopy');
  const first = seen[0];
  const about = summary(actor, seen) ?? null;
  if (!first) throw failure('notFound', 'server.notFound');
  const fallback: ProtocolSummary = {
    id,
    organisationId: first.organisationId,
    organisation: first.organisation,
    name: first.body.name,
    summary: first.body.summary,
    classes: first.body.classes,
    libraryId: first.libraryId,
    current: null,
    workingCopy: null,
  };
  return { ...(about ?? fallback), versions: seen.map(version), canEdit: canEdit(actor, first.organisationId) };
}

export async function readVersion(deps: Deps, actor: Actor, id: string): Promise<VersionDetail> {
  const [row] = await rows<Row>(deps, `${sql} where v.id = $1`, [id]);
  if (!row) throw failure('notFound', 'server.notFound');
  const edits = canEdit(actor, row.organisationId);
  return {
    ...version(row),
    protocolId: row.protocolId,
    organisationId: row.organisationId,
    body: asView(row.body),
    findings: findingsOf(row.body),
    canEdit: edits && row.state === 'workingCopy',
    canSignOff: edits && row.state === 'workingCopy',
  };
}
