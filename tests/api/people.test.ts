import { randomUUID } from 'node:crypto';

import type { Express } from 'express';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { AuditEntry, Engagement, Membership, type User } from '@/server/models';
import { freshDatabase, type Fresh } from '../support/fresh-database';
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
afterAll(() => fresh.drop());

const home = () => `/api/properties/${world.property.id}`;
const member = (who: User, role: 'manager' | 'staff') =>
  Membership.create({ id: randomUUID(), userId: who.id, organisationId: null, propertyId: world.property.id, role });

describe('oneself', () => {
  it('changes what is given and leaves the rest', async () => {
    const staff = await signedIn(app, world.people.staff);
    const first = await staff.patch('/api/me').send({ name: 'Staff Renamed' }).expect(200);
    expect(first.body).toMatchObject({
      user: { name: 'Staff Renamed' },
      preferences: { evening: true, morning: true, closing: true, eveningAt: '18:00', morningAt: '05:30' },
    });
    const second = await staff.patch('/api/me').send({ preferences: { morning: false, morningAt: '04:45' } });
    expect(second.body).toMatchObject({
      user: { name: 'Staff Renamed' },
      preferences: { evening: true, morning: false, morningAt: '04:45' },
    });
  });

  it('cannot take another e-mail address or role that way', async () => {
    const staff = await signedIn(app, world.people.staff);
    const sent = { email: 'other@yard.example', role: 'manager', userId: world.people.manager.id };
    const answer = await staff.patch('/api/me').send(sent).expect(200);
    expect(answer.body).toMatchObject({
      user: { id: world.people.staff.id, email: world.people.staff.email },
      properties: [{ roles: ['staff'] }],
    });
  });
});

describe('a property', () => {
  it('is changed field by field: absent leaves, null clears', async () => {
    const changed = await manager
      .patch(home())
      .send({ milkings: ['05:00', '15:30'], weekendDays: [7] })
      .expect(200);
    expect(changed.body).toMatchObject({
      name: 'Home Yards',
      yardHours: { from: '05:00', to: '21:00' },
      milkings: ['05:00', '15:30'],
      weekendDays: [7],
    });
    const cleared = await manager.patch(home()).send({ yardHours: null }).expect(200);
    expect(cleared.body).toMatchObject({ yardHours: null, milkings: ['05:00', '15:30'] });
    const entries = await AuditEntry.findAll({ where: { action: 'property.edit', propertyId: world.property.id } });
    expect(entries.map((entry) => entry.detail)).toContainEqual({ yardHours: null });
  });

  it('names a field that is not right', async () => {
    const answer = await manager
      .patch(home())
      .send({ yardHours: { from: '25:00', to: '21:00' } })
      .expect(400);
    expect(answer.body).toMatchObject({
      error: { fields: [{ path: 'yardHours.from', message: 'Give a time as HH:MM.' }] },
    });
  });
});

describe('the people of a property', () => {
  it('are its own members and those of engaged organisations', async () => {
    const answer = await manager.get(`${home()}/people`).expect(200);
    const people = (answer.body as { people: { email: string; role: string; through: string | null }[] }).people;
    const seen = people.map(({ email, role, through }) => [email, role, through]);
    expect(seen).toContainEqual([world.people.manager.email, 'manager', null]);
    expect(seen).toContainEqual([world.people.vet.email, 'vet', 'Test Vets']);
    expect(seen).toContainEqual([world.people.technician.email, 'technician', 'Test AI']);
    expect(seen.map(([email]) => email)).not.toContain(world.otherVet.email);
  });

  it('lose what they saw when their membership ends', async () => {
    const guest = await member(world.stranger, 'staff');
    const agent = await signedIn(app, world.stranger);
    await agent.get(home()).expect(200);
    await manager.delete(`/api/memberships/${guest.id}`).expect(200);
    await agent.get(home()).expect(404);
    await manager.delete(`/api/memberships/${guest.id}`).expect(404);
    const entry = await AuditEntry.findOne({ where: { action: 'membership.end' }, rejectOnEmpty: true });
    expect(entry).toMatchObject({ userId: world.people.manager.id, propertyId: world.property.id });
  });

  it('keep one manager, who cannot be removed', async () => {
    const [own] = await Membership.findAll({ where: { userId: world.people.manager.id } });
    const answer = await manager.delete(`/api/memberships/${own?.id ?? ''}`).expect(422);
    expect(answer.body).toMatchObject({ error: { id: 'refused' } });
  });

  it('keep one manager even when two remove each other at the same moment', async () => {
    for (let round = 0; round < 5; round++) {
      const [own] = await Membership.findAll({ where: { userId: world.people.manager.id, endedAt: null } });
      const second = await member(world.stranger, 'manager');
      const other = await signedIn(app, world.stranger);
      const answers = await Promise.all([
        manager.delete(`/api/memberships/${second.id}`),
        other.delete(`/api/memberships/${own?.id ?? ''}`),
      ]);
      const where = { propertyId: world.property.id, role: 'manager' as const, endedAt: null };
      expect(await Membership.count({ where }), answers.map((a) => a.status).join()).toBe(1);
      await Membership.update({ endedAt: fresh.deps.now() }, { where: { id: second.id } });
      await Membership.update({ endedAt: null }, { where: { id: own?.id ?? '' } });
      fresh.setNow(new Date(fresh.deps.now().getTime() + 61_000));
    }
  });
});

describe('an engagement', () => {
  it("begins and ends at midnight of the property's own zone", async () => {
    await Engagement.update(
      { fromDate: '2026-06-10', toDate: '2026-06-12' },
      { where: { organisationId: world.practice.id, propertyId: world.property.id } },
    );
    const vet = await signedIn(app, world.people.vet);
    // Sydney is 10 hours ahead of UTC in June: its 10 June begins at 14:00 UTC of the 9th, its 12th ends at 14:00 UTC
    const at = async (instant: string) => {
      fresh.setNow(new Date(instant));
      return (await vet.get(home())).status;
    };
    expect(await at('2026-06-09T13:59:59Z')).toBe(404);
    expect(await at('2026-06-09T14:00:00Z')).toBe(200);
    expect(await at('2026-06-12T13:59:59Z')).toBe(200);
    expect(await at('2026-06-12T14:00:00Z')).toBe(404);
  });

  it('for insemination makes nobody the vet of the property', async () => {
    const both = await Engagement.create({
      id: randomUUID(),
      organisationId: world.otherPractice.id,
      propertyId: world.property.id,
      scope: 'insemination',
      fromDate: '2020-01-01',
    });
    const vet = await signedIn(app, world.otherVet);
    await vet.get(home()).expect(404);
    await both.update({ scope: 'veterinary' });
    await vet.get(home()).expect(200);
  });
});
