import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useCohort, useMove, useMovePreview } from '@/hooks/useCohorts';
import type { MovePreview, Task } from '@/shared/contracts/cohorts';
import { t } from '@/shared/messages';
import { localOf } from '@/shared/when';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DateTimeField, isWholeLocal } from '../ui/DateTimeField';
import { Dialog } from '../ui/Dialog';
import { FindingList } from '../ui/Finding';
import { Notice } from '../ui/Notice';
import { failureWords } from '../ui/states';
import { Text } from '../ui/Text';
import { toast } from '../ui/toast';

/** Moving a task shows what it does to the others first; only then can it be moved. */
export function MoveDialog({ task: opened, onClose }: { task: Task; onClose: () => void }) {
  const task = useCohort(opened.cohortId).data?.tasks.find((other) => other.id === opened.id) ?? opened;
  const start = localOf(Date.parse(task.dueAt), task.zone);
  const [local, setLocal] = useState(start);
  const preview = useMovePreview(task.id);
  const move = useMove(task.id);
  const input = { dueLocal: local, revision: task.revision };
  const look = () => preview.mutate(input);
  const seen = preview.data && preview.variables?.dueLocal === local ? preview.data : null;
  const error = move.error ?? preview.error;
  const unchanged = local === start;
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('move.title', { title: `${task.title}, ${task.group}` })}
      actions={
        <>
          {seen?.canMove ? (
            <Button
              kind="primary"
              label={
                seen.effects.length > 1 ? t('move.confirmMany', { count: seen.effects.length }) : t('move.confirm')
              }
              busy={move.isPending}
              onPress={() =>
                move.mutate(input, {
                  onSuccess: () => {
                    toast(t('move.done'));
                    onClose();
                  },
                })
              }
            />
          ) : (
            <Button
              label={t('move.look')}
              onPress={look}
              busy={preview.isPending}
              disabled={unchanged || !isWholeLocal(local)}
              why={unchanged ? t('move.same') : undefined}
            />
          )}
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <DateTimeField label={t('move.to')} value={local} onChange={setLocal} zone={task.zone} />
      {error ? <Notice tone="stop">{failureWords(error)}</Notice> : null}
      {seen ? <Effects seen={seen} /> : null}
    </Dialog>
  );
}

function Effects({ seen }: { seen: MovePreview }) {
  return (
    <View style={styles.effects} role="status">
      <Text variant="subheading" level={3}>
        {t('move.effects')}
      </Text>
      {seen.effects.map((effect) => (
        <View key={effect.taskId} style={styles.row}>
          <Text strong>{`${effect.title}, ${effect.group}`}</Text>
          <Text>{`${effect.fromLocal} → ${effect.toLocal}`}</Text>
          <Text
            variant="small"
            tone="quiet"
          >{`${t('cohorts.window')}: ${effect.windowFromLocal} – ${effect.windowToLocal}`}</Text>
        </View>
      ))}
      {seen.effects.length === 1 ? <Text tone="quiet">{t('move.nothingElse')}</Text> : null}
      {seen.canMove ? null : <Notice tone="stop">{t('move.stopped')}</Notice>}
      <FindingList findings={seen.findings} />
    </View>
  );
}

const styles = StyleSheet.create({
  effects: { gap: space.s },
  row: { paddingVertical: space.s, borderBottomWidth: 1, borderBottomColor: color.rail },
});
