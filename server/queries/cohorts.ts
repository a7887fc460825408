import type { AnimalClass, Finding, ProtocolBody } from '@/protocols/types';
import { abilitiesOf } from '@/shared/abilities';
import type { CohortDetail, CohortSummary, PlanPreview } from '@/shared/contracts/cohorts';
import type { Output } from '@/shared/routes';
import { dayClock } from '@/shared/when';
import { anchorVisitOf, makePlan, type MadePlan } from '../commands/makePlan';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import type { Actor } from '../policies/actor';
import { propertiesWith } from '../policies/authorise';
import { presentFindings } from '../presenters/findings';
import { presentAuthority, presentNeed, presentPlanned } from '../presenters/plans';
import { presentTask } from '../presenters/tasks';
import { headOf, readPlanSource, type PlanSource } from './planSource';
import { rows } from './rows';
import { tasksWhere } from './tasks';

interface SummaryRow {
  id: string;
  propertyId: string;
  property: string;
  locale: string;
  zone: string;
  name: string;
  state: CohortSummary['state'];
  protocolName: string | null;
  protocolVersion: number | null;
  head: number;
  groups: number;
  nextId: string | null;
  nextTitle: string | null;
  nextGroup: string | null;
  nextDue: Date | null;
  serviceAt: Date | null;
  overdue: number;
  findings: Finding[];
  revision: number;
  protocolVersionId: string | null;
  options: Record<string, string>;
  anchorVisit: string | null;
  anchorLocal: string | null;
  startedBy: string | null;
  startedAt: Date | null;
  sortKey: Date;
}

/** Cohorts with work come first, by their next task; then those being planned; then what is over, newest first. */
const sql = `
  select c.id, c.property_id as "propertyId", p.name as property, p.locale, c.zone, c.name, c.state,
    pr.name as "protocolName", v.number as "protocolVersion", coalesce(h.head, 0)::int as head,
    coalesce(h.groups, 0)::int as groups, n.id as "nextId", n.title as "nextTitle", n."group" as "nextGroup",
    n.due_at as "nextDue", s.at as "serviceAt", coalesce(o.overdue, 0)::int as overdue, c.findings, c.revision,
    c.protocol_version_id as "protocolVersionId", c.options, c.anchor_visit as "anchorVisit",
    c.anchor_local as "anchorLocal", u.name as "startedBy", c.started_at as "startedAt",
    case c.state when 'running' then coalesce(n.due_at, c.created_at) when 'planning' then c.created_at + interval '100 years'
      else c.created_at + interval '200 years' end as "sortKey"
  from cohorts c
  join properties p on p.id = c.property_id
  left join protocol_versions v on v.id = c.protocol_version_id
  left join protocols pr on pr.id = v.protocol_id
  left join users u on u.id = c.started_by
  left join lateral (
    select count(*) as groups, sum(coalesce(g.head_only, (select count(*) from enrolments e where e.group_id = g.id))) as head
    from groups g where g.cohort_id = c.id) h on true
  left join lateral (
    select t.id, t.title, t.due_at, g.name as "group" from tasks t join groups g on g.id = t.group_id
    where t.cohort_id = c.id and t.state in ('planned', 'inWork') order by t.due_at limit 1) n on true
  left join lateral (
    select min(t.due_at) as at from tasks t where t.cohort_id = c.id and t.state <> 'cancelled'
      and t.steps @> '[{"kind":"fixedTimeService"}]') s on true
  left join lateral (
    select count(*) as overdue from tasks t where t.cohort_id = c.id and t.state in ('planned', 'inWork')
      and t.window_to < $1) o on true`;

const count = (findings: readonly Finding[], severity: Finding['severity']) =>
  findings.filter((f) => f.severity === severity).length;

function summary(row: SummaryRow): CohortSummary {
  const local = (at: Date) => dayClock(at.getTime(), row.zone, row.locale);
  return {
    id: row.id,
    propertyId: row.propertyId,
    property: row.property,
    zone: row.zone,
    name: row.name,
    state: row.state,
    protocolName: row.protocolName,
    protocolVersion: row.protocolVersion,
    head: row.head,
    groups: row.groups,
    next:
      row.nextId && row.nextDue && row.state === 'running'
        ? {
            taskId: row.nextId,
            title: row.nextTitle ?? '',
            group: row.nextGroup ?? '',
            dueAt: row.nextDue.toISOString(),
            dueLocal: local(row.nextDue),
          }
        : null,
    serviceAt: row.serviceAt?.toISOString() ?? null,
    serviceLocal: row.serviceAt ? local(row.serviceAt) : null,
    overdue: row.state === 'running' ? row.overdue : 0,
    findings: {
      stop: count(row.findings, 'stop'),
      warn: count(row.findings, 'warn'),
      note: count(row.findings, 'note'),
    },
  };
}

const encode = (row: SummaryRow) => Buffer.from(`${row.sortKey.toISOString()}|${row.id}`).toString('base64url');
function decode(after: string): [string, string] {
  const [at = '', id = ''] = Buffer.from(after, 'base64url').toString().split('|');
  if (Number.isNaN(Date.parse(at)) || !/^[0-9a-f-]{36}$/.test(id)) throw failure('invalid', 'server.invalid');
  return [at, id];
}

/** A cohort that is being planned has its findings from the plan as it would be made now: nothing of it is written. */
async function withPlan(deps: Deps, row: SummaryRow): Promise<CohortSummary> {
  if (row.state !== 'planning') return summary(row);
  const { findings } = makePlan(await readPlanSource(deps, row.id), deps.now());
  return summary({ ...row, findings });
}

/** Cohorts of every property where the person may see them. */
export async function listCohorts(
  deps: Deps,
  actor: Actor,
  query: { propertyId?: string | undefined; state?: string | undefined; after?: string | undefined; limit: number },
): Promise<Output<'GET /api/cohorts'>> {
  const ids = propertiesWith(actor, 'cohort.read').filter((id) => !query.propertyId || id === query.propertyId);
  const [at, id] = query.after ? decode(query.after) : [null, null];
  const found = await rows<SummaryRow>(
    deps,
    `select * from (${sql}) listed where "propertyId" = any($2) and ($3::text is null or state = $3)
      and ($4::timestamptz is null or ("sortKey", id) > ($4, $5::uuid)) order by "sortKey", id limit $6`,
    [deps.now(), ids, query.state ?? null, at, id, query.limit + 1],
  );
  const page = found.slice(0, query.limit);
  const last = page.at(-1);
  return {
    items: await Promise.all(page.map((row) => withPlan(deps, row))),
    next: found.length > query.limit && last ? encode(last) : null,
  };
}

/** A plan as it travels, with words. */
export function presentPlan(source: PlanSource, plan: MadePlan): PlanPreview {
  const { cohort } = source;
  return {
    tasks: plan.tasks.map((task) => presentPlanned(task, cohort.zone)),
    findings: presentFindings(plan.findings, { zone: cohort.zone, body: cohort.body }),
    fingerprint: plan.fingerprint,
    canStart: plan.canStart,
    needs: plan.needs.map(presentNeed),
  };
}

export async function previewPlan(deps: Deps, cohortId: string): Promise<PlanPreview> {
  const source = await readPlanSource(deps, cohortId);
  return presentPlan(source, makePlan(source, deps.now()));
}

/** The wall-clock time of a group's service, from its tasks. */
function serviceOf(body: ProtocolBody | null, tasks: CohortDetail['tasks'], groupId: string): string | null {
  const visit = body ? anchorVisitOf(body, null) : undefined;
  return tasks.find((task) => task.groupId === groupId && task.visitId === visit)?.dueLocal ?? null;
}

/** A cohort with its groups, tasks, findings and authorities. */
export async function readCohort(deps: Deps, actor: Actor, cohortId: string): Promise<CohortDetail> {
  const [found, source, tasks] = await Promise.all([
    rows<SummaryRow>(deps, `${sql} where c.id = $2`, [deps.now(), cohortId]),
    readPlanSource(deps, cohortId),
    tasksWhere(deps, 't.cohort_id = $1', [cohortId]),
  ]);
  const row = found[0];
  if (!row) throw failure('notFound', 'server.notFound');
  const presented = tasks.map(presentTask);
  const plan = row.state === 'planning' ? makePlan(source, deps.now()) : null;
  const findings = plan ? plan.findings : row.findings;
  const needs = (plan ?? makePlan(source, deps.now())).needs;
  return {
    ...summary({ ...row, findings }),
    revision: row.revision,
    protocolVersionId: row.protocolVersionId,
    options: row.options,
    anchor: row.anchorLocal ? { visit: row.anchorVisit, local: row.anchorLocal } : null,
    groupList: source.groups.map((group) => ({
      id: group.id,
      name: group.name,
      class: group.class as AnimalClass,
      head: headOf(group),
      headOnly: group.headOnly !== null,
      serviceLocal: serviceOf(source.cohort.body, presented, group.id),
      animalIds: group.animals.map((animal) => animal.id),
      local: group.anchorLocal,
    })),
    tasks: presented,
    planFindings: presentFindings(findings, { zone: row.zone, body: source.cohort.body }),
    authorities: source.authorities.map((authority) => presentAuthority(authority, row.propertyId)),
    needs: needs.map(presentNeed),
    abilities: abilitiesOf(actor.properties.get(row.propertyId)?.roles ?? []),
    startedBy: row.startedBy,
    startedAt: row.startedAt?.toISOString() ?? null,
  };
}

interface AuditRow {
  id: string;
  at: Date;
  by: string | null;
  action: string;
  summary: string;
}

/** Changes of plan, newest first. */
export async function readAudit(
  deps: Deps,
  cohortId: string,
  query: { after?: string | undefined; limit: number },
): Promise<Output<'GET /api/cohorts/:cohortId/audit'>> {
  const [at, id] = query.after ? decode(query.after) : [null, null];
  const found = await rows<AuditRow>(
    deps,
    `select a.id, a.at, u.name as by, a.action, a.summary from audit_entries a left join users u on u.id = a.user_id
      where a.cohort_id = $1 and ($2::timestamptz is null or (a.at, a.id) < ($2, $3::uuid))
      order by a.at desc, a.id desc limit $4`,
    [cohortId, at, id, query.limit + 1],
  );
  const page = found.slice(0, query.limit);
  const last = page.at(-1);
  return {
    items: page.map((row) => ({ ...row, by: row.by ?? '', at: row.at.toISOString() })),
    next:
      found.length > query.limit && last
        ? Buffer.from(`${last.at.toISOString()}|${last.id}`).toString('base64url')
        : null,
  };
}
