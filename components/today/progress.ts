import type { OutboxEntry } from '@/lib/outbox';
import type { TaskWork } from '@/shared/contracts/work';

export interface WorkAnimal {
  animalId: string;
  tag: string;
  eid: string | null;
  class: string;
  /** What the server has; a record that was taken back on this phone is not there any more. */
  record: TaskWork['animals'][number]['record'];
  /** Recorded here, not yet at the server. */
  pending: boolean;
}

export interface Progress {
  animals: WorkAnimal[];
  left: WorkAnimal[];
  done: WorkAnimal[];
  /** Head left and done, what waits on this phone included. */
  headLeft: number;
  headDone: number;
}

/** The server's state with what this phone still keeps laid over it. */
export function progressOf(work: TaskWork, entries: readonly OutboxEntry[]): Progress {
  const mine = entries.filter((entry) => entry.taskId === work.task.id && entry.state === 'waiting');
  const undone = new Set(mine.filter((entry) => entry.kind === 'undo').map((entry) => entry.recordId));
  const recorded = new Set(mine.filter((entry) => entry.kind !== 'undo').flatMap((entry) => entry.animalIds));
  const animals = work.animals.map((animal): WorkAnimal => {
    const record = animal.record && !undone.has(animal.record.id) ? animal.record : null;
    return { ...animal, record, pending: record === null && recorded.has(animal.animalId) };
  });
  const isDone = (animal: WorkAnimal) => animal.record !== null || animal.pending;
  const done = animals.filter(isDone);
  const left = animals.filter((animal) => !isDone(animal));
  if (work.animals.length > 0) return { animals, left, done, headLeft: left.length, headDone: done.length };
  const keptHead = mine.filter((entry) => entry.kind !== 'undo').reduce((sum, entry) => sum + entry.head, 0);
  const undoneHead = work.records
    .filter((record) => undone.has(record.id))
    .reduce((sum, record) => sum + record.head, 0);
  const headDone = Math.min(work.task.head, work.task.done + keptHead - undoneHead);
  return { animals, left, done, headLeft: work.task.head - headDone, headDone };
}

/** Animals whose tag or EID holds what was typed or scanned; spaces don't matter. */
export function matching(animals: readonly WorkAnimal[], typed: string): WorkAnimal[] {
  const wanted = typed.replace(/\s/g, '').toLowerCase();
  if (wanted === '') return [...animals];
  const exact = animals.filter((animal) => animal.tag.toLowerCase() === wanted || animal.eid === wanted);
  if (exact.length > 0) return exact;
  return animals.filter((animal) => animal.tag.toLowerCase().includes(wanted) || animal.eid?.includes(wanted));
}
