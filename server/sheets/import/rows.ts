import type { LocalDate } from '@/protocols/types';

import { cleanIdentity, cleanText, readClass, readCondition, readKnownEmpty, readWeight } from './cells';
import { readDate } from './dates';
import { findEid } from './eid';
import type { AnimalValues, DateOrder, ImportField, Problem, Sentence, SheetRow } from './types';

export interface Column {
  index: number;
  header: string;
  field: ImportField;
  /** Order of the numeric dates in it; null: not known yet. */
  order: DateOrder | null;
}
export interface ReadRow {
  line: number;
  tag: string;
  values: AnimalValues;
  problems: Problem[];
}

export const dateFields = ['birth', 'lastCalving', 'lastService'] as const satisfies readonly ImportField[];
type DateField = (typeof dateFields)[number];
const isDate = (field: ImportField): field is DateField => (dateFields as readonly string[]).includes(field);

const mostCharacters = { tag: 40, breed: 80, sire: 80, dam: 80, paddock: 80, note: 2000 } as const;

/** The value of a cell that is not empty, a sentence when it has none, or nothing while the order of dates is not known. */
function readCell(value: string, column: Column, today: LocalDate): AnimalValues | Sentence {
  const { field, header } = column;
  if (isDate(field)) {
    const read = readDate(value, column.order, today);
    if ('date' in read) return { [field]: read.date };
    return 'key' in read ? read : {};
  }
  switch (field) {
    case 'eid':
      return findEid(cleanIdentity(value));
    case 'class':
      return readClass(value);
    case 'weightKg':
      return readWeight(value, header);
    case 'condition':
      return readCondition(value);
    case 'knownEmpty':
      return readKnownEmpty(value, header);
    case 'tag':
      return {};
    default: {
      const most = mostCharacters[field];
      if (value.length > most) return { key: 'server.import.tooLong', params: { count: most } };
      return { [field]: value };
    }
  }
}

/** One row as values; each bad cell is a problem of its own, so that a person can mend all at once. */
export function readRow(row: SheetRow, columns: readonly Column[], width: number, today: LocalDate): ReadRow {
  const problems: Problem[] = [];
  const values: AnimalValues = {};
  let tag = '';
  if (row.cells.slice(width).some((cell) => cell.trim() !== '')) {
    problems.push({ field: '', key: 'server.import.tooManyCells', params: { count: width } });
  }
  for (const column of columns) {
    const value = cleanText(row.cells[column.index] ?? '');
    if (column.field === 'tag') tag = cleanIdentity(value);
    if (value === '') continue;
    const read = readCell(value, column, today);
    if ('key' in read) problems.push({ ...read, field: column.field });
    else Object.assign(values, read);
  }
  if (tag === '') problems.push({ field: 'tag', key: 'server.import.tagMissing' });
  if (tag.length > mostCharacters.tag) {
    problems.push({ field: 'tag', key: 'server.import.tooLong', params: { count: mostCharacters.tag } });
  }
  return { line: row.line, tag, values, problems };
}
