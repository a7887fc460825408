import { usePlace, useOneProperty } from '@/hooks/usePlace';
import { t } from '@/shared/messages';
import { Screen } from '../ui/Screen';
import { Select } from '../ui/Select';
import { CalendarLinks } from './CalendarLinks';
import { PeopleAt } from './PeopleAt';

const deviceZone = () => Intl.DateTimeFormat().resolvedOptions().timeZone;

/** People of a property, for those who may see them, and everybody's own calendar links. */
export function PeopleScreen() {
  const { property, properties, choose } = useOneProperty('people.read');
  const { properties: all } = usePlace();
  return (
    <Screen title={t('people.title')}>
      {properties.length > 1 && property ? (
        <Select
          label={t('nav.place')}
          value={property.id}
          onChange={choose}
          options={properties.map(({ id, name }) => ({ value: id, label: name }))}
        />
      ) : null}
      {property ? <PeopleAt key={property.id} property={property} /> : null}
      <CalendarLinks zone={property?.zone ?? all[0]?.zone ?? deviceZone()} />
    </Screen>
  );
}
