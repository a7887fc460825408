import { StyleSheet, View } from 'react-native';

import type { TaskStep } from '@/shared/contracts/cohorts';
import { space } from '../theme/tokens';
import { Text } from '../ui/Text';
import { TreatmentMark } from '../ui/TreatmentMark';
import { shortDose } from './doses';

/** What is given, as marks with their words: for a list. */
export const StepChips = ({ steps }: { steps: readonly TaskStep[] }) => (
  <View style={styles.chips}>
    {steps.map((step) => {
      const dose = shortDose(step);
      return (
        <View key={step.id} style={styles.chip}>
          <TreatmentMark kind={step.kind} size={22} />
          <Text variant="small" strong>
            {dose ? `${step.label} ${dose}` : step.label}
          </Text>
        </View>
      );
    })}
  </View>
);

const styles = StyleSheet.create({
  chips: { flexDirection: 'row', flexWrap: 'wrap', columnGap: space.m, rowGap: space.s, paddingTop: space.s },
  chip: { flexDirection: 'row', alignItems: 'center', gap: 6 },
});
