import { useState } from 'react';

import type { Gap } from '@/protocols/types';
import { t } from '@/shared/messages';
import { Button } from '../../ui/Button';
import { Dialog } from '../../ui/Dialog';
import { Field } from '../../ui/Field';
import { Select } from '../../ui/Select';
import { removeGap, updateGap } from '../edit/edit';
import { stepName } from '../edit/words';
import type { PartProps } from '../BenchEdit';
import { readFigure, writeFigure } from './figures';

const units = [
  { value: 'elapsedHours', label: t('protocols.unitHours') },
  { value: 'localDays', label: t('protocols.unitDays') },
  { value: 'milkings', label: t('protocols.unitMilkings') },
] as const;

interface GapForm {
  from: string;
  to: string;
  unit: Gap['unit'];
  clock: string;
}
type Figures = Record<'least' | 'ideal' | 'most' | 'tolerance', { value: number | undefined }>;

/** The gap as typed; a tolerance that was changed is the vet's own and loses the source's mark. */
function gapOf(gap: Gap, form: GapForm, read: Figures): Gap {
  const { least: _l, ideal: _i, most: _m, clock: _c, toleranceMinutes, toleranceMark, ...rest } = gap;
  const inDays = form.unit === 'localDays';
  const figure = (key: 'least' | 'ideal' | 'most') => (read[key].value === undefined ? {} : { [key]: read[key].value });
  const sameTolerance = read.tolerance.value === toleranceMinutes;
  return {
    ...rest,
    from: form.from,
    to: form.to,
    unit: form.unit,
    ...figure('least'),
    ...figure('ideal'),
    ...figure('most'),
    ...(inDays && form.clock ? { clock: form.clock } : {}),
    ...(inDays && read.tolerance.value !== undefined ? { toleranceMinutes: read.tolerance.value } : {}),
    ...(toleranceMark && sameTolerance ? { toleranceMark } : {}),
  };
}

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
    change((before) => updateGap(before, gap.id, gapOf(gap, form, read)));
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
