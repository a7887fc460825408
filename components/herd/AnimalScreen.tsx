import { useLocalSearchParams } from 'expo-router';
import { useState, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { useAnimal } from '@/hooks/useHerd';
import { useCan } from '@/hooks/useMe';
import type { Output } from '@/shared/routes';
import { t, tData } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Link } from '../ui/Link';
import { Screen } from '../ui/Screen';
import { Loaded } from '../ui/states';
import { TagChip } from '../ui/TagChip';
import { Text } from '../ui/Text';
import { AnimalForm } from './AnimalForm';
import { AnimalHistory } from './AnimalHistory';
import { dateWords, emptyWords } from './words';

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
            <AnimalHistory animal={animal} />
          </View>
        )}
      </Loaded>
    </Screen>
  );
}

const date = (value: string | null): string | null => (value === null ? null : dateWords(value));

function Facts({ animal }: { animal: Detail }) {
  const mayOpen = useCan()('cohort.read', animal.propertyId);
  const { cohort } = animal;
  const facts: [string, string | number | null][] = [
    [t('herd.eid'), animal.eid],
    [t('herd.class'), tData(`classOne.${animal.class}`, animal.class)],
    [t('herd.breed'), animal.breed],
    [t('herd.birth'), date(animal.birth)],
    [t('herd.lastCalving'), date(animal.lastCalving)],
    [t('herd.lastService'), date(animal.lastService)],
    [t('herd.knownEmpty'), emptyWords(animal.knownEmpty)],
    [t('herd.weightKg'), animal.weightKg],
    [t('herd.condition'), animal.condition],
    [t('herd.paddock'), animal.paddock],
    [t('herd.sire'), animal.sire],
    [t('herd.dam'), animal.dam],
    [t('herd.note'), animal.note],
  ];
  return (
    <dl style={{ margin: 0 }}>
      {facts.map(([label, value]) =>
        value === null ? null : (
          <Fact key={label} label={label}>
            <Text strong>{String(value)}</Text>
          </Fact>
        ),
      )}
      <Fact label={t('herd.cohort')}>
        {cohort && mayOpen ? (
          <Link href={{ pathname: '/cohorts/[id]', params: { id: cohort.id } }}>{cohort.name}</Link>
        ) : (
          <Text strong>{cohort?.name ?? t('herd.noCohort')}</Text>
        )}
      </Fact>
    </dl>
  );
}

/** Label and value; a plain element, since only a div may stand between a list of facts and its terms. */
const Fact = ({ label, children }: { label: string; children: ReactNode }) => (
  <div style={factStyle}>
    <dt style={{ flex: '0 0 128px' }}>
      <Text tone="quiet">{label}</Text>
    </dt>
    <dd style={{ margin: 0, minWidth: 0, overflowWrap: 'anywhere' }}>{children}</dd>
  </div>
);

const factStyle = {
  display: 'flex',
  gap: space.m,
  alignItems: 'baseline',
  padding: '10px 0',
  borderBottom: `1px solid ${color.rail}`,
} as const;

const styles = StyleSheet.create({ page: { gap: space.l } });
