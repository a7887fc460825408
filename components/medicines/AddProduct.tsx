import { useState } from 'react';

import { useMedicineActions } from '@/hooks/useMedicines';
import { useProperty } from '@/hooks/usePeople';
import { fieldError } from '@/lib/api';
import { useKept } from '@/lib/keep';
import { actives, doseUnits, routes, type Active, type AdministrationRoute, type DoseUnit } from '@/protocols/types';
import type { PropertySummary } from '@/shared/contracts/people';
import { t, tData } from '@/shared/messages';
import { localOf } from '@/shared/when';
import { isNoFigure, readFigure } from '../herd/figure';
import { Button } from '../ui/Button';
import { useNow } from '../ui/clock';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Notice } from '../ui/Notice';
import { Select } from '../ui/Select';
import { ErrorState, failureWords } from '../ui/states';

const empty = {
  name: '',
  organisationId: '',
  active: 'dinoprost' as Active,
  strength: '',
  unit: 'mg' as DoseUnit,
  per: 'mL' as 'mL' | 'piece' | 'g',
  packSize: '',
  route: 'im' as AdministrationRoute,
  meatDays: '',
  milkHours: '',
  openDays: '',
};
type Typed = typeof empty;

const figures = ['strength', 'packSize', 'meatDays', 'milkHours', 'openDays'] as const;

/** What can be seen to be wrong before it is sent; the server judges the rest. */
function mistakes(form: Typed): Partial<Record<keyof Typed, string>> {
  const none = figures.filter((key) => isNoFigure(form[key]) || (readFigure(form[key]) ?? 0) < 0);
  return {
    ...((readFigure(form.strength) ?? 0) > 0 ? {} : { strength: t('medicines.needStrength') }),
    ...Object.fromEntries(none.map((key) => [key, t('herd.figure')])),
  };
}

/** Practices engaged here now, in whose name a product can be added. */
function usePractices(property: PropertySummary) {
  const query = useProperty(property.id);
  const today = localOf(useNow(), property.zone).slice(0, 10);
  const open = (query.data?.engagements ?? []).filter((one) => one.from <= today && (!one.to || one.to >= today));
  return { query, practices: [...new Map(open.map((one) => [one.organisationId, one])).values()] };
}

/** Adds a product; what is typed stays on this device until the server has it. */
export function AddProduct({ property, onClose }: { property: PropertySummary; onClose: () => void }) {
  const [form, setForm, accepted] = useKept(`product-${property.id}`, empty);
  const [tried, setTried] = useState(false);
  const { addProduct } = useMedicineActions(property.id);
  const { query, practices } = usePractices(property);
  const practice = practices.find((one) => one.organisationId === form.organisationId) ?? practices[0];
  const wrong = tried ? mistakes(form) : {};
  const error = (key: keyof Typed) => wrong[key] ?? fieldError(addProduct.error, key);
  const set =
    <K extends keyof Typed>(key: K) =>
    (value: Typed[K]) =>
      setForm({ ...form, [key]: value });
  const close = () => {
    accepted();
    onClose();
  };
  const add = () => {
    setTried(true);
    if (!practice || addProduct.isPending || Object.keys(mistakes(form)).length > 0) return;
    addProduct.mutate(bodyOf(form, practice.organisationId), { onSuccess: close });
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('medicines.addProduct')}
      actions={
        <>
          <Button
            label={t('ui.save')}
            onPress={add}
            busy={addProduct.isPending}
            disabled={!practice}
            why={query.data && !practice ? t('medicines.noPractice') : undefined}
          />
          <Button kind="quiet" label={t('ui.cancel')} onPress={close} />
        </>
      }
    >
      {query.error && !query.data ? <ErrorState error={query.error} onRetry={() => void query.refetch()} /> : null}
      <Form onSubmit={add}>
        {practices.length > 1 && practice ? (
          <Select
            label={t('medicines.practice')}
            value={practice.organisationId}
            onChange={set('organisationId')}
            options={practices.map((one) => ({ value: one.organisationId, label: one.organisation }))}
            error={error('organisationId')}
          />
        ) : null}
        <ProductFields form={form} set={set} error={error} />
        {addProduct.error ? <Notice tone="stop">{failureWords(addProduct.error)}</Notice> : null}
      </Form>
    </Dialog>
  );
}

const bodyOf = ({ name, active, unit, per, route, ...typed }: Typed, organisationId: string) => ({
  organisationId,
  name,
  active,
  unit,
  per,
  route,
  strength: readFigure(typed.strength) ?? 0,
  packSize: readFigure(typed.packSize),
  meatDays: readFigure(typed.meatDays),
  milkHours: readFigure(typed.milkHours),
  openDays: readFigure(typed.openDays),
});

interface FieldsProps {
  form: Typed;
  set: <K extends keyof Typed>(key: K) => (value: Typed[K]) => void;
  error: (key: keyof Typed) => string | undefined;
}

function ProductFields({ form, set, error }: FieldsProps) {
  const figure = (key: (typeof figures)[number]) => (
    <Field key={key} label={t(`medicines.${key}`)} numeric value={form[key]} onChange={set(key)} error={error(key)} />
  );
  return (
    <>
      <Field label={t('medicines.name')} value={form.name} onChange={set('name')} error={error('name')} />
      <Select
        label={t('medicines.active')}
        value={form.active}
        onChange={set('active')}
        options={actives.map((value) => ({ value, label: tData(`active.${value}`, value) }))}
      />
      {figure('strength')}
      <Select
        label={t('medicines.unit')}
        value={form.unit}
        onChange={set('unit')}
        options={doseUnits.map((value) => ({ value, label: tData(`unit.${value}`, value) }))}
      />
      <Select
        label={t('medicines.per')}
        value={form.per}
        onChange={set('per')}
        options={(['mL', 'piece', 'g'] as const).map((value) => ({ value, label: t(`medicines.per.${value}`) }))}
      />
      <Select
        label={t('medicines.route')}
        value={form.route}
        onChange={set('route')}
        options={routes.map((value) => ({ value, label: tData(`route.${value}`, value) }))}
      />
      {(['packSize', 'meatDays', 'milkHours', 'openDays'] as const).map(figure)}
    </>
  );
}
