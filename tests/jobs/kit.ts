import { randomUUID } from 'node:crypto';

import type { Deps } from '@/server/deps';
import type { Mail, MailTransport } from '@/server/mail/transport';
import type { JobContext } from '@/jobs/context';
import { freshDatabase } from '../support/fresh-database';

/** A clock that tests move. */
export interface Clock {
  at: Date;
}

export interface Yard {
  /** Address of its database. */
  url: string;
  deps: Deps;
  clock: Clock;
  sql(text: string, values?: Record<string, unknown>): Promise<Record<string, unknown>[]>;
  /** Empties every table and sets the clock: a test file has one database, each test an empty one. */
  reset(at: string): Promise<void>;
  close(): Promise<void>;
}

const tables = 'organisations, properties, users, invitations, protocols, messages, worker_beats, audit_entries';

/** An empty database with the schema, and a clock in the test's hand. */
export async function openYard(at = '2026-10-01T00:00:00Z'): Promise<Yard> {
  const clock: Clock = { at: new Date(at) };
  const fresh = await freshDatabase();
  const env = { ...fresh.deps.env, PUBLIC_URL: 'http://localhost:3000' };
  const deps: Deps = { ...fresh.deps, env, now: () => clock.at };
  return {
    url: fresh.url,
    deps,
    clock,
    close: fresh.drop,
    async sql(text, values = {}) {
      const [rows] = await deps.sequelize.query(text, { replacements: values });
      return rows as Record<string, unknown>[];
    },
    async reset(moment) {
      clock.at = new Date(moment);
      await deps.sequelize.query(`truncate ${tables} cascade`);
    },
  };
}

export async function addProperty(
  yard: Yard,
  zone = 'Australia/Sydney',
  name = 'Gully Flat',
  locale = 'en-AU',
): Promise<string> {
  const id = randomUUID();
  await yard.sql(
    `insert into properties (id, name, zone, country, locale, created_at, updated_at)
     values (:id, :name, :zone, 'AU', :locale, '2026-01-01Z', '2026-01-01Z')`,
    { id, name, zone, locale },
  );
  return id;
}

export async function addOrganisation(
  yard: Yard,
  propertyId: string,
  from = '2026-01-01',
  to: string | null = null,
): Promise<string> {
  const id = randomUUID();
  await yard.sql(`insert into organisations (id, name, kind) values (:id, 'Practice', 'vetPractice')`, { id });
  await yard.sql(
    `insert into engagements (id, organisation_id, property_id, scope, from_date, to_date, created_at)
     values (:engagement, :id, :propertyId, 'veterinary', :from, :to, '2026-01-01Z')`,
    { engagement: randomUUID(), id, propertyId, from, to },
  );
  return id;
}

export type PersonRole = 'manager' | 'staff' | 'calendarOnly' | 'vet' | 'technician';

/** A person with a role at a property, or in an organisation for vet and technician. */
export async function addPerson(
  yard: Yard,
  placeId: string,
  role: PersonRole = 'staff',
  wishes = 'default, default, default',
): Promise<{ id: string; email: string }> {
  const id = randomUUID();
  const email = `${role.toLowerCase()}.${id.slice(0, 8)}@example.org`;
  await yard.sql(
    `insert into users (id, email, name, password_hash, remind_evening, remind_morning, remind_closing)
     values (:id, :email, 'Person', 'x', ${wishes})`,
    { id, email },
  );
  const column = role === 'vet' || role === 'technician' ? 'organisation_id' : 'property_id';
  await yard.sql(
    `insert into memberships (id, user_id, ${column}, role, created_at) values (:membership, :id, :placeId, :role, '2026-01-01Z')`,
    { membership: randomUUID(), id, placeId, role },
  );
  return { id, email };
}

/** A running cohort with one group of so many head without ids. */
export async function addGroup(
  yard: Yard,
  propertyId: string,
  head = 60,
): Promise<{ cohortId: string; groupId: string; by: string }> {
  const [cohortId, groupId, by] = [randomUUID(), randomUUID(), randomUUID()];
  await yard.sql(`insert into users (id, email, name, password_hash) values (:by, :email, 'Planner', 'x')`, {
    by,
    email: `planner.${by}@example.org`,
  });
  await yard.sql(
    `insert into cohorts (id, property_id, name, zone, created_by, created_at, updated_at)
     select :cohortId, id, 'Spring heifers', zone, :by, '2026-01-01Z', '2026-01-01Z' from properties where id = :propertyId`,
    { cohortId, propertyId, by },
  );
  await yard.sql(
    `insert into groups (id, cohort_id, position, name, class, head_only) values (:groupId, :cohortId, 0, :name, 'heifer', :head)`,
    { groupId, cohortId, name: 'Group 1', head },
  );
  return { cohortId, groupId, by };
}

export interface TaskTimes {
  due: string;
  from?: string;
  to?: string;
  title?: string;
}

/** A planned task of the group; window two hours either side unless given. */
export async function addTask(
  yard: Yard,
  propertyId: string,
  group: { cohortId: string; groupId: string },
  times: TaskTimes,
): Promise<string> {
  const id = randomUUID();
  const due = new Date(times.due).getTime();
  const steps = [
    {
      id: 's1',
      kind: 'deviceOut',
      label: 'Device out',
      level: 'animal',
      condition: null,
      doses: [],
      cautions: ['device'],
    },
    {
      id: 's2',
      kind: 'prostaglandin',
      label: 'Cloprostenol',
      level: 'animal',
      condition: null,
      cautions: ['prostaglandin'],
      doses: [
        { stepId: 's2', active: 'cloprostenol', amount: 500, unit: 'ug', route: 'im', total: 30_000, volume: null },
      ],
    },
  ];
  await yard.sql(
    `insert into tasks (id, cohort_id, group_id, property_id, visit_id, title, yarded, due_at, window_from, window_to, zone, steps, created_at, updated_at)
     select :id, :cohortId, :groupId, p.id, :id, :title, true, :due, :from, :to, p.zone, :steps::jsonb, '2026-01-01Z', '2026-01-01Z'
     from properties p where p.id = :propertyId`,
    {
      id,
      ...group,
      propertyId,
      title: times.title ?? 'Device out',
      due: new Date(due),
      from: new Date(times.from ?? due - 7_200_000),
      to: new Date(times.to ?? due + 7_200_000),
      steps: JSON.stringify(steps),
    },
  );
  return id;
}

/** Moves a task with its window, as the move command does: revision and stamp rise. */
export async function moveTask(yard: Yard, taskId: string, due: string): Promise<void> {
  await yard.sql(
    `update tasks set window_from = window_from + (:due::timestamptz - due_at), window_to = window_to + (:due::timestamptz - due_at),
       moved_from = due_at, due_at = :due::timestamptz, revision = revision + 1, updated_at = :now where id = :taskId`,
    { taskId, due, now: yard.clock.at },
  );
}

/** How the fake mail server answers one mail. */
export type Answer = 'take' | 'refuse' | 'dropBeforeText' | 'dropAfterText' | (() => Promise<void>);

export interface FakeMail extends MailTransport {
  taken: Mail[];
  answer: (mail: Mail) => Answer;
}

/** A mail server in memory that keeps the promise of the real one: `beforeText` runs before the text counts as given. */
export function fakeMail(): FakeMail {
  const fake: FakeMail = {
    taken: [],
    answer: () => 'take',
    async send(mail, beforeText) {
      const answer = fake.answer(mail);
      if (answer === 'dropBeforeText') throw new Error('connect ECONNREFUSED');
      await beforeText();
      if (answer === 'refuse') throw Object.assign(new Error('451 try later'), { responseCode: 451 });
      fake.taken.push(mail);
      if (answer === 'dropAfterText') throw new Error('socket closed');
      if (typeof answer === 'function') await answer();
      return '250 taken';
    },
    close: () => undefined,
  };
  return fake;
}

export const jobContext = (yard: Yard, mail: MailTransport, worker = 'w1'): JobContext => ({
  deps: yard.deps,
  mail,
  worker,
  stopping: () => false,
});

/** State, kind and moment of every message, in order of time. */
export const outbox = (yard: Yard): Promise<Record<string, unknown>[]> =>
  yard.sql(
    'select id, kind, state, user_id, attempts, due_at, stale_at, params from messages order by due_at, dedupe_key',
  );
