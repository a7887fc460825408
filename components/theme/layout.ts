import { useSyncExternalStore } from 'react';

import { wideFrom } from './tokens';

const query = () => (typeof matchMedia === 'function' ? matchMedia(`(min-width: ${wideFrom}px)`) : null);
const subscribe = (listener: () => void) => {
  const media = query();
  media?.addEventListener('change', listener);
  return () => media?.removeEventListener('change', listener);
};

/** True where there is room for a rail and two panes. Renders again only when the limit is crossed. */
export const useWide = (): boolean => useSyncExternalStore(subscribe, () => query()?.matches ?? false);
