import '@testing-library/jest-dom/vitest';
import { cleanup } from '@testing-library/react';
import { afterEach, beforeEach, vi } from 'vitest';

import { resetRouter } from './expo-router';

type MediaListener = () => void;
let wide = false;
let dark = false;
const mediaListeners = new Set<MediaListener>();

/** What the stand-in for matchMedia says from now on. */
export function setWide(value: boolean): void {
  wide = value;
  mediaListeners.forEach((listener) => listener());
}
export function setDark(value: boolean): void {
  dark = value;
  mediaListeners.forEach((listener) => listener());
}

const matches = (query: string): boolean => {
  if (query.includes('min-width')) return wide;
  if (query.includes('prefers-color-scheme: dark')) return dark;
  return false;
};

beforeEach(() => {
  wide = false;
  dark = false;
  localStorage.clear();
  resetRouter();
  vi.stubGlobal('matchMedia', (query: string) => ({
    get matches() {
      return matches(query);
    },
    media: query,
    addEventListener: (_: string, listener: MediaListener) => mediaListeners.add(listener),
    removeEventListener: (_: string, listener: MediaListener) => mediaListeners.delete(listener),
  }));
});
afterEach(() => {
  cleanup();
  delete document.documentElement.dataset.theme;
  document.title = '';
  vi.unstubAllGlobals();
});

// jsdom knows the dialog element but not its methods (jsdom 26). The top layer and the inert page behind it are the
// browser's; they are tested there.
HTMLDialogElement.prototype.showModal = function showModal() {
  this.open = true;
  this.querySelector<HTMLElement>('button, input, select, textarea, a[href]')?.focus();
};
HTMLDialogElement.prototype.close = function close() {
  this.open = false;
};
HTMLElement.prototype.scrollIntoView = () => undefined;
