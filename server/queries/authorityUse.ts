import type { Transaction } from 'sequelize';

import type { Permission } from '@/protocols/plan/authorityFindings';
import type { Active, AdministrationRoute, AnimalClass, DoseUnit } from '@/protocols/types';
import type { Deps } from '../deps';
import { rows } from './rows';

/** An authority with the head already treated under it. */
export interface AuthorityUse {
  id: string;
  cohortId: string | null;
  active: Active;
  productId: string | null;
  product: string | null;
  strength: number | null;
  per: string | null;
  amount: number;
  unit: DoseUnit;
  route: AdministrationRoute;
  classes: AnimalClass[];
  head: number;
  used: number;
  /** The part of `used` that belongs to other cohorts: what a cohort used itself still covers it. */
  usedElsewhere: number;
  validFrom: string;
  validTo: string;
  meatDays: number | null;
  milkHours: number | null;
  directions: string;
  issuedBy: string;
  issuedByName: string;
  issuedAt: Date;
  withdrawnAt: Date | null;
}

/**
 * Head is animals, not doses: an animal that gets the same medicine twice counts once. A group without ids counts
 * the most head that any one act of its tasks recorded. Read from the property's tasks, so that other properties'
 * records are never touched.
 */
const usedSql = `
  with given as (
    select s.authority_id, t.cohort_id, t.group_id, r.task_id, s.step_id, s.item, r.animal_id, r.head
    from tasks t join records r on r.task_id = t.id join record_steps s on s.record_id = r.id
    where t.property_id = $1 and s.authority_id is not null and s.outcome = 'done'
      and not exists (select 1 from records u where u.corrects_id = r.id)
  )
  select authority_id, sum(head)::int as used, sum(elsewhere)::int as elsewhere from (
    select authority_id, count(distinct animal_id) as head,
      count(distinct animal_id) filter (where cohort_id is distinct from $2::uuid) as elsewhere
    from given where animal_id is not null group by authority_id
    union all
    select authority_id, max(head), coalesce(max(head) filter (where cohort_id is distinct from $2::uuid), 0) from (
      select authority_id, cohort_id, group_id, sum(head) as head from given where animal_id is null
      group by authority_id, cohort_id, group_id, task_id, step_id, item) by_act
    group by authority_id, group_id
  ) counted group by authority_id`;

const sql = `
  select a.id, a.cohort_id as "cohortId", a.active, a.product_id as "productId", p.name as product, p.strength, p.per,
    a.amount, a.unit, a.route, a.classes, a.head, coalesce(u.used, 0) as used,
    coalesce(u.elsewhere, 0) as "usedElsewhere", a.valid_from as "validFrom",
    a.valid_to as "validTo", a.meat_days as "meatDays", a.milk_hours as "milkHours", a.directions,
    a.issued_by as "issuedBy", w.name as "issuedByName", a.issued_at as "issuedAt", a.withdrawn_at as "withdrawnAt"
  from authorities a
  join users w on w.id = a.issued_by
  left join products p on p.id = a.product_id
  left join (${usedSql}) u on u.authority_id = a.id
  where a.property_id = $1 and ($2::uuid is null or a.cohort_id = $2 or a.cohort_id is null)
  order by a.issued_at, a.id`;

/** Authorities that a cohort may use: its own, and those for the whole property. Without a cohort: all of the property. */
export const authoritiesOf = (deps: Deps, propertyId: string, cohortId: string | null, tx?: Transaction) =>
  rows<AuthorityUse>(deps, sql, [propertyId, cohortId], tx);

/** What an authority permits a cohort, for the core: its head less what others used. Withdrawn ones permit nothing. */
export const permissionsOf = (authorities: readonly AuthorityUse[]): Permission[] =>
  authorities
    .filter((authority) => authority.withdrawnAt === null)
    .map((a) => ({
      active: a.active,
      amount: a.amount,
      unit: a.unit,
      classes: a.classes,
      headLeft: a.head - a.usedElsewhere,
      validFrom: a.validFrom,
      validTo: a.validTo,
    }));
