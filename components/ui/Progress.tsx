import { StyleSheet, View } from 'react-native';

import { color } from '../theme/tokens';
import { Text } from './Text';

/** How far something has come, in words and as a bar. */
export function Progress({ label, value, max, words }: { label: string; value: number; max: number; words?: string }) {
  const share = max > 0 ? Math.min(1, Math.max(0, value / max)) : 0;
  return (
    <View style={styles.all}>
      <View
        role="progressbar"
        aria-label={label}
        aria-valuenow={value}
        aria-valuemin={0}
        aria-valuemax={max}
        {...(words ? { 'aria-valuetext': words } : {})}
        style={styles.track}
      >
        <View style={[styles.done, { width: `${share * 100}%` }]} />
      </View>
      {words ? (
        <Text variant="small" tone="quiet" aria-hidden>
          {words}
        </Text>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  all: { gap: 4 },
  track: { height: 12, borderWidth: 2, borderColor: color.ink, backgroundColor: color.raised },
  done: { height: '100%', backgroundColor: color.ink },
});
