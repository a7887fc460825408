import type { Express } from 'express';
import request from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { hashSecret } from '@/server/auth/secrets';
import { AuditEntry, Message, PasswordReset, type User } from '@/server/models';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { buildWorld, signedIn, type World } from '../support/world';

let fresh: Fresh;
let app: Express;
let world: World;
let person: User;
const newPassword = 'a new and longer password';

beforeAll(async () => {
  fresh = await freshDatabase();
  app = createApp(fresh.deps);
  world = await buildWorld();
  person = world.people.staff;
});
afterAll(() => fresh.drop());
beforeEach(() => fresh.setNow(new Date(fresh.deps.now().getTime() + 61_000)));

const ask = (email: string) => request(app).post('/api/password-resets').send({ email });
const reset = (token: string, password = newPassword) =>
  request(app).post(`/api/password-resets/${token}`).send({ password });
const mails = (address: string) =>
  Message.findAll({ where: { kind: 'passwordReset', address }, order: [['dueAt', 'ASC']] });

/** Asks for a reset and reads the secret from the outbox, as the person would from the mail. */
async function secretFor(who: User): Promise<string> {
  await PasswordReset.destroy({ where: { userId: who.id } });
  await Message.destroy({ where: { address: who.email } });
  await ask(who.email).expect(202);
  const [mail] = await mails(who.email);
  return String(mail?.params.link).split('/').at(-1) ?? '';
}

describe('asking for a reset', () => {
  it('answers known and unknown people alike, and mails only the known', async () => {
    const known = await ask(person.email).expect(202);
    const unknown = await ask('nobody@yard.example').expect(202);
    expect(known.body).toEqual(unknown.body);
    expect(await mails(person.email)).toHaveLength(1);
    expect(await mails('nobody@yard.example')).toHaveLength(0);
  });

  it('takes about as long for unknown people', async () => {
    const time = async (email: string) => {
      const from = performance.now();
      await ask(email).expect(202);
      return performance.now() - from;
    };
    const known = await time(world.people.vet.email);
    const unknown = await time('another@yard.example');
    expect(unknown).toBeGreaterThan(known * 0.6);
  });

  it('puts a link to this site into the outbox and keeps only the hash of its secret', async () => {
    const secret = await secretFor(person);
    expect(Buffer.from(secret, 'base64url')).toHaveLength(32);
    const [mail] = await mails(person.email);
    expect(mail).toMatchObject({ channel: 'email', state: 'waiting', userId: person.id, dueAt: fresh.deps.now() });
    expect(mail?.params).toMatchObject({ link: `${fresh.deps.env.PUBLIC_URL}/reset/${secret}`, name: person.name });
    const kept = await PasswordReset.findOne({ where: { userId: person.id }, rejectOnEmpty: true });
    expect(kept.tokenHash).toBe(hashSecret(secret));
    expect(JSON.stringify(kept)).not.toContain(secret);
  });

  it('takes an address in capitals for the same', async () => {
    await ask(world.otherVet.email.toUpperCase()).expect(202);
    expect(await mails(world.otherVet.email)).toHaveLength(1);
  });

  it('sends one address no more than ten mails a minute, and tells nobody who is known', async () => {
    for (const email of [world.stranger.email, 'nobody@yard.example']) {
      for (let n = 0; n < 10; n++) await ask(email).expect(202);
      await ask(email).expect(429);
    }
    expect(await mails(world.stranger.email)).toHaveLength(10);
  });
});

describe('setting a new password', () => {
  it('ends every session, takes the new password and no longer the old', async () => {
    const phone = await signedIn(app, person);
    const office = await signedIn(app, person);
    await reset(await secretFor(person)).expect(200);
    await phone.get('/api/me').expect(401);
    await office.get('/api/me').expect(401);
    await request(app).post('/api/session').send({ email: person.email, password: world.password }).expect(401);
    await request(app).post('/api/session').send({ email: person.email, password: newPassword }).expect(200);
    expect(await AuditEntry.count({ where: { action: 'password.reset', userId: person.id } })).toBe(1);
  });

  it('leaves the sessions of other people', async () => {
    const other = await signedIn(app, world.people.manager);
    await reset(await secretFor(person)).expect(200);
    await other.get('/api/me').expect(200);
  });

  it('works once', async () => {
    const secret = await secretFor(person);
    await reset(secret).expect(200);
    const again = await reset(secret, 'yet another password').expect(410);
    expect(again.body).toMatchObject({ error: { id: 'gone' } });
    await request(app).post('/api/session').send({ email: person.email, password: newPassword }).expect(200);
  });

  it('works once even when asked twice at the same moment', async () => {
    const secret = await secretFor(person);
    const answers = await Promise.all([reset(secret), reset(secret, 'yet another password')]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 410]);
  });

  it('makes every other open link of the person useless', async () => {
    const first = await secretFor(person);
    await ask(person.email).expect(202);
    const second = String(
      (await mails(person.email)).map((mail) => mail.params.link).find((l) => !String(l).includes(first)),
    );
    await reset(second.split('/').at(-1) ?? '').expect(200);
    await reset(first, 'yet another password').expect(410);
  });

  it('ends after an hour', async () => {
    const secret = await secretFor(person);
    fresh.setNow(new Date(fresh.deps.now().getTime() + 3_600_000));
    await reset(secret).expect(410);
  });

  it('refuses a short password by name and leaves the link', async () => {
    const secret = await secretFor(person);
    const short = await reset(secret, 'too short').expect(400);
    expect(short.body).toMatchObject({
      error: { id: 'invalid', fields: [{ path: 'password', message: 'Use at least 12 characters.' }] },
    });
    await reset(secret).expect(200);
  });

  it('does not know a made-up token', () => reset('a'.repeat(43)).expect(410));
});
