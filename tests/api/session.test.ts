import type { Express } from 'express';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { hashSecret } from '@/server/auth/secrets';
import { Membership } from '@/server/models';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { buildWorld, signedIn, type World } from '../support/world';

let fresh: Fresh;
let app: Express;
let world: World;

beforeAll(async () => {
  fresh = await freshDatabase();
  app = createApp(fresh.deps);
  world = await buildWorld();
});
afterAll(() => fresh.drop());

const signIn = (to: Express, email: string, password = world.password) =>
  request(to).post('/api/session').send({ email, password });
const cookieOf = (response: request.Response): string => response.get('Set-Cookie')?.[0] ?? '';
const sessions = async (userId: string): Promise<{ id: string }[]> =>
  (await fresh.db.pool.query<{ id: string }>('select id from sessions where user_id = $1', [userId])).rows;
/** Goes on to the next minute, so that the tries of one test are not those of another. */
const nextMinute = () => fresh.setNow(new Date(fresh.deps.now().getTime() + 61_000));

describe('signing in', () => {
  it('answers the person with places and abilities, and sets a cookie that scripts and other sites do not get', async () => {
    const response = await signIn(app, 'Manager.One@Yard.Example').expect(200);
    expect(response.body).toMatchObject({
      user: { id: world.people.manager.id, email: 'manager.one@yard.example' },
      properties: [{ id: world.property.id, roles: ['manager'], through: null }],
      organisations: [],
    });
    expect(cookieOf(response)).toMatch(/^yardbell=\w+; HttpOnly; Max-Age=\d+; Path=\/; SameSite=Lax$/);
  });

  it('names the organisation through which a vet comes to a property', async () => {
    const response = await signIn(app, world.people.vet.email).expect(200);
    expect(response.body).toMatchObject({
      organisations: [{ id: world.practice.id, roles: ['vet'] }],
      properties: [
        { id: world.property.id, through: 'Test Vets' },
        { id: world.second.id, through: 'Test Vets' },
      ],
    });
  });

  it('keeps only a hash of the session id', async () => {
    const { staff } = world.people;
    const id = /^yardbell=(\w+)/.exec(cookieOf(await signIn(app, staff.email)))?.[1] ?? '';
    expect(id.length).toBeGreaterThan(30);
    expect(await sessions(staff.id)).toEqual([{ id: hashSecret(id) }]);
    await request(app)
      .get('/api/me')
      .set('Cookie', `yardbell=${hashSecret(id)}`)
      .expect(401);
  });

  it('sets a secure cookie bound to this host in production', async () => {
    const production = createApp({ ...fresh.deps, env: { ...fresh.deps.env, NODE_ENV: 'production' } });
    nextMinute();
    const response = await signIn(production, world.people.staff.email).expect(200);
    expect(cookieOf(response)).toMatch(/^__Host-yardbell=\w+; HttpOnly; .*Path=\/; SameSite=Lax; Secure$/);
    expect(response.get('Strict-Transport-Security')).toContain('max-age=31536000');
  });

  it('ends the session that the browser had before', async () => {
    const { calendarOnly } = world.people;
    const agent = await signedIn(app, calendarOnly);
    const [before] = await sessions(calendarOnly.id);
    await agent.post('/api/session').send({ email: calendarOnly.email, password: world.password }).expect(200);
    const after = await sessions(calendarOnly.id);
    expect(after).toHaveLength(1);
    expect(after[0]?.id).not.toBe(before?.id);
  });
});

describe('signing in without success', () => {
  it('answers an unknown person and a wrong password with the same words', async () => {
    const wrong = await signIn(app, world.people.manager.email, 'not the password').expect(401);
    const unknown = await signIn(app, 'nobody@yard.example', 'not the password').expect(401);
    const words = (response: request.Response) => ({
      ...(response.body as { error: object }).error,
      requestId: undefined,
    });
    expect(words(wrong)).toEqual(words(unknown));
    expect(words(wrong)).toMatchObject({ id: 'unauthenticated' });
    expect(cookieOf(wrong)).toBe('');
  });

  it('does the work of a password check for an unknown person too', async () => {
    const median = async (email: (n: number) => string) => {
      const times: number[] = [];
      for (let n = 0; n < 9; n++) {
        nextMinute();
        const from = performance.now();
        await signIn(app, email(n), 'not the password').expect(401);
        times.push(performance.now() - from);
      }
      return times.sort((a, b) => a - b)[4] ?? 0;
    };
    const known = await median(() => world.people.manager.email);
    const unknown = await median((n) => `nobody${n}@yard.example`);
    // argon2id takes most of the time: an answer without it would come in a small part of it
    expect(unknown).toBeGreaterThan(known * 0.5);
    expect(unknown).toBeLessThan(known * 2);
  });

  it('names the fields that are not right', async () => {
    const response = await signIn(app, 'no address', '').expect(400);
    const fields = (response.body as { error: { fields: { path: string }[] } }).error.fields;
    expect(fields.map((field) => field.path).sort()).toEqual(['email', 'password']);
  });

  it('lets nobody in with a session that has ended by its date', async () => {
    nextMinute();
    const agent = await signedIn(app, world.people.technician);
    await agent.get('/api/me').expect(200);
    await fresh.db.pool.query("update sessions set expires_at = now() - interval '1 minute' where user_id = $1", [
      world.people.technician.id,
    ]);
    await agent.get('/api/me').expect(401);
  });
});

describe('the limit of tries', () => {
  it('is ten a minute for one e-mail address, known or not, and does not touch another', async () => {
    for (const email of [world.otherManager.email, 'nobody@yard.example']) {
      nextMinute();
      for (let n = 0; n < 10; n++) await signIn(app, email, 'not the password').expect(401);
      const limited = await signIn(app, email).expect(429);
      expect(limited.body).toMatchObject({ error: { id: 'tooMany' } });
      await signIn(app, world.otherVet.email).expect(200);
    }
    nextMinute();
    await signIn(app, world.otherManager.email).expect(200);
  });

  it('is twenty a minute for one network address', async () => {
    const limited = createApp({ ...fresh.deps, env: { ...fresh.deps.env, NODE_ENV: 'development' } });
    const answers: number[] = [];
    for (let n = 0; n < 21; n++)
      answers.push((await request(limited).get('/api/invitations/not-a-token-of-anybody')).status);
    expect(answers.slice(0, 20)).toEqual(Array(20).fill(410));
    expect(answers[20]).toBe(429);
    // a forwarded address is not believed where no proxy was configured
    await request(limited)
      .get('/api/invitations/not-a-token-of-anybody')
      .set('X-Forwarded-For', '198.51.100.7')
      .expect(429);
    await request(limited).get('/api/health').expect(200);
  });
});

describe('signing out', () => {
  it('ends the session on the server: its cookie opens nothing any more', async () => {
    nextMinute();
    const signed = await signIn(app, world.otherVet.email).expect(200);
    const cookie = cookieOf(signed).split(';')[0] ?? '';
    await request(app).get('/api/me').set('Cookie', cookie).expect(200);
    const out = await request(app).delete('/api/session').set('Cookie', cookie).expect(200);
    expect(cookieOf(out)).toMatch(/^yardbell=; HttpOnly; Max-Age=0;/);
    await request(app).get('/api/me').set('Cookie', cookie).expect(401);
  });

  it('is no error without a session', () => request(app).delete('/api/session').expect(200));
});

describe('a change of role', () => {
  it('counts from the next request on', async () => {
    const agent = await signedIn(app, world.otherManager);
    const path = `/api/properties/${world.foreign.id}`;
    await agent.get(path).expect(200);
    await Membership.update({ endedAt: fresh.deps.now() }, { where: { userId: world.otherManager.id } });
    await agent.get(path).expect(404);
  });
});
