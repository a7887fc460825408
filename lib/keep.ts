import { useCallback, useEffect, useRef, useState } from 'react';

/**
 * What is typed into a form stays on this device until the server has accepted it: a server that is down, a reload
 * or an empty battery loses nothing. Never for passwords or other secrets.
 */
const prefix = 'yardbell-kept-1:';

export function readKept<Value>(key: string): Value | undefined {
  try {
    const text = localStorage.getItem(prefix + key);
    return text === null ? undefined : (JSON.parse(text) as Value);
  } catch {
    return undefined;
  }
}

export function writeKept(key: string, value: unknown): void {
  try {
    localStorage.setItem(prefix + key, JSON.stringify(value));
  } catch {
    // full or forbidden storage: the form still works, it only isn't kept
  }
}

export function forgetKept(key: string): void {
  try {
    localStorage.removeItem(prefix + key);
  } catch {
    // nothing was kept
  }
}

/** Forgets everything typed on this device: at sign-out, so that the next person doesn't find it. */
export function forgetAllKept(): void {
  try {
    Object.keys(localStorage)
      .filter((key) => key.startsWith(prefix))
      .forEach((key) => localStorage.removeItem(key));
  } catch {
    // nothing was kept
  }
}

/**
 * State that survives a reload: `const [form, setForm, accepted, wasKept] = useKept('cohort-new', empty)`.
 * Call `accepted()` once the server has the values. `wasKept` says that the first values came from an earlier visit.
 * Another key is another form.
 */
export function useKept<Value>(key: string, initial: Value) {
  const [state, setState] = useState(() => {
    const kept = readKept<Value>(key);
    return { key, value: kept ?? initial, wasKept: kept !== undefined };
  });
  let shown = state;
  if (state.key !== key) {
    const kept = readKept<Value>(key);
    shown = { key, value: kept ?? initial, wasKept: kept !== undefined };
    setState(shown);
  }
  const latest = useRef(shown.value);
  useEffect(() => {
    latest.current = shown.value;
  });
  const set = useCallback(
    (next: Value | ((before: Value) => Value)) => {
      const value = next instanceof Function ? next(latest.current) : next;
      latest.current = value;
      writeKept(key, value);
      setState((before) => ({ ...before, key, value }));
    },
    [key],
  );
  const accepted = useCallback(() => forgetKept(key), [key]);
  return [shown.value, set, accepted, shown.wasKept] as const;
}
