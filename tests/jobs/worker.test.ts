import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import type { Job } from '@/jobs/schedule';
import { expression, startWorker } from '@/jobs/worker';
import { planReminders } from '@/server/commands/planReminders';
import { addGroup, addPerson, addProperty, addTask, fakeMail, openYard, outbox, type Yard } from './kit';

const pause = (ms: number) => new Promise<void>((resolve) => setTimeout(resolve, ms));

describe('worker', () => {
  let yard: Yard;
  beforeAll(async () => {
    yard = await openYard();
  });
  afterAll(() => yard.close());
  beforeEach(async () => {
    await yard.reset('2026-10-05T06:00:00Z');
  });

  const planned = async (people: number) => {
    const property = await addProperty(yard);
    for (let n = 0; n < people; n += 1) await addPerson(yard, property, 'staff', 'true, false, false');
    const task = await addTask(yard, property, await addGroup(yard, property), { due: '2026-10-05T20:00:00Z' });
    await yard.deps.sequelize.transaction((tx) => planReminders(yard.deps, tx, property, [task]));
    yard.clock.at = new Date('2026-10-05T07:00:00Z');
  };

  it('catches up at its first waking: plans ahead, then sends', async () => {
    const property = await addProperty(yard);
    await addPerson(yard, property, 'staff', 'true, false, false');
    await addTask(yard, property, await addGroup(yard, property), { due: '2026-10-05T20:00:00Z' });
    yard.clock.at = new Date('2026-10-05T07:00:00Z');
    const mail = fakeMail();
    const worker = startWorker({ deps: yard.deps, mail, worker: 'w1' }, null);
    await worker.wake();
    await worker.stop();
    expect(mail.taken).toHaveLength(1);
    expect(await yard.sql(`select at from worker_beats where name = 'worker'`)).toEqual([{ at: yard.clock.at }]);
  });

  it('finishes the message in hand when asked to stop, and begins no other', async () => {
    await planned(3);
    const mail = fakeMail();
    let inHand: () => void = () => undefined;
    const begun = new Promise<void>((resolve) => {
      mail.answer = () => async () => {
        resolve();
        await new Promise<void>((go) => {
          inHand = go;
        });
      };
    });
    const worker = startWorker({ deps: yard.deps, mail, worker: 'w1' }, null);
    const round = worker.wake();
    await begun;
    const stopped = worker.stop();
    inHand();
    await stopped;
    await round;
    expect(mail.taken).toHaveLength(1);
    expect((await outbox(yard)).map((row) => row['state']).sort()).toEqual(['sent', 'waiting', 'waiting']);
  });

  it('restarts send the rest once', async () => {
    await planned(5);
    const mail = fakeMail();
    for (let n = 0; n < 3; n += 1) {
      const worker = startWorker({ deps: yard.deps, mail, worker: `w${n}` }, null);
      await worker.wake();
      await worker.stop();
    }
    expect(new Set(mail.taken.map((one) => one.to)).size).toBe(5);
    expect(mail.taken).toHaveLength(5);
  });

  it('goes on with the other jobs when one fails', async () => {
    const ran: string[] = [];
    const jobs: Job[] = [
      { name: 'bad', every: 'wake', run: () => Promise.reject(new Error('broken')) },
      { name: 'good', every: 'wake', run: () => Promise.resolve(void ran.push('good')) },
      { name: 'rare', every: 3600, run: () => Promise.resolve(void ran.push('rare')) },
    ];
    const worker = startWorker({ deps: yard.deps, mail: fakeMail(), worker: 'w1' }, null, jobs);
    await worker.wake();
    await worker.wake();
    await worker.stop();
    expect(ran).toEqual(['good', 'rare', 'good']);
  });

  it('is woken by the clock', async () => {
    let rounds = 0;
    const jobs: Job[] = [{ name: 'count', every: 'wake', run: () => Promise.resolve(void (rounds += 1)) }];
    const worker = startWorker({ deps: yard.deps, mail: fakeMail(), worker: 'w1' }, 1, jobs);
    await pause(2300);
    await worker.stop();
    const before = rounds;
    expect(before).toBeGreaterThanOrEqual(2);
    await pause(1200);
    expect(rounds).toBe(before);
  });

  it('writes its pace as a cron expression', () => {
    expect([1, 30, 60, 300].map(expression)).toEqual([
      '*/1 * * * * *',
      '*/30 * * * * *',
      '0 */1 * * * *',
      '0 */5 * * * *',
    ]);
  });
});
