import { View } from 'react-native';

import type { Output } from '@/shared/routes';
import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { LinkButton } from '../ui/Link';
import { Notice } from '../ui/Notice';

/** What was done, and where to go on. */
export const ImportResult = ({ result }: { result: Output<'POST /api/properties/:propertyId/animal-imports'> }) => (
  <View style={{ gap: space.m }}>
    <Notice tone="good">{t('import.done', result.counts)}</Notice>
    <LinkButton
      kind="primary"
      href="/cohorts/new"
      label={t('import.startCohort', { count: result.animalIds.length })}
    />
    <LinkButton href="/herd" label={t('import.toHerd')} />
  </View>
);
