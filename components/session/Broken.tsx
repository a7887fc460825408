import type { ErrorBoundaryProps } from 'expo-router';
import { View } from 'react-native';

import { t } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Screen } from '../ui/Screen';
import { Text } from '../ui/Text';

/** A page that threw: says so, and goes on from a fresh start. */
export const Broken = ({ error, retry }: ErrorBoundaryProps) => (
  <View role="main" style={{ flex: 1, backgroundColor: color.page }}>
    <Screen title={t('error.title')}>
      <View role="alert" style={{ gap: space.m }}>
        <Text>{t('error.broken')}</Text>
        <Text variant="small" tone="quiet">
          {error.message}
        </Text>
      </View>
      <Button kind="primary" label={t('ui.retry')} onPress={() => void retry()} />
      <Button label={t('error.reload')} onPress={() => window.location.reload()} />
    </Screen>
  </View>
);
