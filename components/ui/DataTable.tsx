import type { Href } from 'expo-router';
import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';

import { useWide } from '../theme/layout';
import { color, space } from '../theme/tokens';
import { Link } from './Link';
import { Text } from './Text';

export interface Column<Row> {
  key: string;
  title: string;
  cell: (row: Row) => ReactNode;
  /** Figures stand at the end, under one another. */
  end?: boolean;
  /** Names the row: exactly one column. */
  primary?: boolean;
  /** Left out where rows are stacked. */
  wideOnly?: boolean;
}

interface DataTableProps<Row> {
  /** What the table shows, for everybody; with `hideCaption` for screen readers only. */
  caption: string;
  hideCaption?: boolean;
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  /** Where a row leads: its primary cell becomes a link. */
  href?: (row: Row) => Href;
  /** Stays a table on a phone too, for few narrow columns. */
  alwaysTable?: boolean;
}

const words = (value: ReactNode, strong = false): ReactNode =>
  typeof value === 'string' || typeof value === 'number' ? <Text strong={strong}>{value}</Text> : value;

function Primary<Row>({
  column,
  row,
  href,
}: {
  column: Column<Row>;
  row: Row;
  href?: ((row: Row) => Href) | undefined;
}) {
  const value = column.cell(row);
  return href ? <Link href={href(row)}>{value}</Link> : words(value, true);
}

/** Rows and columns: a table where it is wide, one block a row where it isn't. */
export function DataTable<Row>(props: DataTableProps<Row>) {
  const wide = useWide();
  return wide || props.alwaysTable ? <Wide {...props} /> : <Stacked {...props} />;
}

function Wide<Row>({ caption, hideCaption, columns, rows, rowKey, href }: DataTableProps<Row>) {
  return (
    <table className="table">
      <caption className={hideCaption ? 'hidden-words' : ''}>
        <Text variant="subheading">{caption}</Text>
      </caption>
      <thead>
        <tr>
          {columns.map((column) => (
            <th key={column.key} scope="col" className={column.end ? 'end' : ''}>
              {column.title}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={rowKey(row)}>
            {columns.map((column) =>
              column.primary ? (
                <th key={column.key} scope="row" className={column.end ? 'end' : ''}>
                  <Primary column={column} row={row} href={href} />
                </th>
              ) : (
                <td key={column.key} className={column.end ? 'end' : ''}>
                  {words(column.cell(row))}
                </td>
              ),
            )}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Stacked<Row>({ caption, hideCaption, columns, rows, rowKey, href }: DataTableProps<Row>) {
  const primary = columns.find((column) => column.primary);
  const others = columns.filter((column) => !column.primary && !column.wideOnly);
  return (
    <View>
      {hideCaption ? null : <Text variant="subheading">{caption}</Text>}
      <View role="list" aria-label={caption} style={styles.list}>
        {rows.map((row) => (
          <View role="listitem" key={rowKey(row)} style={styles.row}>
            {primary ? <Primary column={primary} row={row} href={href} /> : null}
            {others.map((column) => {
              const value = column.cell(row);
              if (value === null || value === '') return null;
              return (
                <View key={column.key} style={styles.pair}>
                  <Text variant="small" tone="quiet" style={styles.name}>
                    {column.title}
                  </Text>
                  <View style={styles.value}>{words(value)}</View>
                </View>
              );
            })}
          </View>
        ))}
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  list: { borderTopWidth: 3, borderTopColor: color.ink },
  row: { borderBottomWidth: 1, borderBottomColor: color.rail, paddingVertical: space.s, gap: space.xs },
  pair: { flexDirection: 'row', gap: space.m, alignItems: 'baseline' },
  name: { width: 120 },
  value: { flex: 1, minWidth: 0 },
});
