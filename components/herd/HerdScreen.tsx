import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useAnimals } from '@/hooks/useHerd';
import { useMe } from '@/hooks/useMe';
import { useOneProperty } from '@/hooks/usePlace';
import { animalClasses, type AnimalClass } from '@/protocols/types';
import type { Animal } from '@/shared/contracts/herd';
import { t, tData } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DataTable, type Column } from '../ui/DataTable';
import { Field } from '../ui/Field';
import { Link, LinkButton } from '../ui/Link';
import { Notice } from '../ui/Notice';
import { Screen } from '../ui/Screen';
import { Select } from '../ui/Select';
import { EmptyState, failureWords, Loaded } from '../ui/states';
import { TagChip } from '../ui/TagChip';
import { Text } from '../ui/Text';
import { useSettled } from './useSettled';
import { dateWords, emptyWords } from './words';

/** The animals of a property: search by tag or EID. */
export function HerdScreen() {
  const me = useMe();
  const { property, properties, choose } = useOneProperty('herd.read');
  const mayImport = property?.abilities.includes('herd.import') ?? false;
  return (
    <Screen
      title={t('herd.title')}
      {...(property ? { kicker: property.name } : {})}
      width="full"
      toolbar={mayImport ? <LinkButton href="/herd/import" label={t('herd.import')} kind="primary" /> : null}
    >
      {property ? (
        <>
          {properties.length > 1 ? (
            <View style={styles.filter}>
              <Select
                label={t('planner.property')}
                value={property.id}
                onChange={choose}
                options={properties.map((one) => ({ value: one.id, label: one.name }))}
              />
            </View>
          ) : null}
          <Animals key={property.id} propertyId={property.id} />
        </>
      ) : (
        <Loaded query={me}>{() => <EmptyState title={t('herd.closed')} next={t('server.forbidden')} />}</Loaded>
      )}
    </Screen>
  );
}

function Animals({ propertyId }: { propertyId: string }) {
  const [search, setSearch] = useState('');
  const [animalClass, setClass] = useState<AnimalClass | 'all'>('all');
  const query = useAnimals(propertyId, {
    search: useSettled(search),
    class: animalClass === 'all' ? null : animalClass,
  });
  const filtered = search.trim() !== '' || animalClass !== 'all';
  return (
    <>
      <View style={styles.filters}>
        <View style={styles.filter}>
          <Field label={t('herd.search')} kind="search" value={search} onChange={setSearch} />
        </View>
        <View style={styles.filter}>
          <Select
            label={t('herd.class')}
            value={animalClass}
            onChange={setClass}
            options={[
              { value: 'all', label: t('herd.allClasses') },
              ...animalClasses.map((value) => ({ value, label: tData(`class.${value}`, value) })),
            ]}
          />
        </View>
      </View>
      <Loaded query={query}>
        {(data) => {
          const animals = data.pages.flatMap((page) => page.items);
          if (animals.length === 0)
            return filtered ? (
              <EmptyState title={t('herd.emptySearch')} />
            ) : (
              <EmptyState title={t('herd.empty')} next={t('herd.emptyHint')} />
            );
          return (
            <View style={styles.list}>
              <Text variant="small" tone="quiet" role="status">
                {query.isPlaceholderData ? t('ui.loading') : t('herd.count', { count: animals.length })}
              </Text>
              <DataTable
                caption={t('herd.title')}
                hideCaption
                columns={columns}
                rows={animals}
                rowKey={(animal) => animal.id}
              />
              {query.isFetchNextPageError ? <Notice tone="stop">{failureWords(query.error)}</Notice> : null}
              {query.hasNextPage ? (
                <Button
                  label={t('herd.more')}
                  onPress={() => void query.fetchNextPage()}
                  busy={query.isFetchingNextPage}
                />
              ) : null}
            </View>
          );
        }}
      </Loaded>
    </>
  );
}

const columns: Column<Animal>[] = [
  {
    key: 'tag',
    title: t('herd.tag'),
    primary: true,
    cell: (animal) => (
      <Link href={{ pathname: '/herd/[id]', params: { id: animal.id } }} accessibleLabel={animal.tag}>
        <TagChip tag={animal.tag} size="s" />
      </Link>
    ),
  },
  { key: 'eid', title: t('herd.eid'), cell: (animal) => animal.eid ?? '–' },
  { key: 'class', title: t('herd.class'), cell: (animal) => tData(`classOne.${animal.class}`, animal.class) },
  { key: 'breed', title: t('herd.breed'), cell: (animal) => animal.breed ?? '–' },
  {
    key: 'calving',
    title: t('herd.lastCalving'),
    cell: (animal) => (animal.lastCalving ? dateWords(animal.lastCalving) : '–'),
  },
  { key: 'empty', title: t('herd.knownEmpty'), cell: (animal) => emptyWords(animal.knownEmpty) },
  { key: 'paddock', title: t('herd.paddock'), cell: (animal) => animal.paddock ?? '–' },
  { key: 'cohort', title: t('herd.cohort'), cell: (animal) => animal.cohort?.name ?? t('herd.noCohort') },
];

const styles = StyleSheet.create({
  filters: { flexDirection: 'row', flexWrap: 'wrap', gap: space.m },
  filter: { flexGrow: 1, flexBasis: 220, maxWidth: 360 },
  list: { gap: space.m },
});
