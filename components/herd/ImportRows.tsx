import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

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

/** Every row of the file and what becomes of it, a hundred at a time, so that a large file stays quick. */
export function ImportRows({ rows }: { rows: readonly Row[] }) {
  const [show, setShow] = useState<Show>('all');
  const [wantedPage, setPage] = useState(0);
  const listed = show === 'all' ? rows : rows.filter((row) => row.action === show);
  const last = Math.max(0, Math.ceil(listed.length / pageSize) - 1);
  // another look at the file can leave fewer rows of a kind
  const page = Math.min(wantedPage, last);
  const from = page * pageSize;
  const shown = listed.slice(from, from + pageSize);
  return (
    <View style={styles.rows}>
      <Text variant="heading" level={2}>
        {t('import.rows')}
      </Text>
      <Segmented
        label={t('import.rows')}
        hideLabel
        value={show}
        onChange={(value) => {
          setShow(value);
          setPage(0);
        }}
        options={[
          { value: 'all', label: t('import.showAll') },
          { value: 'refuse', label: t('import.showRefused') },
          { value: 'update', label: t('import.showChanged') },
        ]}
      />
      <Text variant="small" tone="quiet" role="status">
        {listed.length === 0
          ? t('import.noneOfKind')
          : t('import.showing', { from: from + 1, to: from + shown.length, count: listed.length })}
      </Text>
      {shown.length > 0 ? (
        <DataTable
          caption={t('import.rows')}
          hideCaption
          columns={columns}
          rows={shown}
          rowKey={(row) => String(row.line)}
        />
      ) : null}
      {last > 0 ? (
        <View style={styles.turn}>
          <Button label={t('import.earlierRows')} disabled={page === 0} onPress={() => setPage(page - 1)} />
          <Button label={t('import.laterRows')} disabled={page === last} onPress={() => setPage(page + 1)} />
        </View>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  rows: { gap: space.m },
  turn: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s },
});

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
