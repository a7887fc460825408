import { useState } from 'react';
import { View } from 'react-native';

import { useMedicineActions } from '@/hooks/useMedicines';
import { fieldError } from '@/lib/api';
import { useKept } from '@/lib/keep';
import type { PropertySummary } from '@/shared/contracts/people';
import { t } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { duration, localOf } from '@/shared/when';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { useNow } from '../ui/clock';
import { DateField } from '../ui/DateTimeField';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Notice } from '../ui/Notice';
import { RailList, RailRow } from '../ui/Rail';
import { Select } from '../ui/Select';
import { EmptyState, failureWords } from '../ui/states';
import { Text } from '../ui/Text';
import { daysUntil } from './words';

type Medicines = Output<'GET /api/properties/:propertyId/medicines'>;
interface BatchesProps {
  property: PropertySummary;
  batches: Medicines['batches'];
  products: Medicines['products'];
  mayEdit: boolean;
}

/** Days before its expiry from which a product batch is marked. */
const soon = 30;

/** Product batches, those that expire first on top. */
export function Batches({ property, batches, products, mayEdit }: BatchesProps) {
  const [adding, setAdding] = useState(false);
  const today = localOf(useNow(), property.zone).slice(0, 10);
  return (
    <View style={{ gap: space.m }}>
      {batches.length === 0 ? (
        <EmptyState title={t('medicines.noBatches')} next={t('medicines.noBatchesHint')} />
      ) : null}
      <RailList label={t('medicines.batches')}>
        {batches.map((batch) => {
          const left = daysUntil(batch.expiry, today);
          const words =
            left < 0
              ? t('medicines.pastExpiry')
              : left <= soon
                ? t('medicines.expiresSoon', { time: duration(left * 1440) })
                : null;
          return (
            <RailRow
              key={batch.id}
              title={`${batch.product} · ${batch.number}`}
              subtitle={`${t('medicines.expiry')} ${batch.expiry} · ${t('medicines.used', { used: Math.round(batch.used), quantity: batch.quantity })}`}
              {...(left < 0 ? { mark: 'stop' as const } : left <= soon ? { mark: 'warn' as const } : {})}
              trailing={
                words ? (
                  <Text variant="small" strong tone={left < 0 ? 'stop' : 'warn'}>
                    {words}
                  </Text>
                ) : null
              }
            />
          );
        })}
      </RailList>
      {mayEdit && products.length > 0 ? (
        <Button label={t('medicines.addBatch')} onPress={() => setAdding(true)} />
      ) : null}
      {adding ? <AddBatch property={property} products={products} onClose={() => setAdding(false)} /> : null}
    </View>
  );
}

const empty = { productId: '', number: '', expiry: '', quantity: '' };

function AddBatch({
  property,
  products,
  onClose,
}: {
  property: PropertySummary;
  products: Medicines['products'];
  onClose: () => void;
}) {
  const [form, setForm, accepted] = useKept(`batch-${property.id}`, empty);
  const { addBatch } = useMedicineActions(property.id);
  const { error } = addBatch;
  const set = (key: keyof typeof empty) => (value: string) => setForm({ ...form, [key]: value });
  const add = () =>
    addBatch.mutate(
      {
        productId: form.productId,
        number: form.number,
        expiry: form.expiry,
        quantity: Number(form.quantity.replace(',', '.')),
      },
      {
        onSuccess: () => {
          accepted();
          onClose();
        },
      },
    );
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('medicines.addBatch')}
      actions={
        <>
          <Button label={t('ui.save')} onPress={add} busy={addBatch.isPending} />
          <Button kind="quiet" label={t('ui.cancel')} onPress={onClose} />
        </>
      }
    >
      <Select
        label={t('medicines.product')}
        value={form.productId}
        placeholder=""
        onChange={set('productId')}
        options={products.map((product) => ({ value: product.id, label: product.name }))}
        error={fieldError(error, 'productId')}
      />
      <Field
        label={t('medicines.number')}
        value={form.number}
        onChange={set('number')}
        error={fieldError(error, 'number')}
      />
      <DateField
        label={t('medicines.expiry')}
        value={form.expiry}
        onChange={set('expiry')}
        error={fieldError(error, 'expiry')}
      />
      <Field
        label={t('medicines.quantity')}
        numeric
        value={form.quantity}
        onChange={set('quantity')}
        error={fieldError(error, 'quantity')}
      />
      {error ? <Notice tone="stop">{failureWords(error)}</Notice> : null}
    </Dialog>
  );
}
