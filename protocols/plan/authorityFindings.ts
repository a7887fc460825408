import type {
  Active,
  AnimalClass,
  DoseUnit,
  Finding,
  Instant,
  LocalDate,
  PlannedVisit,
  ProtocolBody,
  Zone,
} from '../types';
import { localDate } from '../time/zoned';
import { allocate } from './allocate';
import { requirements, type Need } from './doses';

/** A vet's written direction in force, as far as the plan needs it. */
export interface Permission {
  active: Active;
  amount: number;
  unit: DoseUnit;
  classes: readonly AnimalClass[];
  /** Head that it still covers. */
  headLeft: number;
  validFrom: LocalDate;
  validTo: LocalDate;
}

/** Actives that need no written direction: an aid is stuck on, nothing is given. */
const free: readonly Active[] = ['heatAid'];

export interface NeedCover extends Need {
  head: number;
  covered: number;
  firstAt: Instant | null;
  lastAt: Instant | null;
}

/**
 * What must be authorised, and how many head the permissions in force cover on every day it is given.
 * Head is the number of animals: a permission covers every dose of its active and amount to them. A permission that
 * several classes may use is shared among them, each head once, so that as many as possible are covered.
 */
export function authorityCover(
  body: ProtocolBody,
  groups: readonly { class: AnimalClass; head: number }[],
  visits: readonly PlannedVisit[],
  permissions: readonly Permission[],
  zone: Zone,
  options?: Readonly<Record<string, string>>,
): NeedCover[] {
  const needs = requirements(body, groups, options)
    .filter((need) => !free.includes(need.active))
    .map((need): NeedCover => {
      const head = groups.filter((g) => g.class === need.class).reduce((sum, g) => sum + g.head, 0);
      const moments = visits.filter((v) => v.steps.some((step) => need.steps.includes(step))).map((v) => v.at);
      const [firstAt, lastAt] = moments.length > 0 ? [Math.min(...moments), Math.max(...moments)] : [null, null];
      return { ...need, head, covered: 0, firstAt, lastAt };
    });
  for (const contest of contests(needs)) {
    const covered = allocate(
      contest.map((need) => ({ amount: need.head, supplies: fitting(need, permissions, zone) })),
      permissions.map((permission) => permission.headLeft),
    );
    contest.forEach((need, i) => (need.covered = covered[i] ?? 0));
  }
  return needs;
}

/**
 * Needs that share permissions: those of one active, of different classes. Two amounts of one active for one class go
 * to the same animals, which count once, so they are not in the same contest.
 */
function contests(needs: readonly NeedCover[]): NeedCover[][] {
  const lists = new Map<string, NeedCover[]>();
  for (const need of needs) {
    let nth = 0;
    while (lists.get(`${need.active}|${nth}`)?.some((other) => other.class === need.class)) nth += 1;
    const key = `${need.active}|${nth}`;
    lists.set(key, [...(lists.get(key) ?? []), need]);
  }
  return [...lists.values()];
}

/** Whether a permission allows what is needed in one dose, the day aside. */
const allows = (p: Permission, need: NeedCover): boolean =>
  p.unit === need.unit && (need.amount === null || p.amount >= need.amount);

/** Permissions (by position) that cover a need. */
const fitting = (need: NeedCover, permissions: readonly Permission[], zone: Zone): number[] =>
  permissions.flatMap((p, i) =>
    p.active === need.active &&
    p.classes.includes(need.class) &&
    allows(p, need) &&
    inForce(p, need.firstAt, need.lastAt, zone)
      ? [i]
      : [],
  );

const inForce = (p: Permission, first: Instant | null, last: Instant | null, zone: Zone): boolean =>
  (first === null || p.validFrom <= localDate(first, zone)) && (last === null || p.validTo >= localDate(last, zone));

/** A cohort cannot start without permissions that cover it: each need that is not covered is a stop that says why. */
export const authorityFindings = (
  cover: readonly NeedCover[],
  permissions: readonly Permission[],
  zone: Zone,
): Finding[] =>
  cover
    .filter((need) => need.covered < need.head)
    .map((need): Finding => {
      const [code, why] = reason(need, permissions, zone);
      return {
        code,
        severity: 'stop',
        steps: need.steps,
        params: {
          active: need.active,
          class: need.class,
          head: need.head,
          covered: need.covered,
          short: need.head - need.covered,
          ...(need.amount === null ? {} : { amount: need.amount, unit: need.unit }),
          ...(need.firstAt === null ? {} : { firstAt: need.firstAt }),
          ...(need.lastAt === null ? {} : { lastAt: need.lastAt }),
          ...why,
        },
      };
    });

/** The first of the conditions that no permission meets: active, class, days, amount; else there are too few head. */
function reason(need: NeedCover, permissions: readonly Permission[], zone: Zone): [Finding['code'], Finding['params']] {
  const same = permissions.filter((p) => p.active === need.active);
  if (same.length === 0) return ['authorityMissing', {}];
  const classed = same.filter((p) => p.classes.includes(need.class));
  if (classed.length === 0) return ['authorityWrongClass', { classes: [...new Set(same.flatMap((p) => p.classes))] }];
  const current = classed.filter((p) => inForce(p, need.firstAt, need.lastAt, zone));
  const latest = [...classed].sort((a, b) => (a.validTo < b.validTo ? 1 : -1))[0];
  if (current.length === 0)
    return ['authorityExpired', { validFrom: latest?.validFrom ?? '', validTo: latest?.validTo ?? '' }];
  const [first] = current;
  if (first && !current.some((p) => allows(p, need)))
    return ['authorityWrongActive', { authorised: first.amount, authorisedUnit: first.unit }];
  return ['authorityShort', {}];
}
