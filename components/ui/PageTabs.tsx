import { useId, useRef, type KeyboardEvent, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { color, font, space } from '../theme/tokens';

interface PageTabsProps<T extends string> {
  label: string;
  value: T;
  onChange: (value: T) => void;
  tabs: readonly { value: T; label: string }[];
  /** What the chosen tab shows. */
  children: ReactNode;
}

/** Parts of one place. Arrow keys, Home and End move between them; Tab goes on into the part. */
export function PageTabs<T extends string>({ label, value, onChange, tabs, children }: PageTabsProps<T>) {
  const id = useId();
  const list = useRef<HTMLDivElement>(null);
  const at = tabs.findIndex((tab) => tab.value === value);
  const move = (event: KeyboardEvent) => {
    const to = { ArrowRight: at + 1, ArrowLeft: at - 1, Home: 0, End: tabs.length - 1 }[event.key];
    if (to === undefined) return;
    event.preventDefault();
    const next = tabs[(to + tabs.length) % tabs.length];
    if (!next) return;
    onChange(next.value);
    list.current?.querySelector<HTMLElement>(`[data-tab="${next.value}"]`)?.focus();
  };
  return (
    <View style={styles.all}>
      <div role="tablist" aria-label={label} ref={list} onKeyDown={move} style={listStyle}>
        {tabs.map((tab) => (
          <button
            key={tab.value}
            type="button"
            role="tab"
            id={`${id}-${tab.value}`}
            data-tab={tab.value}
            aria-selected={tab.value === value}
            aria-controls={`${id}-panel`}
            tabIndex={tab.value === value ? 0 : -1}
            onClick={() => onChange(tab.value)}
            style={tabStyle(tab.value === value)}
          >
            {tab.label}
          </button>
        ))}
      </div>
      <div role="tabpanel" id={`${id}-panel`} aria-labelledby={`${id}-${value}`} style={{ minWidth: 0 }}>
        {children}
      </div>
    </View>
  );
}

const listStyle = {
  display: 'flex',
  overflowX: 'auto',
  borderBottom: `1px solid ${color.rail}`,
  // room for the focus ring, which the scrolling edge would cut
  padding: 4,
} as const;
const tabStyle = (chosen: boolean) => ({
  flex: 'none',
  minHeight: 48,
  padding: '0 16px',
  border: 0,
  borderBottom: `4px solid ${chosen ? color.ink : 'transparent'}`,
  background: 'none',
  color: chosen ? color.ink : color.quiet,
  fontFamily: font.bodyBold,
  fontWeight: 700,
  fontSize: 17,
  cursor: 'pointer',
});

const styles = StyleSheet.create({ all: { gap: space.m, minWidth: 0 } });
