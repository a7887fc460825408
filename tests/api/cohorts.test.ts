import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { ProtocolVersion } from '@/server/models';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import type { Output } from '@/shared/routes';
import {
  addAnimals,
  authorise,
  authoriseAll,
  codesOf,
  cohortOf,
  errorOf,
  groupsOf,
  openProgram,
  planCohort,
  planOf,
  signedOff,
  startedCohort,
  wishOf,
  type Program,
} from './programKit';

let program: Program;
let home: string;
const path = () => `/api/properties/${home}/cohorts`;
beforeAll(async () => {
  program = await openProgram();
  home = program.world.property.id;
});
afterAll(() => program.fresh.drop());

describe('a cohort that is being planned', () => {
  it('is the same cohort when the same request comes again, and no one else’s id', async () => {
    const wish = wishOf(program, { groups: [{ head: 10 }] });
    await program.agents.manager.post(path()).send(wish).expect(201);
    const again = await program.agents.manager.post(path()).send(wish).expect(201);
    expect((again.body as CohortDetail).revision).toBe(1);
    const entries = await program.agents.manager.get(`/api/cohorts/${wish.id}/audit`).expect(200);
    expect((entries.body as { items: unknown[] }).items).toHaveLength(1);
    const elsewhere = await program.agents.vet
      .post(`/api/properties/${program.world.second.id}/cohorts`)
      .send(wish)
      .expect(409);
    expect(errorOf(elsewhere).id).toBe('conflict');
  });

  it('keeps what a change does not name and clears what it sets to null', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 10 }] });
    const patch = (body: object) => program.agents.manager.patch(`/api/cohorts/${cohort.id}`).send(body);
    const named = (await patch({ name: 'Hill heifers', revision: 1 }).expect(200)).body as CohortDetail;
    expect(named).toMatchObject({ name: 'Hill heifers', anchor: { visit: 'out' }, head: 10, revision: 2 });
    const cleared = (await patch({ anchor: null, protocolVersionId: null, revision: 2 }).expect(200))
      .body as CohortDetail;
    expect(cleared).toMatchObject({ anchor: null, protocolVersionId: null, head: 10 });
  });

  it('refuses a change of a plan that somebody else has changed', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 10 }] });
    const patch = (name: string) =>
      program.agents.manager.patch(`/api/cohorts/${cohort.id}`).send({ name, revision: cohort.revision });
    await patch('First').expect(200);
    expect(errorOf(await patch('Second').expect(409)).id).toBe('stale');
    expect((await cohortOf(program, cohort.id)).name).toBe('First');
  });

  it('lets one of two changes at the same moment win', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 10 }] });
    const answers = await Promise.all(
      ['A', 'B', 'C'].map((name) =>
        program.agents.manager.patch(`/api/cohorts/${cohort.id}`).send({ name, revision: cohort.revision }),
      ),
    );
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409, 409]);
  });

  it('names the field of an animal that is not here, is in two groups, or is missing', async () => {
    const [own = ''] = await addAnimals(home, 1);
    const [foreign = ''] = await addAnimals(program.world.second.id, 1);
    const send = async (groups: Parameters<typeof groupsOf>[0]) =>
      errorOf(await program.agents.manager.post(path()).send(wishOf(program, { groups })).expect(400)).fields;
    expect(await send([{ animalIds: [own] }, { animalIds: [foreign] }])).toMatchObject([
      { path: 'groups.1.animalIds' },
    ]);
    expect(await send([{ animalIds: [own] }, { animalIds: [own] }])).toMatchObject([{ path: 'groups.1.animalIds' }]);
    expect(await send([{}])).toMatchObject([{ path: 'groups.0.head' }]);
    expect(await send([{ animalIds: [own], head: 3 }])).toMatchObject([{ path: 'groups.0.head' }]);
  });

  it('takes only versions that a practice engaged here has signed off', async () => {
    const { world } = program;
    const versions = await Promise.all([
      signedOff(world, 'device-7-heifers', { state: 'workingCopy' }),
      signedOff(world, 'device-7-heifers', { state: 'retired' }),
      signedOff(world, 'device-7-heifers', { organisationId: world.otherPractice.id }),
    ]);
    for (const version of versions) {
      const wish = wishOf(program, { groups: [{ head: 5 }], version });
      const error = errorOf(await program.agents.manager.post(path()).send(wish).expect(400));
      expect(error.fields).toMatchObject([{ path: 'protocolVersionId' }]);
    }
  });

  it('names a visit that the protocol lacks, and a date that does not exist', async () => {
    const send = async (part: { visit?: string; local?: string }) =>
      errorOf(
        await program.agents.manager
          .post(path())
          .send(wishOf(program, { groups: [{ head: 5 }], ...part }))
          .expect(400),
      ).fields;
    expect(await send({ visit: 'nowhere' })).toMatchObject([{ path: 'anchor.visit' }]);
    expect(await send({ local: '2026-02-30T07:00' })).toMatchObject([{ path: 'anchor.local' }]);
    expect(await send({ local: '2026-05-20T25:00' })).toMatchObject([{ path: 'anchor.local' }]);
  });

  it('falls back to the service when another protocol lacks the visit that was fixed', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 5 }] });
    const version = await signedOff(program.world, 'ovsynch-56');
    const changed = await program.agents.manager
      .patch(`/api/cohorts/${cohort.id}`)
      .send({ protocolVersionId: version, revision: cohort.revision })
      .expect(200);
    expect((changed.body as CohortDetail).anchor?.visit).toBeNull();
    const plan = await planOf(program, cohort.id);
    const service = plan.tasks.find((task) => task.steps.some((step) => step.kind === 'fixedTimeService'));
    expect(service?.dueLocal).toBe('Wed 20 May 07:00');
  });

  it('can’t be changed any more once it runs', async () => {
    const cohort = await startedCohort(program, { groups: [{ animalIds: await addAnimals(home, 2) }] });
    const answer = await program.agents.manager
      .patch(`/api/cohorts/${cohort.id}`)
      .send({ name: 'Late', revision: cohort.revision })
      .expect(422);
    expect(errorOf(answer).id).toBe('refused');
  });
});

describe('the list of cohorts', () => {
  it('comes in pages without gap or repeat, and says what stands in the way of those being planned', async () => {
    const bare = await planCohort(program, { groups: [{ head: 4 }], name: 'No authority yet' });
    type Page = Output<'GET /api/cohorts'>;
    const read = async (query: string) =>
      (await program.agents.manager.get(`/api/cohorts?${query}`).expect(200)).body as Page;
    const whole = await read('limit=200');
    const ids: string[] = [];
    let after: string | null = '';
    while (after !== null) {
      const page: Page = await read(`limit=2${after ? `&after=${encodeURIComponent(after)}` : ''}`);
      expect(page.items.length).toBeLessThanOrEqual(2);
      ids.push(...page.items.map((item) => item.id));
      after = page.next;
    }
    expect(ids).toEqual(whole.items.map((item) => item.id));
    expect(new Set(ids).size).toBe(ids.length);
    expect(whole.items.find((item) => item.id === bare.id)?.findings.stop).toBe(3);
    expect((await read('state=running')).items.every((item) => item.state === 'running')).toBe(true);
    expect((await read(`propertyId=${program.world.foreign.id}`)).items).toEqual([]);
    await program.agents.manager.get('/api/cohorts?after=nonsense').expect(400);
  });
});

describe('cancelling', () => {
  it('withdraws what is planned, keeps what is done, and says so once', async () => {
    const animals = await addAnimals(home, 2);
    const cohort = await startedCohort(program, { groups: [{ animalIds: animals }] });
    program.fresh.setNow(new Date(program.fresh.deps.now().getTime() + 1000));
    const cancel = () =>
      program.agents.manager.post(`/api/cohorts/${cohort.id}/cancel`).send({ reason: 'sold' }).expect(200);
    const after = (await cancel()).body as CohortDetail;
    expect(after.state).toBe('cancelled');
    expect(after.tasks.every((task) => task.state === 'cancelled' && task.revision === 1)).toBe(true);
    await cancel();
    const audit = (await program.agents.manager.get(`/api/cohorts/${cohort.id}/audit`).expect(200))
      .body as Output<'GET /api/cohorts/:cohortId/audit'>;
    expect(audit.items.filter((entry) => entry.action === 'cohort.cancel')).toHaveLength(1);
    expect(audit.items[0]?.summary).toContain('sold');
    const again = await planCohort(program, { groups: [{ animalIds: animals }] });
    expect(codesOf((await planOf(program, again.id)).findings)).not.toContain('inAnotherCohort');
  });
});

describe('the changes of plan', () => {
  it('are read newest first, page by page', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 4 }] });
    for (let revision = 1; revision < 5; revision++) {
      program.fresh.setNow(new Date(program.fresh.deps.now().getTime() + 1000));
      await program.agents.manager
        .patch(`/api/cohorts/${cohort.id}`)
        .send({ name: `Name ${revision}`, revision })
        .expect(200);
    }
    type Page = Output<'GET /api/cohorts/:cohortId/audit'>;
    const read = async (after: string | null): Promise<Page> =>
      (
        await program.agents.manager
          .get(`/api/cohorts/${cohort.id}/audit?limit=2${after ? `&after=${after}` : ''}`)
          .expect(200)
      ).body as Page;
    const first = await read(null);
    const second = await read(first.next);
    const third = await read(second.next);
    const all = [...first.items, ...second.items, ...third.items];
    expect(all.map((entry) => entry.action)).toEqual([...Array<string>(4).fill('cohort.change'), 'cohort.create']);
    expect(all[0]?.by).toBe('Manager One');
    expect(third.next).toBeNull();
  });
});

describe('what must be authorised', () => {
  it('names active, head, first and last day, and counts what is covered', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 40 }, { head: 12, local: '2026-05-21T07:00' }] });
    await authorise(program, cohort.id, 'dinoprost', 50);
    const { needs } = await planOf(program, cohort.id);
    expect(needs).toMatchObject([
      { active: 'progesterone', head: 52, covered: 0, firstAt: '2026-05-12T21:00:00.000Z' },
      { active: 'gonadorelin', amount: 100, unit: 'ug', head: 52, covered: 0, lastAt: '2026-05-23T03:00:00.000Z' },
      { active: 'dinoprost', head: 52, covered: 50, firstAt: '2026-05-19T21:00:00.000Z' },
    ]);
  });

  it('stays covered while the cohort uses it up', async () => {
    const cohort = await startedCohort(program, { groups: [{ head: 9 }] });
    const task = cohort.tasks[0];
    await program.agents.staff
      .post(`/api/tasks/${task?.id ?? ''}/rest`)
      .send({ id: randomUUID(), at: program.fresh.deps.now().toISOString(), expectedHead: 9 })
      .expect(200);
    const after = await cohortOf(program, cohort.id);
    expect(Object.fromEntries(after.authorities.map((one) => [one.active, one.used]))).toEqual({
      progesterone: 9,
      gonadorelin: 9,
      dinoprost: 0,
    });
    expect(after.needs.map((need) => need.covered)).toEqual([9, 9, 9]);
  });

  it('is a stop when missing, short, over, or for another class', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 10 }] });
    await authorise(program, cohort.id, 'dinoprost', 8);
    await authorise(program, cohort.id, 'gonadorelin', 10, { validTo: '2026-05-15' });
    await authorise(program, cohort.id, 'progesterone', 10, { classes: ['cow'] });
    const plan = await planOf(program, cohort.id);
    expect(codesOf(plan.findings, 'stop').sort()).toEqual([
      'authorityExpired',
      'authorityShort',
      'authorityWrongClass',
    ]);
    expect(plan.canStart).toBe(false);
    const short = plan.findings.find((finding) => finding.code === 'authorityShort');
    expect(short?.params).toMatchObject({ short: 2, head: 10, covered: 8 });
    expect(short?.message).not.toBe('');
  });

  it('stops a protocol that was retired after it was chosen', async () => {
    const version = await signedOff(program.world, 'device-7-heifers');
    const cohort = await planCohort(program, { groups: [{ head: 3 }], version });
    await authoriseAll(program, cohort.id, 3);
    expect((await planOf(program, cohort.id)).canStart).toBe(true);
    await ProtocolVersion.update({ state: 'retired' }, { where: { id: version } });
    expect(codesOf((await planOf(program, cohort.id)).findings, 'stop')).toEqual(['protocolRetired']);
  });
});
