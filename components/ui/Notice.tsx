import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { color, space } from '../theme/tokens';
import { Text } from './Text';

export type NoticeTone = 'note' | 'good' | 'warn' | 'stop';

interface NoticeProps {
  /** stop and warn interrupt a screen reader (role alert), note and good wait (role status). */
  tone?: NoticeTone;
  /** First words, bold: what this is about. */
  title?: string;
  children?: ReactNode;
  action?: ReactNode;
  /** For what stands there from the start, such as a caution: not announced. */
  silent?: boolean;
}

/** A sentence in the page, marked by a bar at its left. */
export function Notice({ tone = 'note', title, children, action, silent }: NoticeProps) {
  const role = tone === 'stop' || tone === 'warn' ? 'alert' : 'status';
  return (
    <View {...(silent ? {} : { role })} style={[styles.bar, { borderLeftColor: color[tone] }]}>
      <Text style={styles.words}>
        {title ? <Text strong>{title} </Text> : null}
        {children}
      </Text>
      {action}
    </View>
  );
}

const styles = StyleSheet.create({
  bar: { borderLeftWidth: 6, paddingLeft: space.m, paddingVertical: space.xs, gap: space.s },
  words: { maxWidth: 720 },
});
