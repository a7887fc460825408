import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { CohortDetail, MovePreview } from '@/shared/contracts/cohorts';
import {
  addAnimals,
  codesOf,
  cohortOf,
  errorOf,
  openProgram,
  sqlOf,
  startedCohort,
  taskOf,
  type Program,
} from './programKit';

let program: Program;
beforeAll(async () => {
  program = await openProgram();
});
afterAll(() => program.fresh.drop());

type Wish = { dueLocal: string; revision: number };
const preview = async (taskId: string, wish: Wish) =>
  (await program.agents.manager.post(`/api/tasks/${taskId}/move/preview`).send(wish).expect(200)).body as MovePreview;
const move = (taskId: string, wish: Wish) => program.agents.manager.post(`/api/tasks/${taskId}/move`).send(wish);
const waiting = (cohortId: string) =>
  sqlOf(
    program,
    `select m.kind, m.task_id, m.due_at from messages m join tasks t on t.id = m.task_id
      where t.cohort_id = $1 and m.state = 'waiting' order by m.due_at`,
    [cohortId],
  );

const afterAnHour = 60 * 60_000;
const recordAll = (taskId: string, head: number, at: string) => {
  program.fresh.setNow(new Date(Date.parse(at) + afterAnHour));
  return program.agents.staff
    .post(`/api/tasks/${taskId}/rest`)
    .send({ id: randomUUID(), at, expectedHead: head })
    .expect(200);
};

describe('moving a task', () => {
  it('takes what hangs on it along and leaves what is before it', async () => {
    const cohort = await startedCohort(program, { groups: [{ head: 8 }] });
    const out = taskOf(cohort, 'out');
    const wish = { dueLocal: '2026-05-20T08:00', revision: out.revision };
    const before = await preview(out.id, wish);
    expect(before.canMove).toBe(true);
    expect(before.effects.map(({ title, fromLocal, toLocal }) => [title, fromLocal, toLocal])).toEqual([
      ['Devices out', 'Wed 20 May 07:00', 'Wed 20 May 08:00'],
      ['AI', 'Fri 22 May 13:00', 'Fri 22 May 14:00'],
    ]);
    expect(before.effects[1]).toMatchObject({
      windowFromLocal: 'Fri 22 May 12:00',
      windowToLocal: 'Fri 22 May 16:00',
    });
    expect((await cohortOf(program, cohort.id)).tasks).toEqual(cohort.tasks);
    const after = (await move(out.id, wish).expect(200)).body as CohortDetail;
    for (const effect of before.effects) {
      const task = after.tasks.find((one) => one.id === effect.taskId);
      expect(task).toMatchObject({ dueAt: effect.toAt, movedFrom: effect.fromAt, revision: 1 });
      expect(task?.windowFromLocal).toBe(effect.windowFromLocal);
    }
    expect(taskOf(after, 'in')).toMatchObject({ dueAt: taskOf(cohort, 'in').dueAt, movedFrom: null });
    const [entry] = await sqlOf(
      program,
      `select summary from audit_entries where cohort_id = $1 and action = 'task.move'`,
      [cohort.id],
    );
    expect(entry?.summary).toBe(
      'Devices out, Mob 1: moved from Wed 20 May 07:00 to Wed 20 May 08:00, with 1 task after it',
    );
  });

  it('moves reminders with it', async () => {
    const cohort = await startedCohort(program, { groups: [{ head: 8 }], local: '2026-06-17T07:00' });
    const ai = taskOf(cohort, 'ai');
    const closing = async () =>
      (await waiting(cohort.id)).filter((row) => row.kind === 'closing' && row.task_id === ai.id).map((r) => r.due_at);
    const before = await closing();
    expect(before.length).toBeGreaterThan(0);
    await move(ai.id, { dueLocal: '2026-06-19T14:00', revision: ai.revision }).expect(200);
    // the move of AI changed the window of devices out, and so its revision
    const out = taskOf(await cohortOf(program, cohort.id), 'out');
    await move(out.id, { dueLocal: '2026-06-17T06:30', revision: out.revision }).expect(200);
    const after = await closing();
    expect(after).toHaveLength(before.length);
    expect(after).not.toEqual(before);
  });

  it('counts from what was done, not from what was planned', async () => {
    const animals = await addAnimals(program.world.property.id, 3);
    const cohort = await startedCohort(program, { groups: [{ animalIds: animals }] });
    // devices came out an hour and a half late: 22:30Z is 08:30 in Sydney in May
    await recordAll(taskOf(cohort, 'in').id, 3, '2026-05-12T21:00:00.000Z');
    await recordAll(taskOf(cohort, 'out').id, 3, '2026-05-19T22:30:00.000Z');
    const ai = taskOf(await cohortOf(program, cohort.id), 'ai');
    const right = await preview(ai.id, { dueLocal: '2026-05-22T14:30', revision: ai.revision });
    expect(right).toMatchObject({
      canMove: true,
      effects: [{ windowFromLocal: 'Fri 22 May 12:30', windowToLocal: 'Fri 22 May 16:30' }],
    });
    // 50.5 h after devices really came out
    const early = await preview(ai.id, { dueLocal: '2026-05-22T11:00', revision: ai.revision });
    expect(early.canMove).toBe(false);
    const broken = early.findings.find((finding) => finding.code === 'windowMissed');
    expect(broken).toMatchObject({ severity: 'stop' });
    expect(broken?.message).toMatch(/52 h/);
    const refused = await move(ai.id, { dueLocal: '2026-05-22T11:00', revision: ai.revision }).expect(422);
    expect(codesOf(errorOf(refused).findings ?? [], 'stop')).toContain('windowMissed');
    expect(taskOf(await cohortOf(program, cohort.id), 'ai')).toEqual(ai);
    program.fresh.setNow(new Date('2026-05-04T00:00:00Z'));
  });

  it('says when it would fall on a weekend or outside the yard hours', async () => {
    const cohort = await startedCohort(program, { groups: [{ head: 8 }], local: '2026-06-23T07:00' });
    const first = taskOf(cohort, 'in');
    const { findings } = await preview(first.id, { dueLocal: '2026-06-20T22:00', revision: first.revision });
    expect(codesOf(findings)).toEqual(expect.arrayContaining(['weekend', 'outsideYardHours']));
  });

  it('refuses one that is done, one that was changed meanwhile, and one of a cancelled cohort', async () => {
    const cohort = await startedCohort(program, { groups: [{ head: 4 }] });
    const first = taskOf(cohort, 'in');
    await recordAll(first.id, 4, '2026-05-12T21:00:00.000Z');
    const done = taskOf(await cohortOf(program, cohort.id), 'in');
    const closed = await move(first.id, { dueLocal: '2026-05-13T08:00', revision: done.revision }).expect(422);
    expect(errorOf(closed).id).toBe('refused');
    const out = taskOf(cohort, 'out');
    const wish = { dueLocal: '2026-05-20T08:00', revision: out.revision };
    const answers = await Promise.all([move(out.id, wish), move(out.id, wish)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    await program.agents.manager.post(`/api/cohorts/${cohort.id}/cancel`).send({ reason: 'rain' }).expect(200);
    const gone = taskOf(await cohortOf(program, cohort.id), 'out');
    await move(out.id, { dueLocal: '2026-05-20T09:00', revision: gone.revision }).expect(422);
    program.fresh.setNow(new Date('2026-05-04T00:00:00Z'));
  });

  it('to the time it has already changes nothing', async () => {
    const cohort = await startedCohort(program, { groups: [{ head: 4 }] });
    const out = taskOf(cohort, 'out');
    const wish = { dueLocal: '2026-05-20T07:00', revision: out.revision };
    expect(await preview(out.id, wish)).toMatchObject({ effects: [], canMove: false });
    const after = (await move(out.id, wish).expect(200)).body as CohortDetail;
    expect(after).toEqual(await cohortOf(program, cohort.id));
    expect(after.revision).toBe(cohort.revision);
  });

  it('does not wait for ever when others record, move and cancel at the same time', async () => {
    const animals = await addAnimals(program.world.property.id, 12);
    const cohort = await startedCohort(program, { groups: [{ animalIds: animals }] });
    program.fresh.setNow(new Date('2026-05-12T22:00:00Z'));
    const first = taskOf(cohort, 'in');
    const out = taskOf(cohort, 'out');
    const records = animals.map((animalId) =>
      program.agents.staff.post(`/api/tasks/${first.id}/records`).send({
        records: [{ id: randomUUID(), animalId, outcome: 'done', at: '2026-05-12T21:00:00.000Z' }],
      }),
    );
    const moves = ['07:10', '07:20', '07:30'].map((clock) =>
      move(out.id, { dueLocal: `2026-05-20T${clock}`, revision: out.revision }),
    );
    const answers = await Promise.all([...records, ...moves]);
    expect(answers.slice(0, 12).map((answer) => answer.status)).toEqual(Array<number>(12).fill(200));
    expect(
      answers
        .slice(12)
        .map((answer) => answer.status)
        .sort(),
    ).toEqual([200, 409, 409]);
    expect(taskOf(await cohortOf(program, cohort.id), 'in')).toMatchObject({ done: 12, state: 'done' });
  });
});
