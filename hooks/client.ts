import { createAsyncStoragePersister } from '@tanstack/query-async-storage-persister';
import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { del, get, set } from 'idb-keyval';

import { ApiFailure } from '@/lib/api';
import { keys } from './keys';

/** How long answers stay on the device for work without reception. */
export const cacheAge = 3 * 24 * 3600 * 1000;

/** A session that has ended shows by asking again who is signed in; the frame then leads to sign-in. */
function noteFailure(error: unknown) {
  if (error instanceof ApiFailure && error.id === 'unauthenticated') {
    const state = queryClient.getQueryState(keys.me());
    if (state?.status === 'success' && state.fetchStatus === 'idle')
      void queryClient.invalidateQueries({ queryKey: keys.me() });
  }
}

const worthAnother = (count: number, error: unknown): boolean =>
  count < 2 && error instanceof ApiFailure && ['unavailable', 'unreachable'].includes(error.id);

export const queryClient = new QueryClient({
  queryCache: new QueryCache({ onError: noteFailure }),
  mutationCache: new MutationCache({ onError: noteFailure }),
  defaultOptions: {
    queries: { gcTime: cacheAge, staleTime: 10_000, networkMode: 'always', retry: worthAnother, retryDelay: 1_000 },
    // a write is sent once; the person decides about another, and its id makes it harmless
    mutations: { networkMode: 'always', retry: false },
  },
});

/** Cached answers in IndexedDB; where there is none (tests), nothing is kept. */
export const persister = createAsyncStoragePersister({
  key: 'yardbell-answers',
  storage:
    typeof indexedDB === 'undefined'
      ? undefined
      : {
          getItem: (key: string) => get<string>(key).then((value) => value ?? null),
          setItem: (key: string, value: string) => set(key, value),
          removeItem: (key: string) => del(key),
        },
});

/** Nothing that one person saw is left for the next one on this device. */
export async function forgetAnswers(): Promise<void> {
  queryClient.clear();
  await persister.removeClient();
}
