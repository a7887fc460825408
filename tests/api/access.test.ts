import type { Express } from 'express';
import request, { type Response } from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { abilities, roles, type Role } from '@/shared/abilities';
import { routes, type RouteName } from '@/shared/routes';
import type { RouteSpec } from '@/shared/routes/spec';
import { bodies, buildFixture, type Fixture } from '../support/access-cases';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import { buildWorld, signedIn, type Agent } from '../support/world';

/** Made from the route table: every route is called by every role, by nobody and by people of another place. */
let fresh: Fresh;
let app: Express;
let fixture: Fixture;
const agents = new Map<string, Agent>();

beforeAll(async () => {
  fresh = await freshDatabase();
  app = createApp(fresh.deps);
  const world = await buildWorld();
  fixture = await buildFixture(world);
  for (const role of roles) agents.set(role, await signedIn(app, world.people[role]));
  agents.set('otherVet', await signedIn(app, world.otherVet));
  agents.set('otherManager', await signedIn(app, world.otherManager));
  agents.set('stranger', await signedIn(app, world.stranger));
});
afterAll(() => fresh.drop());

const all = Object.entries(routes) as [RouteName, RouteSpec][];

async function call(name: RouteName, agent: Agent | null): Promise<Response> {
  const [method = '', pattern = ''] = name.split(' ');
  const path = pattern.replace(/:(\w+)/g, (_, key: string) => fixture.ids[key] ?? `missing-${key}`);
  const query = name === 'GET /api/calendar' ? '?from=2026-05-01&to=2026-05-07' : '';
  const client = agent ?? request(app);
  const verb = method.toLowerCase() as 'get' | 'post' | 'put' | 'patch' | 'delete';
  const sent = client[verb](path + query);
  const body = bodies[name](fixture);
  return body ? sent.send(body) : sent;
}

/** What those who may were answered: most must have got through to the end, or the cases prove little. */
const answered: string[] = [];

const id = (response: Response): string => String((response.body as { error?: { id?: string } }).error?.id ?? '');

/** Writes change the fixture, so each is tried first by those who may not, last by those who may. */
const isPlace = (spec: RouteSpec): spec is RouteSpec & { who: { ability: keyof typeof abilities; at: string } } =>
  typeof spec.who !== 'string' && spec.who.at !== 'all';

describe('the route table', () => {
  it('has a case for every route, and no case for a route that is gone', () => {
    expect(Object.keys(bodies).sort()).toEqual(Object.keys(routes).sort());
  });

  it('fills every id that a path names', () => {
    const named = all.flatMap(([name]) => [...name.matchAll(/:(\w+)/g)].map((m) => m[1] ?? ''));
    expect(named.filter((key) => !(key in fixture.ids))).toEqual([]);
  });
});

describe.each(all.filter(([, spec]) => spec.who !== 'anyone'))('%s', (name, spec) => {
  it('asks nobody in without signing in', async () => {
    const response = await call(name, null);
    expect([response.status, id(response)]).toEqual([401, 'unauthenticated']);
  });

  if (isPlace(spec)) {
    it.each(['otherVet', 'otherManager', 'stranger'])('does not exist for %s', async (who) => {
      const response = await call(name, agents.get(who) ?? null);
      expect([response.status, id(response)]).toEqual([404, 'notFound']);
    });
  }

  const allowed = (role: Role) =>
    typeof spec.who === 'string' ||
    spec.who.at === 'all' ||
    (abilities[spec.who.ability] as readonly Role[]).includes(role);
  const byDenied = [...roles].sort((a, b) => Number(allowed(a)) - Number(allowed(b)));
  it.each(byDenied)('answers %s as the table says', async (role) => {
    const response = await call(name, agents.get(role) ?? null);
    if (!allowed(role)) {
      expect([response.status, id(response)]).toEqual([403, 'forbidden']);
      return;
    }
    answered.push(`${response.status} ${role} ${name}`);
    expect([200, 201, 400, 404, 409, 422], JSON.stringify(response.body)).toContain(response.status);
    if (isPlace(spec) && id(response) === 'notFound') expect(gone.has(name)).toBe(true);
  });
});

/** Routes that take their record away: the second role that may do it finds nothing. */
const gone = new Set<RouteName>([
  'DELETE /api/property-invitations/:invitationId',
  'DELETE /api/memberships/:membershipId',
]);

describe('lists over every place', () => {
  it.each(all.filter(([, spec]) => typeof spec.who !== 'string' && spec.who.at === 'all'))(
    '%s shows a stranger nothing of this place',
    async (name) => {
      for (const who of ['stranger', 'otherVet', 'otherManager']) {
        const response = await call(name, agents.get(who) ?? null);
        expect(response.status).toBe(200);
        const text = JSON.stringify(response.body);
        for (const secret of [fixture.ids.cohortId, fixture.ids.taskId, fixture.ids.protocolId, fixture.ids.propertyId])
          expect(text).not.toContain(secret);
      }
    },
  );

  const lists = all.flatMap(([name, spec]) =>
    typeof spec.who !== 'string' && spec.who.at === 'all' ? [[name, spec.who.ability] as const] : [],
  );
  const denied = lists.flatMap(([name, ability]) =>
    roles
      .filter((role) => !(abilities[ability] as readonly Role[]).includes(role))
      .map((role) => [name, role] as const),
  );
  it.each(denied)('%s shows %s, whose role lacks the ability, nothing', async (name, role) => {
    const response = await call(name, agents.get(role) ?? null);
    expect(response.status).toBe(200);
    const text = JSON.stringify(response.body);
    for (const hidden of [fixture.ids.cohortId, fixture.ids.taskId, fixture.ids.protocolId])
      expect(text).not.toContain(hidden);
  });
});

describe('the cases', () => {
  it('reach the end of most routes, not only the first thing that is wrong', () => {
    const done = new Set(answered.filter((line) => line.startsWith('20')).map((line) => line.replace(/^\S+ \S+ /, '')));
    const never = [...new Set(answered.map((line) => line.replace(/^\S+ \S+ /, '')))].filter((name) => !done.has(name));
    // each of these needs a state that one fixture can't have; their own tests bring them to the end
    expect(never.sort()).toEqual(neverDone);
  });
});

const neverDone = [
  // the caller's own link: calendarLinks.test.ts
  'DELETE /api/calendar-links/:linkId',
  // a working copy, where the fixture's version is signed off
  'DELETE /api/protocol-versions/:versionId',
  // a cohort with a plan and tasks made by starting it, and its newest revision
  'PATCH /api/cohorts/:cohortId',
  'POST /api/calendar-links/:linkId/replace',
  'POST /api/cohorts/:cohortId/start',
  'POST /api/tasks/:taskId/move',
  'POST /api/tasks/:taskId/move/preview',
  'PUT /api/protocol-versions/:versionId',
];

describe.each(all.filter(([, spec]) => spec.who === 'anyone'))('%s', (name) => {
  it('answers nobody without an error of the server', async () => {
    const response = await call(name, null);
    expect(response.status).toBeLessThan(500);
    expect(response.status).not.toBe(403);
  });
});
