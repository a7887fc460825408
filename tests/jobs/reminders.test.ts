import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { planAhead } from '@/jobs/tasks/planAhead';
import { sendMessages } from '@/jobs/tasks/sendMessages';
import { planReminders, withdrawReminders } from '@/server/commands/planReminders';
import {
  addGroup,
  addOrganisation,
  addPerson,
  addProperty,
  addTask,
  fakeMail,
  jobContext,
  moveTask,
  openYard,
  outbox,
  type FakeMail,
  type Yard,
} from './kit';

// Sydney keeps AEST (UTC+10) until 4 October 2026 02:00 and AEDT (UTC+11) after it (IANA time zone database)
const DUE = '2026-10-05T20:00:00Z'; // Tue 6 Oct 07:00 AEDT

describe('reminders', () => {
  let yard: Yard;
  let mail: FakeMail;
  let property: string;
  let group: Awaited<ReturnType<typeof addGroup>>;

  beforeAll(async () => {
    yard = await openYard();
  });
  afterAll(() => yard.close());
  beforeEach(async () => {
    await yard.reset('2026-10-01T00:00:00Z');
    mail = fakeMail();
    property = await addProperty(yard);
    group = await addGroup(yard, property);
  });

  const plan = (...taskIds: string[]) =>
    yard.deps.sequelize.transaction((tx) => planReminders(yard.deps, tx, property, taskIds));
  const at = async (moment: string) => {
    yard.clock.at = new Date(moment);
    await sendMessages(jobContext(yard, mail));
  };
  const moments = async (state = 'waiting') =>
    (await outbox(yard))
      .filter((row) => row['state'] === state)
      .map((row) => [row['kind'], (row['due_at'] as Date).toISOString()]);

  it('are derived in the zone of the property: evening before, morning, an hour before the window closes', async () => {
    await addPerson(yard, property);
    await plan(await addTask(yard, property, group, { due: DUE }));
    expect(await moments()).toEqual([
      ['evening', '2026-10-05T07:00:00.000Z'], // Mon 18:00 AEDT
      ['morning', '2026-10-05T18:30:00.000Z'], // Tue 05:30 AEDT
      ['closing', '2026-10-05T21:00:00.000Z'], // Tue 08:00 AEDT, window to 09:00
    ]);
  });

  it('keep the clock time on both sides of a clock change', async () => {
    await addPerson(yard, property, 'staff', 'true, true, false');
    // Sat 3 Oct 18:00 is still AEST, Sun 4 Oct 05:30 already AEDT
    await plan(await addTask(yard, property, group, { due: '2026-10-03T20:00:00Z' }));
    expect(await moments()).toEqual([
      ['evening', '2026-10-03T08:00:00.000Z'],
      ['morning', '2026-10-03T18:30:00.000Z'],
    ]);
  });

  it('come at least an hour before a very early task', async () => {
    await addPerson(yard, property, 'staff', 'false, true, false');
    await plan(await addTask(yard, property, group, { due: '2026-10-05T17:00:00Z' })); // 04:00
    expect(await moments()).toEqual([['morning', '2026-10-05T16:00:00.000Z']]);
  });

  it('go to everyone who may see work or calendar, and to nobody else', async () => {
    const practice = await addOrganisation(yard, property);
    const ended = await addOrganisation(yard, property, '2026-01-01', '2026-09-30');
    const told = [await addPerson(yard, property, 'calendarOnly'), await addPerson(yard, practice, 'vet')];
    await addPerson(yard, ended, 'vet');
    await addPerson(yard, await addProperty(yard), 'manager');
    await plan(await addTask(yard, property, group, { due: DUE }));
    const people = new Set((await outbox(yard)).map((row) => row['user_id']));
    expect(people).toEqual(new Set(told.map((person) => person.id)));
  });

  it('are one mail for all tasks of a day, and each is sent once', async () => {
    const person = await addPerson(yard, property);
    const first = await addTask(yard, property, group, { due: DUE });
    const second = await addTask(yard, property, group, { due: '2026-10-06T03:00:00Z', title: 'Heat round' });
    await plan(first, second);
    await at('2026-10-05T07:01:00Z');
    await at('2026-10-05T07:02:00Z');
    await plan(first, second);
    await at('2026-10-05T07:03:00Z');
    expect(mail.taken).toHaveLength(1);
    expect(mail.taken[0]?.to).toBe(person.email);
    expect(mail.taken[0]?.text).toContain('07:00 Device out · Group 1 · 60 head');
    expect(mail.taken[0]?.text).toContain('14:00 Heat round · Group 1 · 60 head');
  });

  it('are not sent again when the clock goes back', async () => {
    await addPerson(yard, property);
    const task = await addTask(yard, property, group, { due: DUE });
    await plan(task);
    await at('2026-10-05T07:01:00Z');
    yard.clock.at = new Date('2026-10-05T06:00:00Z');
    await plan(task);
    await planAhead(jobContext(yard, mail));
    await at('2026-10-05T07:01:00Z');
    expect(mail.taken).toHaveLength(1);
  });

  it('after a long time down say nothing that is past', async () => {
    await addPerson(yard, property);
    await plan(await addTask(yard, property, group, { due: DUE }));
    await at('2026-10-09T00:00:00Z');
    expect(mail.taken).toEqual([]);
    expect((await outbox(yard)).map((row) => row['state'])).toEqual(['withdrawn', 'withdrawn', 'withdrawn']);
  });

  it('after a night down send the morning mail late but not the evening one', async () => {
    await addPerson(yard, property);
    await plan(await addTask(yard, property, group, { due: DUE }));
    await at('2026-10-05T19:00:00Z'); // 06:00, the task is at 07:00
    expect(mail.taken.map((one) => one.subject)).toEqual(['Due Tue 6 Oct: Device out · Group 1 at Gully Flat']);
  });

  it('follow a task to another day, and come back with it', async () => {
    await addPerson(yard, property, 'staff', 'true, false, true');
    const task = await addTask(yard, property, group, { due: DUE });
    await plan(task);
    await moveTask(yard, task, '2026-10-06T20:00:00Z');
    await plan(task);
    expect(await moments()).toEqual([
      ['evening', '2026-10-06T07:00:00.000Z'],
      ['closing', '2026-10-06T21:00:00.000Z'],
    ]);
    expect(await moments('withdrawn')).toHaveLength(2);
    await moveTask(yard, task, DUE);
    await plan(task);
    expect(await moments()).toEqual([
      ['evening', '2026-10-05T07:00:00.000Z'],
      ['closing', '2026-10-05T21:00:00.000Z'],
    ]);
  });

  it('stop when the work is done', async () => {
    await addPerson(yard, property);
    const task = await addTask(yard, property, group, { due: DUE });
    await plan(task);
    await yard.sql(`update tasks set state = 'done' where id = :task`, { task });
    await yard.deps.sequelize.transaction((tx) => withdrawReminders(yard.deps, tx, task));
    expect(await moments()).toEqual([]);
  });

  it('say nothing of finished work even when nobody withdrew them', async () => {
    await addPerson(yard, property);
    const task = await addTask(yard, property, group, { due: DUE });
    await plan(task);
    await yard.sql(
      `insert into records (id, task_id, property_id, head, outcome, at, user_id) values (gen_random_uuid(), :task, :property, 60, 'done', now(), :by)`,
      { task, property, by: group.by },
    );
    await at('2026-10-05T21:01:00Z');
    expect(mail.taken).toEqual([]);
  });

  it('name the head left undone when the window closes, counting only records that stand', async () => {
    await addPerson(yard, property, 'staff', 'false, false, true');
    const task = await addTask(yard, property, group, { due: DUE });
    await plan(task);
    const record = (head: number, outcome: string, corrects: string | null) =>
      yard.sql(
        `insert into records (id, task_id, property_id, head, outcome, at, user_id, corrects_id)
         values (gen_random_uuid(), :task, :property, :head, :outcome, now(), :by, :corrects) returning id`,
        { task, property, head, outcome, by: group.by, corrects },
      );
    await record(20, 'done', null);
    const [mistake] = await record(10, 'done', null);
    await record(10, 'undone', String(mistake?.['id']));
    await at('2026-10-05T21:01:00Z');
    expect(mail.taken.map((one) => one.subject)).toEqual([
      'Window closes 09:00: Device out, 40 head not done at Gully Flat',
    ]);
  });

  it('are not sent to a person whose membership ended after planning', async () => {
    await addPerson(yard, property);
    await plan(await addTask(yard, property, group, { due: DUE }));
    await yard.sql('update memberships set ended_at = now()');
    await at('2026-10-05T07:01:00Z');
    expect(mail.taken).toEqual([]);
  });

  it('wait when the person has chosen a later time since', async () => {
    await addPerson(yard, property, 'staff', 'true, false, false');
    await plan(await addTask(yard, property, group, { due: DUE }));
    await yard.sql(`update users set evening_at = '20:00'`);
    await at('2026-10-05T07:01:00Z');
    expect(mail.taken).toEqual([]);
    await at('2026-10-05T09:01:00Z');
    expect(mail.taken).toHaveLength(1);
  });

  it('are derived again for the next 48 hours: a new person is told, however they came', async () => {
    const task = await addTask(yard, property, group, { due: DUE });
    await plan(task);
    await addPerson(yard, property);
    yard.clock.at = new Date('2026-10-04T00:00:00Z');
    await planAhead(jobContext(yard, mail));
    expect((await moments()).map(([kind]) => kind)).toEqual(['evening', 'morning', 'closing']);
    yard.clock.at = new Date('2026-10-04T01:00:00Z');
    await planAhead(jobContext(yard, mail));
    expect(await outbox(yard)).toHaveLength(3);
  });

  it('are written with the change of plan or not at all', async () => {
    await addPerson(yard, property);
    const task = await addTask(yard, property, group, { due: DUE });
    await expect(
      yard.deps.sequelize.transaction(async (tx) => {
        await planReminders(yard.deps, tx, property, [task]);
        throw new Error('the move failed');
      }),
    ).rejects.toThrow('the move failed');
    expect(await outbox(yard)).toEqual([]);
  });

  describe('of a change', () => {
    it('go once to those who were told the old time, and to nobody else', async () => {
      const told = await addPerson(yard, property, 'calendarOnly', 'true, false, false');
      await addPerson(yard, property, 'staff', 'false, false, true');
      const task = await addTask(yard, property, group, { due: DUE });
      await plan(task);
      await at('2026-10-05T07:01:00Z');
      yard.clock.at = new Date('2026-10-05T08:00:00Z');
      await moveTask(yard, task, '2026-10-06T20:30:00Z');
      await plan(task);
      await plan(task);
      await at('2026-10-05T08:01:00Z');
      await at('2026-10-05T08:02:00Z');
      expect(mail.taken.map((one) => [one.to, one.subject])).toEqual([
        [told.email, 'Tue 6 Oct: Device out · Group 1 at Gully Flat'],
        [told.email, 'Moved to Wed 7 Oct 07:30 AEDT: Device out · Group 1 at Gully Flat'],
      ]);
      expect(mail.taken[1]?.text).toContain('You were told Tue 6 Oct 07:00 AEDT. It is now Wed 7 Oct 07:30 AEDT.');
    });

    it('are not sent when the task is back before they left', async () => {
      await addPerson(yard, property, 'staff', 'true, false, false');
      const task = await addTask(yard, property, group, { due: DUE });
      await plan(task);
      await at('2026-10-05T07:01:00Z');
      yard.clock.at = new Date('2026-10-05T08:00:00Z');
      await moveTask(yard, task, '2026-10-06T20:30:00Z');
      await plan(task);
      await moveTask(yard, task, DUE);
      await plan(task);
      await at('2026-10-05T08:01:00Z');
      expect(mail.taken).toHaveLength(1);
    });

    it('tell each further change from the last one told, and a cancellation', async () => {
      await addPerson(yard, property, 'staff', 'true, false, false');
      const task = await addTask(yard, property, group, { due: DUE });
      await plan(task);
      await at('2026-10-05T07:01:00Z');
      for (const [moment, due] of [
        ['08:00', '2026-10-05T22:00:00Z'],
        ['09:00', DUE],
      ]) {
        yard.clock.at = new Date(`2026-10-05T${moment}:00Z`);
        await moveTask(yard, task, String(due));
        await plan(task);
        await sendMessages(jobContext(yard, mail));
      }
      yard.clock.at = new Date('2026-10-05T10:00:00Z');
      await yard.sql(
        `update tasks set state = 'cancelled', revision = revision + 1, updated_at = :now where id = :task`,
        { task, now: yard.clock.at },
      );
      await plan(task);
      await sendMessages(jobContext(yard, mail));
      expect(mail.taken.slice(1).map((one) => one.text.split('\n')[2])).toEqual([
        'You were told Tue 6 Oct 07:00 AEDT. It is now Tue 6 Oct 09:00 AEDT.',
        'You were told Tue 6 Oct 09:00 AEDT. It is now Tue 6 Oct 07:00 AEDT.',
        'You were told Tue 6 Oct 07:00 AEDT. It will not take place.',
      ]);
    });
  });
});
