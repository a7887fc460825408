import { useState } from 'react';
import { View } from 'react-native';

import type { ImportPreview } from '@/shared/contracts/herd';
import { t, tData } from '@/shared/messages';
import { space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { DataTable, type Column } from '../ui/DataTable';
import { Segmented } from '../ui/RadioGroup';
import { TagChip } from '../ui/TagChip';
import { Text } from '../ui/Text';

type Row = ImportPreview['rows'][number];
type Show = 'all' | 'refuse' | 'update';

const pageSize = 100;

/** Every row of the file and what becomes of it; shown in parts, so that a large file stays quick. */
export function ImportRows({ rows }: { rows: readonly Row[] }) {
  const [show, setShow] = useState<Show>('all');
  const [shown, setShown] = useState(pageSize);
  const listed = rows.filter((row) => show === 'all' || row.action === show);
  return (
    <View style={{ gap: space.m }}>
      <Text variant="heading" level={2}>
        {t('import.rows')}
      </Text>
      <Segmented
        label={t('import.rows')}
        hideLabel
        value={show}
        onChange={setShow}
        options={[
          { value: 'all', label: t('import.showAll') },
          { value: 'refuse', label: t('import.showRefused') },
          { value: 'update', label: t('import.showChanged') },
        ]}
      />
      <DataTable
        caption={t('import.rows')}
        hideCaption
        columns={columns}
        rows={listed.slice(0, shown)}
        rowKey={(row) => String(row.line)}
      />
      {listed.length > shown ? <Button label={t('ui.more')} onPress={() => setShown(shown + pageSize)} /> : null}
    </View>
  );
}

const fieldWord = (field: string): string => (field ? tData(`herd.${field}`, field) : '');

const columns: Column<Row>[] = [
  { key: 'line', title: t('import.line'), end: true, cell: (row) => row.line },
  {
    key: 'tag',
    title: t('herd.tag'),
    primary: true,
    cell: (row) => (row.tag ? <TagChip tag={row.tag} size="s" /> : '–'),
  },
  { key: 'eid', title: t('herd.eid'), cell: (row) => row.eid ?? '–' },
  {
    key: 'what',
    title: t('import.what'),
    cell: (row) => (
      <View>
        <Text strong tone={row.action === 'refuse' ? 'stop' : 'ink'}>
          {t(`import.action.${row.action}`)}
        </Text>
        {row.problems.map((problem) => (
          <Text key={`${problem.field}${problem.message}`} variant="small">
            {[fieldWord(problem.field), problem.message].filter(Boolean).join(': ')}
          </Text>
        ))}
        {row.changes.map((change) => (
          <Text key={change.field} variant="small">
            {t('import.change', {
              field: fieldWord(change.field),
              from: change.from ?? t('import.blank'),
              to: change.to ?? t('import.blank'),
            })}
          </Text>
        ))}
      </View>
    ),
  },
];
