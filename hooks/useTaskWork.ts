import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useCallback, useEffect, useSyncExternalStore } from 'react';

import { ApiFailure, call } from '@/lib/api';
import { newId } from '@/lib/ids';
import {
  flushOutbox,
  keep,
  loadOutbox,
  outboxEntries,
  subscribeOutbox,
  type OutboxEntry,
  type Send,
} from '@/lib/outbox';
import type { TaskWork } from '@/shared/contracts/work';
import { applyTaken } from './applyTaken';
import { keys } from './keys';
import { useMe } from './useMe';

export const useTaskWork = (taskId: string) =>
  useQuery({
    queryKey: keys.taskWork(taskId),
    queryFn: () => call('GET /api/tasks/:taskId/work', { params: { taskId } }),
    refetchInterval: 30_000,
    // what a reload brings back from the device may be older than what was recorded since: always ask again
    refetchOnMount: 'always',
    staleTime: 0,
  });

const none: OutboxEntry[] = [];
export const useOutboxEntries = (): OutboxEntry[] => useSyncExternalStore(subscribeOutbox, outboxEntries, () => none);

/** What may be tried again: no answer, too many requests, signed out, or a server in trouble. */
const isLater = (failure: ApiFailure): boolean =>
  ['unreachable', 'unavailable', 'tooMany', 'unauthenticated', 'server'].includes(failure.id);

const send: Send = async (entry) => {
  try {
    if (entry.kind === 'undo')
      await call('POST /api/records/:recordId/undo', {
        params: { recordId: entry.recordId ?? '' },
        body: entry.body as never,
      });
    else if (entry.kind === 'rest')
      await call('POST /api/tasks/:taskId/rest', { params: { taskId: entry.taskId }, body: entry.body as never });
    else {
      const answer = await call('POST /api/tasks/:taskId/records', {
        params: { taskId: entry.taskId },
        body: entry.body as never,
      });
      const first = answer.refused[0];
      if (first) return { result: 'refused', message: first.message };
    }
    return { result: 'taken' };
  } catch (error) {
    if (error instanceof ApiFailure && !isLater(error)) return { result: 'refused', message: error.message };
    return { result: 'later' };
  }
};

/** Sends what is kept whenever there may be signal again: at start, back online, back in view, and every half minute. */
export function useFlush(): () => Promise<void> {
  const client = useQueryClient();
  const me = useMe().data?.user;
  const userId = me?.id;
  const by = me?.name ?? '';
  const flush = useCallback(async () => {
    if (!userId) return;
    const before = outboxEntries().length;
    await flushOutbox(userId, async (entry) => {
      const answer = await send(entry);
      if (answer.result === 'taken')
        client.setQueryData<TaskWork>(keys.taskWork(entry.taskId), (work) => work && applyTaken(work, entry, by));
      return answer;
    });
    if (outboxEntries().length !== before) {
      await client.invalidateQueries({ queryKey: keys.work() });
    }
  }, [by, client, userId]);
  useEffect(() => {
    void loadOutbox().then(flush);
    const again = () => void flush();
    const timer = setInterval(() => outboxEntries().length > 0 && again(), 30_000);
    window.addEventListener('online', again);
    document.addEventListener('visibilitychange', again);
    return () => {
      clearInterval(timer);
      window.removeEventListener('online', again);
      document.removeEventListener('visibilitychange', again);
    };
  }, [flush]);
  return flush;
}

export interface NewRecord {
  animalId: string | null;
  head?: number;
  outcome: 'done' | 'notDone' | 'lost' | 'withdrawn';
  reason?: string;
  exceptions?: { stepId: string; outcome: string; reason?: string }[];
  observed?: Record<string, string>;
  batchId?: string | null;
  note?: string;
}

/** Ways to record work: each resolves once the act is safely on this device, and then goes out. */
export function useRecorder(task: TaskWork['task'] | undefined, flush: () => Promise<void>) {
  const userId = useMe().data?.user.id ?? '';
  const put = async (
    part: Pick<OutboxEntry, 'kind' | 'body' | 'animalIds' | 'head'> & { recordId?: string },
    at: string,
  ) => {
    await keep({ id: newId(), userId, taskId: task?.id ?? '', at, state: 'waiting', ...part });
    await flush();
  };
  return {
    record: (record: NewRecord) => {
      const at = new Date().toISOString();
      const body = { records: [{ id: newId(), at, ...record }] };
      return put(
        { kind: 'records', body, animalIds: record.animalId ? [record.animalId] : [], head: record.head ?? 1 },
        at,
      );
    },
    rest: (animalIds: string[], expectedHead: number, batchId: string | null) => {
      const at = new Date().toISOString();
      return put({ kind: 'rest', body: { id: newId(), at, batchId, expectedHead }, animalIds, head: expectedHead }, at);
    },
    undo: (recordId: string) => {
      const at = new Date().toISOString();
      return put({ kind: 'undo', recordId, body: { id: newId(), at }, animalIds: [], head: 0 }, at);
    },
  };
}
