import { StyleSheet, View } from 'react-native';

import type { Output } from '@/shared/routes';
import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { LinkButton } from '../ui/Link';
import { Notice } from '../ui/Notice';
import { Text } from '../ui/Text';

interface ResultProps {
  result: Output<'POST /api/properties/:propertyId/animal-imports'>;
  onAnother: () => void;
}

/** What was done, and where to go on. */
export const ImportResult = ({ result, onAnother }: ResultProps) => (
  <View style={styles.result}>
    <Notice tone="good">{t('import.done', result.counts)}</Notice>
    {result.repeated ? <Text>{t('import.repeated')}</Text> : null}
    <View style={styles.next}>
      {result.animalIds.length > 0 ? (
        <LinkButton
          kind="primary"
          href="/cohorts/new"
          label={t('import.startCohort', { count: result.animalIds.length })}
        />
      ) : null}
      <LinkButton href="/herd" label={t('import.toHerd')} />
      <Button label={t('import.another')} onPress={onAnother} />
    </View>
  </View>
);

const styles = StyleSheet.create({
  result: { gap: space.m },
  next: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s },
});
