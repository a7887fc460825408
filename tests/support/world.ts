import { randomUUID } from 'node:crypto';

import type { Express } from 'express';
import request from 'supertest';

import { hashPassword } from '@/server/auth/password';
import { Engagement, Membership, Organisation, Property, User } from '@/server/models';
import type { Role } from '@/shared/abilities';

/** Two practices, a contractor, three properties and a person for every role; all names invented. */
export interface World {
  password: string;
  practice: Organisation;
  otherPractice: Organisation;
  contractor: Organisation;
  /** Engaged: practice (veterinary), contractor (insemination). Sydney. */
  property: Property;
  /** Engaged: practice. Dublin. */
  second: Property;
  /** Engaged: otherPractice. New York. */
  foreign: Property;
  /** People with one role each towards `property`. */
  people: Record<Role, User>;
  /** Vet and manager who have nothing to do with `property`. */
  otherVet: User;
  otherManager: User;
  /** An account without any membership. */
  stranger: User;
}

const organisation = (name: string, kind: 'vetPractice' | 'aiContractor') =>
  Organisation.create({ id: randomUUID(), name, kind });

const place = (name: string, zone: string, country: string, locale: string) =>
  Property.create({ id: randomUUID(), name, zone, country, locale, yardFrom: '05:00', yardTo: '21:00' });

const engage = (organisationId: string, propertyId: string, scope: 'veterinary' | 'insemination') =>
  Engagement.create({ id: randomUUID(), organisationId, propertyId, scope, fromDate: '2020-01-01' });

export async function buildWorld(): Promise<World> {
  const password = 'correct horse battery';
  const passwordHash = await hashPassword(password);
  const user = (name: string) =>
    User.create({
      id: randomUUID(),
      name,
      email: `${name.toLowerCase().replace(/\W+/g, '.')}@yard.example`,
      passwordHash,
    });
  const member = (who: User, role: Role, where: { organisationId?: string; propertyId?: string }) =>
    Membership.create({ id: randomUUID(), userId: who.id, role, organisationId: null, propertyId: null, ...where });
  const practice = await organisation('Test Vets', 'vetPractice');
  const otherPractice = await organisation('Other Vets', 'vetPractice');
  const contractor = await organisation('Test AI', 'aiContractor');
  const property = await place('Home Yards', 'Australia/Sydney', 'AU', 'en-AU');
  const second = await place('Second Yards', 'Europe/Dublin', 'IE', 'en-IE');
  const foreign = await place('Foreign Yards', 'America/New_York', 'US', 'en-US');
  await engage(practice.id, property.id, 'veterinary');
  await engage(practice.id, second.id, 'veterinary');
  await engage(contractor.id, property.id, 'insemination');
  await engage(otherPractice.id, foreign.id, 'veterinary');
  const people: Record<Role, User> = {
    vet: await user('Vet One'),
    manager: await user('Manager One'),
    technician: await user('Technician One'),
    staff: await user('Staff One'),
    calendarOnly: await user('Calendar One'),
  };
  await member(people.vet, 'vet', { organisationId: practice.id });
  await member(people.technician, 'technician', { organisationId: contractor.id });
  for (const role of ['manager', 'staff', 'calendarOnly'] as const)
    await member(people[role], role, { propertyId: property.id });
  const otherVet = await user('Other Vet');
  await member(otherVet, 'vet', { organisationId: otherPractice.id });
  const otherManager = await user('Other Manager');
  await member(otherManager, 'manager', { propertyId: foreign.id });
  const stranger = await user('Stranger');
  return {
    password,
    practice,
    otherPractice,
    contractor,
    property,
    second,
    foreign,
    people,
    otherVet,
    otherManager,
    stranger,
  };
}

export type Agent = ReturnType<typeof request.agent>;

/** An agent that carries a person's session. */
export async function signedIn(app: Express, who: User, password = 'correct horse battery'): Promise<Agent> {
  const agent = request.agent(app);
  await agent.post('/api/session').send({ email: who.email, password }).expect(200);
  return agent;
}
