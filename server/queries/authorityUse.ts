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
 * the most head that any one of its tasks recorded.
 */
const usedSql = `
  select authority_id, (count(distinct animal_id) + coalesce(max(by_task) filter (where animal_id is null), 0))::int as used
  from (
    select s.authority_id, r.animal_id,
      case when r.animal_id is null then sum(r.head) over (partition by s.authority_id, r.task_id, s.step_id, s.item, (r.animal_id is null)) end as by_task
    from record_steps s join records r on r.id = s.record_id
    where s.authority_id is not null and s.outcome = 'done'
      and not exists (select 1 from records u where u.corrects_id = r.id)
      and s.authority_id in (select id from authorities where property_id = $1)
  ) used group by authority_id`;

const sql = `
  select a.id, a.cohort_id as "cohortId", a.active, a.product_id as "productId", p.name as product, p.strength, p.per,
    a.amount, a.unit, a.route, a.classes, a.head, coalesce(u.used, 0) as used, a.valid_from as "validFrom",
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

/** What an authority still permits, for the core. Withdrawn ones permit nothing. */
export const permissionsOf = (authorities: readonly AuthorityUse[]): Permission[] =>
  authorities
    .filter((authority) => authority.withdrawnAt === null)
    .map((a) => ({
      active: a.active,
      amount: a.amount,
      unit: a.unit,
      classes: a.classes,
      headLeft: a.head - a.used,
      validFrom: a.validFrom,
      validTo: a.validTo,
    }));
