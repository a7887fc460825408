import { useState } from 'react';
import { View } from 'react-native';

import type { PropertySummary } from '@/shared/contracts/people';
import { t } from '@/shared/messages';
import { localOf } from '@/shared/when';
import { dateWords } from '../herd/words';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { useNow } from '../ui/clock';
import { RailList, RailRow } from '../ui/Rail';
import { EmptyState } from '../ui/states';
import { Text } from '../ui/Text';
import { AddBatch } from './AddBatch';
import { batchState, type Batch, type Product } from './batchState';
import { rounded } from './words';

interface BatchesProps {
  property: PropertySummary;
  batches: readonly Batch[];
  products: readonly Product[];
  mayEdit: boolean;
}

/** Product batches, those that expire first on top. */
export function Batches({ property, batches, products, mayEdit }: BatchesProps) {
  const [adding, setAdding] = useState(false);
  const today = localOf(useNow(), property.zone).slice(0, 10);
  const listed = [...batches].sort((a, b) => a.expiry.localeCompare(b.expiry));
  return (
    <View style={{ gap: space.m }}>
      {listed.length > 0 ? (
        <RailList label={t('medicines.batches')}>
          {listed.map((batch) => (
            <BatchRow
              key={batch.id}
              batch={batch}
              product={products.find((one) => one.id === batch.productId)}
              zone={property.zone}
              today={today}
            />
          ))}
        </RailList>
      ) : (
        <EmptyState title={t('medicines.noBatches')} next={t('medicines.noBatchesHint')} />
      )}
      {mayEdit ? (
        <Button
          label={t('medicines.addBatch')}
          onPress={() => setAdding(true)}
          disabled={products.length === 0}
          why={products.length === 0 ? t('medicines.productFirst') : undefined}
        />
      ) : null}
      {adding ? <AddBatch property={property} products={products} onClose={() => setAdding(false)} /> : null}
    </View>
  );
}

interface RowProps {
  batch: Batch;
  product: Product | undefined;
  zone: string;
  today: string;
}

function BatchRow({ batch, product, zone, today }: RowProps) {
  const { mark, warning, opened } = batchState(batch, product, zone, today);
  return (
    <RailRow
      title={`${batch.product} · ${batch.number}`}
      subtitle={[
        `${t('medicines.expiry')} ${dateWords(batch.expiry)}`,
        t('medicines.used', { used: rounded(batch.used), quantity: rounded(batch.quantity) }),
        ...opened,
      ].join(' · ')}
      {...(mark ? { mark } : {})}
      trailing={
        mark ? (
          <Text variant="small" strong tone={mark} align="right" style={{ maxWidth: 150 }}>
            {warning}
          </Text>
        ) : null
      }
    />
  );
}
