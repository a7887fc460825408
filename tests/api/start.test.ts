import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { Animal, Authority } from '@/server/models';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import {
  addAnimals,
  authoriseAll,
  codesOf,
  cohortOf,
  errorOf,
  openProgram,
  planCohort,
  planOf,
  signedOff,
  sqlOf,
  startedCohort,
  type Program,
} from './programKit';

let program: Program;
let home: string;
beforeAll(async () => {
  program = await openProgram();
  home = program.world.property.id;
});
afterAll(() => program.fresh.drop());

const start = (id: string, seen: { fingerprint: string; revision: number }) =>
  program.agents.manager.post(`/api/cohorts/${id}/start`).send(seen);

describe('the plan', () => {
  it('gives every group its tasks with local times, windows, interval, doses and cautions', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 156 }, { head: 12, local: '2026-05-21T07:00' }] });
    const plan = await planOf(program, cohort.id);
    expect(plan.tasks.map((task) => [task.group, task.title, task.dueLocal, task.head])).toEqual([
      ['Mob 1', 'Devices in', 'Wed 13 May 07:00', 156],
      ['Mob 1', 'Devices out', 'Wed 20 May 07:00', 156],
      ['Mob 1', 'AI', 'Fri 22 May 13:00', 156],
      ['Mob 2', 'Devices in', 'Thu 14 May 07:00', 12],
      ['Mob 2', 'Devices out', 'Thu 21 May 07:00', 12],
      ['Mob 2', 'AI', 'Sat 23 May 13:00', 12],
    ]);
    const ai = plan.tasks[2];
    // 54 h give or take 2: Oosthuizen et al., as the library cites it
    expect(ai).toMatchObject({
      sinceAnchor: '54 h since device out',
      windowFromLocal: 'Fri 22 May 11:00',
      windowToLocal: 'Fri 22 May 15:00',
    });
    const out = plan.tasks[1];
    expect(out?.sinceAnchor).toBe('timing anchor');
    expect(plan.tasks[0]?.sinceAnchor).toBe('7 d before device out');
    const pg = out?.steps.find((step) => step.kind === 'prostaglandin');
    expect(pg?.doses).toMatchObject([{ active: 'dinoprost', amount: 25, unit: 'mg', total: 25 * 156 }]);
    expect(pg?.cautions).toEqual(['prostaglandin']);
    expect(codesOf(plan.findings)).toEqual(expect.arrayContaining(['headCountOnly', 'weekend']));
  });

  it('keeps the clock time of local days and the hours of hour gaps when clocks change', async () => {
    // New South Wales goes to summer time on the first Sunday of October, 4 October 2026 (IANA tzdata); the Monday
    // after it is Labour Day there (Public Holidays Act 2010 NSW, from memory)
    const cohort = await planCohort(program, { groups: [{ head: 5 }], local: '2026-10-03T07:00' });
    const plan = await planOf(program, cohort.id);
    expect(plan.tasks.map((task) => task.dueLocal)).toEqual([
      'Sat 26 Sept 07:00',
      'Sat 3 Oct 07:00',
      'Mon 5 Oct 14:00',
    ]);
    const hours = (Date.parse(plan.tasks[2]?.dueAt ?? '') - Date.parse(plan.tasks[1]?.dueAt ?? '')) / 3_600_000;
    expect(hours).toBe(54);
    expect(codesOf(plan.findings)).toEqual(expect.arrayContaining(['clockChange', 'holiday', 'weekend']));
    expect(plan.findings.find((finding) => finding.code === 'holiday')?.message).toContain('Labour Day');
  });

  it('stops at a clock time that the clocks jump over', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 5 }], local: '2026-10-04T02:30' });
    expect(codesOf((await planOf(program, cohort.id)).findings, 'stop')).toContain('clockTimeSkipped');
  });

  it('warns outside the yard hours and stops in the past', async () => {
    const night = await planCohort(program, { groups: [{ head: 5 }], local: '2026-05-20T23:00' });
    expect(codesOf((await planOf(program, night.id)).findings, 'warn')).toContain('outsideYardHours');
    const past = await planCohort(program, { groups: [{ head: 5 }], local: '2026-05-06T07:00' });
    expect(codesOf((await planOf(program, past.id)).findings, 'stop')).toContain('inThePast');
  });

  it('stops prostaglandin for animals not known empty, and names them', async () => {
    const animals = [...(await addAnimals(home, 3)), ...(await addAnimals(home, 2, { knownEmpty: null }))];
    const cohort = await planCohort(program, { groups: [{ animalIds: animals }] });
    const finding = (await planOf(program, cohort.id)).findings.find((f) => f.code === 'notKnownEmpty');
    expect(finding).toMatchObject({ severity: 'stop', params: { count: 2 } });
  });

  it('warns of the wrong class and of cows too soon after calving', async () => {
    const version = await signedOff(program.world, 'device-7-cows');
    const cows = await addAnimals(home, 2, { class: 'cow', lastCalving: '2026-04-20' });
    const heifers = await addAnimals(home, 1);
    const cohort = await planCohort(program, {
      groups: [{ class: 'cow', animalIds: [...cows, ...heifers] }],
      version,
    });
    const { findings } = await planOf(program, cohort.id);
    // 13 May is 23 days after 20 April; the protocol asks for 50 to device in
    expect(findings.find((f) => f.code === 'daysSinceCalving')?.params).toMatchObject({ count: 2, fewestDays: 23 });
    expect(findings.find((f) => f.code === 'wrongClass')?.params).toMatchObject({ count: 1 });
  });

  it('warns of a clash in the same half of a day only', async () => {
    const { agents } = program;
    const first = await startedCohort(program, { groups: [{ head: 6 }], local: '2026-06-10T07:00', name: 'First mob' });
    const same = await planCohort(program, { groups: [{ head: 6 }], local: '2026-06-10T10:00' });
    const clash = (await planOf(program, same.id)).findings.filter((finding) => finding.code === 'clash');
    expect(clash.map((finding) => finding.severity)).toContain('warn');
    expect(clash[0]?.message).toContain('First mob');
    const after = await planCohort(program, { groups: [{ head: 6 }], local: '2026-06-10T14:00' });
    const at = (await planOf(program, after.id)).findings.filter((finding) => finding.code === 'clash');
    expect(at.map((finding) => finding.visits)).not.toContainEqual(['out']);
    await agents.manager.post(`/api/cohorts/${first.id}/cancel`).send({ reason: 'test' }).expect(200);
    expect(codesOf((await planOf(program, same.id)).findings)).not.toContain('clash');
  });

  it('reads options, and has nothing to say before there is a protocol, a time or an animal', async () => {
    const version = await signedOff(program.world, 'device-5-cows');
    const read = async (secondPg: string) => {
      const options = { secondPg };
      const cohort = await planCohort(program, { groups: [{ class: 'cow', head: 5 }], version, options });
      const plan = await planOf(program, cohort.id);
      const at = (visit: string) => Date.parse(plan.tasks.find((task) => task.visitId === visit)?.dueAt ?? '');
      const [first, second] = plan.tasks.filter((task) => task.steps.some((step) => step.kind === 'prostaglandin'));
      return (at(second?.visitId ?? '') - at(first?.visitId ?? '')) / 3_600_000;
    };
    expect([await read('h8'), await read('h12')]).toEqual([8, 12]);
    const empty = await planCohort(program, { groups: [] });
    expect(await planOf(program, empty.id)).toMatchObject({ tasks: [], canStart: false, needs: [] });
    const answer = await start(empty.id, { fingerprint: '', revision: empty.revision }).expect(422);
    expect(errorOf(answer).id).toBe('refused');
  });
});

describe('starting', () => {
  it('writes exactly what was shown, tells the audit, plans reminders', async () => {
    const animals = await addAnimals(home, 4);
    const cohort = await planCohort(program, { groups: [{ animalIds: animals }] });
    await authoriseAll(program, cohort.id, 4);
    const plan = await planOf(program, cohort.id);
    const started = (await start(cohort.id, { fingerprint: plan.fingerprint, revision: 1 }).expect(200))
      .body as CohortDetail;
    expect(started).toMatchObject({ state: 'running', startedBy: 'Manager One', revision: 2 });
    const shown = plan.tasks.map(({ dueAt, windowFrom, windowTo, title, head, steps, sinceAnchor }) => {
      return { dueAt, windowFrom, windowTo, title, head, steps, sinceAnchor };
    });
    expect(started.tasks).toMatchObject(shown);
    expect(started.tasks.every((task) => task.state === 'planned' && task.done === 0)).toBe(true);
    expect(codesOf(started.planFindings)).toEqual(codesOf(plan.findings));
    const [audit] = await sqlOf(
      program,
      `select summary from audit_entries where cohort_id = $1 and action = 'cohort.start'`,
      [cohort.id],
    );
    expect(audit?.summary).toBe('Autumn heifers started with 4 head and 3 tasks');
    const messages = await sqlOf(
      program,
      `select distinct kind from messages where property_id = $1 and state = 'waiting' order by kind`,
      [home],
    );
    expect(messages.map((row) => row.kind)).toEqual(['closing', 'evening', 'morning']);
  });

  it('refuses a plan that has become another since it was looked at', async () => {
    const animals = await addAnimals(home, 3);
    const cohort = await planCohort(program, { groups: [{ animalIds: animals }] });
    await authoriseAll(program, cohort.id, 5);
    const seen = { fingerprint: (await planOf(program, cohort.id)).fingerprint, revision: cohort.revision };
    await Animal.update({ knownEmpty: false }, { where: { id: animals[0] ?? '' } });
    expect(errorOf(await start(cohort.id, seen).expect(409))).toMatchObject({ id: 'stale' });
    await Animal.update({ knownEmpty: true }, { where: { id: animals[0] ?? '' } });
    await Authority.update({ withdrawnAt: new Date() }, { where: { cohortId: cohort.id, active: 'dinoprost' } });
    expect(errorOf(await start(cohort.id, seen).expect(409)).id).toBe('stale');
    await Authority.update({ withdrawnAt: null }, { where: { cohortId: cohort.id } });
    await start(cohort.id, { ...seen, revision: 9 }).expect(409);
    await start(cohort.id, seen).expect(200);
  });

  it('refuses while a stop stands, with the findings', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 5 }] });
    const plan = await planOf(program, cohort.id);
    const error = errorOf(
      await start(cohort.id, { fingerprint: plan.fingerprint, revision: cohort.revision }).expect(422),
    );
    expect(error.id).toBe('refused');
    expect(codesOf(error.findings ?? [], 'stop')).toEqual(Array<string>(3).fill('authorityMissing'));
    expect((await cohortOf(program, cohort.id)).state).toBe('planning');
  });

  it('starts once, however often the same request comes, and not again from another plan', async () => {
    const cohort = await planCohort(program, { groups: [{ head: 7 }] });
    await authoriseAll(program, cohort.id, 7);
    const seen = { fingerprint: (await planOf(program, cohort.id)).fingerprint, revision: cohort.revision };
    const answers = await Promise.all([1, 2, 3, 4].map(() => start(cohort.id, seen)));
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200, 200]);
    expect((await cohortOf(program, cohort.id)).tasks).toHaveLength(3);
    expect((await cohortOf(program, cohort.id)).revision).toBe(2);
    const other = await start(cohort.id, { ...seen, fingerprint: 'another' }).expect(422);
    expect(errorOf(other).id).toBe('refused');
  });

  it('never puts one animal into two running cohorts', async () => {
    const animals = await addAnimals(home, 2);
    const cohorts = [];
    for (const name of ['One', 'Two']) {
      const cohort = await planCohort(program, { groups: [{ animalIds: animals }], name });
      await authoriseAll(program, cohort.id, 2);
      cohorts.push(cohort);
    }
    for (const cohort of cohorts) {
      const plan = await planOf(program, cohort.id);
      expect(codesOf(plan.findings, 'stop')).toEqual(['inAnotherCohort']);
      await start(cohort.id, { fingerprint: plan.fingerprint, revision: cohort.revision }).expect(422);
    }
    const [first, second] = cohorts;
    await program.agents.manager
      .patch(`/api/cohorts/${second?.id ?? ''}`)
      .send({ groups: [{ id: randomUUID(), name: 'Empty', class: 'heifer', head: 2 }], revision: second?.revision })
      .expect(200);
    const plan = await planOf(program, first?.id ?? '');
    await start(first?.id ?? '', { fingerprint: plan.fingerprint, revision: first?.revision ?? 0 }).expect(200);
  });

  it('writes tasks of the paddock and of repeats too', async () => {
    const version = await signedOff(program.world, 'progestagen-feed-heifers');
    const cohort = await planCohort(program, {
      groups: [{ head: 5 }],
      version,
      visit: null,
      local: '2026-07-15T08:00',
    });
    const plan = await planOf(program, cohort.id);
    const feeding = plan.tasks.filter((task) => task.visitId === plan.tasks[0]?.visitId);
    // 14 days of feeding: the first and the last are 13 days apart
    expect(feeding).toHaveLength(14);
    expect(feeding.every((task) => !task.yarded)).toBe(true);
    expect(feeding[1]?.title).toContain('2 of 14');
    const days = (Date.parse(feeding[13]?.dueAt ?? '') - Date.parse(feeding[0]?.dueAt ?? '')) / 86_400_000;
    expect(days).toBe(13);
  });
});
