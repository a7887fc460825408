import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { Product, ProductBatch } from '@/server/models';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import {
  addAnimals,
  authorise,
  authoriseAll,
  cohortOf,
  openProgram,
  planCohort,
  planOf,
  signedOff,
  sqlOf,
  startedCohort,
  taskOf,
  type Program,
} from './programKit';
import { crewOf, entry, type Crew, type Recorded } from './recordKit';

let program: Program;
let crew: Crew;
let home: string;
beforeAll(async () => {
  program = await openProgram();
  crew = crewOf(program);
  home = program.world.property.id;
});
afterAll(() => program.fresh.drop());

describe('what a record gave', () => {
  it('is written step by step: dose, product batch, authority, under whose direction', async () => {
    const { cohort, animals } = await crew.heifers(2);
    const product = await Product.create({
      id: randomUUID(),
      organisationId: program.world.practice.id,
      name: 'Gonadorelin 50',
      active: 'gonadorelin',
      strength: 50,
      unit: 'ug',
      per: 'mL',
      route: 'im',
    });
    const batch = await ProductBatch.create({
      id: randomUUID(),
      propertyId: home,
      productId: product.id,
      number: 'L1',
      expiry: '2027-01-01',
      quantity: 50,
    });
    const sent = entry({ animalId: animals[0] ?? '', batchId: batch.id });
    await crew.send(taskOf(cohort, 'in').id, [sent]).expect(200);
    const steps = await crew.stepsOf(sent.id);
    expect(steps).toMatchObject([
      {
        step_id: 'deviceIn',
        outcome: 'done',
        active: 'progesterone',
        amount: 1,
        unit: 'device',
        product_batch_id: null,
      },
      { step_id: 'gnrh1', active: 'gonadorelin', amount: 100, unit: 'ug', product_batch_id: batch.id },
    ]);
    expect(steps.every((step) => step.authority_id !== null)).toBe(true);
    expect(steps[0]?.direction_user_id).toBe(program.world.people.vet.id);
    const elsewhere = await ProductBatch.create({
      id: randomUUID(),
      propertyId: program.world.second.id,
      productId: product.id,
      number: 'L2',
      expiry: '2027-01-01',
      quantity: 50,
    });
    const result = await crew.record(taskOf(cohort, 'in').id, { animalId: animals[1] ?? '', batchId: elsewhere.id });
    expect(result.refused[0]?.message).toBe('This product batch is not one of this property.');
  });

  it('is an exception of the device step when a device is lost', async () => {
    const { cohort, animals } = await crew.heifers(2);
    const task = taskOf(cohort, 'out');
    const [a = '', b = ''] = animals;
    const lost = entry({
      animalId: a,
      exceptions: [{ stepId: 'deviceOut', outcome: 'lost', reason: 'deviceMissing' }],
    });
    const whole = entry({ animalId: b, outcome: 'lost', reason: 'deviceMissing' });
    const result = (await crew.send(task.id, [lost, whole]).expect(200)).body as Recorded;
    expect(result.task).toMatchObject({ done: 2, exceptions: 2 });
    const outcomes = async (id: string) =>
      Object.fromEntries((await crew.stepsOf(id)).map((step) => [step.step_id, step.outcome]));
    expect(await outcomes(lost.id)).toEqual({ deviceOut: 'lost', pg: 'done', patchOn: 'done' });
    expect(await outcomes(whole.id)).toEqual({ deviceOut: 'lost', pg: 'notDone', patchOn: 'notDone' });
    const view = (await crew.workOf(task.id)).animals.find((animal) => animal.animalId === a)?.record;
    expect(view?.exceptions).toEqual([{ stepId: 'deviceOut', outcome: 'lost', reason: 'deviceMissing' }]);
  });

  it('uses up the oldest authority first, then the next, then none', async () => {
    program.fresh.setNow(new Date('2026-05-04T00:00:00Z'));
    const animals = await addAnimals(home, 4);
    const cohort = await planCohort(program, { groups: [{ animalIds: animals }] });
    const older = await authorise(program, cohort.id, 'progesterone', 2, { issuedAt: new Date('2026-04-01') });
    const newer = await authorise(program, cohort.id, 'progesterone', 2, { issuedAt: new Date('2026-04-02') });
    await authorise(program, cohort.id, 'gonadorelin', 4);
    await authorise(program, cohort.id, 'dinoprost', 4);
    const plan = await planOf(program, cohort.id);
    const answer = await program.agents.manager
      .post(`/api/cohorts/${cohort.id}/start`)
      .send({ fingerprint: plan.fingerprint, revision: 1 })
      .expect(200);
    const task = taskOf(answer.body as CohortDetail, 'in');
    program.fresh.setNow(new Date('2026-05-12T22:00:00Z'));
    const used: unknown[] = [];
    for (const animalId of animals) {
      const sent = entry({ animalId });
      await crew.send(task.id, [sent]).expect(200);
      used.push((await crew.stepsOf(sent.id)).find((step) => step.step_id === 'deviceIn')?.authority_id);
    }
    expect(used).toEqual([older, older, newer, newer]);
    // the record that is taken back gives its head free, and the next takes it
    const taken = (await crew.workOf(task.id)).animals.find((animal) => animal.animalId === animals[0])?.record;
    await crew.undo(taken?.id ?? '').expect(200);
    const sent = entry({ animalId: animals[0] ?? '' });
    await crew.send(task.id, [sent]).expect(200);
    expect((await crew.stepsOf(sent.id))[0]?.authority_id).toBe(older);
  });

  it('counts a group without tags once, though it gets the same medicine twice', async () => {
    program.fresh.setNow(new Date('2026-05-04T00:00:00Z'));
    // 30 and 20 head; gonadorelin with devices in and again at AI
    const cohort = await startedCohort(program, { groups: [{ head: 30 }, { head: 20 }] }, 50);
    const at = { in: '2026-05-12T21:10:00.000Z', ai: '2026-05-22T03:10:00.000Z' };
    for (const visit of ['in', 'ai'] as const)
      for (const group of ['Mob 1', 'Mob 2']) {
        program.fresh.setNow(new Date(Date.parse(at[visit]) + 60_000));
        const task = taskOf(cohort, visit, group);
        // in two parts, as crews do
        await crew.record(task.id, { animalId: null, head: 12, at: at[visit] });
        await crew.rest(task.id, task.head - 12, { at: at[visit] }).expect(200);
      }
    const [none] = await sqlOf(
      program,
      `select count(*)::int as n from record_steps s join records r on r.id = s.record_id join tasks t on t.id = r.task_id
        where t.cohort_id = $1 and s.active in ('gonadorelin', 'progesterone') and s.authority_id is null`,
      [cohort.id],
    );
    expect(none?.n).toBe(0);
    const after = await cohortOf(program, cohort.id);
    expect(after.authorities.find((one) => one.active === 'gonadorelin')).toMatchObject({ head: 50, used: 50 });
  });

  it('follows what was seen: who was served in heat gets nothing more at the second service', async () => {
    program.fresh.setNow(new Date('2026-05-04T00:00:00Z'));
    const version = await signedOff(program.world, 'device-14-heifers-split');
    const animals = await addAnimals(home, 3);
    const cohort = await planCohort(program, {
      groups: [{ animalIds: animals }],
      version,
      visit: 'pg',
      local: '2026-06-24T07:00',
    });
    await authoriseAll(program, cohort.id, 3);
    const plan = await planOf(program, cohort.id);
    const started = (
      await program.agents.manager
        .post(`/api/cohorts/${cohort.id}/start`)
        .send({ fingerprint: plan.fingerprint, revision: 1 })
        .expect(200)
    ).body as CohortDetail;
    program.fresh.setNow(new Date('2026-06-28T08:00:00Z'));
    const [a = '', b = '', c = ''] = animals;
    const first = ['yes', 'no', undefined].map((heat66, i) =>
      entry({ animalId: animals[i] ?? '', ...(heat66 ? { observed: { heat66 } } : {}) }),
    );
    await crew.send(taskOf(started, 'ai1').id, first).expect(200);
    const second = [a, b, c].map((animalId) => entry({ animalId }));
    await crew.send(taskOf(started, 'ai2').id, second).expect(200);
    const given = async (id: string | undefined) => (await crew.stepsOf(id ?? '')).map((step) => step.step_id);
    expect(await Promise.all(first.map((one) => given(one.id)))).toEqual([
      ['patchRead', 'service1'],
      ['patchRead'],
      ['patchRead'],
    ]);
    expect(await Promise.all(second.map((one) => given(one.id)))).toEqual([
      [],
      ['gnrh', 'service2'],
      ['gnrh', 'service2'],
    ]);
  });
});
