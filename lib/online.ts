import { useSyncExternalStore } from 'react';

/** Whether the last attempt to reach the server came through: a phone may have bars and still no answer. */
let answered = true;
const listeners = new Set<() => void>();
const tell = () => listeners.forEach((listener) => listener());

/** Called by the API client after every attempt. */
export function noteReached(reached: boolean): void {
  if (answered === reached) return;
  answered = reached;
  tell();
}

const isOnline = (): boolean => answered && (typeof navigator === 'undefined' || navigator.onLine !== false);

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  window.addEventListener('online', listener);
  window.addEventListener('offline', listener);
  return () => {
    listeners.delete(listener);
    window.removeEventListener('online', listener);
    window.removeEventListener('offline', listener);
  };
}

/** False when the device has no signal or the server does not answer. */
export const useOnline = (): boolean => useSyncExternalStore(subscribe, isOnline);
