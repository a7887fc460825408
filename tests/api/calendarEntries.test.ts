import { randomUUID } from 'node:crypto';

import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';

import { readCalendar } from '@/server/calendar/read';
import type { Actor } from '@/server/policies/actor';
import type { CalendarLinkRow } from '@/server/queries/calendarLinks';
import type { Role } from '@/shared/abilities';
import { addGroup, addProperty, addTask, moveTask, openYard, type Yard } from '../jobs/kit';
import { brokenRules, readEntries } from './calendarKit';

/** Every second hour of three days around a clock change. */
const around = (middle: string): string[] =>
  Array.from({ length: 37 }, (_, n) => new Date(Date.parse(middle) + (n - 18) * 7_200_000).toISOString());

// clock changes by the IANA time zone database
const changes = {
  'Australia/Sydney': ['2026-04-04T16:00:00Z', '2026-10-03T16:00:00Z'],
  'Europe/Dublin': ['2026-03-29T01:00:00Z', '2026-10-25T01:00:00Z'],
} as const;

const actorOf = (...places: [string, Role][]): Actor => ({
  userId: randomUUID(),
  name: 'Person',
  email: 'person@example.org',
  properties: new Map(places.map(([id, role]) => [id, { roles: [role], through: null }])),
  organisations: new Map(),
});
const linkOf = (actor: Actor, propertyId: string | null = null, label = 'My phone'): CalendarLinkRow => ({
  id: randomUUID(),
  userId: actor.userId,
  owner: actor,
  label,
  propertyId,
  property: null,
  createdAt: new Date('2026-01-01T00:00:00Z'),
  lastReadAt: null,
});

describe('calendar entries', () => {
  let yard: Yard;
  const zone = process.env.TZ;
  beforeAll(async () => {
    yard = await openYard('2026-03-20T00:00:00Z');
  });
  afterAll(() => yard.close());
  afterEach(() => {
    if (zone === undefined) delete process.env.TZ;
    else process.env.TZ = zone;
  });

  it.each(Object.entries(changes))(
    'are the very instants of the tasks in %s, whatever the zone of the server',
    async (place, moments) => {
      const property = await addProperty(yard, place);
      const group = await addGroup(yard, property, 156);
      const dues = moments.flatMap(around);
      const ids: string[] = [];
      for (const due of dues) ids.push(await addTask(yard, property, group, { due }));
      const actor = actorOf([property, 'staff']);
      for (const [server, offset] of [
        ['UTC', 0],
        ['Australia/Lord_Howe', -630],
        ['America/St_Johns', 210],
      ] as const) {
        process.env.TZ = server;
        expect(Math.abs(new Date('2026-06-30T00:00:00Z').getTimezoneOffset() - offset)).toBeLessThanOrEqual(60);
        const { text } = await readCalendar(yard.deps, linkOf(actor), actor);
        expect(brokenRules(text)).toEqual([]);
        const entries = readEntries(text);
        expect(entries.map((entry) => entry.start.toISOString())).toEqual([...dues].sort());
        expect(new Set(entries.map((entry) => entry.uid))).toEqual(new Set(ids.map((id) => `${id}@yardbell`)));
        // 156 head at 60 an hour are 156 minutes; the window closes after 120
        expect(new Set(entries.map((entry) => entry.end.getTime() - entry.start.getTime()))).toEqual(
          new Set([7_200_000]),
        );
      }
    },
  );

  it('say what, how much, until when, where and with which caution', async () => {
    const property = await addProperty(yard, 'Australia/Sydney', 'Gully; Flat, "north" \\');
    const group = await addGroup(yard, property, 60);
    await addTask(yard, property, group, { due: '2026-04-05T21:00:00Z' });
    const actor = actorOf([property, 'staff']);
    const [entry] = readEntries((await readCalendar(yard.deps, linkOf(actor), actor)).text);
    expect(entry?.summary).toBe('Device out · Group 1 · 60 head');
    expect(entry?.location).toBe('Gully; Flat, "north" \\');
    expect(entry?.status).toBe('CONFIRMED');
    expect(entry?.categories).toBe('Spring heifers');
    expect(entry?.description).toContain('Cloprostenol 500 µg a head, into muscle · 30 mg in all');
    expect(entry?.description).toContain('Window Mon 6 Apr 05:00 AEST to 09:00 AEST');
    expect(entry?.description).toContain('Pregnant women and anyone with asthma');
    expect(entry?.description).toContain('http://localhost:3000/task/');
  });

  it('follow a move: other time, higher sequence, same uid, new stamp', async () => {
    const property = await addProperty(yard);
    const task = await addTask(yard, property, await addGroup(yard, property), { due: '2026-04-10T21:00:00Z' });
    const actor = actorOf([property, 'staff']);
    const link = linkOf(actor);
    const before = await readCalendar(yard.deps, link, actor);
    expect(await readCalendar(yard.deps, link, actor)).toEqual(before);
    await moveTask(yard, task, '2026-04-11T22:30:00Z');
    const after = await readCalendar(yard.deps, link, actor);
    const [was, is] = [readEntries(before.text)[0], readEntries(after.text)[0]];
    expect(is?.start.toISOString()).toBe('2026-04-11T22:30:00.000Z');
    expect(is?.uid).toBe(was?.uid);
    expect(is?.sequence).toBeGreaterThan(was?.sequence ?? Infinity);
    expect([was?.stamp, is?.stamp]).toEqual(['2026-01-01T00:00:00Z', '2026-03-20T00:00:00Z']);
    expect(is?.modified).toBe(is?.stamp);
    expect(after.etag).not.toBe(before.etag);
    expect(after.lastModified.getTime()).toBeGreaterThan(before.lastModified.getTime());
    expect(is?.description).toContain('Moved here from Sat 11 Apr 07:00');
  });

  it('keep a cancelled task for a week, then drop it', async () => {
    const property = await addProperty(yard);
    const task = await addTask(yard, property, await addGroup(yard, property), { due: '2026-04-20T21:00:00Z' });
    const actor = actorOf([property, 'staff']);
    const link = linkOf(actor);
    await yard.sql(
      `update tasks set state = 'cancelled', revision = revision + 1, updated_at = :now where id = :task`,
      { task, now: yard.clock.at },
    );
    const read = async () => readEntries((await readCalendar(yard.deps, link, actor)).text);
    expect((await read()).map((entry) => [entry.status, entry.sequence, entry.summary])).toEqual([
      ['CANCELLED', 1, 'Cancelled: Device out · Group 1 · 60 head'],
    ]);
    yard.clock.at = new Date('2026-03-22T01:00:00Z');
    expect(await read()).toHaveLength(1);
    yard.clock.at = new Date('2026-03-28T00:00:00Z');
    expect(await read()).toEqual([]);
    yard.clock.at = new Date('2026-03-20T00:00:00Z');
  });

  it('hold only what the person may see now', async () => {
    const [mine, other] = [await addProperty(yard), await addProperty(yard)];
    const own = await addTask(yard, mine, await addGroup(yard, mine), { due: '2026-04-20T21:00:00Z' });
    await addTask(yard, other, await addGroup(yard, other), { due: '2026-04-20T21:00:00Z' });
    const contractor = actorOf([mine, 'calendarOnly']);
    const uids = async (actor: Actor, link: CalendarLinkRow) =>
      readEntries((await readCalendar(yard.deps, link, actor)).text).map((entry) => entry.uid);
    const link = linkOf(contractor);
    expect(await uids(contractor, link)).toEqual([`${own}@yardbell`]);
    // the plan, and no door into the work
    expect((await readCalendar(yard.deps, link, contractor)).text).not.toContain('/task/');
    // access lost: the same link, at once empty, whatever is kept of it
    expect(await uids(actorOf(), link)).toEqual([]);
    expect(await uids(contractor, linkOf(contractor, other))).toEqual([]);
    const both = actorOf([mine, 'staff'], [other, 'staff']);
    expect(await uids(both, linkOf(both, mine))).toEqual([`${own}@yardbell`]);
    expect(await uids(both, linkOf(both))).toHaveLength(2);
  });

  it('change when an animal leaves the group, though the task stays as it is', async () => {
    const property = await addProperty(yard);
    const group = await addGroup(yard, property);
    await yard.sql('update groups set head_only = null where id = :groupId', group);
    await addTask(yard, property, group, { due: '2026-04-20T21:00:00Z' });
    for (const tag of ['1', '2'])
      await yard.sql(
        `with a as (insert into animals (id, property_id, tag, class) values (gen_random_uuid(), :property, :tag, 'heifer') returning id)
         insert into enrolments (id, group_id, animal_id) select gen_random_uuid(), :groupId, id from a`,
        { property, tag, groupId: group.groupId },
      );
    const actor = actorOf([property, 'staff']);
    const link = linkOf(actor);
    const summary = async () => readEntries((await readCalendar(yard.deps, link, actor)).text)[0]?.summary;
    expect(await summary()).toBe('Device out · Group 1 · 2 head');
    await yard.sql(
      `update enrolments set left_at = '2026-03-19T00:00:00Z' where animal_id = (select animal_id from enrolments where group_id = :groupId limit 1)`,
      group,
    );
    expect(await summary()).toBe('Device out · Group 1 · 1 head');
  });

  it('never let typed text become a property', async () => {
    const evil = 'A\r\nATTACH:http://x\nEND:VEVENT\u2028X:1\u0007;,\\';
    const property = await addProperty(yard, 'Australia/Sydney', evil);
    const group = await addGroup(yard, property);
    await yard.sql('update groups set name = :evil where id = :groupId', { evil, groupId: group.groupId });
    await yard.sql('update cohorts set name = :evil where id = :cohortId', { evil, cohortId: group.cohortId });
    await addTask(yard, property, group, { due: '2026-04-20T21:00:00Z', title: evil });
    const actor = actorOf([property, 'staff']);
    const { text } = await readCalendar(yard.deps, linkOf(actor, null, evil), actor);
    expect(brokenRules(text)).toEqual([]);
    const names = text
      .replace(/\r\n[ \t]/g, '')
      .split('\r\n')
      .map((line) => line.split(/[;:]/)[0]);
    expect(names).not.toContain('ATTACH');
    expect(names.filter((name) => name === 'END')).toHaveLength(2);
    expect(text).not.toContain('\u0007');
    expect(readEntries(text)[0]?.location).toBe('A ATTACH:http://x END:VEVENT X:1;,\\');
  });

  it('end after half an hour at least and ten hours at most', async () => {
    const property = await addProperty(yard);
    const [few, many] = [await addGroup(yard, property, 3), await addGroup(yard, property, 3000)];
    await addTask(yard, property, few, { due: '2026-04-20T21:00:00Z', to: '2026-04-20T21:10:00Z' });
    await addTask(yard, property, many, { due: '2026-04-22T21:00:00Z', to: '2026-04-24T21:00:00Z' });
    const actor = actorOf([property, 'staff']);
    const entries = readEntries((await readCalendar(yard.deps, linkOf(actor), actor)).text);
    expect(entries.map((entry) => (entry.end.getTime() - entry.start.getTime()) / 60_000)).toEqual([30, 600]);
  });
});
