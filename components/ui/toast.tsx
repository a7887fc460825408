import { useEffect, useSyncExternalStore } from 'react';
import { StyleSheet, View } from 'react-native';

import { t } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Button } from './Button';
import { Text } from './Text';

interface ToastEntry {
  id: number;
  message: string;
  undo?: (() => void) | undefined;
}

let entry: ToastEntry | null = null;
let count = 0;
const listeners = new Set<() => void>();
const set = (next: ToastEntry | null) => {
  entry = next;
  listeners.forEach((listener) => listener());
};
const subscribe = (listener: () => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};

/** Says at the bottom of the page that something was done, with a way back where there is one. */
export function toast(message: string, undo?: () => void): void {
  count += 1;
  set({ id: count, message, undo });
}

/** Milliseconds a toast stays; one that can be undone stays longer. */
const plain = 6_000;
const undoable = 12_000;

/** Where toasts appear: once, in the root layout. The region is always there, so that readers announce what comes into it. */
export function Toasts() {
  const shown = useSyncExternalStore(subscribe, () => entry);
  useEffect(() => {
    if (!shown) return;
    const timer = setTimeout(() => set(null), shown.undo ? undoable : plain);
    return () => clearTimeout(timer);
  }, [shown]);
  return (
    <View role="status" style={styles.region}>
      {shown ? (
        <View style={styles.toast}>
          <Text tone="page" style={styles.words}>
            {shown.message}
          </Text>
          {shown.undo ? (
            <Button
              label={t('ui.undo')}
              onPress={() => {
                shown.undo?.();
                set(null);
              }}
            />
          ) : null}
        </View>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  region: {
    position: 'fixed' as 'absolute',
    bottom: 88,
    left: 0,
    right: 0,
    alignItems: 'center',
    pointerEvents: 'box-none',
    zIndex: 5,
  },
  toast: {
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.m,
    maxWidth: 560,
    marginHorizontal: space.m,
    paddingHorizontal: space.m,
    paddingVertical: space.s,
    minHeight: 56,
    borderRadius: 4,
    backgroundColor: color.ink,
  },
  words: { flexShrink: 1 },
});
