import type { NeedCover } from '@/protocols/plan/authorityFindings';
import type { PlannedTask } from '@/shared/contracts/cohorts';
import type { Authority } from '@/shared/contracts/medicines';
import { dayClock } from '@/shared/when';
import type { MadeTask } from '../commands/makePlan';
import type { AuthorityUse } from '../queries/authorityUse';
import { sinceAnchorWords } from './tasks';

export function presentPlanned(task: MadeTask, zone: string): PlannedTask {
  const { visit } = task;
  const iso = (at: number) => new Date(at).toISOString();
  return {
    groupId: task.groupId,
    group: task.group,
    visitId: visit.visit,
    title: task.title,
    occurrence: visit.occurrence,
    yarded: task.yarded,
    dueAt: iso(visit.at),
    windowFrom: iso(visit.window.earliest),
    windowTo: iso(visit.window.latest),
    dueLocal: dayClock(visit.at, zone),
    windowFromLocal: dayClock(visit.window.earliest, zone),
    windowToLocal: dayClock(visit.window.latest, zone),
    sinceAnchor: sinceAnchorWords(Math.round(visit.sinceAnchorMinutes), task.anchorLabel),
    head: task.head,
    steps: task.steps,
  };
}

export const presentNeed = (need: NeedCover) => ({
  active: need.active,
  amount: need.amount,
  unit: need.unit,
  route: need.route,
  head: need.head,
  classes: [need.class],
  firstAt: need.firstAt === null ? null : new Date(need.firstAt).toISOString(),
  lastAt: need.lastAt === null ? null : new Date(need.lastAt).toISOString(),
  covered: need.covered,
});

export const presentAuthority = (authority: AuthorityUse, propertyId: string): Authority => ({
  id: authority.id,
  propertyId,
  cohortId: authority.cohortId,
  active: authority.active,
  productId: authority.productId,
  product: authority.product,
  amount: authority.amount,
  unit: authority.unit,
  route: authority.route,
  classes: authority.classes,
  head: authority.head,
  used: authority.used,
  validFrom: authority.validFrom,
  validTo: authority.validTo,
  meatDays: authority.meatDays,
  milkHours: authority.milkHours,
  directions: authority.directions,
  issuedBy: authority.issuedByName,
  issuedAt: authority.issuedAt.toISOString(),
  withdrawnAt: authority.withdrawnAt?.toISOString() ?? null,
});
