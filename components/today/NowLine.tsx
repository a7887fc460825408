import { StyleSheet, View } from 'react-native';

import type { Task } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { clock, duration } from '@/shared/when';
import { color, font, space } from '../theme/tokens';
import { Text } from '../ui/Text';

/** The hi-vis line between what has been and what comes. */
export function NowLine({ now, zone, next }: { now: number; zone: string; next: Task | undefined }) {
  const words = next
    ? t('today.nowNext', { time: duration((Date.parse(next.dueAt) - now) / 60_000) })
    : t('today.nowNothing');
  return (
    <View role="listitem" style={styles.line}>
      <Text tone="onVis" style={styles.clock}>
        {clock(now, zone)}
      </Text>
      <Text tone="onVis" strong>
        {words}
      </Text>
    </View>
  );
}

const styles = StyleSheet.create({
  line: {
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.m,
    backgroundColor: color.vis,
    paddingVertical: 10,
    paddingHorizontal: space.m,
  },
  clock: { fontFamily: font.figureBold, fontWeight: '700', fontSize: 25, lineHeight: 30 },
});
