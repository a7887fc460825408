import type { Express } from 'express';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { User } from '@/server/models';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { buildWorld, signedIn, type Agent, type World } from '../support/world';

let fresh: Fresh;
let app: Express;
let world: World;
let agent: Agent;

beforeAll(async () => {
  fresh = await freshDatabase();
  app = createApp(fresh.deps);
  world = await buildWorld();
  agent = await signedIn(app, world.people.staff);
});
afterAll(() => fresh.drop());

const rename = (headers: Record<string, string>, name: string) => agent.patch('/api/me').set(headers).send({ name });
const nameNow = async () => (await User.findByPk(world.people.staff.id, { rejectOnEmpty: true })).name;

describe('a write from another site', () => {
  it.each([
    ['says so itself', { 'Sec-Fetch-Site': 'cross-site' }],
    ['comes from a neighbour under the same domain', { 'Sec-Fetch-Site': 'same-site' }],
    ['comes from another origin, in a browser without Sec-Fetch-Site', { Origin: 'https://other.example' }],
    ['hides its origin', { Origin: 'null' }],
    ['has an origin that is none', { Origin: 'not an address' }],
    ['looks like ours at the beginning', { Origin: 'http://127.0.0.1:4180.other.example' }],
    ['claims our origin but is cross-site', { 'Sec-Fetch-Site': 'cross-site', Origin: 'http://127.0.0.1:4180' }],
  ])('is refused: %s', async (_, headers: Record<string, string>) => {
    const answer = await rename(headers, 'Written from afar').expect(403);
    expect(answer.body).toMatchObject({ error: { id: 'forbidden' } });
    expect(await nameNow()).not.toBe('Written from afar');
  });

  it('is refused before signing in too: nobody is signed in as somebody else', async () => {
    const { email } = world.people.manager;
    const answer = await request(app)
      .post('/api/session')
      .set('Sec-Fetch-Site', 'cross-site')
      .send({ email, password: world.password })
      .expect(403);
    expect(answer.get('Set-Cookie')).toBeUndefined();
  });

  it('cannot sign anybody out', async () => {
    await agent.delete('/api/session').set('Sec-Fetch-Site', 'cross-site').expect(403);
    await agent.get('/api/me').expect(200);
  });
});

describe('a write from this site', () => {
  it.each([
    ['by the page', { 'Sec-Fetch-Site': 'same-origin' }],
    ['by the person at the address bar', { 'Sec-Fetch-Site': 'none' }],
    ['by the page in a browser without Sec-Fetch-Site', { Origin: 'http://127.0.0.1:4180' }],
    ['by a program that is no browser', {}],
  ])('is done: %s', async (words, headers: Record<string, string>) => {
    await rename(headers, `Written ${words}`.slice(0, 100)).expect(200);
    expect(await nameNow()).toBe(`Written ${words}`.slice(0, 100));
  });

  it('takes the address that the page was opened under, behind a proxy that keeps the host', () =>
    rename({ Origin: 'https://yards.example', Host: 'yards.example' }, 'Written by host').expect(200));
});

describe('a body that is not JSON', () => {
  it.each(['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data; boundary=x'])(
    'is refused: %s, which a form can send from anywhere',
    async (type) => {
      const answer = await agent.patch('/api/me').set('Content-Type', type).send('{"name":"Form"}').expect(400);
      expect(answer.body).toMatchObject({ error: { message: 'Send application/json.' } });
      expect(await nameNow()).not.toBe('Form');
    },
  );
});

describe('reading', () => {
  it('is answered wherever it comes from, and no other site is told that it may read', async () => {
    const answer = await agent
      .get('/api/me')
      .set({ 'Sec-Fetch-Site': 'cross-site', Origin: 'https://other.example' })
      .expect(200);
    expect(answer.get('Access-Control-Allow-Origin')).toBeUndefined();
    expect(answer.get('Cross-Origin-Resource-Policy')).toBe('same-origin');
  });
});
