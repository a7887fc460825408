import { useState } from 'react';

import type { Gap } from '@/protocols/types';
import { t } from '@/shared/messages';
import { Button } from '../../ui/Button';
import { Dialog } from '../../ui/Dialog';
import { Field } from '../../ui/Field';
import { Select } from '../../ui/Select';
import { removeGap, updateGap } from '../edit/edit';
import { stepName } from '../edit/words';
import type { PartProps } from '../PartDialog';
import { readFigure, writeFigure } from './figures';

const units = [
  { value: 'elapsedHours', label: t('protocols.unitHours') },
  { value: 'localDays', label: t('protocols.unitDays') },
  { value: 'milkings', label: t('protocols.unitMilkings') },
] as const;

/** The figures of a gap. Order of least, ideal and most is the core's to judge: it says so at once in the findings. */
export function GapDialog({ gap, body, change, onClose }: PartProps & { gap: Gap }) {
  const [form, setForm] = useState({
    from: gap.from,
    to: gap.to,
    unit: gap.unit,
    least: writeFigure(gap.least),
    ideal: writeFigure(gap.ideal),
    most: writeFigure(gap.most),
    clock: gap.clock ?? '',
    tolerance: writeFigure(gap.toleranceMinutes),
  });
  const set = <K extends keyof typeof form>(key: K, value: (typeof form)[K]) => setForm({ ...form, [key]: value });
  const read = {
    least: readFigure(form.least),
    ideal: readFigure(form.ideal),
    most: readFigure(form.most),
    tolerance: readFigure(form.tolerance),
  };
  const badClock =
    form.clock !== '' && !/^([01]\d|2[0-3]):[0-5]\d$/.test(form.clock) ? t('protocols.badClock') : undefined;
  const bad = Object.values(read).some((one) => one.error) || badClock !== undefined;
  const steps = body.steps.map((step) => ({ value: step.id, label: stepName(step) }));
  const done = () => {
    const { least: _l, ideal: _i, most: _m, clock: _c, toleranceMinutes: _t, toleranceMark, ...rest } = gap;
    const sameTolerance = read.tolerance.value === gap.toleranceMinutes;
    const next: Gap = {
      ...rest,
      from: form.from,
      to: form.to,
      unit: form.unit,
      ...(read.least.value === undefined ? {} : { least: read.least.value }),
      ...(read.ideal.value === undefined ? {} : { ideal: read.ideal.value }),
      ...(read.most.value === undefined ? {} : { most: read.most.value }),
      ...(form.unit === 'localDays' && form.clock ? { clock: form.clock } : {}),
      ...(form.unit === 'localDays' && read.tolerance.value !== undefined
        ? { toleranceMinutes: read.tolerance.value }
        : {}),
      ...(toleranceMark && sameTolerance ? { toleranceMark } : {}),
    };
    change((before) => updateGap(before, gap.id, next));
    onClose();
  };
  const figure = (key: 'least' | 'ideal' | 'most') => (
    <Field
      key={key}
      label={t(`protocols.${key}`)}
      numeric
      value={form[key]}
      onChange={(value) => set(key, value)}
      error={read[key].error}
    />
  );
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('protocols.editGap')}
      actions={
        <>
          <Button label={t('protocols.done')} onPress={done} disabled={bad} />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
          <Button
            label={t('protocols.remove')}
            kind="danger"
            onPress={() => {
              change((before) => removeGap(before, gap.id));
              onClose();
            }}
          />
        </>
      }
    >
      <Select label={t('protocols.from')} value={form.from} onChange={(value) => set('from', value)} options={steps} />
      <Select label={t('protocols.toStep')} value={form.to} onChange={(value) => set('to', value)} options={steps} />
      <Select
        label={t('protocols.gapUnit')}
        value={form.unit}
        onChange={(value) => set('unit', value)}
        options={units}
      />
      {(['least', 'ideal', 'most'] as const).map(figure)}
      {form.unit === 'localDays' ? (
        <>
          <Field
            label={t('protocols.clock')}
            value={form.clock}
            onChange={(value) => set('clock', value)}
            placeholder="HH:MM"
            error={badClock}
          />
          <Field
            label={t('protocols.tolerance')}
            numeric
            value={form.tolerance}
            onChange={(value) => set('tolerance', value)}
            error={read.tolerance.error}
          />
        </>
      ) : null}
    </Dialog>
  );
}
