import { useState } from 'react';
import { View } from 'react-native';

import { useMedicineActions } from '@/hooks/useMedicines';
import { useProperty } from '@/hooks/usePeople';
import { fieldError } from '@/lib/api';
import { useKept } from '@/lib/keep';
import { actives, doseUnits, routes, type Active, type AdministrationRoute, type DoseUnit } from '@/protocols/types';
import type { PropertySummary } from '@/shared/contracts/people';
import { t, tData } from '@/shared/messages';
import type { Output } from '@/shared/routes';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Dialog } from '../ui/Dialog';
import { Field } from '../ui/Field';
import { Notice } from '../ui/Notice';
import { RailList, RailRow } from '../ui/Rail';
import { Select } from '../ui/Select';
import { EmptyState, failureWords } from '../ui/states';
import { withholdWords } from './words';

type Product = Output<'GET /api/properties/:propertyId/medicines'>['products'][number];

/** Products of the practices engaged here. */
export function Products({
  property,
  products,
  mayEdit,
}: {
  property: PropertySummary;
  products: readonly Product[];
  mayEdit: boolean;
}) {
  const [adding, setAdding] = useState(false);
  return (
    <View style={{ gap: space.m }}>
      {products.length === 0 ? (
        <EmptyState title={t('medicines.noProducts')} next={t('medicines.noProductsHint')} />
      ) : null}
      <RailList label={t('medicines.products')}>
        {products.map((product) => (
          <RailRow
            key={product.id}
            title={product.name}
            subtitle={[
              `${tData(`active.${product.active}`, product.active)} ${product.strength} ${tData(`unit.${product.unit}`, product.unit)} ${t('medicines.per')} ${t(`medicines.per.${product.per}`)}`,
              tData(`route.${product.route}`, product.route),
              withholdWords(product.meatDays, product.milkHours),
            ].join(' · ')}
          />
        ))}
      </RailList>
      {mayEdit ? <Button label={t('medicines.addProduct')} onPress={() => setAdding(true)} /> : null}
      {adding ? <AddProduct property={property} onClose={() => setAdding(false)} /> : null}
    </View>
  );
}

const empty = {
  name: '',
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

const figure = (text: string): number | null => (text.trim() === '' ? null : Number(text.replace(',', '.')));

function AddProduct({ property, onClose }: { property: PropertySummary; onClose: () => void }) {
  const [form, setForm, accepted] = useKept(`product-${property.id}`, empty);
  const { addProduct } = useMedicineActions(property.id);
  const practice = useProperty(property.id).data?.engagements.find((one) => one.scope === 'veterinary');
  const { error } = addProduct;
  const set =
    <K extends keyof typeof empty>(key: K) =>
    (value: (typeof empty)[K]) =>
      setForm({ ...form, [key]: value });
  const add = () => {
    if (!practice) return;
    const { name, active, unit, per, route } = form;
    const figures = {
      strength: figure(form.strength) ?? 0,
      packSize: figure(form.packSize),
      meatDays: figure(form.meatDays),
      milkHours: figure(form.milkHours),
      openDays: figure(form.openDays),
    };
    addProduct.mutate(
      { organisationId: practice.organisationId, name, active, unit, per, route, ...figures },
      {
        onSuccess: () => {
          accepted();
          onClose();
        },
      },
    );
  };
  const number = (key: 'strength' | 'packSize' | 'meatDays' | 'milkHours' | 'openDays') => (
    <Field
      key={key}
      label={t(`medicines.${key}`)}
      numeric
      value={form[key]}
      onChange={set(key)}
      error={fieldError(error, key)}
    />
  );
  return (
    <Dialog
      open
      onClose={onClose}
      title={t('medicines.addProduct')}
      actions={
        <>
          <Button label={t('ui.save')} onPress={add} busy={addProduct.isPending} disabled={!practice} />
          <Button kind="quiet" label={t('ui.cancel')} onPress={onClose} />
        </>
      }
    >
      <Field label={t('medicines.name')} value={form.name} onChange={set('name')} error={fieldError(error, 'name')} />
      <Select
        label={t('medicines.active')}
        value={form.active}
        onChange={set('active')}
        options={actives.map((value) => ({ value, label: tData(`active.${value}`, value) }))}
      />
      {number('strength')}
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
      {(['packSize', 'meatDays', 'milkHours', 'openDays'] as const).map(number)}
      {error ? <Notice tone="stop">{failureWords(error)}</Notice> : null}
    </Dialog>
  );
}
