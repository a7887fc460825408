import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useFlush, useOutboxEntries, useRecorder, useTaskWork } from '@/hooks/useTaskWork';
import { useCan } from '@/hooks/useMe';
import type { TaskWork } from '@/shared/contracts/work';
import { t } from '@/shared/messages';
import { clock, day, duration } from '@/shared/when';
import { color, font, space } from '../theme/tokens';
import { useNow } from '../ui/clock';
import { Notice } from '../ui/Notice';
import { Select } from '../ui/Select';
import { Loaded } from '../ui/states';
import { Text } from '../ui/Text';
import { AnimalWork } from './AnimalWork';
import { Cautions } from './Cautions';
import { GiveList } from './GiveList';
import { HeadWork } from './HeadWork';
import { progressOf, type Progress } from './progress';

/** The work of a task: how it stands, what to give, the caution, and the animals. */
export function TaskPanel({ taskId, titled = false }: { taskId: string; titled?: boolean }) {
  const query = useTaskWork(taskId);
  return <Loaded query={query}>{(work) => <TaskContent work={work} titled={titled} />}</Loaded>;
}

function TaskContent({ work, titled }: { work: TaskWork; titled: boolean }) {
  const { task } = work;
  const flush = useFlush();
  const entries = useOutboxEntries();
  const recorder = useRecorder(task, flush);
  const [batchId, setBatchId] = useState<string | null>(null);
  const can = useCan();
  const progress = progressOf(work, entries);
  const headOnly = work.animals.length === 0;
  const mayRecord = can('work.record', task.propertyId) && task.state !== 'cancelled';
  return (
    <View style={styles.panel}>
      {titled ? null : (
        <View>
          <Text variant="heading" level={2}>
            {task.title}
          </Text>
          <Text variant="small" tone="quiet">{`${task.group} · ${task.cohort} · ${task.property}`}</Text>
        </View>
      )}
      <Figures work={work} progress={progress} />
      <GiveList steps={task.steps} sinceAnchor={task.sinceAnchor} />
      <Cautions steps={task.steps} />
      {work.authorityNote ? (
        <Notice tone="stop" silent>
          {work.authorityNote}
        </Notice>
      ) : null}
      {work.direction ? (
        <Text variant="small" tone="quiet">
          {t('task.direction', { name: work.direction })}
        </Text>
      ) : null}
      {work.batches.length > 0 ? (
        <Select
          label={t('task.batch')}
          value={batchId ?? 'none'}
          onChange={(value) => setBatchId(value === 'none' ? null : value)}
          options={[
            { value: 'none', label: t('task.batchNone') },
            ...work.batches.map((batch) => ({ value: batch.id, label: `${batch.label} (${batch.expiry})` })),
          ]}
        />
      ) : null}
      {progress.headLeft === 0 && task.head > 0 ? (
        <Notice tone="good" title={t('task.finished')}>
          {t('task.finishedHint', { done: progress.headDone, exceptions: task.exceptions })}
        </Notice>
      ) : null}
      {headOnly ? (
        <HeadWork work={work} progress={progress} recorder={recorder} batchId={batchId} mayRecord={mayRecord} />
      ) : (
        <AnimalWork work={work} progress={progress} recorder={recorder} batchId={batchId} mayRecord={mayRecord} />
      )}
    </View>
  );
}

/** Head left, when it is due, and the clock to the window's end. */
function Figures({ work, progress }: { work: TaskWork; progress: Progress }) {
  const { task } = work;
  const now = useNow(15_000);
  const to = Date.parse(task.windowTo);
  const over = now > to;
  const cell = (big: string, small: string, tone: 'ink' | 'stop' = 'ink') => (
    <View style={styles.cell}>
      <Text style={styles.big} tone={tone}>
        {big}
      </Text>
      <Text variant="small" tone="quiet">
        {small}
      </Text>
    </View>
  );
  return (
    <View style={styles.figures}>
      {cell(String(progress.headLeft), t('task.leftOf', { head: task.head }))}
      {cell(clock(Date.parse(task.dueAt), task.zone), `${t('task.due')} ${day(Date.parse(task.dueAt), task.zone)}`)}
      {cell(
        clock(to, task.zone),
        over
          ? `${t('task.windowEnded')} ${t('ui.ago', { time: duration((now - to) / 60_000) })}`
          : `${t('task.windowEnds')} ${t('ui.in', { time: duration((to - now) / 60_000) })}`,
        over && progress.headLeft > 0 ? 'stop' : 'ink',
      )}
    </View>
  );
}

const styles = StyleSheet.create({
  panel: { gap: space.m },
  figures: { flexDirection: 'row', borderBottomWidth: 3, borderBottomColor: color.ink, marginTop: -space.s },
  cell: { flex: 1, paddingVertical: space.s, paddingRight: space.s },
  big: { fontFamily: font.figureBold, fontWeight: '700', fontSize: 40, lineHeight: 44 },
});
