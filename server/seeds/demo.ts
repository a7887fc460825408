import { addDays } from '@/protocols/time/dates';
import { localDate, toLocal } from '@/protocols/time/zoned';
import type { AnimalClass } from '@/protocols/types';
import { createCohort } from '../commands/editCohort';
import { makePlan } from '../commands/makePlan';
import { recordRest, recordWork } from '../commands/recordWork';
import { startCohort } from '../commands/startCohort';
import type { Deps } from '../deps';
import { Cohort, Organisation, Task } from '../models';
import type { Actor } from '../policies/actor';
import { loadActor } from '../policies/loadActor';
import { readPlanSource } from '../queries/planSource';
import { taskById } from '../queries/tasks';
import { seedMob } from './herds';
import { demoId } from './ids';
import { seedAuthorities, seedMedicines } from './medicines';
import { ballywhin, brindleGap, heronSlough, personId, seedPlaces } from './places';
import { seedProtocols, type DemoVersions } from './protocols';
import { demoPeople, type DemoKey } from './signIns';

const day = 86_400_000;

interface Group {
  name: string;
  class: AnimalClass;
  animalIds?: string[];
  head?: number;
  local?: string;
}

const at = (deps: Deps, now: Date): Deps => ({ ...deps, now: () => now });

async function actorOf(deps: Deps, key: DemoKey): Promise<Actor> {
  const person = demoPeople.find((p) => p.key === key);
  return loadActor(deps.pool, { id: personId(key), name: person?.name ?? key, email: person?.email ?? '' }, deps.now());
}

/** Begins a cohort through the same commands as a manager does. */
async function begin(
  deps: Deps,
  by: DemoKey,
  property: { id: string },
  name: string,
  versionId: string,
  local: string,
  visit: string | null,
  groups: Group[],
): Promise<string> {
  return createCohort(deps, await actorOf(deps, by), property.id, {
    id: demoId(`cohort ${name}`),
    name,
    protocolVersionId: versionId,
    anchor: { visit, local },
    groups: groups.map((group) => ({ id: demoId(`group ${name} ${group.name}`), ...group })),
  });
}

async function start(deps: Deps, by: DemoKey, cohortId: string): Promise<void> {
  const cohort = await Cohort.findByPk(cohortId, { rejectOnEmpty: true });
  const plan = makePlan(await readPlanSource(deps, cohortId), deps.now());
  await startCohort(deps, await actorOf(deps, by), cohortId, {
    fingerprint: plan.fingerprint,
    revision: cohort.revision,
  });
}

const taskOf = (cohort: string, group: string, visitId: string) =>
  Task.findOne({ where: { groupId: demoId(`group ${cohort} ${group}`), visitId }, rejectOnEmpty: true });

/** Records a whole task as done, as if at its due time. */
async function done(deps: Deps, by: DemoKey, task: Task): Promise<void> {
  const then = at(deps, new Date(task.dueAt.getTime() + 30 * 60_000));
  const row = await taskById(then, task.id);
  await recordRest(then, await actorOf(then, by), task.id, {
    id: demoId(`rest ${task.id}`),
    at: task.dueAt.toISOString(),
    expectedHead: (row?.head ?? 0) - (row?.done ?? 0),
  });
}

/** Heifers at Brindle Gap: devices came out yesterday, AI is tomorrow; a late group of twelve comes out today. */
async function seedBrindleGap(deps: Deps, versions: DemoVersions): Promise<void> {
  const { zone, id: propertyId } = brindleGap;
  const today = localDate(deps.now().getTime(), zone);
  const name = 'Spring heifers';
  const heifers = await seedMob({
    propertyId,
    from: 381,
    count: 168,
    width: 4,
    class: 'heifer',
    breed: 'Shorthorn cross',
    paddock: 'Lane paddock',
    today,
    bornDaysAgo: 480,
    knownEmpty: true,
    eids: '999000',
  });
  await seedMob({
    propertyId,
    from: 601,
    count: 22,
    width: 4,
    class: 'cow',
    breed: 'Shorthorn cross',
    paddock: 'Creek flat',
    today,
    bornDaysAgo: 1900,
    calvedDaysAgo: { from: 40, to: 95 },
    knownEmpty: null,
    eids: '999000',
  });
  await seedMedicines(propertyId, today, true);
  const before = at(deps, new Date(deps.now().getTime() - 12 * day));
  const cohort = await begin(
    before,
    'manager',
    brindleGap,
    name,
    versions.heifers,
    `${addDays(today, -1)}T07:00`,
    'out',
    [
      { name: 'Main mob', class: 'heifer', animalIds: heifers.slice(0, 156) },
      { name: 'Late heifers', class: 'heifer', animalIds: heifers.slice(156), local: nextYarding(deps.now(), zone) },
    ],
  );
  await seedAuthorities({
    propertyId,
    cohortId: cohort,
    class: 'heifer',
    heads: { progesterone: 170, gonadorelin: 170, dinoprost: 170 },
    from: addDays(today, -14),
    to: addDays(today, 21),
    issuedAt: before.now(),
  });
  await start(before, 'manager', cohort);
  await done(deps, 'staff', await taskOf(name, 'Main mob', 'in'));
  await done(deps, 'staff', await taskOf(name, 'Late heifers', 'in'));
  await pullDevices(deps, await taskOf(name, 'Main mob', 'out'), heifers.slice(0, 156));
}

/** A time a little ahead within the yard hours, so that Today has something to begin whenever the demo is opened. */
function nextYarding(now: Date, zone: string): string {
  const local = toLocal(now.getTime(), zone);
  const hour = Number(local.slice(11, 13));
  if (hour < 5) return `${local.slice(0, 10)}T07:00`;
  if (hour <= 16) return `${local.slice(0, 10)}T${String(hour + 1).padStart(2, '0')}:30`;
  return `${addDays(local.slice(0, 10), 1)}T07:00`;
}

/** 153 of 156 devices out, two lost, one animal unaccounted for (tag 0412). */
async function pullDevices(deps: Deps, task: Task, heifers: string[]): Promise<void> {
  const missing = 31;
  const lost = new Set([57, 118]);
  const minute = (i: number) => new Date(task.dueAt.getTime() + i * 90_000);
  const records = heifers.flatMap((animalId, i) =>
    i === missing
      ? []
      : [
          {
            id: demoId(`pull ${animalId}`),
            animalId,
            head: 1,
            outcome: 'done' as const,
            at: minute(i).toISOString(),
            ...(lost.has(i)
              ? { exceptions: [{ stepId: 'deviceOut', outcome: 'lost' as const, reason: 'deviceMissing' as const }] }
              : {}),
          },
        ],
  );
  const then = at(deps, minute(heifers.length + 5));
  await recordWork(then, await actorOf(then, 'staff'), task.id, records);
}

/** The dairy's weekly lists: last week's is at its second GnRH today, this week's begins today. */
async function seedBallywhin(deps: Deps, versions: DemoVersions): Promise<void> {
  const { zone, id: propertyId } = ballywhin;
  const today = localDate(deps.now().getTime(), zone);
  const cows = await seedMob({
    propertyId,
    from: 101,
    count: 92,
    width: 3,
    class: 'dairyCow',
    breed: 'Holstein Friesian',
    paddock: 'Pen 2',
    today,
    bornDaysAgo: 1500,
    calvedDaysAgo: { from: 58, to: 96 },
    knownEmpty: true,
  });
  await seedMedicines(propertyId, today, false);
  const lists = [
    { name: 'Weekly list 1', animals: cows.slice(0, 24), out: -2, ago: 14 },
    { name: 'Weekly list 2', animals: cows.slice(24, 42), out: 7, ago: 3 },
  ];
  for (const list of lists) {
    const before = at(deps, new Date(deps.now().getTime() - list.ago * day));
    const cohort = await begin(
      before,
      'dairy',
      ballywhin,
      list.name,
      versions.dairy,
      `${addDays(today, list.out)}T08:00`,
      'pg',
      [{ name: 'Pen 2', class: 'dairyCow', animalIds: list.animals }],
    );
    const heads = { gonadorelin: list.animals.length, dinoprost: list.animals.length };
    await seedAuthorities({
      propertyId,
      cohortId: cohort,
      class: 'dairyCow',
      heads,
      from: addDays(today, -20),
      to: addDays(today, 30),
      issuedAt: before.now(),
    });
    await start(before, 'dairy', cohort);
  }
  await done(deps, 'dairy', await taskOf('Weekly list 1', 'Pen 2', 'g1'));
  await done(deps, 'dairy', await taskOf('Weekly list 1', 'Pen 2', 'pg'));
}

/** Replacements of the season before, as a head count, all done. */
async function seedLastSeason(deps: Deps, versions: DemoVersions): Promise<void> {
  const { zone, id: propertyId } = heronSlough;
  const past = at(deps, new Date(deps.now().getTime() - 70 * day));
  const lastDay = localDate(past.now().getTime(), zone);
  const last = await begin(
    past,
    'south',
    heronSlough,
    'Autumn replacements',
    versions.heifers,
    `${addDays(lastDay, 3)}T08:00`,
    'in',
    [{ name: 'Replacements', class: 'heifer', head: 31 }],
  );
  await seedAuthorities({
    propertyId,
    cohortId: last,
    class: 'heifer',
    heads: { progesterone: 31, gonadorelin: 31, dinoprost: 31 },
    from: lastDay,
    to: addDays(lastDay, 30),
    issuedAt: past.now(),
  });
  await start(past, 'south', last);
  for (const visit of ['in', 'out', 'ai'])
    await done(deps, 'south', await taskOf('Autumn replacements', 'Replacements', visit));
}

/** Cows with calves at Heron Slough: being planned, the authority two head short; and a mob of the season before. */
async function seedHeronSlough(deps: Deps, versions: DemoVersions): Promise<void> {
  const { zone, id: propertyId } = heronSlough;
  const today = localDate(deps.now().getTime(), zone);
  const cows = await seedMob({
    propertyId,
    from: 1,
    count: 84,
    width: 3,
    class: 'cow',
    breed: 'Brangus cross',
    paddock: 'North marsh',
    today,
    bornDaysAgo: 2000,
    calvedDaysAgo: { from: 44, to: 90 },
    knownEmpty: true,
    eids: '999840',
  });
  await seedMedicines(propertyId, today, false);
  await seedLastSeason(deps, versions);
  const plan = await begin(
    deps,
    'south',
    heronSlough,
    'Cows with calves',
    versions.cows,
    `${addDays(today, 24)}T08:00`,
    null,
    [{ name: 'North marsh', class: 'cow', animalIds: cows }],
  );
  await seedAuthorities({
    propertyId,
    cohortId: plan,
    class: 'cow',
    heads: { progesterone: 84, gonadorelin: 84, dinoprost: 82 },
    from: today,
    to: addDays(today, 60),
    issuedAt: deps.now(),
  });
}

/**
 * Seeds the demonstration around the clock given, once: with any organisation there, nothing is done. Every farm,
 * person and animal is invented. Refuses in production.
 */
export async function seedDemo(deps: Deps): Promise<boolean> {
  if (deps.env.NODE_ENV === 'production') throw new Error('Demo data is never seeded in production.');
  if ((await Organisation.count()) > 0) return false;
  await seedPlaces();
  const versions = await seedProtocols(new Date(deps.now().getTime() - 120 * day));
  await seedBrindleGap(deps, versions);
  await seedBallywhin(deps, versions);
  await seedHeronSlough(deps, versions);
  return true;
}
