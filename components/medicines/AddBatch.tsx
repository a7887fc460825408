import { useState } from 'react';

import { useMedicineActions } from '@/hooks/useMedicines';
import { fieldError } from '@/lib/api';
import { useKept } from '@/lib/keep';
import type { PropertySummary } from '@/shared/contracts/people';
import { t } from '@/shared/messages';
import { isNoFigure, readFigure } from '../herd/figure';
import { Button } from '../ui/Button';
import { DateField } from '../ui/DateTimeField';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Form } from '../ui/Form';
import { Notice } from '../ui/Notice';
import { Select } from '../ui/Select';
import { failureWords } from '../ui/states';
import type { Product } from './batchState';

const empty = { productId: '', number: '', expiry: '', quantity: '' };
type Typed = typeof empty;

/** What can be seen to be wrong before it is sent; the server judges the rest. */
function mistakes(form: Typed): Partial<Record<keyof Typed, string>> {
  return {
    ...(form.productId === '' ? { productId: t('medicines.choose') } : {}),
    ...(isNoFigure(form.quantity) ? { quantity: t('herd.figure') } : {}),
  };
}

interface AddBatchProps {
  property: PropertySummary;
  products: readonly Product[];
  onClose: () => void;
}

/** Adds a product batch; what is typed stays on this device until the server has it. */
export function AddBatch({ property, products, onClose }: AddBatchProps) {
  const [form, setForm, accepted] = useKept(`batch-${property.id}`, empty);
  const [tried, setTried] = useState(false);
  const { addBatch } = useMedicineActions(property.id);
  const set = (key: keyof Typed) => (value: string) => setForm({ ...form, [key]: value });
  const wrong = tried ? mistakes(form) : {};
  const error = (key: keyof Typed) => wrong[key] ?? fieldError(addBatch.error, key);
  const close = () => {
    accepted();
    onClose();
  };
  const add = () => {
    setTried(true);
    if (addBatch.isPending || Object.keys(mistakes(form)).length > 0) return;
    const { productId, number, expiry } = form;
    addBatch.mutate({ productId, number, expiry, quantity: readFigure(form.quantity) ?? 0 }, { onSuccess: close });
  };
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('medicines.addBatch')}
      actions={
        <>
          <Button label={t('ui.save')} onPress={add} busy={addBatch.isPending} />
          <Button kind="quiet" label={t('ui.cancel')} onPress={close} />
        </>
      }
    >
      <Form onSubmit={add}>
        <Select
          label={t('medicines.product')}
          value={form.productId}
          placeholder=""
          onChange={set('productId')}
          options={products.map((product) => ({ value: product.id, label: product.name }))}
          error={error('productId')}
        />
        <Field label={t('medicines.number')} value={form.number} onChange={set('number')} error={error('number')} />
        <DateField label={t('medicines.expiry')} value={form.expiry} onChange={set('expiry')} error={error('expiry')} />
        <Field
          label={t('medicines.quantity')}
          numeric
          value={form.quantity}
          onChange={set('quantity')}
          error={error('quantity')}
        />
        {addBatch.error ? <Notice tone="stop">{failureWords(addBatch.error)}</Notice> : null}
      </Form>
    </Dialog>
  );
}
