import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { t, tData } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { TagChip } from '../ui/TagChip';
import { Text } from '../ui/Text';
import type { WorkAnimal } from './progress';

interface RowsProps {
  animals: readonly WorkAnimal[];
  zone: string;
  mayRecord: boolean;
  onUndo: (recordId: string) => void;
  onDone: (animal: WorkAnimal) => void;
  onDifferent: (animal: WorkAnimal) => void;
}

const pageSize = 30;

/** The animals of the group, each with how it stands. Shown in parts, so that a large mob stays quick. */
export function AnimalRows({ animals, mayRecord, onUndo, onDone, onDifferent }: RowsProps) {
  const [shown, setShown] = useState(pageSize);
  return (
    <View role="list" aria-label={t('task.animals')} style={styles.list}>
      {animals.slice(0, shown).map((animal) => (
        <View role="listitem" key={animal.animalId} style={styles.row}>
          <TagChip tag={animal.tag} size="s" />
          <Text variant="small" tone="quiet" style={styles.words}>
            {stateWords(animal)}
          </Text>
          {mayRecord && animal.record ? (
            <Button
              label={t('task.undo')}
              kind="quiet"
              accessibleLabel={t('task.undoTag', { tag: animal.tag })}
              onPress={() => animal.record && onUndo(animal.record.id)}
            />
          ) : null}
          {mayRecord && !animal.record && !animal.pending ? (
            <View style={styles.actions}>
              <Button
                label="…"
                kind="quiet"
                accessibleLabel={t('task.differentTag', { tag: animal.tag })}
                onPress={() => onDifferent(animal)}
              />
              <Button
                label={t('task.doneOne')}
                accessibleLabel={t('task.recordTag', { tag: animal.tag })}
                onPress={() => onDone(animal)}
              />
            </View>
          ) : null}
        </View>
      ))}
      {animals.length > shown ? (
        <View role="listitem" style={styles.row}>
          <Button label={t('ui.more')} onPress={() => setShown(shown + 5 * pageSize)} />
        </View>
      ) : null}
    </View>
  );
}

function stateWords(animal: WorkAnimal): string {
  const { record } = animal;
  if (animal.pending) return t('ui.kept');
  if (!record) return '';
  const when = t('task.recordedBy', { clock: record.atLocal, name: record.by });
  if (record.outcome !== 'done')
    return [
      tData(`task.outcome.${record.outcome}`, record.outcome),
      record.reason ? tData(`task.reason.${record.reason}`, record.reason) : null,
      when,
    ]
      .filter(Boolean)
      .join(' · ');
  const odd = record.exceptions.map((e) =>
    [tData(`task.outcome.${e.outcome}`, e.outcome), e.reason ? tData(`task.reason.${e.reason}`, e.reason) : null]
      .filter(Boolean)
      .join(': '),
  );
  return [when, ...odd].join(' · ');
}

const styles = StyleSheet.create({
  list: { borderTopWidth: 1, borderTopColor: color.rail },
  row: {
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.m,
    minHeight: 60,
    paddingVertical: 4,
    borderBottomWidth: 1,
    borderBottomColor: color.rail,
  },
  words: { flex: 1, minWidth: 0 },
  actions: { flexDirection: 'row', gap: space.xs },
});
