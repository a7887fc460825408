import { StyleSheet, View } from 'react-native';

import type { TaskStep } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Text } from '../ui/Text';
import { TreatmentMark } from '../ui/TreatmentMark';
import { doseWords, totalWords } from './doses';

/** What is done to each animal: the mark, the word, how much, how. */
export function GiveList({ steps, sinceAnchor }: { steps: readonly TaskStep[]; sinceAnchor: string | null }) {
  return (
    <View role="list" aria-label={t('task.give')} style={styles.list}>
      {steps.map((step) => (
        <View role="listitem" key={step.id} style={styles.row}>
          <TreatmentMark kind={step.kind} size={36} />
          <View style={styles.words}>
            <Text variant="subheading">{step.condition ? `${step.label}: ${step.condition}` : step.label}</Text>
            {step.doses.map((dose) => (
              <Text key={`${dose.active}${dose.amount ?? ''}`} tone="quiet">
                {[doseWords(dose), totalWords(dose)].filter(Boolean).join(' · ')}
              </Text>
            ))}
            {step.kind === 'fixedTimeService' && sinceAnchor ? <Text tone="quiet">{sinceAnchor}</Text> : null}
          </View>
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  list: { borderTopWidth: 0 },
  row: {
    flexDirection: 'row',
    gap: space.m,
    alignItems: 'center',
    paddingVertical: 10,
    borderBottomWidth: 1,
    borderBottomColor: color.rail,
  },
  words: { flex: 1, minWidth: 0 },
});
