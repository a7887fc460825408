import type { Express } from 'express';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { createApp } from '@/server/app';
import { seedDemo } from '@/server/seeds/demo';
import { demoId } from '@/server/seeds/ids';
import { demoPassword, demoSignIns } from '@/server/seeds/signIns';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import type { TaskWork } from '@/shared/contracts/work';
import type { Output } from '@/shared/routes';
import { freshDatabase, type Fresh } from '../support/fresh-database';
import type { Agent } from '../support/world';
import { codesOf } from './programKit';

/** Thursday 7 May 2026, 09:20 in Sydney; 00:20 in Dublin; still Wednesday in New York. */
const now = new Date('2026-05-06T23:20:00Z');
let fresh: Fresh;
let app: Express;
let took = 0;
beforeAll(async () => {
  fresh = await freshDatabase(now);
  app = createApp(fresh.deps);
  const from = performance.now();
  expect(await seedDemo(fresh.deps)).toBe(true);
  took = performance.now() - from;
});
afterAll(() => fresh.drop());

const agents = new Map<string, Agent>();
async function as(email: string): Promise<Agent> {
  const known = agents.get(email);
  if (known) return known;
  const agent = request.agent(app);
  await agent.post('/api/session').send({ email, password: demoPassword }).expect(200);
  agents.set(email, agent);
  return agent;
}
type Today = Output<'GET /api/today'>;
type Cohorts = Output<'GET /api/cohorts'>;
const todayOf = async (email: string) => (await (await as(email)).get('/api/today').expect(200)).body as Today;
const cohortsOf = async (email: string) =>
  ((await (await as(email)).get('/api/cohorts').expect(200)).body as Cohorts).items;

const counts = async () =>
  (
    await fresh.db.pool.query<Record<string, number>>(
      `select (select count(*)::int from users) as users, (select count(*)::int from animals) as animals,
        (select count(*)::int from tasks) as tasks, (select count(*)::int from records) as records,
        (select count(*)::int from audit_entries) as audit`,
    )
  ).rows[0];

describe('the demonstration', () => {
  it('lets everybody sign in who is listed, at addresses that can’t be real', async () => {
    for (const { email, role, place } of demoSignIns) {
      // RFC 2606: .example is never anybody's
      expect(email).toMatch(/\.example$/);
      const me = (await (await as(email)).get('/api/me').expect(200)).body as Output<'GET /api/me'>;
      const here = [...me.properties.flatMap((p) => p.roles), ...me.organisations.flatMap((o) => o.roles)];
      expect(here).toContain(role);
      expect([...me.properties, ...me.organisations].map((one) => one.name)).toContain(place);
    }
  });

  it('has overdue work, work now and work to come', async () => {
    const [home] = (await todayOf('staff@brindlegap.example')).properties;
    expect(home?.overdue.map((task) => [task.group, task.title, task.done, task.head, task.exceptions])).toEqual([
      ['Main mob', 'Devices out', 155, 156, 2],
    ]);
    expect(home?.tasks.map((task) => [task.group, task.title, task.head])).toEqual([
      ['Late heifers', 'Devices out', 12],
    ]);
    expect(home?.next).toMatchObject({ group: 'Main mob', title: 'AI', sinceAnchor: '54 h since device out' });
    const [dairy] = (await todayOf('manager@ballywhin.example')).properties;
    expect(dairy?.tasks.length).toBeGreaterThan(0);
  });

  it('shows 153 devices out, two lost and one heifer unaccounted for', async () => {
    const staff = await as('staff@brindlegap.example');
    const task = (await todayOf('staff@brindlegap.example')).properties[0]?.overdue[0];
    const work = (await staff.get(`/api/tasks/${task?.id ?? ''}/work`).expect(200)).body as TaskWork;
    const lost = work.animals.filter((animal) => animal.record?.exceptions.some((one) => one.outcome === 'lost'));
    const missing = work.animals.filter((animal) => animal.record === null);
    expect([work.animals.length, lost.length, missing.map((animal) => animal.tag)]).toEqual([156, 2, ['0412']]);
    expect(work.direction).not.toBeNull();
  });

  it('has a plan whose authority is two head short, and history', async () => {
    const manager = await as('manager@heronslough.example');
    const cohorts = await cohortsOf('manager@heronslough.example');
    expect(cohorts.map((cohort) => cohort.state)).toEqual(['planning', 'finished']);
    expect(cohorts[0]?.findings.stop).toBe(1);
    const plan = (await manager.get(`/api/cohorts/${cohorts[0]?.id ?? ''}`).expect(200)).body as CohortDetail;
    expect(codesOf(plan.planFindings, 'stop')).toEqual(['authorityShort']);
    expect(plan.planFindings[0]?.params).toMatchObject({ short: 2, active: 'dinoprost' });
    const past = (await manager.get(`/api/cohorts/${cohorts[1]?.id ?? ''}`).expect(200)).body as CohortDetail;
    expect(past.tasks.every((task) => task.state === 'done' && task.done === 31)).toBe(true);
  });

  it('gives every dose under an authority', async () => {
    const { rows } = await fresh.db.pool.query(
      `select 1 from record_steps where active is not null and active <> 'heatAid' and outcome = 'done' and authority_id is null`,
    );
    expect(rows).toEqual([]);
  });

  it('is laid once, in less than 15 s, and never in production', async () => {
    expect(took).toBeLessThan(15_000);
    const before = await counts();
    expect(await seedDemo(fresh.deps)).toBe(false);
    expect(await counts()).toEqual(before);
    const env = { ...fresh.deps.env, NODE_ENV: 'production' as const };
    await expect(seedDemo({ ...fresh.deps, env })).rejects.toThrow(/production/);
  });

  it('has the same ids each time', async () => {
    const { rows } = await fresh.db.pool.query<{ id: string }>(`select id from properties where name = 'Brindle Gap'`);
    expect(rows[0]?.id).toBe(demoId('Brindle Gap'));
    expect(demoId('Brindle Gap')).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-8[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
  });
});

describe('on any day and at any hour', () => {
  // around the days on which clocks change in Sydney, Dublin and New York (IANA tzdata), midnights and a leap day
  const clocks = [
    '2026-10-03T16:30:00Z',
    '2026-10-11T21:00:00Z',
    '2027-04-03T13:59:00Z',
    '2026-10-25T01:30:00Z',
    '2027-03-14T07:30:00Z',
    '2026-11-01T05:59:00Z',
    '2026-12-31T23:59:00Z',
    '2028-02-29T12:00:00Z',
  ];
  let other: Fresh;
  beforeAll(async () => {
    other = await freshDatabase();
  });
  afterAll(() => other.drop());

  it.each(clocks)('%s: the scenario stands', async (clock) => {
    await other.db.pool.query('truncate organisations, properties, users, protocols, messages, audit_entries cascade');
    other.setNow(new Date(clock));
    expect(await seedDemo(other.deps)).toBe(true);
    const { rows } = await other.db.pool.query<Record<string, number>>(
      `select count(*) filter (where c.state = 'running')::int as running, count(*) filter (where c.state = 'finished')::int as finished,
        count(*) filter (where c.state = 'planning')::int as planning from cohorts c`,
    );
    expect(rows[0]).toEqual({ running: 3, finished: 1, planning: 1 });
    const late = await other.db.pool.query<{ title: string; state: string }>(
      `select t.title, t.state from tasks t join cohorts c on c.id = t.cohort_id
        where c.state = 'running' and t.state in ('planned', 'inWork') and t.window_to < $1`,
      [new Date(clock)],
    );
    expect(late.rows).toContainEqual({ title: 'Devices out', state: 'inWork' });
  });
});
