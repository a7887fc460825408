import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { color, space } from '../theme/tokens';
import { Screen } from '../ui/Screen';
import { Brand } from './Brand';

/** A page for people who are not signed in: the name, one question, one button. */
export const Outside = ({ title, children }: { title: string; children: ReactNode }) => (
  <View role="main" style={styles.page}>
    <Screen
      title={title}
      kicker={
        <View style={styles.brand}>
          <Brand />
        </View>
      }
    >
      <View style={styles.column}>{children}</View>
    </Screen>
  </View>
);

const styles = StyleSheet.create({
  page: { flex: 1, backgroundColor: color.page },
  brand: { marginBottom: space.m },
  column: { width: '100%', maxWidth: 480, gap: space.m },
});
