import { useState } from 'react';
import { View } from 'react-native';

import type { PropertySummary } from '@/shared/contracts/people';
import { t, tData } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { RailList, RailRow } from '../ui/Rail';
import { EmptyState } from '../ui/states';
import { AddProduct } from './AddProduct';
import type { Product } from './batchState';
import { withholdWords } from './words';

interface ProductsProps {
  property: PropertySummary;
  products: readonly Product[];
  mayEdit: boolean;
}

/** Products of the practices engaged here. */
export function Products({ property, products, mayEdit }: ProductsProps) {
  const [adding, setAdding] = useState(false);
  return (
    <View style={{ gap: space.m }}>
      {products.length > 0 ? (
        <RailList label={t('medicines.products')}>
          {products.map((product) => (
            <RailRow key={product.id} title={product.name} subtitle={productWords(product)} />
          ))}
        </RailList>
      ) : (
        <EmptyState title={t('medicines.noProducts')} next={t('medicines.noProductsHint')} />
      )}
      {mayEdit ? <Button label={t('medicines.addProduct')} onPress={() => setAdding(true)} /> : null}
      {adding ? <AddProduct property={property} onClose={() => setAdding(false)} /> : null}
    </View>
  );
}

const productWords = (product: Product): string =>
  [
    [
      tData(`active.${product.active}`, product.active),
      product.strength,
      tData(`unit.${product.unit}`, product.unit),
      t('medicines.per'),
      t(`medicines.per.${product.per}`),
    ].join(' '),
    tData(`route.${product.route}`, product.route),
    withholdWords(product.meatDays, product.milkHours),
    ...(product.openDays === null ? [] : [`${t('medicines.openDays')}: ${product.openDays}`]),
  ].join(' · ');
