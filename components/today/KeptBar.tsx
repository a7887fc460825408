import { StyleSheet, View } from 'react-native';

import { useOutboxEntries } from '@/hooks/useTaskWork';
import { dismiss } from '@/lib/outbox';
import { t } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Notice } from '../ui/Notice';
import { Text } from '../ui/Text';

/** What is saved only on this phone says so; what the server refused stays until somebody has read why. */
export function KeptBar() {
  const entries = useOutboxEntries();
  const waiting = entries
    .filter((entry) => entry.state === 'waiting')
    .reduce((sum, entry) => sum + Math.max(entry.head, 1), 0);
  const refused = entries.filter((entry) => entry.state === 'refused');
  return (
    <>
      {refused.map((entry) => (
        <Notice
          key={entry.id}
          tone="stop"
          action={<Button label={t('ui.close')} kind="quiet" onPress={() => void dismiss(entry.id)} />}
        >
          {t('task.refused', { message: entry.message })}
        </Notice>
      ))}
      {waiting > 0 ? (
        <View role="status" style={styles.bar}>
          <Text strong>{t('task.keptHere', { count: waiting })}</Text>
          <Text variant="small" tone="quiet">
            {t('task.waiting')}
          </Text>
        </View>
      ) : null}
    </>
  );
}

const styles = StyleSheet.create({
  bar: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    justifyContent: 'space-between',
    gap: space.s,
    backgroundColor: color.sunk,
    paddingVertical: space.s,
    paddingHorizontal: space.m,
  },
});
