import type { OutboxEntry } from '@/lib/outbox';
import type { TaskWork, WorkRecord } from '@/shared/contracts/work';
import { clock } from '@/shared/when';

type Sent = Partial<Pick<WorkRecord, 'id' | 'outcome' | 'reason' | 'exceptions' | 'observed' | 'note'>>;

const sentRecord = (entry: OutboxEntry): Sent => {
  const body = entry.body as { id?: string; records?: Sent[] };
  return body.records?.[0] ?? {};
};

/**
 * A task's work with an act laid in that the server has just taken. Between the server's answer and the next reading
 * the animal must not stand among those left again: it would be recorded twice and the second refused.
 */
export function applyTaken(work: TaskWork, entry: OutboxEntry, by: string): TaskWork {
  if (entry.kind === 'undo') {
    const animals = work.animals.map((animal) =>
      animal.record?.id === entry.recordId ? { ...animal, record: null } : animal,
    );
    const back = animals.some((animal, i) => animal !== work.animals[i]);
    const records = work.records.map((record) =>
      record.id === entry.recordId ? { ...record, undoneBy: entry.id } : record,
    );
    const head = back ? 1 : (work.records.find((record) => record.id === entry.recordId)?.head ?? 0);
    return { ...work, animals, records, task: { ...work.task, done: work.task.done - head } };
  }
  const sent = sentRecord(entry);
  const recorded = new Set(entry.animalIds);
  const animals = work.animals.map((animal) => {
    if (!recorded.has(animal.animalId) || animal.record) return animal;
    const record: WorkRecord = {
      id: sent.id ?? entry.id,
      taskId: entry.taskId,
      animalId: animal.animalId,
      tag: animal.tag,
      head: 1,
      outcome: sent.outcome ?? 'done',
      reason: sent.reason ?? null,
      exceptions: sent.exceptions ?? [],
      observed: sent.observed ?? {},
      at: entry.at,
      atLocal: clock(Date.parse(entry.at), work.task.zone),
      by,
      note: sent.note ?? null,
      undoneBy: null,
    };
    return { ...animal, record };
  });
  return { ...work, animals, task: { ...work.task, done: work.task.done + entry.head } };
}
