import type { ReactNode } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';

import { t } from '@/shared/messages';
import { useWide } from '../theme/layout';
import { color, space } from '../theme/tokens';
import { Text } from './Text';

interface SplitPaneProps {
  list: ReactNode;
  /** Null: nothing is open. */
  detail: ReactNode | null;
  listLabel: string;
  detailLabel: string;
  /** Width of the list in pixels. Default 400. */
  listWidth?: number;
  /** On a phone: which one shows. Default: the detail when there is one. */
  phoneShows?: 'list' | 'detail';
}

/** List at the left and what is open at the right, each scrolling by itself; on a phone one of them. Use in a Screen with `scroll={false}`. */
export function SplitPane({ list, detail, listLabel, detailLabel, listWidth = 400, phoneShows }: SplitPaneProps) {
  const wide = useWide();
  if (!wide) {
    const showDetail = (phoneShows ?? (detail ? 'detail' : 'list')) === 'detail';
    return <ScrollView style={styles.fill}>{showDetail ? detail : list}</ScrollView>;
  }
  return (
    <View style={styles.both}>
      <ScrollView role="region" aria-label={listLabel} style={[styles.list, { width: listWidth }]}>
        {list}
      </ScrollView>
      <ScrollView role="region" aria-label={detailLabel} style={styles.fill} contentContainerStyle={styles.detail}>
        {detail ?? <Text tone="quiet">{t('ui.nothingOpen')}</Text>}
      </ScrollView>
    </View>
  );
}

const styles = StyleSheet.create({
  fill: { flex: 1 },
  both: { flex: 1, flexDirection: 'row', minHeight: 0 },
  list: { flexGrow: 0, flexShrink: 0, borderRightWidth: 1, borderRightColor: color.rail },
  detail: { padding: space.l, paddingBottom: space.xxl },
});
