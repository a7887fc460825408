import { StyleSheet, View } from 'react-native';

import type { ProtocolBody } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Text } from '../ui/Text';
import type { BenchEdit } from './BenchEdit';
import { stepName } from './edit/words';

/** What stands beside the steps: animals, choices, what is seen, facts asked of the animal, notes. */
export function About({ body, edit }: { body: ProtocolBody; edit?: BenchEdit }) {
  const nameOf = (id: string) => {
    const step = body.steps.find((s) => s.id === id);
    return step ? stepName(step) : id;
  };
  const facts = body.factGaps.flatMap((gap) => {
    const fact = tData(`protocols.fact.${gap.fact}`, gap.fact);
    return [
      gap.leastDays === undefined
        ? null
        : t('protocols.factGap', { fact, days: gap.leastDays, step: nameOf(gap.to).toLowerCase() }),
      gap.mostDays === undefined
        ? null
        : t('protocols.factGapMost', { fact, days: gap.mostDays, step: nameOf(gap.to).toLowerCase() }),
    ].filter((line) => line !== null);
  });
  const options = body.options.map(
    (option) => `${option.label}: ${option.values.map((value) => value.label).join(` ${t('protocols.or')} `)}`,
  );
  const seen = body.observations.map((one) => {
    const unknown = one.results.find((result) => result.id === one.onUnknown)?.label ?? t('protocols.askVet');
    return `${one.label}: ${one.results.map((result) => result.label).join(` ${t('protocols.or')} `)}. ${t('protocols.onUnknown', { label: unknown })}`;
  });
  return (
    <View style={styles.about}>
      {edit ? (
        <View style={styles.row}>
          <Button label={t('protocols.addVisit')} onPress={() => edit.open({ what: 'newVisit' })} />
          <Button label={t('protocols.addGap')} onPress={() => edit.open({ what: 'newGap' })} />
          <Button label={t('protocols.editDetails')} onPress={() => edit.open({ what: 'details' })} />
        </View>
      ) : null}
      <Part
        title={t('protocols.classes')}
        lines={[body.classes.map((c) => tData(`class.${c}`, c)).join(', '), ...facts]}
      />
      <Part title={t('protocols.options')} lines={options} />
      <Part title={t('protocols.observations')} lines={seen} />
      <Part title={t('protocols.notes')} lines={body.notes} />
    </View>
  );
}

const Part = ({ title, lines }: { title: string; lines: string[] }) =>
  lines.length === 0 ? null : (
    <View>
      <Text variant="subheading" level={2}>
        {title}
      </Text>
      {lines.map((line) => (
        <Text key={line}>{line}</Text>
      ))}
    </View>
  );

const styles = StyleSheet.create({
  about: { gap: space.m, paddingTop: space.l },
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s },
});
