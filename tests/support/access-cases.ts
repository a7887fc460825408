import { randomUUID } from 'node:crypto';

import { library } from '@/protocols/library';
import type { ProtocolBody } from '@/protocols/types';
import {
  Animal,
  Authority,
  Cohort,
  Group,
  Invitation,
  Membership,
  Product,
  Protocol,
  ProtocolVersion,
  Task,
  User,
  WorkRecord,
} from '@/server/models';
import type { RouteName } from '@/shared/routes';
import { sevenDay } from './bodies';
import type { World } from './world';

/** One record of every kind at the world's property, for calling each route with ids that are there. */
export interface Fixture {
  world: World;
  ids: Record<string, string>;
  body: ProtocolBody;
}

export async function buildFixture(world: World): Promise<Fixture> {
  const { practice, property, people } = world;
  const id = () => randomUUID();
  const protocol = await Protocol.create({
    id: id(),
    organisationId: practice.id,
    name: 'Heifers',
    createdBy: people.vet.id,
  });
  const version = await ProtocolVersion.create({
    id: id(),
    protocolId: protocol.id,
    number: 1,
    state: 'signedOff',
    body: sevenDay(),
    signedBy: people.vet.id,
    signedAt: new Date('2026-04-01T00:00:00Z'),
  });
  const animal = await Animal.create({ id: id(), propertyId: property.id, tag: '0001', class: 'heifer' });
  const cohort = await Cohort.create({
    id: id(),
    propertyId: property.id,
    name: 'Spring',
    zone: property.zone,
    createdBy: people.manager.id,
  });
  const group = await Group.create({
    id: id(),
    cohortId: cohort.id,
    position: 0,
    name: 'Group 1',
    class: 'heifer',
    headOnly: 10,
  });
  const at = new Date('2026-05-04T00:00:00Z');
  const task = await Task.create({
    id: id(),
    cohortId: cohort.id,
    groupId: group.id,
    propertyId: property.id,
    visitId: 'in',
    title: 'Devices in',
    yarded: true,
    dueAt: at,
    windowFrom: at,
    windowTo: at,
    zone: property.zone,
    steps: [],
  });
  const record = await WorkRecord.create({
    id: id(),
    taskId: task.id,
    propertyId: property.id,
    outcome: 'done',
    at,
    userId: people.staff.id,
  });
  const authority = await Authority.create({
    id: id(),
    propertyId: property.id,
    cohortId: cohort.id,
    organisationId: practice.id,
    active: 'dinoprost',
    amount: 25,
    unit: 'mg',
    route: 'im',
    classes: ['heifer'],
    head: 10,
    validFrom: '2026-05-01',
    validTo: '2026-05-31',
    issuedBy: people.vet.id,
  });
  const product = await Product.create({
    id: id(),
    organisationId: practice.id,
    name: 'Dinoprost 5 mg/mL',
    active: 'dinoprost',
    strength: 5,
    unit: 'mg',
    per: 'mL',
    route: 'im',
  });
  const guest = await User.create({ id: id(), email: 'guest@yard.example', name: 'Guest', passwordHash: 'x' });
  const membership = await Membership.create({
    id: id(),
    userId: guest.id,
    organisationId: null,
    propertyId: property.id,
    role: 'staff',
  });
  const invitation = await Invitation.create({
    id: id(),
    email: 'soon@yard.example',
    role: 'staff',
    propertyId: property.id,
    tokenHash: id(),
    invitedBy: people.manager.id,
    expiresAt: new Date('2030-01-01T00:00:00Z'),
  });
  return {
    world,
    body: sevenDay(),
    ids: {
      propertyId: property.id,
      organisationId: practice.id,
      protocolId: protocol.id,
      versionId: version.id,
      animalId: animal.id,
      cohortId: cohort.id,
      taskId: task.id,
      recordId: record.id,
      authorityId: authority.id,
      membershipId: membership.id,
      invitationId: invitation.id,
      linkId: id(),
      libraryId: library[0]?.id ?? '',
      productId: product.id,
      token: 'not-a-token-that-anybody-was-given',
      secret: 'not-a-secret-that-anybody-was-given.ics',
    },
  };
}

const csv = Buffer.from('tag;class\n0002;heifer\n').toString('base64');

/** A body (or query) for every route that takes one; the test fails for a route that is not here. */
export const bodies: Record<RouteName, (f: Fixture) => object | undefined> = {
  'GET /api/health': () => undefined,
  'GET /api/openapi.json': () => undefined,
  'POST /api/session': () => ({ email: 'nobody@yard.example', password: 'nothing that fits' }),
  'DELETE /api/session': () => undefined,
  'GET /api/me': () => undefined,
  'PATCH /api/me': () => ({ preferences: { evening: true } }),
  'POST /api/password-resets': () => ({ email: 'nobody@yard.example' }),
  'POST /api/password-resets/:token': () => ({ password: 'a long enough password' }),
  'GET /api/invitations/:token': () => undefined,
  'POST /api/invitations/:token': () => ({ name: 'Somebody', password: 'a long enough password' }),
  'GET /api/properties/:propertyId': () => undefined,
  'PATCH /api/properties/:propertyId': () => ({ milkings: [] }),
  'GET /api/properties/:propertyId/people': () => undefined,
  'POST /api/properties/:propertyId/invitations': () => ({
    id: randomUUID(),
    email: `${randomUUID()}@yard.example`,
    role: 'staff',
  }),
  'DELETE /api/property-invitations/:invitationId': () => undefined,
  'DELETE /api/memberships/:membershipId': () => undefined,
  'GET /api/calendar-links': () => undefined,
  'POST /api/calendar-links': () => ({ id: randomUUID(), label: 'Phone', propertyId: null }),
  'POST /api/calendar-links/:linkId/replace': () => undefined,
  'DELETE /api/calendar-links/:linkId': () => undefined,
  'GET /api/calendar/:secret': () => undefined,
  'GET /api/library': () => undefined,
  'GET /api/library/:libraryId': () => undefined,
  'GET /api/protocols': () => undefined,
  'POST /api/protocols': (f) => ({
    id: randomUUID(),
    versionId: randomUUID(),
    organisationId: f.ids.organisationId,
    name: 'New',
  }),
  'GET /api/protocols/:protocolId': () => undefined,
  'POST /api/protocols/:protocolId/working-copies': () => ({ id: randomUUID() }),
  'GET /api/protocol-versions/:versionId': () => undefined,
  'PUT /api/protocol-versions/:versionId': (f) => ({ revision: 1, body: f.body }),
  'DELETE /api/protocol-versions/:versionId': () => undefined,
  'POST /api/protocol-versions/:versionId/sign-off': () => ({ revision: 1 }),
  'POST /api/protocol-versions/:versionId/retire': () => undefined,
  'GET /api/properties/:propertyId/animals': () => undefined,
  'POST /api/properties/:propertyId/animal-imports/preview': () => ({
    id: randomUUID(),
    fileName: 'a.csv',
    contentBase64: csv,
  }),
  'POST /api/properties/:propertyId/animal-imports': () => ({
    id: randomUUID(),
    fileName: 'a.csv',
    contentBase64: csv,
  }),
  'GET /api/animals/:animalId': () => undefined,
  'PATCH /api/animals/:animalId': () => ({ note: 'seen' }),
  'GET /api/properties/:propertyId/medicines': () => undefined,
  'POST /api/properties/:propertyId/products': (f) => ({
    id: randomUUID(),
    organisationId: f.ids.organisationId,
    name: `Product ${randomUUID()}`,
    active: 'dinoprost',
    strength: 5,
    unit: 'mg',
    per: 'mL',
    packSize: null,
    route: 'im',
    meatDays: null,
    milkHours: null,
    openDays: null,
  }),
  'POST /api/properties/:propertyId/product-batches': (f) => ({
    id: randomUUID(),
    productId: f.ids.productId,
    number: randomUUID(),
    expiry: '2027-01-01',
    quantity: 10,
  }),
  'POST /api/cohorts/:cohortId/authorities': () => ({
    id: randomUUID(),
    active: 'dinoprost',
    amount: 25,
    unit: 'mg',
    route: 'im',
    classes: ['heifer'],
    head: 10,
    validFrom: '2026-05-01',
    validTo: '2026-05-31',
    directions: '',
  }),
  'POST /api/authorities/:authorityId/withdraw': () => undefined,
  'GET /api/cohorts': () => undefined,
  'POST /api/properties/:propertyId/cohorts': () => ({ id: randomUUID(), name: `Cohort ${randomUUID()}` }),
  'GET /api/cohorts/:cohortId': () => undefined,
  'PATCH /api/cohorts/:cohortId': () => ({ revision: 999 }),
  'GET /api/cohorts/:cohortId/plan': () => undefined,
  'POST /api/cohorts/:cohortId/start': () => ({ fingerprint: 'x', revision: 999 }),
  'POST /api/cohorts/:cohortId/cancel': () => ({ reason: 'test' }),
  'GET /api/cohorts/:cohortId/audit': () => undefined,
  'POST /api/tasks/:taskId/move/preview': () => ({ dueLocal: '2026-05-04T10:00', revision: 0 }),
  'POST /api/tasks/:taskId/move': () => ({ dueLocal: '2026-05-04T10:00', revision: 0 }),
  'GET /api/today': () => undefined,
  'GET /api/calendar': () => undefined,
  'GET /api/tasks/:taskId/work': () => undefined,
  'POST /api/tasks/:taskId/records': () => ({
    records: [{ id: randomUUID(), animalId: null, outcome: 'done', at: '2026-05-04T00:00:00.000Z' }],
  }),
  'POST /api/tasks/:taskId/rest': () => ({ id: randomUUID(), at: '2026-05-04T00:00:00.000Z', expectedHead: 9 }),
  'POST /api/records/:recordId/undo': () => ({ id: randomUUID(), at: '2026-05-04T00:00:00.000Z' }),
};
