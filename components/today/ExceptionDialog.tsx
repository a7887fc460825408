import { useState } from 'react';

import type { NewRecord } from '@/hooks/useTaskWork';
import type { TaskStep } from '@/shared/contracts/cohorts';
import { t, tData } from '@/shared/messages';
import { Button } from '../ui/Button';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { RadioGroup, Segmented } from '../ui/RadioGroup';
import { Select } from '../ui/Select';
import type { WorkAnimal } from './progress';

type Outcome = 'notDone' | 'lost' | 'withdrawn';
const reasons = [
  'absent',
  'sick',
  'injured',
  'refusedByCrew',
  'deviceMissing',
  'servedEarly',
  'pregnant',
  'other',
] as const;

/** The usual reason of an outcome, so that two taps are enough. */
const usual: Record<Outcome, (typeof reasons)[number]> = {
  notDone: 'absent',
  lost: 'deviceMissing',
  withdrawn: 'servedEarly',
};

interface ExceptionProps {
  animal: WorkAnimal;
  steps: readonly TaskStep[];
  onClose: () => void;
  onRecord: (record: Omit<NewRecord, 'animalId'>) => void;
}

/** What is different with one animal: the whole visit, or one step of it while the rest was done. */
export function ExceptionDialog({ animal, steps, onClose, onRecord }: ExceptionProps) {
  const [outcome, setOutcome] = useState<Outcome>('notDone');
  const [reason, setReason] = useState<(typeof reasons)[number]>('absent');
  const [step, setStep] = useState('all');
  const [note, setNote] = useState('');
  const choose = (next: Outcome) => {
    setOutcome(next);
    setReason(usual[next]);
    const device = steps.find((s) => s.kind === 'deviceOut' || s.kind === 'deviceCheck');
    setStep(next === 'lost' && device ? device.id : 'all');
  };
  const save = () => {
    const words = note.trim() ? { note: note.trim() } : {};
    if (step === 'all') onRecord({ outcome, reason, ...words });
    else onRecord({ outcome: 'done', exceptions: [{ stepId: step, outcome, reason }], ...words });
  };
  const outcomes: Outcome[] = ['notDone', 'lost', 'withdrawn'];
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('task.exceptionTitle', { tag: animal.tag })}
      actions={
        <>
          <Button label={t('task.exceptionSave')} onPress={save} size={64} />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} size={64} />
        </>
      }
    >
      <RadioGroup
        label={t('task.exceptionWhat')}
        value={outcome}
        onChange={choose}
        options={outcomes.map((value) => ({ value, label: tData(`task.outcome.${value}`, value) }))}
      />
      <Select
        label={t('task.exceptionWhy')}
        value={reason}
        onChange={setReason}
        options={reasons.map((value) => ({ value, label: tData(`task.reason.${value}`, value) }))}
      />
      {steps.length > 1 && outcome !== 'withdrawn' ? (
        <Segmented
          label={t('task.exceptionStep')}
          value={step}
          onChange={setStep}
          options={[
            { value: 'all', label: t('task.exceptionAll') },
            ...steps.map((s) => ({ value: s.id, label: s.label })),
          ]}
        />
      ) : null}
      <Field label={t('task.exceptionNote')} value={note} onChange={setNote} multiline rows={2} maxLength={2000} />
    </Dialog>
  );
}
