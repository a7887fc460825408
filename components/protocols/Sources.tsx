import { StyleSheet, View } from 'react-native';

import type { ProtocolBody } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Text } from '../ui/Text';

/** Where the figures come from, and whether they were read or are from memory. */
export const Sources = ({ body }: { body: ProtocolBody }) => (
  <View>
    <Text variant="heading" level={2}>
      {t('protocols.sourcesTitle')}
    </Text>
    <Text variant="small" tone="quiet">
      {t('protocols.confirmDoses')}
    </Text>
    {body.sources.map((source) => (
      <View key={source.id} style={styles.source}>
        <Text variant="small" strong>
          {source.title}
        </Text>
        <Text variant="small" tone="quiet">
          {[source.publisher, source.year, tData(`protocols.mark.${source.mark}`, source.mark)]
            .filter(Boolean)
            .join(' · ')}
        </Text>
        {source.note ? <Text variant="small">{source.note}</Text> : null}
      </View>
    ))}
  </View>
);

const styles = StyleSheet.create({
  source: { paddingVertical: space.s, borderBottomWidth: 1, borderBottomColor: color.rail },
});
