import { StyleSheet, View } from 'react-native';

import { actives as allActives, doseUnits, routes, type Active, type Item } from '@/protocols/types';
import { t, tData } from '@/shared/messages';
import { color, space } from '../../theme/tokens';
import { Button } from '../../ui/Button';
import { Field } from '../../ui/Field';
import { Select } from '../../ui/Select';
import { readFigure, writeFigure } from './figures';

/** A medicine as typed; what the form does not show is kept. */
export interface ItemForm {
  item: Item;
  amount: string;
}
export const itemForm = (item: Item): ItemForm => ({ item, amount: writeFigure(item.amount) });
export function itemOf({ item, amount }: ItemForm): Item {
  const { amount: _, ...rest } = item;
  const { value } = readFigure(amount);
  return value === undefined ? rest : { ...rest, amount: value };
}

interface ItemProps {
  item: ItemForm;
  actives: readonly Active[] | undefined;
  onChange: (item: ItemForm) => void;
  onRemove: () => void;
}

/** What is given: active, how much, how. */
export function ItemFields({ item: form, actives = allActives, onChange, onRemove }: ItemProps) {
  const { item } = form;
  const set = (part: Partial<Item>) => onChange({ ...form, item: { ...item, ...part } });
  return (
    <View style={styles.item}>
      <Select
        label={t('protocols.active')}
        value={item.active}
        onChange={(active) => set({ active })}
        options={actives.map((value) => ({ value, label: tData(`active.${value}`, value) }))}
      />
      <Field
        label={t('protocols.amount')}
        numeric
        value={form.amount}
        onChange={(amount) => onChange({ ...form, amount })}
        error={readFigure(form.amount).error}
      />
      <Select
        label={t('protocols.unit')}
        value={item.unit}
        onChange={(unit) => set({ unit })}
        options={doseUnits.map((value) => ({ value, label: tData(`unit.${value}`, value) }))}
      />
      <Select
        label={t('protocols.route')}
        value={item.route}
        onChange={(route) => set({ route })}
        options={routes.map((value) => ({ value, label: tData(`route.${value}`, value) }))}
      />
      <Button kind="quiet" label={t('protocols.removeItem')} onPress={onRemove} />
    </View>
  );
}

const styles = StyleSheet.create({
  item: { gap: space.m, borderLeftWidth: 4, borderLeftColor: color.rail, paddingLeft: space.m },
});
