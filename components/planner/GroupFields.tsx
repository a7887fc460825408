import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { animalClasses } from '@/protocols/types';
import type { CohortDetail } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Checkbox } from '../ui/Checkbox';
import { DateTimeField } from '../ui/DateTimeField';
import { Field } from '../ui/Field';
import { Segmented } from '../ui/RadioGroup';
import { Select } from '../ui/Select';
import { ChooseAnimals } from './ChooseAnimals';
import { headOf, type GroupForm } from './form';

interface GroupProps {
  cohort: CohortDetail;
  group: GroupForm;
  onChange: (group: GroupForm) => void;
  onRemove?: () => void;
}

/** A group: its name, class, animals or a head count alone, and its own time if it has one. */
export function GroupFields({ cohort, group, onChange, onRemove }: GroupProps) {
  const [choosing, setChoosing] = useState(false);
  const [ownTime, setOwnTime] = useState(group.local !== '');
  const wrong = group.by === 'count' && group.head !== '' && headOf(group) === null;
  return (
    <View style={styles.group} role="group" aria-label={group.name}>
      <Field label={t('planner.group')} value={group.name} onChange={(name) => onChange({ ...group, name })} />
      <Select
        label={t('planner.class')}
        value={group.class}
        onChange={(value) => onChange({ ...group, class: value })}
        options={animalClasses.map((value) => ({ value, label: tData(`class.${value}`, value) }))}
      />
      <Segmented
        label={t('planner.animals')}
        value={group.by}
        onChange={(by) => onChange({ ...group, by })}
        options={[
          { value: 'count', label: t('planner.byCount') },
          { value: 'tags', label: t('planner.byTags') },
        ]}
      />
      {group.by === 'count' ? (
        <Field
          label={t('planner.headCount')}
          numeric
          value={group.head}
          onChange={(head) => onChange({ ...group, head })}
          error={wrong ? t('planner.headWrong') : undefined}
        />
      ) : (
        <Button
          label={`${t('planner.choose')} (${t('planner.chosen', { count: group.animalIds.length })})`}
          onPress={() => setChoosing(true)}
        />
      )}
      <Checkbox
        label={t('planner.groupTime')}
        checked={ownTime}
        onChange={(checked) => {
          setOwnTime(checked);
          if (!checked) onChange({ ...group, local: '' });
        }}
      />
      {ownTime ? (
        <DateTimeField
          label={t('planner.groupTime')}
          value={group.local}
          zone={cohort.zone}
          onChange={(local) => onChange({ ...group, local })}
        />
      ) : null}
      {onRemove ? (
        <Button kind="quiet" label={t('planner.removeGroup', { name: group.name })} onPress={onRemove} />
      ) : null}
      {choosing ? (
        <ChooseAnimals
          propertyId={cohort.propertyId}
          group={group}
          onClose={() => setChoosing(false)}
          onChoose={(animalIds) => onChange({ ...group, animalIds })}
        />
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  group: { gap: space.m, paddingTop: space.m, borderTopWidth: 1, borderTopColor: color.rail },
});
