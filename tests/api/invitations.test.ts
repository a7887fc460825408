import { randomUUID } from 'node:crypto';

import type { Express } from 'express';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { hashSecret } from '@/server/auth/secrets';
import { AuditEntry, Invitation, Membership, Message, User } from '@/server/models';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { buildWorld, signedIn, type Agent, type World } from '../support/world';

let fresh: Fresh;
let app: Express;
let world: World;
let manager: Agent;
const password = 'a long enough password';

beforeAll(async () => {
  fresh = await freshDatabase();
  app = createApp(fresh.deps);
  world = await buildWorld();
  manager = await signedIn(app, world.people.manager);
});
afterAll(() => fresh.drop());

const invite = (email: string, role = 'staff', id: string = randomUUID()) =>
  manager.post(`/api/properties/${world.property.id}/invitations`).send({ id, email, role });
const accept = (secret: string, body: object) => request(app).post(`/api/invitations/${secret}`).send(body);

/** Invites and reads the secret from the outbox, as the person would from the mail. */
async function invited(email: string, role = 'staff'): Promise<{ id: string; secret: string }> {
  const id = randomUUID();
  await invite(email, role, id).expect(201);
  const mail = await Message.findOne({ where: { dedupeKey: `invitation:${id}` }, rejectOnEmpty: true });
  return { id, secret: String(mail.params.link).split('/').at(-1) ?? '' };
}

describe('inviting', () => {
  it('answers the invitation, lists it, mails it and writes it into the audit trail', async () => {
    const id = randomUUID();
    const answer = await invite('New.Hand@Yard.Example', 'staff', id).expect(201);
    expect(answer.body).toEqual({
      id,
      email: 'new.hand@yard.example',
      role: 'staff',
      expiresAt: '2026-05-18T00:00:00.000Z',
      invitedBy: world.people.manager.name,
    });
    const list = await manager.get(`/api/properties/${world.property.id}/people`).expect(200);
    expect((list.body as { invitations: object[] }).invitations).toContainEqual(answer.body);
    const mail = await Message.findOne({ where: { address: 'new.hand@yard.example' }, rejectOnEmpty: true });
    expect(mail).toMatchObject({ kind: 'invitation', channel: 'email', state: 'waiting', dueAt: fresh.deps.now() });
    expect(mail.params).toMatchObject({ place: 'Home Yards', invitedBy: world.people.manager.name });
    const entry = await AuditEntry.findOne({ where: { action: 'invitation.create' }, rejectOnEmpty: true });
    expect(entry).toMatchObject({ propertyId: world.property.id, summary: 'new.hand@yard.example invited' });
  });

  it('keeps only the hash of the secret in the link', async () => {
    const { id, secret } = await invited('hash@yard.example');
    const kept = await Invitation.findByPk(id, { rejectOnEmpty: true });
    expect(kept.tokenHash).toBe(hashSecret(secret));
    expect(Buffer.from(secret, 'base64url')).toHaveLength(32);
  });

  it('is done once when the request is repeated', async () => {
    const id = randomUUID();
    await invite('twice@yard.example', 'staff', id).expect(201);
    await invite('twice@yard.example', 'staff', id).expect(201);
    expect(await Message.count({ where: { address: 'twice@yard.example' } })).toBe(1);
  });

  it('refuses an id that was used at another property', async () => {
    const { id } = await invited('elsewhere@yard.example');
    const foreign = await signedIn(app, world.otherManager);
    const answer = await foreign
      .post(`/api/properties/${world.foreign.id}/invitations`)
      .send({ id, email: 'elsewhere@yard.example', role: 'staff' });
    expect([answer.status, (answer.body as { error: { id: string } }).error.id]).toEqual([409, 'conflict']);
  });

  it('refuses a role that comes only through an organisation', async () => {
    const answer = await invite('vet@yard.example', 'vet').expect(400);
    expect(answer.body).toMatchObject({ error: { fields: [{ path: 'role' }] } });
  });

  it('refuses a person who has the role here already', async () => {
    const answer = await invite(world.people.staff.email).expect(400);
    expect(answer.body).toMatchObject({ error: { fields: [{ path: 'email' }] } });
  });

  it('is open to nobody but a manager', async () => {
    const staff = await signedIn(app, world.people.staff);
    await staff
      .post(`/api/properties/${world.property.id}/invitations`)
      .send({ id: randomUUID(), email: 'friend@yard.example', role: 'manager' })
      .expect(403);
    expect(await Invitation.count({ where: { email: 'friend@yard.example' } })).toBe(0);
  });
});

describe('accepting as a new person', () => {
  it('shows what the invitation is for, makes the account and signs in', async () => {
    const { secret } = await invited('fresh@yard.example');
    const look = await request(app).get(`/api/invitations/${secret}`).expect(200);
    expect(look.body).toEqual({
      email: 'fresh@yard.example',
      role: 'staff',
      place: 'Home Yards',
      invitedBy: world.people.manager.name,
      known: false,
    });
    const agent = request.agent(app);
    const joined = await agent.post(`/api/invitations/${secret}`).send({ name: 'Fresh Hand', password }).expect(200);
    expect(joined.body).toMatchObject({
      user: { name: 'Fresh Hand', email: 'fresh@yard.example' },
      properties: [{ id: world.property.id, roles: ['staff'] }],
    });
    await agent.get('/api/me').expect(200);
    await accept(secret, { name: 'Another', password }).expect(410);
    await request(app).get(`/api/invitations/${secret}`).expect(410);
  });

  it('asks for a name, and leaves the invitation open when there is none', async () => {
    const { secret } = await invited('nameless@yard.example');
    const answer = await accept(secret, { password }).expect(400);
    expect(answer.body).toMatchObject({ error: { fields: [{ path: 'name' }] } });
    expect(await User.count({ where: { email: 'nameless@yard.example' } })).toBe(0);
    await accept(secret, { name: 'Named', password }).expect(200);
  });

  it('makes one account when accepted twice at the same moment', async () => {
    const { secret } = await invited('hasty@yard.example');
    const body = { name: 'Hasty', password };
    const answers = await Promise.all([accept(secret, body), accept(secret, body)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 410]);
    expect(await User.count({ where: { email: 'hasty@yard.example' } })).toBe(1);
  });
});

describe('accepting with an account', () => {
  it('needs the password of that account', async () => {
    const { secret } = await invited(world.stranger.email);
    const look = await request(app).get(`/api/invitations/${secret}`).expect(200);
    expect(look.body).toMatchObject({ known: true });
    const wrong = await accept(secret, { name: 'Impostor', password }).expect(400);
    expect(wrong.body).toMatchObject({ error: { fields: [{ path: 'password' }] } });
    expect(await Membership.count({ where: { userId: world.stranger.id } })).toBe(0);
    const right = await accept(secret, { password: world.password }).expect(200);
    expect(right.body).toMatchObject({ user: { id: world.stranger.id, name: 'Stranger' } });
  });

  it('can have its password guessed no more than ten times a minute', async () => {
    const { secret } = await invited(world.otherVet.email);
    for (let n = 0; n < 10; n++) await accept(secret, { password: `wrong password ${n}` }).expect(400);
    await accept(secret, { password: world.password }).expect(429);
  });

  it('adds a second role beside the first', async () => {
    const { secret } = await invited(world.people.calendarOnly.email);
    const joined = await accept(secret, { password: world.password }).expect(200);
    const [property] = (joined.body as { properties: { roles: string[] }[] }).properties;
    expect(property?.roles.sort()).toEqual(['calendarOnly', 'staff']);
  });
});

describe('an invitation that is over', () => {
  it('is not accepted after a manager withdrew it', async () => {
    const { id, secret } = await invited('withdrawn@yard.example');
    await manager.delete(`/api/property-invitations/${id}`).expect(200);
    await accept(secret, { name: 'Late', password }).expect(410);
    await manager.delete(`/api/property-invitations/${id}`).expect(404);
    const mail = await Message.findOne({ where: { dedupeKey: `invitation:${id}` }, rejectOnEmpty: true });
    expect(mail.state).toBe('withdrawn');
  });

  it('is not accepted after two weeks, nor listed', async () => {
    const { id, secret } = await invited('slow@yard.example');
    const before = fresh.deps.now();
    fresh.setNow(new Date(before.getTime() + 14 * 86_400_000));
    await accept(secret, { name: 'Slow', password }).expect(410);
    const list = await manager.get(`/api/properties/${world.property.id}/people`).expect(200);
    expect(JSON.stringify(list.body)).not.toContain(id);
    fresh.setNow(before);
  });
});
