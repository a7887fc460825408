import Papa from 'papaparse';

import { decode } from './decode';
import { fieldOfHeading } from './headings';
import type { Sheet, SheetRow, Unreadable } from './types';

export const mostBytes = 4 * 1024 * 1024;
export const mostRows = 20_000;
export const mostColumns = 60;
/** Lines that may stand above the headings, such as a title. */
const headingsWithin = 10;
const delimiters = [';', '\t', ',', '|'] as const;

interface Heading {
  delimiter: string;
  index: number;
  named: number;
  width: number;
}

const parse = (text: string, delimiter: string, preview = 0) =>
  Papa.parse<string[]>(text, { delimiter, newline: '\n', preview, header: false, skipEmptyLines: false });

/**
 * The delimiter under which most headings are known words, and the line they stand on; else the one that makes most
 * columns in the first line. Rows are not counted: a decimal comma makes "3,5;4,2" look like a comma file.
 */
function findHeading(text: string): Heading {
  const top = text.split('\n', 40).join('\n');
  let best: Heading | null = null;
  for (const delimiter of delimiters) {
    const rows = parse(top, delimiter, headingsWithin).data;
    const first = rows.findIndex((row) => row.some((cell) => cell.trim() !== ''));
    rows.forEach((row, index) => {
      const known = new Set(row.map((cell) => fieldOfHeading(cell)?.field).filter((field) => field !== undefined));
      // a row further down heads the table only when it clearly is a row of headings
      const named = index === first || known.size >= 2 ? known.size : -1;
      const width = row.length;
      if (named < 0 || index < first) return;
      if (!best || named > best.named || (named === best.named && index === best.index && width > best.width)) {
        best = { delimiter, index, named, width };
      }
    });
  }
  return best ?? { delimiter: ',', index: 0, named: 0, width: 0 };
}

/** Each row with the line it begins on: cells in quotation marks may hold line ends. */
function withLines(rows: readonly string[][], firstLine: number): SheetRow[] {
  let line = firstLine;
  return rows.map((cells) => {
    const row = { line, cells };
    line += 1 + cells.reduce((ends, cell) => ends + (cell.split('\n').length - 1), 0);
    return row;
  });
}

/** Headings without a name get their column's number, repeated ones a number behind; empty columns go. */
function nameColumns(heading: readonly string[], rows: readonly SheetRow[]) {
  const used = new Set<string>();
  const columns: { index: number; header: string }[] = [];
  heading.forEach((cell, index) => {
    const name = cell.replace(/\s+/g, ' ').trim();
    if (name === '' && !rows.some((row) => (row.cells[index] ?? '').trim() !== '')) return;
    const base = name === '' ? `Column ${index + 1}` : name;
    let header = base;
    for (let n = 2; used.has(header); n++) header = `${base} (${n})`;
    used.add(header);
    columns.push({ index, header });
  });
  return columns;
}

/** Bytes of a file to named columns and rows. Answers a sentence when it is no such file or is too large. */
export function readSheet(bytes: Uint8Array): Sheet | Unreadable {
  if (bytes.length > mostBytes) return { unreadable: { key: 'server.import.tooLarge' } };
  const decoded = decode(bytes);
  if ('unreadable' in decoded) return decoded;
  const whole = decoded.text.replace(/\r\n?/g, '\n');
  // the line by which a spreadsheet is told its delimiter
  const told = /^"?sep=(.)"?\n/i.exec(whole);
  const text = told ? whole.slice(told[0].length) : whole;
  const found = findHeading(text);
  const delimiter = told?.[1] ?? found.delimiter;
  const parsed = parse(text, delimiter);
  const all = withLines(parsed.data, told ? 2 : 1);
  const broken = parsed.errors.find((error) => error.type === 'Quotes');
  if (broken) {
    const line = all[Math.min(broken.row ?? 0, all.length - 1)]?.line ?? 1;
    return { unreadable: { key: 'server.import.quotes', params: { line: String(line) } } };
  }
  const rows = all.slice(found.index + 1).filter((row) => row.cells.some((cell) => cell.trim() !== ''));
  const heading = all[found.index]?.cells ?? [];
  if (heading.length > mostColumns) {
    return { unreadable: { key: 'server.import.tooManyColumns', params: { count: heading.length } } };
  }
  if (rows.length > mostRows)
    return { unreadable: { key: 'server.import.tooManyRows', params: { count: rows.length } } };
  if (rows.length === 0) return { unreadable: { key: 'server.import.noRows' } };
  const columns = nameColumns(heading, rows);
  return {
    encoding: decoded.encoding,
    delimiter,
    headers: columns.map((column) => column.header),
    rows: rows.map(({ line, cells }) => ({
      line,
      // what lies beyond the headings is kept at the end, so that the row can be refused for it
      cells: [...columns.map(({ index }) => cells[index] ?? ''), ...cells.slice(heading.length)],
    })),
  };
}
