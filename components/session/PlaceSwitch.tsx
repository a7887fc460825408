import { usePlace } from '@/hooks/usePlace';
import { t } from '@/shared/messages';
import { Select } from '../ui/Select';
import { Text } from '../ui/Text';

const all = 'all';

/** One property or all of them; with a single property only its name. */
export function PlaceSwitch() {
  const { propertyId, properties, choose } = usePlace();
  const only = properties.length === 1 ? properties[0] : undefined;
  if (only) return <Text strong>{only.name}</Text>;
  if (properties.length === 0) return null;
  return (
    <Select
      label={t('nav.place')}
      value={propertyId ?? all}
      onChange={(value) => choose(value === all ? null : value)}
      options={[
        { value: all, label: t('nav.allPlaces') },
        ...properties.map(({ id, name }) => ({ value: id, label: name })),
      ]}
    />
  );
}
