import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { t, tData } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { RailList, RailRow } from '../ui/Rail';
import { Text } from '../ui/Text';
import type { WorkProps } from './AnimalWork';

/** A group without tags: how many were done, and what was recorded so far. */
export function HeadWork({ work, progress, recorder, batchId, mayRecord }: WorkProps) {
  const [typed, setTyped] = useState('');
  const head = typed.trim() === '' ? progress.headLeft : Number(typed);
  const wrong = !Number.isInteger(head) || head < 1 || head > progress.headLeft;
  const record = () => {
    if (wrong) return;
    setTyped('');
    void recorder.record({ animalId: null, head, outcome: 'done', batchId });
  };
  const live = work.records.filter((r) => r.undoneBy === null);
  return (
    <View style={styles.work}>
      <Text tone="quiet">{t('task.headOnly')}</Text>
      {mayRecord && progress.headLeft > 0 ? (
        <Form onSubmit={record}>
          <Field
            label={t('task.headNow')}
            numeric
            value={typed}
            onChange={setTyped}
            placeholder={String(progress.headLeft)}
            error={typed !== '' && wrong ? t('task.headWrong', { left: progress.headLeft }) : undefined}
          />
          <Button
            kind="primary"
            size={64}
            fill
            label={t('task.recordHead', { count: wrong ? progress.headLeft : head })}
            disabled={wrong}
            onPress={record}
          />
        </Form>
      ) : null}
      {live.length > 0 ? (
        <RailList label={t('task.filterDone')}>
          {live.map((r) => (
            <RailRow
              key={r.id}
              title={`${t('cohorts.head', { count: r.head })} ${tData(`task.outcome.${r.outcome}`, r.outcome)}`}
              subtitle={t('task.recordedBy', { clock: r.atLocal, name: r.by })}
              trailing={
                mayRecord ? (
                  <Button label={t('task.undo')} kind="quiet" onPress={() => void recorder.undo(r.id)} />
                ) : null
              }
            />
          ))}
        </RailList>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({ work: { gap: space.m } });
