import { randomUUID } from 'node:crypto';

import type { Express } from 'express';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { Animal, AnimalImport, AuditEntry } from '@/server/models';
import type { ImportPreview } from '@/shared/contracts/herd';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { mobCsv } from '../support/mob-csv';
import { buildWorld, signedIn, type Agent, type World } from '../support/world';

let fresh: Fresh;
let app: Express;
let world: World;
let manager: Agent;
beforeAll(async () => {
  fresh = await freshDatabase();
  app = createApp(fresh.deps);
  world = await buildWorld();
  manager = await signedIn(app, world.people.manager);
});
beforeEach(async () => {
  await fresh.db.pool.query('delete from animal_imports');
  await fresh.db.pool.query('delete from animals');
});
afterAll(() => fresh.drop());

const request = (text: string, more: object = {}) => ({
  id: randomUUID(),
  fileName: 'mob.csv',
  contentBase64: Buffer.from(text).toString('base64'),
  ...more,
});
const path = () => `/api/properties/${world.property.id}/animal-imports`;

describe('a mob from a file', () => {
  it('is shown row by row before anything is written', async () => {
    const body = request(`\ufeff${mobCsv({ head: 184, spacedEids: true, delimiter: ';' })}`);
    const answer = await manager.post(`${path()}/preview`).send(body).expect(200);
    const preview = answer.body as ImportPreview;
    expect(preview).toMatchObject({
      delimiter: ';',
      questions: [],
      counts: { create: 184, update: 0, skip: 0, refuse: 0 },
    });
    expect(preview.rows).toHaveLength(184);
    expect(await Animal.count()).toBe(0);
  });

  it('is written in one transaction with its audit entry, tags and EIDs as they are', async () => {
    const body = request(mobCsv({ head: 184, spacedEids: true }));
    await manager.post(path()).send(body).expect(201);
    const animals = await Animal.findAll({ order: [['tag', 'ASC']] });
    expect(animals).toHaveLength(184);
    expect(animals.some((animal) => animal.tag.startsWith('0'))).toBe(true);
    expect(animals.every((animal) => /^\d{15}$/.test(animal.eid ?? ''))).toBe(true);
    expect(
      await AuditEntry.count({ where: { action: 'animal.import', propertyId: world.property.id } }),
    ).toBeGreaterThan(0);
  });

  it('changes nothing when it is sent again, and refuses another file under the same id', async () => {
    const body = request(mobCsv({ head: 12 }));
    const first = await manager.post(path()).send(body).expect(201);
    const again = await manager.post(path()).send(body).expect(201);
    expect(again.body).toEqual({ ...(first.body as object), repeated: true });
    expect(await Animal.count()).toBe(12);
    const other = { ...request(mobCsv({ head: 13 })), id: body.id };
    await manager.post(path()).send(other).expect(409);
    expect(await Animal.count()).toBe(12);
  });

  it('skips what is the same and updates what differs, from and to', async () => {
    await manager.post(path()).send(request('Tag;Class;Mob\n0012;heifer;Hill\n0013;heifer;Hill\n')).expect(201);
    const answer = await manager
      .post(`${path()}/preview`)
      .send(request('Tag;Class;Mob\n0012;heifer;Creek\n0013;heifer;Hill\n'));
    const { counts, rows } = answer.body as ImportPreview;
    expect(counts).toEqual({ create: 0, update: 1, skip: 1, refuse: 0 });
    expect(rows[0]?.changes).toEqual([{ field: 'paddock', from: 'Hill', to: 'Creek' }]);
  });

  it('is not written while a question is open', async () => {
    const body = request(mobCsv({ head: 20, dates: 'dmy', ambiguousDates: true }));
    const answer = await manager.post(path()).send(body).expect(422);
    expect((answer.body as { error: { message: string } }).error.message).toMatch(/day or the month/);
    expect(await Animal.count()).toBe(0);
    await manager
      .post(path())
      .send({ ...body, dateOrder: 'dmy' })
      .expect(201);
    expect(await Animal.count()).toBe(20);
  });

  it('that breaks off in the middle leaves nothing half done', async () => {
    // the database itself refuses the last row, as a full disk or a lost connection would
    await fresh.db.pool.query(`create function stop_there() returns trigger language plpgsql as $$ begin
      if (select count(*) from animals) >= 30 then raise exception 'broken off'; end if; return new; end $$`);
    await fresh.db.pool.query(
      'create trigger stop_there before insert on animal_imports for each row execute function stop_there()',
    );
    await manager
      .post(path())
      .send(request(mobCsv({ head: 40 })))
      .expect(500);
    await fresh.db.pool.query('drop trigger stop_there on animal_imports');
    await fresh.db.pool.query('drop function stop_there()');
    expect([await Animal.count(), await AnimalImport.count()]).toEqual([0, 0]);
  });

  it('that can’t be read says so at the field', async () => {
    const answer = await manager.post(`${path()}/preview`).send(request('')).expect(400);
    expect((answer.body as { error: { fields: { path: string }[] } }).error.fields[0]?.path).toBe('contentBase64');
  });
});

describe('the herd', () => {
  it('is listed by tag, page by page, and found by part of a tag or EID', async () => {
    await manager
      .post(path())
      .send(request(mobCsv({ head: 60 })))
      .expect(201);
    const list = (query: string) => manager.get(`/api/properties/${world.property.id}/animals?${query}`);
    const first = (await list('limit=25')).body as { items: { tag: string }[]; next: string };
    const second = (await list(`limit=25&after=${first.next}`)).body as { items: { tag: string }[] };
    const tags = [...first.items, ...second.items].map((animal) => animal.tag);
    expect(new Set(tags).size).toBe(50);
    expect([...tags].sort()).toEqual(tags);
    const one = (await list(`search=${tags[7]}`)).body as { items: { tag: string; eid: string }[] };
    expect(one.items.map((animal) => animal.tag)).toContain(tags[7]);
    await list('after=nonsense').expect(400);
  });

  it('leaves what is absent and clears what is null', async () => {
    await manager.post(path()).send(request('Tag;Class;Mob\n0012;heifer;Hill\n')).expect(201);
    const animal = await Animal.findOne({ rejectOnEmpty: true });
    const patched = await manager
      .patch(`/api/animals/${animal.id}`)
      .send({ knownEmpty: true, paddock: null })
      .expect(200);
    expect(patched.body).toMatchObject({ tag: '0012', knownEmpty: true, paddock: null, class: 'heifer' });
    const bad = await manager.patch(`/api/animals/${animal.id}`).send({ birth: '2031-01-01' }).expect(400);
    expect((bad.body as { error: { fields: unknown } }).error.fields).toEqual([
      expect.objectContaining({ path: 'birth' }),
    ]);
  });
});
