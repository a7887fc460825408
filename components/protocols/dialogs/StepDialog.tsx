import { useState } from 'react';
import { View } from 'react-native';

import { stepKinds, type Step } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import { space } from '../../theme/tokens';
import { Button } from '../../ui/Button';
import { Dialog } from '../../ui/Dialog';
import { Field } from '../../ui/Field';
import { Segmented } from '../../ui/RadioGroup';
import { Select } from '../../ui/Select';
import { activesOf, newItems } from '../edit/defaults';
import { removeStep, shiftStep, updateStep } from '../edit/edit';
import type { PartProps } from '../BenchEdit';
import { choicesOf, conditionKey, conditionOf } from './conditionChoice';
import { readFigure } from './figures';
import { ItemFields, itemForm, type ItemForm, itemOf } from './ItemFields';

const kinds = stepKinds.map((value) => ({ value, label: tData(`step.${value}`, value) }));

/** One step: kind, name, medicines, and for which animals. */
export function StepDialog({ step, body, change, onClose }: PartProps & { step: Step }) {
  const [kind, setKind] = useState(step.kind);
  const [label, setLabel] = useState(step.label ?? '');
  const [level, setLevel] = useState(step.level);
  const [items, setItems] = useState<ItemForm[]>(step.items.map(itemForm));
  const [note, setNote] = useState(step.note ?? '');
  const choices = choicesOf(body, step.when);
  const [when, setWhen] = useState(conditionKey(step.when));
  const bad = items.some((item) => readFigure(item.amount).error !== undefined);
  const done = () => {
    const { label: _label, note: _note, when: _when, ...rest } = step;
    const condition = conditionOf(when, step.when);
    const next: Step = {
      ...rest,
      kind,
      level,
      items: items.map(itemOf),
      ...(label.trim() ? { label: label.trim() } : {}),
      ...(note.trim() ? { note: note.trim() } : {}),
      ...(condition ? { when: condition } : {}),
    };
    change((before) => updateStep(before, step.id, next));
    onClose();
  };
  const act = (edit: Parameters<typeof change>[0], close: boolean) => () => {
    change(edit);
    if (close) onClose();
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('protocols.editStep')}
      actions={
        <>
          <Button label={t('protocols.done')} onPress={done} disabled={bad} />
          <Button label={t('ui.cancel')} kind="quiet" onPress={onClose} />
          <Button
            label={t('protocols.up')}
            kind="quiet"
            onPress={act((before) => shiftStep(before, step.id, -1), false)}
          />
          <Button
            label={t('protocols.down')}
            kind="quiet"
            onPress={act((before) => shiftStep(before, step.id, 1), false)}
          />
          <Button
            label={t('protocols.remove')}
            kind="danger"
            onPress={act((before) => removeStep(before, step.id), true)}
          />
        </>
      }
    >
      <Select
        label={t('protocols.kind')}
        value={kind}
        onChange={(next) => {
          setKind(next);
          setItems(newItems(next).map(itemForm));
        }}
        options={kinds}
      />
      <Field label={t('protocols.label')} value={label} onChange={setLabel} maxLength={80} />
      <Segmented
        label={t('protocols.level')}
        value={level}
        onChange={setLevel}
        options={[
          { value: 'animal', label: t('protocols.levelAnimal') },
          { value: 'group', label: t('protocols.levelGroup') },
        ]}
      />
      <View style={{ gap: space.m }}>
        {items.map((item, i) => (
          <ItemFields
            key={i}
            item={item}
            actives={activesOf[kind]}
            onChange={(next) => setItems(items.map((one, k) => (k === i ? next : one)))}
            onRemove={() => setItems(items.filter((_, k) => k !== i))}
          />
        ))}
        {activesOf[kind] ? (
          <Button
            label={t('protocols.addItem')}
            onPress={() => setItems([...items, ...newItems(kind).map(itemForm)])}
          />
        ) : null}
      </View>
      <Select label={t('protocols.condition')} value={when} onChange={setWhen} options={choices} />
      <Field label={t('protocols.note')} value={note} onChange={setNote} multiline rows={2} maxLength={1000} />
    </Dialog>
  );
}
