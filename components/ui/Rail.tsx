import { Link as RouterLink, type Href } from 'expo-router';
import { createContext, use, type ReactNode } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';

import { color, space } from '../theme/tokens';
import { Text } from './Text';

/** True where the page around already keeps its distance from the edges, so that rows need none of their own. */
export const Padded = createContext(false);

/** A list ruled by single lines over the full width, as the rails of a crush. */
export const RailList = ({ label, children }: { label: string; children: ReactNode }) => (
  <View role="list" aria-label={label} style={styles.list}>
    {children}
  </View>
);

interface RailRowProps {
  title?: ReactNode;
  subtitle?: ReactNode;
  /** Left column: a time, a tag, a mark. */
  leading?: ReactNode;
  /** Right column: a figure, a word. */
  trailing?: ReactNode;
  /** Where the row leads; or what it does. Neither: the row only says something. */
  href?: Href;
  onPress?: () => void;
  accessibleLabel?: string;
  selected?: boolean;
  /** A bar at the left: something overdue or wrong. Say the word too. */
  mark?: 'stop' | 'warn';
  /** Below the row, for buttons and notices: not part of its press. */
  children?: ReactNode;
}

const words = (value: ReactNode, subtitle: boolean): ReactNode =>
  typeof value === 'string' ? (
    <Text variant={subtitle ? 'small' : 'subheading'} tone={subtitle ? 'quiet' : 'ink'}>
      {value}
    </Text>
  ) : (
    value
  );

export function RailRow(props: RailRowProps) {
  const { title, subtitle, leading, trailing, href, onPress, accessibleLabel, selected, mark, children } = props;
  const side = { paddingHorizontal: use(Padded) && !mark ? 0 : space.m };
  const inside = (
    <>
      {leading ? <View style={styles.leading}>{leading}</View> : null}
      <View style={styles.middle}>
        {words(title, false)}
        {words(subtitle, true)}
      </View>
      {trailing ? (
        <View style={styles.trailing}>{typeof trailing === 'string' ? <Text>{trailing}</Text> : trailing}</View>
      ) : null}
    </>
  );
  const named = accessibleLabel ? { 'aria-label': accessibleLabel } : {};
  return (
    <View
      role="listitem"
      style={[styles.row, mark && styles.marked, mark && { borderLeftColor: color[mark] }, selected && styles.selected]}
    >
      {href !== undefined ? (
        <RouterLink href={href} asChild>
          <Pressable
            {...named}
            {...(selected ? { 'aria-current': 'page' } : {})}
            style={{ ...StyleSheet.flatten(styles.press), ...side }}
          >
            {inside}
          </Pressable>
        </RouterLink>
      ) : onPress ? (
        <Pressable role="button" {...named} onPress={onPress} style={[styles.press, side]}>
          {inside}
        </Pressable>
      ) : (
        <View style={[styles.press, side]}>{inside}</View>
      )}
      {children ? <View style={[styles.below, side]}>{children}</View> : null}
    </View>
  );
}

const styles = StyleSheet.create({
  list: { borderTopWidth: 1, borderTopColor: color.rail },
  row: { borderBottomWidth: 1, borderBottomColor: color.rail },
  marked: { borderLeftWidth: 8 },
  selected: { backgroundColor: color.raised },
  press: {
    minHeight: 56,
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.m,
    paddingVertical: 10,
  },
  leading: { minWidth: 56 },
  middle: { flex: 1, minWidth: 0, gap: 2 },
  trailing: { alignItems: 'flex-end' },
  below: { paddingBottom: space.m, gap: space.s },
});
