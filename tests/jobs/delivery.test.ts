import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { claimMessage, claimTurn } from '@/jobs/claim';
import { begin, settleSent } from '@/jobs/settle';
import { cleanUp } from '@/jobs/tasks/cleanUp';
import { sendMessages } from '@/jobs/tasks/sendMessages';
import { planReminders } from '@/server/commands/planReminders';
import {
  addGroup,
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

const DUE = '2026-10-05T20:00:00Z';
const EVENING = '2026-10-05T07:00:00Z';

describe('delivery', () => {
  let yard: Yard;
  let mail: FakeMail;
  let property: string;
  let task: string;

  beforeAll(async () => {
    yard = await openYard();
  });
  afterAll(() => yard.close());
  beforeEach(async () => {
    await yard.reset('2026-10-01T00:00:00Z');
    mail = fakeMail();
    property = await addProperty(yard);
    task = await addTask(yard, property, await addGroup(yard, property), { due: DUE });
  });

  const plan = () => yard.deps.sequelize.transaction((tx) => planReminders(yard.deps, tx, property, [task]));
  const people = async (count: number) => {
    for (let n = 0; n < count; n += 1) await addPerson(yard, property, 'staff', 'true, false, false');
    await plan();
  };
  const send = (worker = 'w1') => sendMessages(jobContext(yard, mail, worker));
  const at = (moment: string) => {
    yard.clock.at = new Date(moment);
  };
  const states = async () => (await outbox(yard)).map((row) => row['state']);
  const attempts = async () =>
    (await yard.sql('select ok, answer from delivery_attempts order by at, id')).map((row) => [
      row['ok'],
      row['answer'],
    ]);
  const invite = (params: Record<string, unknown>) =>
    yard.sql(
      `insert into messages (id, dedupe_key, channel, kind, address, params, due_at, next_try_at)
       values (:id, :id, 'email', 'invitation', 'new@example.org', :params::jsonb, :now, :now)`,
      { id: randomUUID(), params: JSON.stringify(params), now: yard.clock.at },
    );

  it('gives each message to one of several workers that run at once', async () => {
    await people(40);
    at(EVENING);
    await Promise.all(['w1', 'w2', 'w3', 'w4'].map((worker) => send(worker)));
    expect(mail.taken).toHaveLength(40);
    expect(new Set(mail.taken.map((one) => one.to)).size).toBe(40);
    expect(await states()).toEqual(Array(40).fill('sent'));
  });

  it('takes over from a worker that died before the text left', async () => {
    await people(1);
    at(EVENING);
    await claimMessage(jobContext(yard, mail, 'dead'));
    await send();
    expect(mail.taken).toHaveLength(0);
    // leases are measured by the database's clock: let this one run out there
    await yard.sql('update messages set claimed_until = clock_timestamp()');
    await send();
    expect(mail.taken).toHaveLength(1);
  });

  it('does not repeat a reminder whose worker died while the mail server was answering', async () => {
    await people(1);
    at(EVENING);
    const dead = jobContext(yard, mail, 'dead');
    const claimed = await claimMessage(dead, 0);
    if (!claimed) throw new Error('nothing claimed');
    await begin(dead, claimed);
    await send();
    await send();
    expect(mail.taken).toHaveLength(0);
    expect(await states()).toEqual(['failed']);
    expect(await attempts()).toEqual([[false, expect.stringContaining('not repeated')]]);
  });

  it('repeats an invitation in the same case, under the same id', async () => {
    await invite({ link: 'http://localhost:3000/invitations/abc', place: 'Gully Flat', invitedBy: 'Kim' });
    const [row] = await outbox(yard);
    const dead = jobContext(yard, mail, 'dead');
    const claimed = await claimMessage(dead, 0);
    if (!claimed) throw new Error('nothing claimed');
    await begin(dead, claimed);
    await send();
    expect(mail.taken.map((one) => one.id)).toEqual([row?.['id']]);
    expect(await states()).toEqual(['sent']);
  });

  it('lets a worker that outlived its lease send nothing more', async () => {
    await people(1);
    at(EVENING);
    const slow = jobContext(yard, mail, 'slow');
    const claimed = await claimMessage(slow, 0);
    if (!claimed) throw new Error('nothing claimed');
    await claimMessage(jobContext(yard, mail, 'quick'), 60);
    expect(await begin(slow, claimed)).toBeNull();
  });

  it('believes a worker that had sent although another had given it up', async () => {
    await people(1);
    at(EVENING);
    const slow = jobContext(yard, mail, 'slow');
    const claimed = await claimMessage(slow, 0);
    const attempt = claimed && (await begin(slow, claimed));
    if (!claimed || !attempt) throw new Error('nothing begun');
    await send('quick');
    expect(await states()).toEqual(['failed']);
    await settleSent(slow, claimed, attempt, '250 taken');
    expect(await states()).toEqual(['sent']);
    expect(mail.taken).toHaveLength(0);
  });

  it('does not send what was withdrawn while it was being written', async () => {
    await people(1);
    at(EVENING);
    const stubborn = {
      ...mail,
      send: async (one: Parameters<typeof mail.send>[0], beforeText: () => Promise<void>) => {
        await moveTask(yard, task, '2026-10-09T20:00:00Z');
        await plan();
        return mail.send(one, beforeText);
      },
    };
    await sendMessages(jobContext(yard, stubborn));
    expect(mail.taken).toHaveLength(0);
    expect((await states()).sort()).toEqual(['waiting', 'withdrawn']);
  });

  it('tries again with growing pauses while the mail server refuses, then succeeds', async () => {
    await people(1);
    let refusing: 'refuse' | 'dropBeforeText' | 'take' = 'refuse';
    mail.answer = () => refusing;
    at('2026-10-05T07:00:00Z');
    await send();
    at('2026-10-05T07:00:59Z');
    await send();
    expect(await attempts()).toHaveLength(1);
    refusing = 'dropBeforeText';
    at('2026-10-05T07:01:00Z');
    await send();
    expect(await attempts()).toHaveLength(2);
    refusing = 'take';
    at('2026-10-05T07:05:59Z');
    await send();
    expect(mail.taken).toHaveLength(0);
    at('2026-10-05T07:06:00Z');
    await send();
    expect(mail.taken).toHaveLength(1);
    expect((await attempts()).map(([ok]) => ok).sort()).toEqual([false, false, true]);
  });

  it('gives up after the fifth refusal', async () => {
    await people(1);
    mail.answer = () => 'refuse';
    for (const moment of ['07:00', '07:01', '07:06', '07:21', '08:21', '12:00']) {
      at(`2026-10-05T${moment}:00Z`);
      await send();
    }
    expect(await states()).toEqual(['failed']);
    expect(await attempts()).toHaveLength(5);
  });

  it('does not repeat a reminder when the connection broke after the text', async () => {
    await people(1);
    mail.answer = () => 'dropAfterText';
    at(EVENING);
    await send();
    at('2026-10-05T09:00:00Z');
    await send();
    expect(mail.taken).toHaveLength(1);
    expect(await states()).toEqual(['failed']);
  });

  it('keeps the secret link of an invitation until it is sent, and no longer', async () => {
    await invite({ link: 'http://localhost:3000/invitations/secret', place: 'Gully Flat', invitedBy: 'Kim' });
    await send();
    expect(mail.taken[0]?.text).toContain('http://localhost:3000/invitations/secret');
    expect((await outbox(yard))[0]?.['params']).toEqual({ place: 'Gully Flat', invitedBy: 'Kim' });
  });

  it('never mails a link to another place', async () => {
    await invite({ link: 'https://elsewhere.example/invitations/secret' });
    await send();
    expect(mail.taken).toEqual([]);
    expect(await states()).toEqual(['withdrawn']);
  });

  it('one turn an interval, for all workers together', async () => {
    const workers = ['w1', 'w2', 'w3'].map((name) => jobContext(yard, mail, name));
    const turns = await Promise.all(workers.map((worker) => claimTurn(worker, 'planAhead', 600)));
    expect(turns.filter(Boolean)).toHaveLength(1);
    await yard.sql(`update worker_beats set at = at - interval '601 seconds'`);
    const later = await Promise.all(workers.map((worker) => claimTurn(worker, 'planAhead', 600)));
    expect(later.filter(Boolean)).toHaveLength(1);
  });

  it('cleans up what has expired, and nothing that is still of use', async () => {
    await people(1);
    const [user] = await yard.sql('select id from users limit 1');
    const session = (id: string, expires: string) =>
      yard.sql('insert into sessions (id, user_id, expires_at) values (:id, :user, :expires)', {
        id,
        user: user?.['id'],
        expires,
      });
    await session('old', '2026-10-05T06:59:00Z');
    await session('good', '2026-10-05T07:01:00Z');
    at(EVENING);
    await send();
    await cleanUp(jobContext(yard, mail));
    expect(await yard.sql('select id from sessions')).toEqual([{ id: 'good' }]);
    expect(await states()).toEqual(['sent']);
    at('2027-01-05T07:00:00Z');
    await cleanUp(jobContext(yard, mail));
    expect(await outbox(yard)).toEqual([]);
  });
});
