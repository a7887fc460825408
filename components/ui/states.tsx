import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { ApiFailure } from '@/lib/api';
import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from './Button';
import { Notice } from './Notice';
import { Text } from './Text';

/** Says while something is fetched; the words come after a moment, so that a quick answer doesn't flicker. */
export const Loading = ({ label }: { label?: string }) => (
  <View role="status" style={styles.state}>
    <Text tone="quiet">{label ?? t('ui.loading')}</Text>
  </View>
);

/** Nothing here yet: says so and what the next step is. */
export const EmptyState = ({ title, next, action }: { title: string; next?: string; action?: ReactNode }) => (
  <View style={styles.state}>
    <Text variant="subheading">{title}</Text>
    {next ? <Text tone="quiet">{next}</Text> : null}
    {action}
  </View>
);

/** Words for anything that was thrown: the server's sentence, or that it can't be reached. */
export const failureWords = (error: unknown): string =>
  error instanceof ApiFailure ? error.message : t('error.unexpected');

/** What happened and how to go on. A server that is down is said to be down. */
export function ErrorState({ error, onRetry }: { error: unknown; onRetry?: () => void }) {
  const down = error instanceof ApiFailure && (error.id === 'unreachable' || error.id === 'unavailable');
  return (
    <View style={styles.state}>
      <Notice
        tone="stop"
        title={t(down ? 'error.downTitle' : 'error.title')}
        action={onRetry ? <Button label={t('ui.retry')} onPress={onRetry} /> : null}
      >
        {failureWords(error)}
      </Notice>
    </View>
  );
}

interface QueryLike<Data> {
  data: Data | undefined;
  error: unknown;
  refetch: () => unknown;
}

/** Loading, error with retry, or what came. What is already here stays when asking again fails. */
export function Loaded<Data>({ query, children }: { query: QueryLike<Data>; children: (data: Data) => ReactNode }) {
  if (query.data !== undefined) return <>{children(query.data)}</>;
  if (query.error) return <ErrorState error={query.error} onRetry={() => void query.refetch()} />;
  return <Loading />;
}

const styles = StyleSheet.create({ state: { padding: space.m, gap: space.m, alignItems: 'flex-start' } });
