import { get, update } from 'idb-keyval';

/**
 * What was recorded on this phone until the server has it. An entry is in IndexedDB before the button confirms, so it
 * survives a reload, a crash and a sign-out; it goes out in order, and a repeat changes nothing because its ids are
 * made here. What the server refuses is kept with the reason.
 */
export interface OutboxEntry {
  id: string;
  userId: string;
  taskId: string;
  kind: 'records' | 'rest' | 'undo';
  /** For undo: the record taken back. */
  recordId?: string;
  body: unknown;
  /** Animals it is about, for showing them as recorded at once. */
  animalIds: string[];
  head: number;
  at: string;
  state: 'waiting' | 'refused';
  message?: string;
}

/** How one attempt ended: taken, refused for good, or to be tried again later. */
export type SendResult = { result: 'taken' } | { result: 'refused'; message: string } | { result: 'later' };
export type Send = (entry: OutboxEntry) => Promise<SendResult>;

const key = 'yardbell-outbox-1';
let memory: OutboxEntry[] = [];
let loaded = false;
const listeners = new Set<() => void>();
const durable = typeof indexedDB !== 'undefined';

const tell = () => listeners.forEach((listener) => listener());

async function change(edit: (entries: OutboxEntry[]) => OutboxEntry[]): Promise<void> {
  if (durable) {
    await update<OutboxEntry[]>(key, (stored) => {
      memory = edit(stored ?? []);
      return memory;
    });
  } else {
    memory = edit(memory);
  }
  loaded = true;
  tell();
}

/** Reads the queue from the device; call once at start. */
export async function loadOutbox(): Promise<void> {
  if (loaded || !durable) return;
  memory = (await get<OutboxEntry[]>(key)) ?? [];
  loaded = true;
  tell();
}

export const subscribeOutbox = (listener: () => void): (() => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};

/** The queue as it stands; a new array after every change, the same one between changes. */
export const outboxEntries = (): OutboxEntry[] => memory;

/** Resolves when the entry is safely on the device. */
export const keep = (entry: OutboxEntry): Promise<void> => change((entries) => [...entries, entry]);

/** Drops a refused entry after somebody has read why. */
export const dismiss = (id: string): Promise<void> => change((entries) => entries.filter((entry) => entry.id !== id));

let running: Promise<void> | null = null;

const waits = (userId: string) => memory.some((e) => e.state === 'waiting' && e.userId === userId);

/** Sends what waits, oldest first, one at a time; stops at the first that has to wait. Never runs twice at once. */
export async function flushOutbox(userId: string, send: Send): Promise<void> {
  const before = running;
  running ??= drain(userId, send).finally(() => {
    running = null;
  });
  await running;
  // what came in while an earlier run was just ending has not been seen by it
  if (before && waits(userId)) await flushOutbox(userId, send);
}

async function drain(userId: string, send: Send): Promise<void> {
  await loadOutbox();
  for (;;) {
    const entry = memory.find((e) => e.state === 'waiting' && e.userId === userId);
    if (!entry) return;
    const answer = await send(entry);
    if (answer.result === 'later') return;
    if (answer.result === 'taken') await dismiss(entry.id);
    else
      await change((entries) =>
        entries.map((e) => (e.id === entry.id ? { ...e, state: 'refused', message: answer.message } : e)),
      );
  }
}
