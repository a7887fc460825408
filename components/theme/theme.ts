import { useSyncExternalStore } from 'react';

import { color, palettes, type Scheme } from './tokens';

export type ThemeChoice = 'system' | Scheme;

const key = 'yardbell-theme';
const listeners = new Set<() => void>();
const dark = () => (typeof matchMedia === 'function' ? matchMedia('(prefers-color-scheme: dark)') : null);

function stored(): ThemeChoice {
  try {
    const value = localStorage.getItem(key);
    return value === 'light' || value === 'dark' ? value : 'system';
  } catch {
    return 'system';
  }
}

/** Keeps the choice on this device and paints the page by it at once. */
export function chooseTheme(choice: ThemeChoice): void {
  try {
    if (choice === 'system') localStorage.removeItem(key);
    else localStorage.setItem(key, choice);
  } catch {
    // a browser that keeps nothing still shows the choice until it is closed
  }
  if (choice === 'system') delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = choice;
  listeners.forEach((listener) => listener());
}

function subscribe(listener: () => void): () => void {
  const query = dark();
  listeners.add(listener);
  query?.addEventListener('change', listener);
  return () => {
    listeners.delete(listener);
    query?.removeEventListener('change', listener);
  };
}

const current = (): ThemeChoice => {
  const painted = document.documentElement.dataset.theme;
  return painted === 'light' || painted === 'dark' ? painted : stored();
};
const scheme = (): Scheme => {
  const choice = current();
  if (choice !== 'system') return choice;
  return dark()?.matches ? 'dark' : 'light';
};

/** The choice, the scheme it comes to, colours as variables (for styles) and as figures (for canvas or QR codes). */
export function useTheme() {
  const choice = useSyncExternalStore(subscribe, current);
  const shown = useSyncExternalStore(subscribe, scheme);
  return { choice, setChoice: chooseTheme, scheme: shown, color, hex: palettes[shown] };
}
