import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import type { useRecorder } from '@/hooks/useTaskWork';
import type { TaskWork } from '@/shared/contracts/work';
import { t, tData } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Confirm } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Segmented } from '../ui/RadioGroup';
import { TagChip } from '../ui/TagChip';
import { Text } from '../ui/Text';
import { AnimalRows } from './AnimalRows';
import { stepsFor } from './doses';
import { ExceptionDialog } from './ExceptionDialog';
import { matching, type Progress, type WorkAnimal } from './progress';

export interface WorkProps {
  work: TaskWork;
  progress: Progress;
  recorder: ReturnType<typeof useRecorder>;
  batchId: string | null;
  mayRecord: boolean;
}

type Show = 'left' | 'done' | 'all';

/** One animal after another at the top, the whole group below it. */
export function AnimalWork({ work, progress, recorder, batchId, mayRecord }: WorkProps) {
  const [typed, setTyped] = useState('');
  const [show, setShow] = useState<Show>('left');
  const [observed, setObserved] = useState<Record<string, string>>({});
  const [different, setDifferent] = useState<WorkAnimal | null>(null);
  const [askRest, setAskRest] = useState(false);
  const found = matching(progress.left, typed);
  const current = found[0];
  const steps = stepsFor(work.task.steps, observed);
  const done = (animal: WorkAnimal) => {
    void recorder.record({ animalId: animal.animalId, outcome: 'done', observed, batchId });
    setTyped('');
    setObserved({});
  };
  const listed = matching({ left: progress.left, done: progress.done, all: progress.animals }[show], typed);
  return (
    <View style={styles.work}>
      <Form label={t('task.search')} onSubmit={() => mayRecord && current && typed && setTyped(current.tag)}>
        <Field label={t('task.search')} hint={t('task.searchHint')} kind="search" value={typed} onChange={setTyped} />
      </Form>
      {mayRecord && current ? (
        <View style={styles.current}>
          <TagChip tag={current.tag} size="l" />
          <Text variant="small" tone="quiet">
            {[current.eid ? `${t('herd.eid')} ${current.eid}` : null, tData(`classOne.${current.class}`, current.class)]
              .filter(Boolean)
              .join(' · ')}
          </Text>
          <Observations work={work} observed={observed} onChange={setObserved} />
          <Button
            label={t('task.different')}
            accessibleLabel={t('task.differentTag', { tag: current.tag })}
            size={64}
            fill
            onPress={() => setDifferent(current)}
          />
          <Button
            kind="primary"
            size={64}
            fill
            label={steps.length > 1 ? t('task.allDone', { count: steps.length }) : t('task.doneOne')}
            accessibleLabel={t('task.recordTag', { tag: current.tag })}
            onPress={() => done(current)}
          />
        </View>
      ) : null}
      {typed && !current && show === 'left' ? <Text>{t('task.noMatch')}</Text> : null}
      <Segmented
        label={t('task.animals')}
        value={show}
        onChange={setShow}
        options={[
          { value: 'left', label: `${t('task.filterLeft')} ${progress.left.length}` },
          { value: 'done', label: `${t('task.filterDone')} ${progress.done.length}` },
          { value: 'all', label: `${t('task.filterAll')} ${progress.animals.length}` },
        ]}
      />
      <AnimalRows
        animals={listed}
        zone={work.task.zone}
        mayRecord={mayRecord}
        onUndo={(id) => void recorder.undo(id)}
        onDone={done}
        onDifferent={setDifferent}
      />
      {mayRecord && progress.left.length > 0 ? (
        <Button label={t('task.rest', { count: progress.left.length })} fill onPress={() => setAskRest(true)} />
      ) : null}
      <Confirm
        open={askRest}
        title={t('task.rest', { count: progress.left.length })}
        body={t('task.restAsk', { count: progress.left.length })}
        confirmLabel={t('task.restConfirm', { count: progress.left.length })}
        onClose={() => setAskRest(false)}
        onConfirm={() => {
          setAskRest(false);
          void recorder.rest(
            progress.left.map((animal) => animal.animalId),
            progress.left.length,
            batchId,
          );
        }}
      />
      {different ? (
        <ExceptionDialog
          animal={different}
          steps={work.task.steps}
          onClose={() => setDifferent(null)}
          onRecord={(record) => {
            setDifferent(null);
            setTyped('');
            void recorder.record({ ...record, animalId: different.animalId, observed, batchId });
          }}
        />
      ) : null}
    </View>
  );
}

interface ObservationProps {
  work: TaskWork;
  observed: Record<string, string>;
  onChange: (observed: Record<string, string>) => void;
}

/** What was seen in the animal decides which steps it gets; not seen counts as the protocol says. */
function Observations({ work, observed, onChange }: ObservationProps) {
  return (
    <>
      {work.task.steps.flatMap((step) =>
        step.observation
          ? [
              <Segmented
                key={step.id}
                label={step.observation.label}
                value={observed[step.observation.id] ?? ''}
                onChange={(value) => step.observation && onChange({ ...observed, [step.observation.id]: value })}
                options={step.observation.results.map((result) => ({ value: result.id, label: result.label }))}
              />,
            ]
          : [],
      )}
    </>
  );
}

const styles = StyleSheet.create({
  work: { gap: space.m },
  current: { alignItems: 'center', gap: space.s },
});
