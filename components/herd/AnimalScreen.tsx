import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { useAnimal } from '@/hooks/useHerd';
import { useCan, useMe, propertyOf } from '@/hooks/useMe';
import type { Output } from '@/shared/routes';
import { t, tData } from '@/shared/messages';
import { dayClock } from '@/shared/when';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { RailList, RailRow } from '../ui/Rail';
import { Screen } from '../ui/Screen';
import { Loaded } from '../ui/states';
import { TagChip } from '../ui/TagChip';
import { Text } from '../ui/Text';
import { AnimalForm } from './AnimalForm';
import { emptyWords } from './words';

type Detail = Output<'GET /api/animals/:animalId'>;

/** An animal: what is known of it, and its history as one line of dates. */
export function AnimalScreen() {
  const { id } = useLocalSearchParams<'/herd/[id]'>();
  const query = useAnimal(id);
  const [editing, setEditing] = useState(false);
  const can = useCan();
  const mayEdit = query.data !== undefined && can('herd.edit', query.data.propertyId);
  return (
    <Screen
      title={query.data ? `${t('herd.tag')} ${query.data.tag}` : t('herd.title')}
      back={{ href: '/herd', label: t('herd.title') }}
      toolbar={mayEdit && !editing ? <Button label={t('herd.edit')} onPress={() => setEditing(true)} /> : null}
    >
      <Loaded query={query}>
        {(animal) => (
          <View style={styles.page}>
            <TagChip tag={animal.tag} size="l" />
            {editing ? <AnimalForm animal={animal} onDone={() => setEditing(false)} /> : <Facts animal={animal} />}
            <History animal={animal} />
          </View>
        )}
      </Loaded>
    </Screen>
  );
}

function Facts({ animal }: { animal: Detail }) {
  const facts: [string, string | number | null][] = [
    [t('herd.eid'), animal.eid],
    [t('herd.class'), tData(`classOne.${animal.class}`, animal.class)],
    [t('herd.breed'), animal.breed],
    [t('herd.birth'), animal.birth],
    [t('herd.lastCalving'), animal.lastCalving],
    [t('herd.lastService'), animal.lastService],
    [t('herd.knownEmpty'), emptyWords(animal.knownEmpty)],
    [t('herd.weightKg'), animal.weightKg],
    [t('herd.condition'), animal.condition],
    [t('herd.paddock'), animal.paddock],
    [t('herd.sire'), animal.sire],
    [t('herd.dam'), animal.dam],
    [t('herd.cohort'), animal.cohort?.name ?? t('herd.noCohort')],
    [t('herd.note'), animal.note],
  ];
  return (
    <dl style={{ margin: 0 }}>
      {facts
        .filter(([, value]) => value !== null)
        .map(([label, value]) => (
          <View key={label} style={styles.fact}>
            <dt style={{ flex: '0 0 160px' }}>
              <Text tone="quiet">{label}</Text>
            </dt>
            <dd style={{ margin: 0 }}>
              <Text strong>{String(value)}</Text>
            </dd>
          </View>
        ))}
    </dl>
  );
}

function History({ animal }: { animal: Detail }) {
  const zone = propertyOf(useMe().data, animal.propertyId)?.zone ?? 'UTC';
  return (
    <View>
      <Text variant="heading" level={2}>
        {t('herd.history')}
      </Text>
      {animal.events.length === 0 ? <Text tone="quiet">{t('herd.noHistory')}</Text> : null}
      <RailList label={t('herd.history')}>
        {animal.events.map((event) => (
          <RailRow
            key={`${event.at}${event.title}`}
            title={event.title}
            subtitle={[dayClock(Date.parse(event.at), zone), event.detail, event.by].filter(Boolean).join(' · ')}
          />
        ))}
      </RailList>
    </View>
  );
}

const styles = StyleSheet.create({
  page: { gap: space.l },
  fact: {
    flexDirection: 'row',
    gap: space.m,
    paddingVertical: 10,
    borderBottomWidth: 1,
    borderBottomColor: color.rail,
  },
});
