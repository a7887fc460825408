import { randomUUID } from 'node:crypto';

import type { Express } from 'express';
import type { Response } from 'supertest';

import { findLibrary } from '@/protocols/library';
import type { Active, AdministrationRoute, AnimalClass, DoseUnit, ProtocolBody } from '@/protocols/types';
import { createApp } from '@/server/app';
import { Animal, Authority, Protocol, ProtocolVersion } from '@/server/models';
import type { Role } from '@/shared/abilities';
import type { ApiError } from '@/shared/contracts/common';
import type { CohortDetail, PlanPreview } from '@/shared/contracts/cohorts';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { buildWorld, signedIn, type Agent, type World } from '../support/world';

/** A server with its own database, the world in it, and an agent for every role at the home property. */
export interface Program {
  fresh: Fresh;
  app: Express;
  world: World;
  agents: Record<Role, Agent>;
  /** Signed-off 7-day program for heifers: in, out a week later, AI 54 h after that (52 to 56). */
  heifers: string;
}

/** Monday 4 May 2026, 10:00 at the home property. */
export async function openProgram(now = '2026-05-04T00:00:00Z'): Promise<Program> {
  const fresh = await freshDatabase(new Date(now));
  const app = createApp(fresh.deps);
  const world = await buildWorld();
  await world.property.update({ region: 'NSW' });
  const sign = (role: Role) => signedIn(app, world.people[role]);
  const agents = {
    vet: await sign('vet'),
    manager: await sign('manager'),
    technician: await sign('technician'),
    staff: await sign('staff'),
    calendarOnly: await sign('calendarOnly'),
  };
  return { fresh, app, world, agents, heifers: await signedOff(world, 'device-7-heifers') };
}

/** A version of the practice's, made from a published protocol. */
export async function signedOff(
  world: World,
  libraryId: string,
  more: { state?: 'signedOff' | 'retired' | 'workingCopy'; organisationId?: string; body?: Partial<ProtocolBody> } = {},
): Promise<string> {
  const entry = findLibrary(libraryId);
  if (!entry) throw new Error(`no published protocol ${libraryId}`);
  const { state = 'signedOff', organisationId = world.practice.id } = more;
  const protocol = await Protocol.create({
    id: randomUUID(),
    organisationId,
    name: entry.body.name,
    libraryId,
    createdBy: world.people.vet.id,
  });
  const signed = state === 'workingCopy' ? {} : { signedBy: world.people.vet.id, signedAt: new Date('2026-01-05') };
  const version = await ProtocolVersion.create({
    id: randomUUID(),
    protocolId: protocol.id,
    number: 1,
    state,
    body: { ...entry.body, ...more.body },
    ...signed,
  });
  return version.id;
}

let lastTag = 0;
type AnimalPart = { class?: AnimalClass; knownEmpty?: boolean | null; lastCalving?: string | null };

/** Animals with tags of their own; heifers known empty unless said otherwise. */
export async function addAnimals(propertyId: string, count: number, more: AnimalPart = {}): Promise<string[]> {
  const animals = Array.from({ length: count }, () => ({
    id: randomUUID(),
    propertyId,
    tag: String(++lastTag).padStart(5, '0'),
    class: more.class ?? ('heifer' as const),
    knownEmpty: more.knownEmpty === undefined ? true : more.knownEmpty,
    lastCalving: more.lastCalving ?? null,
    state: 'present' as const,
  }));
  const fields = ['id', 'propertyId', 'tag', 'class', 'knownEmpty', 'lastCalving', 'state'] as const;
  await Animal.bulkCreate(animals, { fields: [...fields] });
  return animals.map((animal) => animal.id);
}

const doses: Record<string, { amount: number; unit: DoseUnit; route: AdministrationRoute }> = {
  progesterone: { amount: 1, unit: 'device', route: 'intravaginal' },
  gonadorelin: { amount: 100, unit: 'ug', route: 'im' },
  dinoprost: { amount: 25, unit: 'mg', route: 'im' },
};

type AuthorityPart = Partial<{
  classes: AnimalClass[];
  validFrom: string;
  validTo: string;
  amount: number;
  issuedAt: Date;
  cohortId: string | null;
  productId: string;
}>;

/** The vet's direction for one active; for a cohort, or for the property when `cohortId` is null. */
export async function authorise(
  { world }: Program,
  cohortId: string | null,
  active: Active,
  head: number,
  more: AuthorityPart = {},
): Promise<string> {
  const authority = await Authority.create({
    id: randomUUID(),
    propertyId: world.property.id,
    cohortId,
    organisationId: world.practice.id,
    active,
    ...(doses[active] ?? { amount: 1, unit: 'dose' as const, route: 'im' as const }),
    classes: ['heifer'],
    head,
    validFrom: '2026-01-01',
    validTo: '2026-12-31',
    issuedBy: world.people.vet.id,
    issuedAt: new Date('2026-05-01T00:00:00Z'),
    ...more,
  });
  return authority.id;
}

/** All three medicines of the 7-day program. */
export async function authoriseAll(program: Program, cohortId: string, head: number, more?: AuthorityPart) {
  for (const active of ['progesterone', 'gonadorelin', 'dinoprost'] as const)
    await authorise(program, cohortId, active, head, more);
}

export interface GroupPart {
  id?: string;
  name?: string;
  class?: AnimalClass;
  animalIds?: string[];
  head?: number;
  local?: string;
}
interface Wish {
  groups: readonly GroupPart[];
  version?: string;
  visit?: string | null;
  local?: string;
  name?: string;
  options?: Record<string, string>;
}

/** Wednesday 20 May 2026: devices in a week before, AI on Friday 22 May at 13:00. */
export const devicesOut = '2026-05-20T07:00';

export const groupsOf = (groups: readonly GroupPart[]) =>
  groups.map((group, i) => ({ id: randomUUID(), name: `Mob ${i + 1}`, class: 'heifer' as const, ...group }));

/** What a manager sends to begin planning. */
export const wishOf = (program: Program, wish: Wish) => ({
  id: randomUUID(),
  name: wish.name ?? 'Autumn heifers',
  protocolVersionId: wish.version ?? program.heifers,
  anchor: { visit: wish.visit === undefined ? 'out' : wish.visit, local: wish.local ?? devicesOut },
  groups: groupsOf(wish.groups),
  ...(wish.options ? { options: wish.options } : {}),
});

export async function planCohort(program: Program, wish: Wish): Promise<CohortDetail> {
  const { agents, world } = program;
  const answer = await agents.manager
    .post(`/api/properties/${world.property.id}/cohorts`)
    .send(wishOf(program, wish))
    .expect(201);
  return answer.body as CohortDetail;
}

export const planOf = async ({ agents }: Program, cohortId: string): Promise<PlanPreview> =>
  (await agents.manager.get(`/api/cohorts/${cohortId}/plan`).expect(200)).body as PlanPreview;

export const cohortOf = async ({ agents }: Program, cohortId: string): Promise<CohortDetail> =>
  (await agents.manager.get(`/api/cohorts/${cohortId}`).expect(200)).body as CohortDetail;

/** Plans, authorises and starts a cohort of heifers. */
export async function startedCohort(program: Program, wish: Wish, authorised?: number): Promise<CohortDetail> {
  const cohort = await planCohort(program, wish);
  await authoriseAll(program, cohort.id, authorised ?? cohort.head);
  const plan = await planOf(program, cohort.id);
  const answer = await program.agents.manager
    .post(`/api/cohorts/${cohort.id}/start`)
    .send({ fingerprint: plan.fingerprint, revision: cohort.revision });
  if (answer.status !== 200) throw new Error(JSON.stringify(answer.body));
  return answer.body as CohortDetail;
}

export const errorOf = (answer: Response): ApiError['error'] => (answer.body as ApiError).error;
export const codesOf = (findings: readonly { code: string; severity: string }[], severity?: string): string[] =>
  findings.filter((f) => severity === undefined || f.severity === severity).map((f) => f.code);

export function taskOf(cohort: CohortDetail, visitId: string, group?: string): CohortDetail['tasks'][number] {
  const task = cohort.tasks.find((one) => one.visitId === visitId && (group === undefined || one.group === group));
  if (!task) throw new Error(`no task ${visitId}`);
  return task;
}

export async function sqlOf({ fresh }: Program, text: string, values: unknown[] = []) {
  return (await fresh.db.pool.query<Record<string, unknown>>(text, values)).rows;
}
