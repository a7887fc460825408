import { StyleSheet, View } from 'react-native';

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

interface ColumnsProps {
  preview: ImportPreview;
  request: ImportRequest;
  onChange: (mapping: Mapping) => void;
}

/** Which column means what; the server has proposed, people decide. */
export function ImportColumns({ preview, request, onChange }: ColumnsProps) {
  // what was chosen last, even while the answer to it is still on its way or was a refusal
  const mapping = request.mapping ?? preview.mapping;
  return (
    <View>
      <Text variant="heading" level={2}>
        {t('import.columns')}
      </Text>
      <View style={styles.columns}>
        {preview.columns.map((column) => (
          <View key={column.header} style={styles.column}>
            <Select
              label={column.header}
              hint={column.sample.join(' · ') || t('import.blank')}
              value={mapping[column.header] ?? 'leave'}
              onChange={(value) => onChange({ ...mapping, [column.header]: value === 'leave' ? null : value })}
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

const styles = StyleSheet.create({
  columns: { flexDirection: 'row', flexWrap: 'wrap', gap: space.m, paddingTop: space.s },
  column: { flexBasis: 240, flexGrow: 1, maxWidth: 340, minWidth: 0, justifyContent: 'flex-end' },
});
