import type { Transaction } from 'sequelize';

import type { AnimalClass } from '@/protocols/types';
import type { TaskStep } from '@/shared/contracts/cohorts';
import type { Deps } from '../deps';
import { rows } from './rows';

export interface TaskRow {
  id: string;
  propertyId: string;
  property: string;
  locale: string;
  zone: string;
  cohortId: string;
  cohort: string;
  cohortState: string;
  groupId: string;
  group: string;
  class: AnimalClass;
  headOnly: number | null;
  visitId: string;
  title: string;
  occurrence: number;
  yarded: boolean;
  dueAt: Date;
  windowFrom: Date;
  windowTo: Date;
  sinceAnchorMinutes: number | null;
  anchorLabel: string | null;
  steps: TaskStep[];
  state: 'planned' | 'inWork' | 'done' | 'cancelled';
  movedFrom: Date | null;
  revision: number;
  head: number;
  done: number;
  exceptions: number;
}

/** Records that no later record takes back. */
export const liveRecords = (alias: string): string =>
  `${alias}.outcome <> 'undone' and not exists (select 1 from records undo where undo.corrects_id = ${alias}.id)`;

/**
 * Tasks with their head and progress, in one query. An animal that has left the program still counts in the tasks
 * in which it was recorded.
 */
const base = `
  select t.id, t.property_id as "propertyId", p.name as property, p.locale, t.zone, t.cohort_id as "cohortId",
    c.name as cohort, c.state as "cohortState", t.group_id as "groupId", g.name as "group", g.class,
    g.head_only as "headOnly", t.visit_id as "visitId", t.title, t.occurrence, t.yarded, t.due_at as "dueAt",
    t.window_from as "windowFrom", t.window_to as "windowTo", t.since_anchor_minutes as "sinceAnchorMinutes",
    t.anchor_label as "anchorLabel", t.steps, t.state, t.moved_from as "movedFrom", t.revision,
    coalesce(g.head_only, e.enrolled)::int as head, coalesce(r.done, 0) as done, coalesce(r.exceptions, 0) as exceptions
  from tasks t
  join groups g on g.id = t.group_id
  join cohorts c on c.id = t.cohort_id
  join properties p on p.id = t.property_id
  left join lateral (
    select sum(r.head)::int as done,
      count(*) filter (where r.outcome <> 'done' or exists (
        select 1 from record_steps s where s.record_id = r.id and s.outcome <> 'done'))::int as exceptions
    from records r where r.task_id = t.id and ${liveRecords('r')}
  ) r on true
  left join lateral (
    select count(*)::int as enrolled from enrolments e where e.group_id = g.id and (e.left_at is null or exists (
      select 1 from records r2 where r2.task_id = t.id and r2.animal_id = e.animal_id and ${liveRecords('r2')}))
  ) e on g.head_only is null`;

/** Tasks that a condition over `t`, `c`, `p` and `$n` picks, by due time. */
export const tasksWhere = (
  deps: Deps,
  condition: string,
  values: readonly unknown[],
  tx?: Transaction,
): Promise<TaskRow[]> => rows<TaskRow>(deps, `${base} where ${condition} order by t.due_at, t.title, t.id`, values, tx);

export const taskById = async (deps: Deps, id: string, tx?: Transaction): Promise<TaskRow | undefined> =>
  (await tasksWhere(deps, 't.id = $1', [id], tx))[0];
