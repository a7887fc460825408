import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useSaveAnimal } from '@/hooks/useHerd';
import { fieldError } from '@/lib/api';
import { useKept } from '@/lib/keep';
import { animalClasses } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DateField } from '../ui/DateTimeField';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Notice } from '../ui/Notice';
import { Segmented } from '../ui/RadioGroup';
import { Select } from '../ui/Select';
import { failureWords } from '../ui/states';
import { toast } from '../ui/toast';
import { isNoFigure, readFigure } from './figure';

type Detail = Output<'GET /api/animals/:animalId'>;

const first = (animal: Detail) => ({
  class: animal.class,
  breed: animal.breed ?? '',
  birth: animal.birth ?? '',
  lastCalving: animal.lastCalving ?? '',
  lastService: animal.lastService ?? '',
  knownEmpty: animal.knownEmpty === null ? 'unknown' : animal.knownEmpty ? 'yes' : 'no',
  weightKg: animal.weightKg === null ? '' : String(animal.weightKg),
  condition: animal.condition === null ? '' : String(animal.condition),
  paddock: animal.paddock ?? '',
  note: animal.note ?? '',
});

const orNull = (text: string): string | null => (text.trim() === '' ? null : text.trim());
type Typed = ReturnType<typeof first>;

const figures = ['weightKg', 'condition'] as const;

/** Only what was changed: what somebody else changed meanwhile is left alone. */
function changesOf(form: Typed, animal: Detail): Record<string, unknown> {
  const all: Record<keyof Typed, unknown> = {
    class: form.class,
    breed: orNull(form.breed),
    birth: orNull(form.birth),
    lastCalving: orNull(form.lastCalving),
    lastService: orNull(form.lastService),
    knownEmpty: form.knownEmpty === 'unknown' ? null : form.knownEmpty === 'yes',
    weightKg: readFigure(form.weightKg),
    condition: readFigure(form.condition),
    paddock: orNull(form.paddock),
    note: orNull(form.note),
  };
  const before = first(animal);
  return Object.fromEntries(
    Object.entries(all).filter(([key]) => form[key as keyof Typed] !== before[key as keyof Typed]),
  );
}

/** Changes what is known of an animal: empty clears. Typed values stay on the device until the server has them. */
export function AnimalForm({ animal, onDone }: { animal: Detail; onDone: () => void }) {
  const [form, setForm, accepted] = useKept(`animal-${animal.id}`, first(animal));
  const save = useSaveAnimal(animal.id);
  const set = (key: keyof Typed) => (value: string) => setForm({ ...form, [key]: value });
  const [tried, setTried] = useState(false);
  const error = (key: keyof Typed) =>
    tried && figures.some((one) => one === key) && isNoFigure(form[key])
      ? t('herd.figure')
      : fieldError(save.error, key);
  const finish = () => {
    accepted();
    onDone();
  };
  const send = () => {
    setTried(true);
    if (figures.some((key) => isNoFigure(form[key]))) return;
    save.mutate(changesOf(form, animal), {
      onSuccess: () => {
        toast(t('herd.saved'));
        finish();
      },
    });
  };
  return (
    <Form onSubmit={send}>
      <Select
        label={t('herd.class')}
        value={form.class}
        onChange={(value) => setForm({ ...form, class: value })}
        error={error('class')}
        options={animalClasses.map((value) => ({ value, label: tData(`classOne.${value}`, value) }))}
      />
      <Segmented
        label={t('herd.knownEmpty')}
        value={form.knownEmpty}
        onChange={set('knownEmpty')}
        options={(['yes', 'no', 'unknown'] as const).map((value) => ({ value, label: t(`herd.knownEmpty.${value}`) }))}
      />
      <Field label={t('herd.breed')} value={form.breed} onChange={set('breed')} error={error('breed')} />
      <DateField label={t('herd.birth')} value={form.birth} onChange={set('birth')} error={error('birth')} />
      <DateField
        label={t('herd.lastCalving')}
        value={form.lastCalving}
        onChange={set('lastCalving')}
        error={error('lastCalving')}
      />
      <DateField
        label={t('herd.lastService')}
        value={form.lastService}
        onChange={set('lastService')}
        error={error('lastService')}
      />
      <Field
        label={t('herd.weightKg')}
        numeric
        value={form.weightKg}
        onChange={set('weightKg')}
        error={error('weightKg')}
      />
      <Field
        label={t('herd.condition')}
        numeric
        value={form.condition}
        onChange={set('condition')}
        error={error('condition')}
      />
      <Field label={t('herd.paddock')} value={form.paddock} onChange={set('paddock')} error={error('paddock')} />
      <Field label={t('herd.note')} multiline value={form.note} onChange={set('note')} error={error('note')} />
      {save.error ? <Notice tone="stop">{failureWords(save.error)}</Notice> : null}
      <View style={styles.row}>
        <Button kind="primary" label={t('herd.save')} onPress={send} busy={save.isPending} />
        <Button kind="quiet" label={t('ui.cancel')} onPress={finish} />
      </View>
    </Form>
  );
}

const styles = StyleSheet.create({ row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s } });
