import { useState } from 'react';
import { View } from 'react-native';

import { useMe } from '@/hooks/useMe';
import { useMedicines } from '@/hooks/useMedicines';
import { useOneProperty } from '@/hooks/usePlace';
import { t } from '@/shared/messages';
import { space } from '../theme/tokens';
import { PageTabs } from '../ui/PageTabs';
import { Screen } from '../ui/Screen';
import { Select } from '../ui/Select';
import { EmptyState, Loaded } from '../ui/states';
import { Authorities } from './Authorities';
import { Batches } from './Batches';
import { Products } from './Products';

type Tab = 'authorities' | 'batches' | 'products';

/** What is authorised and how much of it is left, product batches by expiry, and products. */
export function MedicinesScreen() {
  const { property, properties, choose } = useOneProperty('medicine.read');
  const [tab, setTab] = useState<Tab>('authorities');
  const query = useMedicines(property?.id ?? '');
  const may = (ability: string) => property?.abilities.some((one) => one === ability) ?? false;
  const me = useMe();
  if (!property)
    return (
      <Screen title={t('medicines.title')}>
        <Loaded query={me}>{() => <EmptyState title={t('medicines.closed')} next={t('server.forbidden')} />}</Loaded>
      </Screen>
    );
  return (
    <Screen title={t('medicines.title')} kicker={property.name}>
      {properties.length > 1 ? (
        <Select
          label={t('planner.property')}
          value={property.id}
          onChange={choose}
          options={properties.map((one) => ({ value: one.id, label: one.name }))}
        />
      ) : null}
      <Loaded query={query}>
        {(data) => (
          <View style={{ gap: space.m }}>
            <PageTabs
              label={t('medicines.title')}
              value={tab}
              onChange={setTab}
              tabs={[
                { value: 'authorities', label: t('medicines.authorities') },
                { value: 'batches', label: t('medicines.batches') },
                { value: 'products', label: t('medicines.products') },
              ]}
            >
              {tab === 'authorities' ? (
                <Authorities property={property} authorities={data.authorities} mayWithdraw={may('authority.write')} />
              ) : null}
              {tab === 'batches' ? (
                <Batches
                  property={property}
                  batches={data.batches}
                  products={data.products}
                  mayEdit={may('medicine.edit')}
                />
              ) : null}
              {tab === 'products' ? (
                <Products property={property} products={data.products} mayEdit={may('medicine.edit')} />
              ) : null}
            </PageTabs>
          </View>
        )}
      </Loaded>
    </Screen>
  );
}
