import type { Transaction } from 'sequelize';

import type { AnimalClass, LocalDate, ProtocolBody } from '@/protocols/types';
import type { Deps } from '../deps';
import { failure } from '../http/errors';
import { holidaysOf, type Holiday } from '../holidays';
import { authoritiesOf, type AuthorityUse } from './authorityUse';
import { rows } from './rows';

export interface SourceCohort {
  id: string;
  propertyId: string;
  property: string;
  name: string;
  state: 'planning' | 'running' | 'finished' | 'cancelled';
  versionId: string | null;
  versionState: string | null;
  body: ProtocolBody | null;
  options: Record<string, string>;
  anchorVisit: string | null;
  anchorLocal: string | null;
  zone: string;
  revision: number;
  country: string;
  region: string | null;
  yardFrom: string | null;
  yardTo: string | null;
  milkings: string[];
  weekendDays: number[];
}

export interface SourceAnimal {
  id: string;
  groupId: string;
  tag: string;
  class: AnimalClass;
  birth: LocalDate | null;
  lastCalving: LocalDate | null;
  lastService: LocalDate | null;
  knownEmpty: boolean | null;
  otherCohort: string | null;
}

export interface SourceGroup {
  id: string;
  name: string;
  class: AnimalClass;
  headOnly: number | null;
  anchorLocal: string | null;
  animals: SourceAnimal[];
}

/** Everything that a plan is made of. */
export interface PlanSource {
  cohort: SourceCohort;
  groups: SourceGroup[];
  authorities: AuthorityUse[];
  holidays: Holiday[];
  /** Yarded tasks of other cohorts at the property. */
  others: { cohort: string; title: string; dueAt: Date }[];
}

const cohortSql = `
  select c.id, c.property_id as "propertyId", p.name as property, c.name, c.state, c.protocol_version_id as "versionId",
    v.state as "versionState", v.body, c.options, c.anchor_visit as "anchorVisit", c.anchor_local as "anchorLocal", c.zone,
    c.revision, p.country, p.region, p.yard_from as "yardFrom", p.yard_to as "yardTo", p.milkings,
    p.weekend_days as "weekendDays"
  from cohorts c join properties p on p.id = c.property_id
  left join protocol_versions v on v.id = c.protocol_version_id
  where c.id = $1`;

const groupSql = `
  select id, name, class, head_only as "headOnly", anchor_local as "anchorLocal" from groups where cohort_id = $1 order by position, id`;

const animalSql = `
  select a.id, e.group_id as "groupId", a.tag, a.class, a.birth, a.last_calving as "lastCalving",
    a.last_service as "lastService", a.known_empty as "knownEmpty",
    (select c2.name from enrolments e2 join groups g2 on g2.id = e2.group_id join cohorts c2 on c2.id = g2.cohort_id
      where e2.animal_id = a.id and e2.left_at is null and c2.id <> $1 and c2.state in ('planning', 'running')
      order by c2.state desc, c2.name limit 1) as "otherCohort"
  from enrolments e join groups g on g.id = e.group_id join animals a on a.id = e.animal_id
  where g.cohort_id = $1 and e.left_at is null order by a.tag`;

const othersSql = `
  select c.name as cohort, t.title, t.due_at as "dueAt" from tasks t join cohorts c on c.id = t.cohort_id
  where t.property_id = $1 and t.cohort_id <> $2 and t.yarded and t.state in ('planned', 'inWork') and c.state = 'running'`;

/** Reads all of it, in the transaction when one is given. */
export async function readPlanSource(deps: Deps, cohortId: string, tx?: Transaction): Promise<PlanSource> {
  const [cohort] = await rows<SourceCohort>(deps, cohortSql, [cohortId], tx);
  if (!cohort) throw failure('notFound', 'server.notFound');
  const groups = await rows<Omit<SourceGroup, 'animals'>>(deps, groupSql, [cohortId], tx);
  const animals = await rows<SourceAnimal>(deps, animalSql, [cohortId], tx);
  const year = Number((cohort.anchorLocal ?? deps.now().toISOString()).slice(0, 4));
  return {
    cohort,
    groups: groups.map((group) => ({ ...group, animals: animals.filter((animal) => animal.groupId === group.id) })),
    authorities: await authoritiesOf(deps, cohort.propertyId, cohortId, tx),
    holidays: await holidaysOf(cohort.country, cohort.region, [year - 1, year, year + 1]),
    others: await rows(deps, othersSql, [cohort.propertyId, cohortId], tx),
  };
}

export const headOf = (group: SourceGroup): number => group.headOnly ?? group.animals.length;
