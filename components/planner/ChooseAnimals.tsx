import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { allAnimals, useAnimals } from '@/hooks/useHerd';
import { animalClasses, type AnimalClass } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Checkbox } from '../ui/Checkbox';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Select } from '../ui/Select';
import { Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import type { GroupForm } from './form';

interface ChooseProps {
  propertyId: string;
  group: GroupForm;
  onClose: () => void;
  onChoose: (animalIds: string[]) => void;
}

/** Animals of the herd that are in no cohort: one by one, or all that match. */
export function ChooseAnimals({ propertyId, group, onClose, onChoose }: ChooseProps) {
  const [search, setSearch] = useState('');
  const [animalClass, setClass] = useState<AnimalClass>(group.class);
  const [chosen, setChosen] = useState(new Set(group.animalIds));
  const [busy, setBusy] = useState(false);
  const filter = { search, class: animalClass, available: true };
  const query = useAnimals(propertyId, filter);
  const toggle = (id: string, on: boolean) => {
    const next = new Set(chosen);
    if (on) next.add(id);
    else next.delete(id);
    setChosen(next);
  };
  const chooseAll = async () => {
    setBusy(true);
    const all = await allAnimals(propertyId, filter).finally(() => setBusy(false));
    setChosen(new Set([...chosen, ...all.map((animal) => animal.id)]));
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('planner.chooseTitle', { name: group.name })}
      actions={
        <>
          <Button
            label={t('planner.take', { count: chosen.size })}
            onPress={() => {
              onChoose([...chosen]);
              onClose();
            }}
          />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <Field label={t('herd.search')} kind="search" value={search} onChange={setSearch} />
      <Select
        label={t('herd.class')}
        value={animalClass}
        onChange={setClass}
        options={animalClasses.map((value) => ({ value, label: tData(`class.${value}`, value) }))}
      />
      <Text strong role="status">
        {t('planner.chosen', { count: chosen.size })}
      </Text>
      <View style={styles.row}>
        <Button label={t('planner.chooseEvery')} onPress={() => void chooseAll()} busy={busy} />
        <Button label={t('planner.chooseNone')} kind="quiet" onPress={() => setChosen(new Set())} />
      </View>
      <Loaded query={query}>
        {(data) => (
          <View style={styles.list}>
            {data.pages
              .flatMap((page) => page.items)
              .map((animal) => (
                <View key={animal.id} style={styles.animal}>
                  <Checkbox
                    label={[
                      animal.tag,
                      animal.paddock,
                      animal.knownEmpty === true ? null : t('herd.knownEmpty.unknown'),
                    ]
                      .filter(Boolean)
                      .join(' · ')}
                    checked={chosen.has(animal.id)}
                    onChange={(on) => toggle(animal.id, on)}
                  />
                </View>
              ))}
            {query.hasNextPage ? <Button label={t('ui.more')} onPress={() => void query.fetchNextPage()} /> : null}
          </View>
        )}
      </Loaded>
    </Dialog>
  );
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s },
  list: { borderTopWidth: 1, borderTopColor: color.rail },
  animal: { borderBottomWidth: 1, borderBottomColor: color.rail },
});
