import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Output } from '@/shared/routes';
import { openProgram, startedCohort, taskOf, type Program } from './programKit';

let program: Program;
type Today = Output<'GET /api/today'>;
type Calendar = Output<'GET /api/calendar'>;
beforeAll(async () => {
  program = await openProgram();
});
afterAll(() => program.fresh.drop());

const today = async (role: 'staff' | 'manager' | 'vet' | 'technician', query = '') =>
  (await program.agents[role].get(`/api/today${query}`).expect(200)).body as Today;
const titles = (tasks: Today['properties'][number]['tasks']) => tasks.map((task) => `${task.cohort} ${task.title}`);

describe('today', () => {
  beforeAll(async () => {
    // two cohorts: devices in on Wednesday 13 and out on Wednesday 20; and the same a day later, in the afternoon
    await startedCohort(program, { groups: [{ head: 10 }], name: 'Early' });
    await startedCohort(program, { groups: [{ head: 6 }], name: 'Later', local: '2026-05-21T15:00' });
  });

  it('is empty before the first day, and says what is next', async () => {
    const { properties } = await today('staff');
    expect(properties).toHaveLength(1);
    expect(properties[0]).toMatchObject({ date: '2026-05-04', zone: 'Australia/Sydney', overdue: [], tasks: [] });
    expect(properties[0]?.next).toMatchObject({ cohort: 'Early', title: 'Devices in', dueLocal: 'Wed 13 May 07:00' });
  });

  it('is the day of the property, not of the server', async () => {
    // 12 May 20:00Z is 13 May 06:00 in Sydney and 12 May in Dublin
    program.fresh.setNow(new Date('2026-05-12T20:00:00Z'));
    const { properties } = await today('vet');
    expect(properties.map((place) => [place.property, place.date])).toEqual([
      ['Home Yards', '2026-05-13'],
      ['Second Yards', '2026-05-12'],
    ]);
    expect(titles(properties[0]?.tasks ?? [])).toEqual(['Early Devices in']);
    expect(properties[0]?.next?.cohort).toBe('Later');
  });

  it('puts what is undone first, the oldest on top, once its window is over', async () => {
    // the window of devices in ends with its tolerance; by noon of the next day it is past for certain
    program.fresh.setNow(new Date('2026-05-14T02:00:00Z'));
    const [home] = (await today('staff')).properties;
    expect(titles(home?.overdue ?? [])).toEqual(['Early Devices in']);
    expect(titles(home?.tasks ?? [])).toEqual(['Later Devices in']);
    program.fresh.setNow(new Date('2026-05-15T02:00:00Z'));
    expect(titles((await today('staff')).properties[0]?.overdue ?? [])).toEqual([
      'Early Devices in',
      'Later Devices in',
    ]);
  });

  it('keeps what was done today and drops what was done before', async () => {
    const [home] = (await today('staff')).properties;
    for (const task of home?.overdue ?? [])
      await program.agents.staff
        .post(`/api/tasks/${task.id}/rest`)
        .send({ id: randomUUID(), at: task.dueAt, expectedHead: task.head })
        .expect(200);
    expect((await today('staff')).properties[0]).toMatchObject({ overdue: [], tasks: [] });
    const [then] = (await today('staff', '?date=2026-05-14')).properties;
    expect(then?.tasks.map((task) => [task.title, task.state, task.done])).toEqual([['Devices in', 'done', 6]]);
  });

  it('shows tasks in order of time, with their progress', async () => {
    await startedCohort(program, { groups: [{ head: 5 }], name: 'Noon', local: '2026-05-28T12:00' });
    // devices out at 15:00 for one, in at 12:00 for the other, both on Thursday 21 May
    program.fresh.setNow(new Date('2026-05-20T22:00:00Z'));
    const [home] = (await today('staff', `?propertyId=${program.world.property.id}`)).properties;
    expect(titles(home?.tasks ?? [])).toEqual(['Noon Devices in', 'Later Devices out']);
    const task = home?.tasks[0];
    await program.agents.staff
      .post(`/api/tasks/${task?.id ?? ''}/records`)
      .send({ records: [{ id: randomUUID(), animalId: null, head: 2, outcome: 'done', at: '2026-05-20T22:00:00Z' }] })
      .expect(200);
    const after = (await today('staff')).properties[0]?.tasks[0];
    expect(after).toMatchObject({ head: 5, done: 2, state: 'inWork' });
  });

  it('tells the technician of the properties that engage them, and nobody of any other', async () => {
    expect((await today('technician')).properties.map((place) => place.property)).toEqual(['Home Yards']);
    expect((await today('staff', `?propertyId=${program.world.foreign.id}`)).properties).toEqual([]);
  });

  it('asks the database the same number of questions however much there is to do', async () => {
    const { pool } = program.fresh.db;
    const query = pool.query.bind(pool);
    let asked = 0;
    const count = async () => {
      asked = 0;
      await today('staff');
      return asked;
    };
    Object.assign(pool, {
      query: (...args: Parameters<typeof query>) => {
        asked++;
        return query(...args);
      },
    });
    const few = await count();
    for (let i = 0; i < 4; i++)
      await startedCohort(program, {
        groups: [{ head: 5 }, { head: 5 }],
        name: `More ${i}`,
        local: '2026-05-28T13:00',
      });
    const many = await count();
    Object.assign(pool, { query });
    expect((await today('staff')).properties[0]?.tasks.length).toBe(10);
    expect(many).toBe(few);
  });
});

describe('the calendar', () => {
  const read = async (query: string, role: 'manager' | 'calendarOnly' = 'manager') =>
    (await program.agents[role].get(`/api/calendar?${query}`).expect(200)).body as Calendar;

  it('holds the tasks of the local days asked for, both ends included', async () => {
    const { tasks } = await read('from=2026-05-20&to=2026-05-20');
    expect(titles(tasks)).toEqual(['Early Devices out']);
    // 13:00 on 22 May in Sydney is 03:00Z: the day before ends at 14:00Z
    expect(titles((await read('from=2026-05-22&to=2026-05-22')).tasks)).toContain('Early AI');
    expect((await read('from=2026-05-20&to=2026-05-20', 'calendarOnly')).tasks).toHaveLength(1);
  });

  it('names the public holidays of the property’s country and region', async () => {
    // New South Wales: King's Birthday on the second Monday of June (8 June 2026), Labour Day on the first Monday of
    // October (Public Holidays Act 2010 NSW, from memory)
    const { holidays } = await read('from=2026-06-01&to=2026-10-31');
    expect(holidays.map((day) => day.date)).toEqual(['2026-06-08', '2026-10-05']);
    expect(holidays[0]?.propertyId).toBe(program.world.property.id);
  });

  it('reaches over new year, and no further than 400 days', async () => {
    const { holidays } = await read('from=2026-12-20&to=2029-12-31');
    const years = [...new Set(holidays.map((day) => day.date.slice(0, 4)))];
    expect(years).toEqual(['2026', '2027', '2028']);
    expect(
      holidays
        .map((day) => day.date)
        .sort()
        .at(-1)! <= '2028-01-24',
    ).toBe(true);
  });

  it('leaves out a cancelled cohort, and refuses what is no date', async () => {
    const cohort = await startedCohort(program, { groups: [{ head: 3 }], name: 'Gone', local: '2026-08-19T07:00' });
    expect(taskOf(cohort, 'out').dueLocal).toBe('Wed 19 Aug 07:00');
    expect((await read('from=2026-08-19&to=2026-08-19')).tasks).toHaveLength(1);
    await program.agents.manager.post(`/api/cohorts/${cohort.id}/cancel`).send({ reason: '' }).expect(200);
    expect((await read('from=2026-08-19&to=2026-08-19')).tasks).toEqual([]);
    await program.agents.manager.get('/api/calendar?from=2026-02-30&to=2026-03-01').expect(400);
    await program.agents.manager.get('/api/calendar?from=2026-02-01').expect(400);
  });
});
