import { randomUUID } from 'node:crypto';

import type { Express } from 'express';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { Engagement, Membership, Protocol, ProtocolVersion, type User } from '@/server/models';
import { sevenDay } from '../support/bodies';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { buildWorld, signedIn, type World } from '../support/world';

/** What people at a property see of the protocols of the practice that it engages. */
let fresh: Fresh;
let app: Express;
let world: World;
let signedOff: ProtocolVersion;
let workingCopy: ProtocolVersion;
let unfinished: Protocol;

const protocol = (name: string) =>
  Protocol.create({ id: randomUUID(), organisationId: world.practice.id, name, createdBy: world.people.vet.id });
const version = (of: Protocol, number: number, state: 'workingCopy' | 'signedOff') =>
  ProtocolVersion.create({
    id: randomUUID(),
    protocolId: of.id,
    number,
    state,
    body: sevenDay(),
    signedBy: state === 'signedOff' ? world.people.vet.id : null,
    signedAt: state === 'signedOff' ? new Date('2026-04-01T00:00:00Z') : null,
  });

beforeAll(async () => {
  fresh = await freshDatabase();
  app = createApp(fresh.deps);
  world = await buildWorld();
  const heifers = await protocol('Heifers');
  signedOff = await version(heifers, 1, 'signedOff');
  workingCopy = await version(heifers, 2, 'workingCopy');
  unfinished = await protocol('Not finished');
  await version(unfinished, 1, 'workingCopy');
});
afterAll(() => fresh.drop());

const member = (who: User, role: 'manager' | 'staff', propertyId: string) =>
  Membership.create({ id: randomUUID(), userId: who.id, organisationId: null, propertyId, role });

/** Answers of reading the signed-off version, the working copy, and the protocol that has no signed-off version. */
async function sees(who: User): Promise<number[]> {
  const agent = await signedIn(app, who);
  const paths = [
    `/api/protocol-versions/${signedOff.id}`,
    `/api/protocol-versions/${workingCopy.id}`,
    `/api/protocols/${unfinished.id}`,
  ];
  const answers = [];
  for (const path of paths) answers.push((await agent.get(path)).status);
  return answers;
}
async function lists(who: User): Promise<string[]> {
  const answer = await (await signedIn(app, who)).get('/api/protocols').expect(200);
  return (answer.body as { items: { id: string }[] }).items.map((item) => item.id);
}

describe('protocols of a practice', () => {
  it('are all seen by its own vet', async () => {
    expect(await sees(world.people.vet)).toEqual([200, 200, 200]);
    expect(await lists(world.people.vet)).toHaveLength(2);
  });

  it('are seen, when signed off, by the manager of a property that engages it', async () => {
    expect(await sees(world.people.manager)).toEqual([200, 404, 404]);
    expect(await lists(world.people.manager)).toEqual([signedOff.protocolId]);
    const agent = await signedIn(app, world.people.manager);
    const seen = await agent.get(`/api/protocols/${signedOff.protocolId}`).expect(200);
    expect(JSON.stringify(seen.body)).not.toContain(workingCopy.id);
  });

  it('are there, but not for reading, for staff of such a property', async () => {
    expect(await sees(world.people.staff)).toEqual([403, 404, 404]);
    expect(await lists(world.people.staff)).toEqual([]);
  });

  it('are read, and never changed, by the vet of another practice at the same property', async () => {
    expect(await sees(world.otherVet)).toEqual([404, 404, 404]);
    const both = await Engagement.create({
      id: randomUUID(),
      organisationId: world.otherPractice.id,
      propertyId: world.property.id,
      scope: 'veterinary',
      fromDate: '2020-01-01',
    });
    expect(await sees(world.otherVet)).toEqual([200, 404, 404]);
    const agent = await signedIn(app, world.otherVet);
    const at = `/api/protocol-versions/${signedOff.id}`;
    await agent.put(at).send({ revision: 1, body: sevenDay() }).expect(403);
    await agent.post(`${at}/retire`).expect(403);
    await agent.post(`/api/protocols/${signedOff.protocolId}/working-copies`).send({ id: randomUUID() }).expect(403);
    const created = { id: randomUUID(), versionId: randomUUID(), organisationId: world.practice.id, name: 'Theirs' };
    await agent.post('/api/protocols').send(created).expect(403);
    await both.destroy();
  });

  it('are judged by the role at the property that engages the practice, not by one held elsewhere', async () => {
    // manager of a property that does not engage the practice, staff at one that does
    await member(world.otherManager, 'staff', world.property.id);
    expect(await sees(world.otherManager)).toEqual([403, 404, 404]);
    expect(await lists(world.otherManager)).toEqual([]);
  });

  it('are gone for the property the day after the engagement ends', async () => {
    const where = { organisationId: world.practice.id, propertyId: world.property.id };
    await Engagement.update({ toDate: '2026-05-03' }, { where });
    expect(await sees(world.people.manager)).toEqual([404, 404, 404]);
    expect(await lists(world.people.manager)).toEqual([]);
    await Engagement.update({ toDate: '2026-05-04' }, { where });
    expect(await sees(world.people.manager)).toEqual([200, 404, 404]);
  });
});
