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
 * Head is the number of animals: a permission covers every dose of its active and amount to them.
 */
export function authorityCover(
  body: ProtocolBody,
  groups: readonly { class: AnimalClass; head: number }[],
  visits: readonly PlannedVisit[],
  permissions: readonly Permission[],
  zone: Zone,
  options?: Readonly<Record<string, string>>,
): NeedCover[] {
  return requirements(body, groups, options)
    .filter((need) => !free.includes(need.active))
    .map((need) => {
      const head = groups.filter((g) => g.class === need.class).reduce((sum, g) => sum + g.head, 0);
      const moments = visits.filter((v) => v.steps.some((step) => need.steps.includes(step))).map((v) => v.at);
      const [firstAt, lastAt] = moments.length > 0 ? [Math.min(...moments), Math.max(...moments)] : [null, null];
      const fitting = permissions.filter(
        (p) =>
          p.active === need.active &&
          p.classes.includes(need.class) &&
          p.unit === need.unit &&
          (need.amount === null || p.amount >= need.amount) &&
          inForce(p, firstAt, lastAt, zone),
      );
      return {
        ...need,
        head,
        covered: Math.min(
          head,
          fitting.reduce((sum, p) => sum + p.headLeft, 0),
        ),
        firstAt,
        lastAt,
      };
    });
}

const inForce = (p: Permission, first: Instant | null, last: Instant | null, zone: Zone): boolean =>
  (first === null || p.validFrom <= localDate(first, zone)) && (last === null || p.validTo >= localDate(last, zone));

/** A cohort cannot start without permissions that cover it: each need that is not covered is a stop that says why. */
export function authorityFindings(
  cover: readonly NeedCover[],
  permissions: readonly Permission[],
  zone: Zone,
): Finding[] {
  return cover
    .filter((need) => need.covered < need.head)
    .map((need): Finding => {
      const same = permissions.filter((p) => p.active === need.active);
      const classed = same.filter((p) => p.classes.includes(need.class));
      const current = classed.filter((p) => inForce(p, need.firstAt, need.lastAt, zone));
      const params: Finding['params'] = {
        active: need.active,
        class: need.class,
        head: need.head,
        covered: need.covered,
        short: need.head - need.covered,
        ...(need.amount === null ? {} : { amount: need.amount, unit: need.unit }),
        ...(need.firstAt === null ? {} : { firstAt: need.firstAt }),
        ...(need.lastAt === null ? {} : { lastAt: need.lastAt }),
      };
      const finding = (code: Finding['code'], more: Finding['params'] = {}): Finding => ({
        code,
        severity: 'stop',
        steps: need.steps,
        params: { ...params, ...more },
      });
      if (same.length === 0) return finding('authorityMissing');
      if (classed.length === 0) return finding('authorityWrongClass', { classes: same.flatMap((p) => [...p.classes]) });
      if (current.length === 0)
        return finding('authorityExpired', {
          validTo:
            classed
              .map((p) => p.validTo)
              .sort()
              .at(-1) ?? '',
        });
      if (need.covered === 0 && current.every((p) => need.amount !== null && p.amount < need.amount))
        return finding('authorityWrongActive', { authorised: current[0]?.amount ?? 0 });
      return finding('authorityShort');
    });
}
