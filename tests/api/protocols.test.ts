import { randomUUID } from 'node:crypto';

import type { Express } from 'express';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { ProtocolBody } from '@/protocols/types';
import { createApp } from '@/server/app';
import type { VersionDetail } from '@/shared/contracts/protocols';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { buildWorld, signedIn, type Agent, type World } from '../support/world';

let fresh: Fresh;
let app: Express;
let world: World;
let vet: Agent;
let manager: Agent;
beforeAll(async () => {
  fresh = await freshDatabase();
  app = createApp(fresh.deps);
  world = await buildWorld();
  vet = await signedIn(app, world.people.vet);
  manager = await signedIn(app, world.people.manager);
});
afterAll(() => fresh.drop());

const version = async (id: string, who = vet) =>
  (await who.get(`/api/protocol-versions/${id}`).expect(200)).body as VersionDetail;

/** A copy of a published protocol; gives the ids of protocol and working copy. */
async function copy(libraryId = 'device-7-heifers') {
  const ids = { id: randomUUID(), versionId: randomUUID() };
  const body = { ...ids, organisationId: world.practice.id, name: 'Ours', from: { libraryId } };
  await vet.post('/api/protocols').send(body).expect(201);
  return ids;
}

const save = (id: string, revision: number, body: ProtocolBody) =>
  vet.put(`/api/protocol-versions/${id}`).send({ revision, body });
const signOff = (id: string, revision: number) => vet.post(`/api/protocol-versions/${id}/sign-off`).send({ revision });

describe('the library', () => {
  it('is listed with interval, yardings and sources', async () => {
    const { items } = (await manager.get('/api/library').expect(200)).body as { items: Record<string, unknown>[] };
    expect(items.find((entry) => entry.id === 'device-7-cows')).toMatchObject({
      serviceInterval: '60 to 66 h after device out',
      yardings: 3,
      lengthDays: 10,
    });
    expect(items.length).toBeGreaterThanOrEqual(12);
  });
});

describe('a protocol', () => {
  it('is copied, changed, signed off, and then never changes', async () => {
    const { versionId } = await copy();
    const opened = await version(versionId);
    const body = opened.body as ProtocolBody;
    const changed = {
      ...body,
      gaps: body.gaps.map((gap) => (gap.unit === 'elapsedHours' ? { ...gap, most: 58 } : gap)),
    };
    await save(versionId, opened.revision, changed).expect(200);
    await signOff(versionId, opened.revision + 1).expect(200);
    await save(versionId, opened.revision + 1, body).expect(422);
    await vet.delete(`/api/protocol-versions/${versionId}`).expect(422);
    expect(await version(versionId)).toMatchObject({
      state: 'signedOff',
      signedBy: world.people.vet.name,
      canEdit: false,
    });
    await expect(
      fresh.db.pool.query(`update protocol_versions set body = '{}' where id = $1`, [versionId]),
    ).rejects.toThrow('never changes');
  });

  it('opens one next working copy at a time, from the newest version', async () => {
    const { id, versionId } = await copy();
    await signOff(versionId, 1).expect(200);
    const next = randomUUID();
    const opened = await vet.post(`/api/protocols/${id}/working-copies`).send({ id: next }).expect(201);
    expect(opened.body).toMatchObject({ number: 2, state: 'workingCopy' });
    await vet.post(`/api/protocols/${id}/working-copies`).send({ id: next }).expect(201);
    await vet.post(`/api/protocols/${id}/working-copies`).send({ id: randomUUID() }).expect(409);
    await vet.delete(`/api/protocol-versions/${next}`).expect(200);
  });

  it('is not signed off while a stop stands or an amount is not written', async () => {
    const { versionId } = await copy('device-7-suckler');
    const answer = await signOff(versionId, 1).expect(422);
    const { findings } = (answer.body as { error: { findings: { code: string }[] } }).error;
    expect(new Set(findings.map((finding) => finding.code))).toEqual(new Set(['amountMissing']));
  });

  it('that somebody else saved meanwhile is stale, and says who and when; nothing is overwritten', async () => {
    const { versionId } = await copy();
    const opened = await version(versionId);
    const body = opened.body as ProtocolBody;
    await save(versionId, 1, { ...body, summary: 'First' }).expect(200);
    const answer = await save(versionId, 1, { ...body, summary: 'Second' }).expect(409);
    expect((answer.body as { error: { id: string; message: string } }).error).toMatchObject({
      id: 'stale',
      message: expect.stringContaining(world.people.vet.name) as string,
    });
    expect((await version(versionId)).body.summary).toBe('First');
  });

  it('with a field that is wrong says which and why', async () => {
    const { versionId } = await copy();
    const body = (await version(versionId)).body as ProtocolBody;
    const answer = await save(versionId, 1, { ...body, classes: [] }).expect(400);
    expect((answer.body as { error: { fields: unknown[] } }).error.fields).toEqual([
      { path: 'body.classes', message: 'Choose at least one class of animal.' },
    ]);
  });

  it('is seen by a manager once it is signed off, never as a working copy', async () => {
    const { id, versionId } = await copy();
    await manager.get(`/api/protocol-versions/${versionId}`).expect(404);
    await signOff(versionId, 1).expect(200);
    await manager.get(`/api/protocol-versions/${versionId}`).expect(200);
    const { items } = (await manager.get('/api/protocols').expect(200)).body as { items: { id: string }[] };
    expect(items.map((item) => item.id)).toContain(id);
  });

  it('made twice by the same request is made once', async () => {
    const ids = { id: randomUUID(), versionId: randomUUID() };
    const body = { ...ids, organisationId: world.practice.id, name: 'Once' };
    await vet.post('/api/protocols').send(body).expect(201);
    await vet.post('/api/protocols').send(body).expect(201);
    expect((await version(ids.versionId)).number).toBe(1);
  });
});
