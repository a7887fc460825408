import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';

import type { TaskStep } from '@/shared/contracts/cohorts';

/** A task with all that a mail or a calendar entry says of it. */
export interface TellableTask {
  id: string;
  propertyId: string;
  property: string;
  /** The property's zone and locale. */
  zone: string;
  locale: string;
  cohort: string;
  group: string;
  title: string;
  dueAt: Date;
  windowFrom: Date;
  windowTo: Date;
  movedFrom: Date | null;
  sinceAnchorMinutes: number | null;
  steps: readonly TaskStep[];
  state: 'planned' | 'inWork' | 'done' | 'cancelled';
  head: number;
  /** Head without a record that stands. */
  undone: number;
  revision: number;
  updatedAt: Date;
}

export interface TaskSelection {
  propertyIds?: readonly string[];
  ids?: readonly string[];
  dueFrom?: Date;
  dueTo?: Date;
  /** Planned or in work only. */
  open?: boolean;
  /** Leaves out what was cancelled before this moment. */
  cancelledSince?: Date;
}

/** Conditions on `tasks t`, with their replacements: shared with the query that only asks whether anything changed. */
export function selectionSql(selection: TaskSelection): { where: string; replacements: Record<string, unknown> } {
  const where: string[] = ['true'];
  const { propertyIds, ids, dueFrom, dueTo, open, cancelledSince } = selection;
  if (propertyIds) where.push('t.property_id = any(array[:propertyIds]::uuid[])');
  if (ids) where.push('t.id = any(array[:ids]::uuid[])');
  if (dueFrom) where.push('t.due_at >= :dueFrom');
  if (dueTo) where.push('t.due_at <= :dueTo');
  if (open) where.push("t.state in ('planned', 'inWork')");
  if (cancelledSince) where.push("(t.state <> 'cancelled' or t.updated_at >= :cancelledSince)");
  return {
    where: where.join(' and '),
    // an empty list would be written as nothing: a list of the nil id finds nothing either
    replacements: { ...selection, propertyIds: orNil(propertyIds), ids: orNil(ids) },
  };
}
const orNil = (ids: readonly string[] | undefined): readonly string[] =>
  ids?.length ? ids : ['00000000-0000-0000-0000-000000000000'];

/** Tasks in the order in which they fall due. */
export async function tellableTasks(
  sequelize: Sequelize,
  selection: TaskSelection,
  transaction?: Transaction,
): Promise<TellableTask[]> {
  const { where, replacements } = selectionSql(selection);
  return sequelize.query<TellableTask>(
    `select t.id, t.property_id as "propertyId", p.name as property, p.zone, p.locale, c.name as cohort, g.name as "group",
       t.title, t.due_at as "dueAt", t.window_from as "windowFrom", t.window_to as "windowTo", t.moved_from as "movedFrom",
       t.since_anchor_minutes as "sinceAnchorMinutes", t.steps, t.state, t.revision, t.updated_at as "updatedAt",
       coalesce(g.head_only, e.head) as head,
       greatest(0, case when g.head_only is null then e.undone else g.head_only - r.head end) as undone
     from tasks t
     join properties p on p.id = t.property_id
     join cohorts c on c.id = t.cohort_id
     join groups g on g.id = t.group_id
     cross join lateral (
       select count(*)::int as head,
         (count(*) filter (where not exists (
           select from records w where w.task_id = t.id and w.animal_id = n.animal_id and w.outcome <> 'undone'
             and not exists (select from records k where k.corrects_id = w.id))))::int as undone
       from enrolments n where n.group_id = g.id and n.left_at is null
     ) e
     cross join lateral (
       select coalesce(sum(w.head), 0)::int as head from records w
       where g.head_only is not null and w.task_id = t.id and w.outcome <> 'undone'
         and not exists (select from records k where k.corrects_id = w.id)
     ) r
     where ${where}
     order by t.due_at, g.position, t.id`,
    { type: QueryTypes.SELECT, replacements, ...(transaction ? { transaction } : {}) },
  );
}
