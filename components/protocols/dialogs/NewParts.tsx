import { useState } from 'react';

import { stepKinds, type StepKind } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import { Button } from '../../ui/Button';
import { Dialog } from '../../ui/Dialog';
import { Field } from '../../ui/Field';
import { Select } from '../../ui/Select';
import { addGap, addVisit } from '../edit/edit';
import { stepName } from '../edit/words';
import type { PartProps } from '../BenchEdit';

/** A new visit begins with one step, a day after the last. */
export function NewVisitDialog({ body, change, onClose }: PartProps) {
  const [label, setLabel] = useState(t('protocols.visitN', { n: body.visits.length + 1 }));
  const [kind, setKind] = useState<StepKind>('prostaglandin');
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('protocols.addVisit')}
      actions={
        <>
          <Button
            label={t('protocols.addVisit')}
            disabled={label.trim() === ''}
            onPress={() => {
              change((before) => addVisit(before, label.trim(), kind).body);
              onClose();
            }}
          />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <Field label={t('protocols.visitLabel')} value={label} onChange={setLabel} maxLength={120} />
      <Select
        label={t('protocols.kind')}
        value={kind}
        onChange={setKind}
        options={stepKinds.map((value) => ({ value, label: tData(`step.${value}`, value) }))}
      />
    </Dialog>
  );
}

/** A new gap of a day between two steps, to be written in the gap's own dialog. */
export function NewGapDialog({ body, change, onClose }: PartProps) {
  const steps = body.steps.map((step) => ({ value: step.id, label: stepName(step) }));
  const [from, setFrom] = useState(steps[0]?.value ?? '');
  const [to, setTo] = useState(steps.at(-1)?.value ?? '');
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('protocols.addGap')}
      actions={
        <>
          <Button
            label={t('protocols.addGap')}
            disabled={from === to}
            onPress={() => {
              change((before) => addGap(before, from, to).body);
              onClose();
            }}
          />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
        </>
      }
    >
      <Select label={t('protocols.from')} value={from} onChange={setFrom} options={steps} />
      <Select label={t('protocols.toStep')} value={to} onChange={setTo} options={steps} />
    </Dialog>
  );
}
