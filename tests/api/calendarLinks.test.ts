import { randomUUID } from 'node:crypto';

import express from 'express';
import request from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { createLucia } from '@/server/auth/sessions';
import { errorHandler } from '@/server/http/errors';
import type { Handlers } from '@/server/http/handler';
import { register } from '@/server/http/register';
import { calendarLinkHandlers } from '@/server/routes/calendarLinks';
import type { RouteName } from '@/shared/routes';
import { addGroup, addOrganisation, addPerson, addProperty, addTask, moveTask, openYard, type Yard } from '../jobs/kit';
import { brokenRules, readEntries } from './calendarKit';

describe('calendar links', () => {
  let yard: Yard;
  let app: express.Express;
  let property: string;
  let task: string;

  beforeAll(async () => {
    yard = await openYard();
  });
  afterAll(() => yard.close());
  beforeEach(async () => {
    await yard.reset('2026-10-01T00:00:00Z');
    app = express();
    // the routes under test are all here; the table's other routes are not called
    register(app, yard.deps, createLucia(yard.deps.pool, false), calendarLinkHandlers as Handlers<RouteName>);
    app.use(errorHandler);
    property = await addProperty(yard);
    task = await addTask(yard, property, await addGroup(yard, property), { due: '2026-10-05T20:00:00Z' });
  });

  const signIn = async (userId: string) => {
    const sessions = createLucia(yard.deps.pool, false);
    const session = await sessions.createSession(userId, {});
    const cookie = sessions.createSessionCookie(session.id).serialize();
    return {
      get: (path: string) => request(app).get(path).set('Cookie', cookie),
      post: (path: string, body: object = {}) => request(app).post(path).set('Cookie', cookie).send(body),
      delete: (path: string) => request(app).delete(path).set('Cookie', cookie),
    };
  };
  const person = async (role: Parameters<typeof addPerson>[2] = 'staff', place = property) => {
    const { id } = await addPerson(yard, place, role);
    return { id, ...(await signIn(id)) };
  };
  const pathOf = (url: unknown) => new URL(String(url)).pathname;
  const make = async (who: Awaited<ReturnType<typeof person>>, propertyId: string | null = null) => {
    const made = await who.post('/api/calendar-links', { id: randomUUID(), label: 'My phone', propertyId });
    expect(made.status).toBe(201);
    return { id: String(made.body.id), path: pathOf(made.body.url), url: String(made.body.url) };
  };
  const read = (path: string) => request(app).get(path);

  it('show their secret once and keep only a hash of it', async () => {
    const who = await person();
    const { url, path } = await make(who);
    const secret = /^http:\/\/localhost:3000\/api\/calendar\/([A-Za-z0-9_-]{43})\.ics$/.exec(url)?.[1] ?? 'none';
    const listed = await who.get('/api/calendar-links');
    expect(listed.body.items).toHaveLength(1);
    expect(JSON.stringify(listed.body)).not.toContain(secret);
    expect(JSON.stringify(await yard.sql('select * from calendar_links'))).not.toContain(secret);
    expect((await read(path)).status).toBe(200);
  });

  it('are calendars that need no sign-in and are never kept by others', async () => {
    const { path } = await make(await person());
    const answer = await read(path);
    expect(answer.headers['content-type']).toBe('text/calendar; charset=utf-8');
    expect(answer.headers['cache-control']).toContain('private');
    expect(brokenRules(answer.text)).toEqual([]);
    expect(readEntries(answer.text).map((entry) => [entry.uid, entry.start.toISOString()])).toEqual([
      [`${task}@yardbell`, '2026-10-05T20:00:00.000Z'],
    ]);
    expect(answer.text).toContain('X-WR-CALNAME:Yardbell · My phone\r\n');
  });

  it('answer 304 until something changes', async () => {
    const { path } = await make(await person());
    yard.clock.at = new Date('2026-10-01T01:00:00Z');
    const first = await read(path);
    const { etag, 'last-modified': modified } = first.headers as Record<string, string>;
    expect((await read(path).set('If-None-Match', String(etag))).status).toBe(304);
    expect((await read(path).set('If-Modified-Since', String(modified))).status).toBe(304);
    yard.clock.at = new Date('2026-10-01T02:00:00Z');
    await moveTask(yard, task, '2026-10-06T20:00:00Z');
    yard.clock.at = new Date('2026-10-01T02:00:05Z');
    expect((await read(path).set('If-Modified-Since', String(modified))).status).toBe(200);
    const moved = await read(path).set('If-None-Match', String(etag));
    expect(moved.status).toBe(200);
    expect(readEntries(moved.text)[0]?.start.toISOString()).toBe('2026-10-06T20:00:00.000Z');
  });

  it('tell a reader that only asks "changed since?" that access was lost', async () => {
    const who = await person();
    const { path } = await make(who);
    yard.clock.at = new Date('2026-10-01T01:00:00Z');
    const modified = String((await read(path)).headers['last-modified']);
    await yard.sql(`update memberships set ended_at = '2026-10-01T02:00:00Z' where user_id = :id`, { id: who.id });
    yard.clock.at = new Date('2026-10-01T03:00:00Z');
    const answer = await read(path).set('If-Modified-Since', modified);
    expect(answer.status).toBe(200);
    expect(readEntries(answer.text)).toEqual([]);
  });

  it('end with the engagement through which the person came', async () => {
    const practice = await addOrganisation(yard, property, '2026-01-01', '2026-10-02');
    const { path } = await make(await person('vet', practice));
    expect(readEntries((await read(path)).text)).toHaveLength(1);
    // 3 October in Sydney begins at 14:00 UTC on the 2nd
    yard.clock.at = new Date('2026-10-02T14:00:00Z');
    expect(readEntries((await read(path)).text)).toEqual([]);
  });

  it('stop when revoked, like an address that never was', async () => {
    const who = await person();
    const { id, path } = await make(who);
    expect((await who.delete(`/api/calendar-links/${id}`)).status).toBe(200);
    const [revoked, never] = [await read(path), await read(`/api/calendar/${'A'.repeat(43)}.ics`)];
    expect([revoked.status, never.status]).toEqual([404, 404]);
    expect(revoked.body.error.message).toBe(never.body.error.message);
    expect((await who.get('/api/calendar-links')).body.items).toEqual([]);
    expect((await read('/api/calendar/not-a-secret')).status).toBe(404);
  });

  it('stop at the old address when replaced, and go on at the new one', async () => {
    const who = await person();
    const { id, path } = await make(who);
    const replaced = await who.post(`/api/calendar-links/${id}/replace`);
    expect((await read(path)).status).toBe(404);
    expect((await read(pathOf(replaced.body.url))).status).toBe(200);
  });

  it('belong to one person', async () => {
    const [who, other] = [await person(), await person('manager')];
    const { id, path } = await make(who);
    expect((await other.get('/api/calendar-links')).body.items).toEqual([]);
    expect((await other.delete(`/api/calendar-links/${id}`)).status).toBe(404);
    expect((await other.post(`/api/calendar-links/${id}/replace`)).status).toBe(404);
    expect((await other.post('/api/calendar-links', { id, label: 'Mine now', propertyId: null })).status).toBe(409);
    expect((await read(path)).status).toBe(200);
    expect((await request(app).get('/api/calendar-links')).status).toBe(401);
  });

  it('can be bound to a property of the person, and to no other', async () => {
    const elsewhere = await addProperty(yard);
    await addTask(yard, elsewhere, await addGroup(yard, elsewhere), { due: '2026-10-05T20:00:00Z' });
    const who = await person('calendarOnly');
    const refused = await who.post('/api/calendar-links', { id: randomUUID(), label: 'x', propertyId: elsewhere });
    expect(refused.status).toBe(404);
    const { path } = await make(who, property);
    expect(readEntries((await read(path)).text).map((entry) => entry.uid)).toEqual([`${task}@yardbell`]);
    expect((await who.get('/api/calendar-links')).body.items[0].property).toBe('Gully Flat');
  });

  it('answer a repeated making with a working address, until the calendar is in use', async () => {
    const who = await person();
    const body = { id: randomUUID(), label: 'My phone', propertyId: null };
    await who.post('/api/calendar-links', body);
    const again = await who.post('/api/calendar-links', body);
    expect(again.status).toBe(201);
    expect((await who.get('/api/calendar-links')).body.items).toHaveLength(1);
    expect((await read(pathOf(again.body.url))).status).toBe(200);
    expect((await who.post('/api/calendar-links', body)).status).toBe(409);
  });

  it('note when they were last read, at most every ten minutes', async () => {
    const who = await person();
    const { path } = await make(who);
    const noted = async () => (await who.get('/api/calendar-links')).body.items[0].lastReadAt as string | null;
    expect(await noted()).toBeNull();
    for (const [at, expected] of [
      ['00:01', '00:01'],
      ['00:10', '00:01'],
      ['00:11', '00:11'],
    ]) {
      yard.clock.at = new Date(`2026-10-01T${at}:00Z`);
      await read(path);
      expect(await noted()).toBe(`2026-10-01T${expected}:00.000Z`);
    }
  });
});
