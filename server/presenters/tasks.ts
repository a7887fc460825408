import type { Task } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { dayClock, duration } from '@/shared/when';
import type { TaskRow } from '../queries/tasks';

/** `54 h since device out`; null where the interval says nothing (group acts of other kinds keep it too). */
export function sinceAnchorWords(minutes: number | null, anchor: string | null): string | null {
  if (minutes === null || !anchor) return null;
  if (minutes === 0) return t('cohorts.atAnchor');
  const key = minutes > 0 ? 'cohorts.sinceAnchor' : 'cohorts.beforeAnchor';
  return t(key, {
    time: duration(Math.abs(minutes)),
    step: anchor.toLowerCase().replace(/^gnrh/, 'GnRH').replace(/^ai\b/, 'AI'),
  });
}

export function presentTask(row: TaskRow): Task {
  const local = (at: Date) => dayClock(at.getTime(), row.zone, row.locale);
  return {
    id: row.id,
    propertyId: row.propertyId,
    property: row.property,
    zone: row.zone,
    cohortId: row.cohortId,
    cohort: row.cohort,
    groupId: row.groupId,
    group: row.group,
    visitId: row.visitId,
    title: row.title,
    occurrence: row.occurrence,
    yarded: row.yarded,
    dueAt: row.dueAt.toISOString(),
    windowFrom: row.windowFrom.toISOString(),
    windowTo: row.windowTo.toISOString(),
    dueLocal: local(row.dueAt),
    windowFromLocal: local(row.windowFrom),
    windowToLocal: local(row.windowTo),
    sinceAnchor: sinceAnchorWords(row.sinceAnchorMinutes, row.anchorLabel),
    state: row.state,
    head: row.head,
    done: row.done,
    exceptions: row.exceptions,
    steps: row.steps,
    revision: row.revision,
    movedFrom: row.movedFrom?.toISOString() ?? null,
  };
}
