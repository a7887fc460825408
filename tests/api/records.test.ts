import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { addAnimals, cohortOf, errorOf, openProgram, sqlOf, startedCohort, taskOf, type Program } from './programKit';
import { crewOf, entry, inAt, type Crew, type Recorded } from './recordKit';

let program: Program;
let crew: Crew;
let home: string;
beforeAll(async () => {
  program = await openProgram();
  crew = crewOf(program);
  home = program.world.property.id;
});
afterAll(() => program.fresh.drop());

describe('recording', () => {
  it('takes a record once, however often it is sent', async () => {
    const { cohort, animals } = await crew.heifers(3);
    const task = taskOf(cohort, 'in');
    const sent = entry({ animalId: animals[0] ?? '' });
    const first = (await crew.send(task.id, [sent]).expect(200)).body as Recorded;
    expect(first).toMatchObject({ accepted: [sent.id], refused: [], task: { done: 1, head: 3, state: 'inWork' } });
    const again = await Promise.all([
      crew.send(task.id, [sent]),
      crew.send(task.id, [sent]),
      crew.send(task.id, [sent]),
    ]);
    for (const answer of again) expect(answer.body).toMatchObject({ accepted: [sent.id], task: { done: 1 } });
    expect(await sqlOf(program, 'select id from records where task_id = $1', [task.id])).toHaveLength(1);
  });

  it('keeps the good ones and says of each bad one why', async () => {
    const { cohort, animals } = await crew.heifers(3);
    const task = taskOf(cohort, 'in');
    const [a = '', b = '', c = ''] = animals;
    const [stranger = ''] = await addAnimals(home, 1);
    await crew.record(task.id, { animalId: a });
    const list = [
      entry({ animalId: a }),
      entry({ animalId: b }),
      entry({ animalId: stranger }),
      entry({ animalId: null }),
      entry({ animalId: c, at: '2026-05-12T23:00:00.000Z' }),
      entry({ animalId: c, exceptions: [{ stepId: 'nothing', outcome: 'notDone' }] }),
      entry({ animalId: c, batchId: randomUUID() }),
      entry({ animalId: c, observed: { heat66: 'yes' } }),
      entry({ animalId: c }),
      entry({ animalId: c }),
    ];
    const result = (await crew.send(task.id, list).expect(200)).body as Recorded;
    expect(result.accepted).toEqual([list[1]?.id, list[8]?.id]);
    expect(result.refused.map((one) => [list.findIndex((r) => r.id === one.id), one.message])).toEqual([
      [0, 'Recorded already by Staff One at 07:12.'],
      [2, 'This animal is not in this group.'],
      [3, 'This group has tags: record each animal.'],
      [4, 'The time of this record lies ahead of the server’s clock.'],
      [5, 'This visit has no such step.'],
      [6, 'This product batch is not one of this property.'],
      [7, 'This visit does not look for that.'],
      [9, 'Recorded already by Staff One at 07:12.'],
    ]);
    expect(result.task).toMatchObject({ done: 3, state: 'done' });
  });

  it('refuses an id that was used for another animal or another task', async () => {
    const { cohort, animals } = await crew.heifers(2);
    const [first, second] = [taskOf(cohort, 'in'), taskOf(cohort, 'out')];
    const sent = entry({ animalId: animals[0] ?? '' });
    await crew.send(first.id, [sent]).expect(200);
    for (const [taskId, animalId] of [
      [first.id, animals[1]],
      [second.id, animals[0]],
    ]) {
      const result = (await crew.send(taskId ?? '', [{ ...sent, animalId }]).expect(200)).body as Recorded;
      expect(result.refused).toEqual([{ id: sent.id, message: 'This record id was used for something else.' }]);
    }
  });

  it('lets one of many phones that record the same animal at once', async () => {
    const { cohort, animals } = await crew.heifers(1);
    const task = taskOf(cohort, 'in');
    const answers = await Promise.all(
      Array.from({ length: 6 }, (_, i) =>
        crew.send(task.id, [entry({ animalId: animals[0] ?? '' })], i % 2 ? 'technician' : 'staff'),
      ),
    );
    const results = answers.map((answer) => answer.body as Recorded);
    expect(results.map((result) => result.accepted.length).sort()).toEqual([0, 0, 0, 0, 0, 1]);
    expect(await sqlOf(program, 'select id from records where task_id = $1', [task.id])).toHaveLength(1);
  });

  it('goes from planned to in work to done, and the cohort ends with its last task', async () => {
    const { cohort, animals } = await crew.heifers(2);
    const [a = '', b = ''] = animals;
    const at = { in: inAt, out: '2026-05-19T21:10:00.000Z', ai: '2026-05-22T03:10:00.000Z' };
    for (const visit of ['in', 'out', 'ai'] as const) {
      const task = taskOf(cohort, visit);
      program.fresh.setNow(new Date(Date.parse(at[visit]) + 60_000));
      expect((await crew.record(task.id, { animalId: a, at: at[visit] })).task.state).toBe('inWork');
      expect((await crew.record(task.id, { animalId: b, at: at[visit] })).task.state).toBe('done');
      const closing = await sqlOf(program, `select id from messages where task_id = $1 and state = 'waiting'`, [
        task.id,
      ]);
      expect(closing).toEqual([]);
    }
    const after = await cohortOf(program, cohort.id);
    expect(after.state).toBe('finished');
    const work = await crew.workOf(taskOf(cohort, 'ai').id);
    const last = work.animals[0]?.record;
    await crew.undo(last?.id ?? '').expect(200);
    expect((await cohortOf(program, cohort.id)).state).toBe('running');
  });
});

describe('the rest of a group', () => {
  it('gets a record each, once', async () => {
    const { cohort, animals } = await crew.heifers(4);
    const task = taskOf(cohort, 'in');
    await crew.record(task.id, { animalId: animals[0] ?? '' });
    const id = randomUUID();
    const first = (await crew.rest(task.id, 3, { id }).expect(200)).body as Recorded;
    expect(first.accepted).toHaveLength(3);
    expect(first.task).toMatchObject({ done: 4, state: 'done' });
    const again = (await crew.rest(task.id, 3, { id }).expect(200)).body as Recorded;
    expect(again.accepted.sort()).toEqual(first.accepted.sort());
    await crew.undo(first.accepted[0] ?? '').expect(200);
    const late = (await crew.rest(task.id, 3, { id }).expect(200)).body as Recorded;
    expect(late.task).toMatchObject({ done: 3, state: 'inWork' });
  });

  it('is refused with the new number when others recorded meanwhile', async () => {
    const { cohort, animals } = await crew.heifers(4);
    const task = taskOf(cohort, 'in');
    await crew.record(task.id, { animalId: animals[0] ?? '' });
    const error = errorOf(await crew.rest(task.id, 4).expect(409));
    expect(error).toMatchObject({ id: 'conflict', message: 'Meanwhile others recorded: 3 head are left now.' });
    expect((await crew.workOf(task.id)).task.done).toBe(1);
  });

  it('never doubles when two phones send it at once', async () => {
    const { cohort } = await crew.heifers(5);
    const task = taskOf(cohort, 'in');
    const answers = await Promise.all([crew.rest(task.id, 5), crew.rest(task.id, 5), crew.rest(task.id, 5)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409, 409]);
    expect((await crew.workOf(task.id)).task.done).toBe(5);
  });

  it('counts down a group without tags, and refuses more than are left', async () => {
    program.fresh.setNow(new Date('2026-05-04T00:00:00Z'));
    const cohort = await startedCohort(program, { groups: [{ head: 10 }] });
    program.fresh.setNow(new Date('2026-05-12T22:00:00Z'));
    const task = taskOf(cohort, 'in');
    expect((await crew.record(task.id, { animalId: null, head: 7 })).task).toMatchObject({ done: 7, head: 10 });
    const over = await crew.record(task.id, { animalId: null, head: 4 });
    expect(over.refused[0]?.message).toBe('Only 3 head are left to record.');
    const tagged = await crew.record(task.id, { animalId: (await addAnimals(home, 1))[0] ?? '' });
    expect(tagged.refused[0]?.message).toBe('This group is a number without tags.');
    const done = (await crew.rest(task.id, 3).expect(200)).body as Recorded;
    expect(done.task).toMatchObject({ done: 10, state: 'done' });
    expect((await crew.workOf(task.id)).records.map((one) => one.head).sort()).toEqual([3, 7]);
  });
});

describe('leaving and taking back', () => {
  it('takes an animal that leaves out of every other task, also those it was missing in', async () => {
    const { cohort, animals } = await crew.heifers(3);
    const [a = '', b = '', c = ''] = animals;
    const [first, second, third] = ['in', 'out', 'ai'].map((visit) => taskOf(cohort, visit));
    await crew.record(first?.id ?? '', { animalId: a }, { animalId: b });
    const left = entry({ animalId: c, outcome: 'withdrawn', reason: 'servedEarly' });
    await crew.send(second?.id ?? '', [left]).expect(200);
    const state = async (id = '') => {
      const { task } = await crew.workOf(id);
      return [task.done, task.head, task.state];
    };
    expect(await state(first?.id)).toEqual([2, 2, 'done']);
    expect(await state(second?.id)).toEqual([1, 3, 'inWork']);
    expect(await state(third?.id)).toEqual([0, 2, 'planned']);
    const later = await crew.record(third?.id ?? '', { animalId: c });
    expect(later.refused[0]?.message).toBe('This animal is not in this group.');
    await crew.undo(left.id).expect(200);
    expect(await state(first?.id)).toEqual([2, 3, 'inWork']);
    expect(await state(third?.id)).toEqual([0, 3, 'planned']);
  });

  it('takes a record back once, and keeps both', async () => {
    const { cohort, animals } = await crew.heifers(2);
    const task = taskOf(cohort, 'in');
    const sent = entry({ animalId: animals[0] ?? '' });
    await crew.send(task.id, [sent]).expect(200);
    const id = randomUUID();
    const first = (await crew.undo(sent.id, id).expect(200)).body as Recorded;
    expect(first.task).toMatchObject({ done: 0, state: 'planned' });
    await crew.undo(sent.id, id).expect(200);
    expect(errorOf(await crew.undo(sent.id).expect(409)).message).toBe('That record was taken back already.');
    await crew.undo(id).expect(409);
    const work = await crew.workOf(task.id);
    expect(work.records).toMatchObject([{ id: sent.id, undoneBy: id }]);
    expect(work.animals.every((animal) => animal.record === null)).toBe(true);
    expect((await crew.record(task.id, { animalId: animals[0] ?? '' })).task.done).toBe(1);
  });

  it('is never a change of what was written', async () => {
    const { cohort, animals } = await crew.heifers(1);
    const sent = entry({ animalId: animals[0] ?? '' });
    await crew.send(taskOf(cohort, 'in').id, [sent]).expect(200);
    await expect(sqlOf(program, 'update records set reason = $1 where id = $2', ['x', sent.id])).rejects.toThrow();
    await expect(sqlOf(program, 'delete from records where id = $1', [sent.id])).rejects.toThrow();
  });
});

describe('the work of a task', () => {
  it('says whose direction covers it, and which medicine nobody authorised', async () => {
    const { cohort } = await crew.heifers(2);
    const task = taskOf(cohort, 'in');
    expect(await crew.workOf(task.id)).toMatchObject({ direction: 'Vet One', authorityNote: null });
    await sqlOf(
      program,
      `update authorities set withdrawn_at = now() where cohort_id = $1 and active = 'gonadorelin'`,
      [cohort.id],
    );
    expect((await crew.workOf(task.id)).authorityNote).toMatch(/gonadorelin/i);
    await program.agents.manager.post(`/api/cohorts/${cohort.id}/cancel`).send({ reason: '' }).expect(200);
    const [animal] = (await crew.workOf(task.id)).animals;
    const late = await crew.record(task.id, { animalId: animal?.animalId ?? '' });
    expect(late.refused[0]?.message).toBe('This task was cancelled.');
  });
});
