import { View } from 'react-native';

import type { ImportPreview, ImportRequest } from '@/shared/contracts/herd';
import { t, tData } from '@/shared/messages';
import { Select } from '../ui/Select';
import { Text } from '../ui/Text';
import { space } from '../theme/tokens';

type Mapping = NonNullable<ImportRequest['mapping']>;
type Field = NonNullable<Mapping[string]>;

const fields: readonly Field[] = [
  'tag',
  'eid',
  'class',
  'breed',
  'birth',
  'sire',
  'dam',
  'lastCalving',
  'lastService',
  'knownEmpty',
  'weightKg',
  'condition',
  'paddock',
  'note',
];

/** Which column means what; the server has proposed, people decide. */
export function ImportColumns({ preview, onChange }: { preview: ImportPreview; onChange: (mapping: Mapping) => void }) {
  return (
    <View>
      <Text variant="heading" level={2}>
        {t('import.columns')}
      </Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.m, paddingTop: space.s }}>
        {preview.columns.map((column) => (
          <View key={column.header} style={{ flexBasis: 240, flexGrow: 1, maxWidth: 340 }}>
            <Select
              label={column.header}
              hint={column.sample.join(' · ')}
              value={column.field ?? 'leave'}
              onChange={(value) => onChange({ ...preview.mapping, [column.header]: value === 'leave' ? null : value })}
              options={[
                { value: 'leave' as const, label: t('import.leaveOut') },
                ...fields.map((value) => ({ value, label: tData(`herd.${value}`, value) })),
              ]}
            />
          </View>
        ))}
      </View>
    </View>
  );
}
