import type { CohortPatch } from '@/hooks/useCohorts';
import type { AnimalClass } from '@/protocols/types';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import { newId } from '@/lib/ids';
import { t } from '@/shared/messages';

/** What is typed into the planner, as it is typed. */
export interface GroupForm {
  id: string;
  name: string;
  class: AnimalClass;
  by: 'count' | 'tags';
  /** As typed. */
  head: string;
  animalIds: string[];
  /** Own time of the group, `YYYY-MM-DDTHH:MM`; empty: the cohort's. */
  local: string;
}
export interface PlanForm {
  name: string;
  protocolVersionId: string;
  options: Record<string, string>;
  fixed: 'service' | 'start';
  local: string;
  groups: GroupForm[];
}

export const newGroup = (n: number, animalClass: AnimalClass): GroupForm => ({
  id: newId(),
  name: t('planner.groupN', { n }),
  class: animalClass,
  by: 'count',
  head: '',
  animalIds: [],
  local: '',
});

export const formOf = (cohort: CohortDetail): PlanForm => ({
  name: cohort.name,
  protocolVersionId: cohort.protocolVersionId ?? '',
  options: cohort.options,
  fixed: cohort.anchor && cohort.anchor.visit !== null ? 'start' : 'service',
  local: cohort.anchor?.local ?? '',
  groups:
    cohort.groupList.length > 0
      ? cohort.groupList.map((group) => ({
          id: group.id,
          name: group.name,
          class: group.class,
          by: group.headOnly ? 'count' : 'tags',
          head: group.headOnly ? String(group.head) : '',
          animalIds: group.animalIds,
          local: group.local ?? '',
        }))
      : [newGroup(1, 'heifer')],
});

const whole = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/;

/** Head of a group, or null while it is empty or no whole number. */
export function headOf(group: GroupForm): number | null {
  if (group.by === 'tags') return group.animalIds.length > 0 ? group.animalIds.length : null;
  const n = Number(group.head);
  return Number.isInteger(n) && n > 0 ? n : null;
}

/**
 * The form as a change for the server. Groups that are not filled in yet are left out, and so is a time that is not
 * whole: they wait in the form.
 */
export function patchOf(form: PlanForm, firstVisit: string | undefined, revision: number): CohortPatch {
  const groups = form.groups.filter((group) => headOf(group) !== null && group.name.trim() !== '');
  return {
    revision,
    ...(form.name.trim() ? { name: form.name.trim() } : {}),
    protocolVersionId: form.protocolVersionId || null,
    options: form.options,
    anchor: whole.test(form.local)
      ? { visit: form.fixed === 'start' ? (firstVisit ?? null) : null, local: form.local }
      : null,
    groups: groups.map((group) => ({
      id: group.id,
      name: group.name.trim(),
      class: group.class,
      ...(group.by === 'tags' ? { animalIds: group.animalIds } : { head: headOf(group) ?? 1 }),
      ...(whole.test(group.local) ? { local: group.local } : {}),
    })),
  };
}
