import { createHash } from 'node:crypto';

import { authorityCover, authorityFindings, type NeedCover } from '@/protocols/plan/authorityFindings';
import { calendarFindings } from '@/protocols/plan/calendarFindings';
import { eligibility } from '@/protocols/plan/eligibility';
import { expand, visitOfStep } from '@/protocols/plan/expand';
import { clockOf, localDate, toInstant } from '@/protocols/time/zoned';
import type { Finding, PlannedVisit, ProtocolBody } from '@/protocols/types';
import { permissionsOf } from '../queries/authorityUse';
import { headOf, type PlanSource, type SourceGroup } from '../queries/planSource';
import { chosenOptions, taskWords, type TaskWords } from './planTasks';

export interface MadeTask extends TaskWords {
  groupId: string;
  group: string;
  head: number;
  visit: PlannedVisit;
}

export interface MadePlan {
  tasks: MadeTask[];
  findings: Finding[];
  needs: NeedCover[];
  fingerprint: string;
  canStart: boolean;
}

const nothing = (findings: Finding[]): MadePlan => ({
  tasks: [],
  findings,
  needs: [],
  fingerprint: '',
  canStart: false,
});

/** The visit that a cohort's anchor fixes: the one named, else that of the service. */
export const anchorVisitOf = (body: ProtocolBody, anchorVisit: string | null): string | undefined =>
  anchorVisit ?? visitOfStep(body, body.serviceStep);

/**
 * Makes the plan of a cohort from all that it depends on: tasks group by group, findings, what must be authorised.
 * Pure but for `now`. Without protocol, time or animals there is no plan and it cannot start.
 */
export function makePlan(source: PlanSource, now: Date): MadePlan {
  const { cohort } = source;
  const groups = source.groups.filter((group) => headOf(group) > 0);
  const body = cohort.body;
  const visit = body ? anchorVisitOf(body, cohort.anchorVisit) : undefined;
  if (!body || !visit || !cohort.anchorLocal || groups.length === 0) return nothing([]);
  const options = chosenOptions(body, cohort.options);
  const made = groups.map((group) => planGroup(source, body, options, visit, group));
  const visits = made.flatMap((m) => m.visits);
  const heads = groups.map((group) => ({ class: group.class, head: headOf(group) }));
  const permissions = permissionsOf(source.authorities);
  const needs = authorityCover(body, heads, visits, permissions, cohort.zone, options);
  const findings = merged([
    ...made.flatMap((m) => m.findings),
    ...made.flatMap((m) => calendarOf(source, body, m.visits, now)),
    ...groups.flatMap((group, i) => animalsOf(body, group, made[i]?.visits ?? [], cohort.zone)),
    ...clashes(source, body, visits),
    ...authorityFindings(needs, permissions, cohort.zone),
    ...(cohort.versionState === 'retired' ? [finding('protocolRetired', 'stop')] : []),
  ]);
  const tasks = made.flatMap((m) => m.tasks);
  return {
    tasks,
    findings,
    needs,
    fingerprint: fingerprint(source, tasks, findings),
    canStart: !findings.some((f) => f.severity === 'stop'),
  };
}

const finding = (code: Finding['code'], severity: Finding['severity'], params: Finding['params'] = {}): Finding => ({
  code,
  severity,
  steps: [],
  params,
});

function planGroup(
  source: PlanSource,
  body: ProtocolBody,
  options: Record<string, string>,
  visit: string,
  group: SourceGroup,
) {
  const { cohort } = source;
  const local = group.anchorLocal ?? cohort.anchorLocal ?? '';
  const reading = toInstant(local, cohort.zone);
  const plan = expand(body, {
    fix: { visit, at: reading.at },
    zone: cohort.zone,
    options,
    ...(cohort.milkings.length > 0 ? { milkings: cohort.milkings } : {}),
  });
  const head = headOf(group);
  const repeats = new Map<string, number>();
  for (const v of plan.visits) repeats.set(v.visit, Math.max(repeats.get(v.visit) ?? 1, v.occurrence));
  const tasks = plan.visits.map((v): MadeTask => ({
    groupId: group.id,
    group: group.name,
    head,
    visit: v,
    ...taskWords(body, v, repeats.get(v.visit) ?? 1, { class: group.class, head }, options, source.authorities),
  }));
  const skipped =
    reading.kind === 'skipped' ? [finding('clockTimeSkipped', 'stop', { visit, local, dueAt: reading.at })] : [];
  const countOnly = group.headOnly === null ? [] : [finding('headCountOnly', 'note', { group: group.name, head })];
  return {
    visits: plan.visits,
    tasks: tasks.filter((task) => task.steps.length > 0),
    findings: [...plan.findings, ...skipped, ...countOnly],
  };
}

function calendarOf(source: PlanSource, body: ProtocolBody, visits: PlannedVisit[], now: Date): Finding[] {
  const { cohort } = source;
  const yarded = new Set(body.visits.filter((visit) => visit.yarded).map((visit) => visit.id));
  return calendarFindings(visits, yarded, {
    zone: cohort.zone,
    weekendDays: cohort.weekendDays,
    holidays: source.holidays,
    ...(cohort.yardFrom && cohort.yardTo ? { yardHours: { from: cohort.yardFrom, to: cohort.yardTo } } : {}),
    now: now.getTime(),
  });
}

function animalsOf(body: ProtocolBody, group: SourceGroup, visits: PlannedVisit[], zone: string): Finding[] {
  if (group.headOnly === null) return eligibility(body, visits, group.animals, zone);
  return body.classes.includes(group.class)
    ? []
    : [finding('wrongClass', 'warn', { count: group.headOnly, tags: [], classes: body.classes })];
}

/** Forenoon or afternoon of a local day: two yardings in the same one want the same yards. */
const halfDay = (at: number, zone: string): string =>
  `${localDate(at, zone)} ${clockOf(at, zone) < '12:00' ? 'forenoon' : 'afternoon'}`;

/** Other cohorts in the yards on the same half of a day. */
function clashes(source: PlanSource, body: ProtocolBody, visits: PlannedVisit[]): Finding[] {
  const { zone } = source.cohort;
  const yarded = new Set(body.visits.filter((visit) => visit.yarded).map((visit) => visit.id));
  return visits
    .filter((visit) => yarded.has(visit.visit))
    .flatMap((visit) =>
      source.others
        .filter((other) => halfDay(other.dueAt.getTime(), zone) === halfDay(visit.at, zone))
        .map((other) => ({
          ...finding('clash', 'warn', {
            visit: visit.visit,
            dueAt: visit.at,
            cohort: other.cohort,
            title: other.title,
            otherAt: other.dueAt.getTime(),
          }),
          visits: [visit.visit],
        })),
    );
}

/** The same finding of several groups at the same moment is said once. */
function merged(findings: readonly Finding[]): Finding[] {
  const seen = new Map(findings.map((f) => [JSON.stringify([f.code, f.visits, f.steps, f.params]), f]));
  return [...seen.values()];
}

/** Hash of what was looked at: when anything that the plan depends on has changed, it is another. */
function fingerprint(source: PlanSource, tasks: readonly MadeTask[], findings: readonly Finding[]): string {
  const animals = source.groups.map((group) => [group.id, group.headOnly, group.animals.map((animal) => animal.id)]);
  const what = [source.cohort.versionId, source.cohort.options, animals, tasks, findings];
  return createHash('sha256').update(JSON.stringify(what)).digest('hex');
}
