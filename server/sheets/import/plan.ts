import type { AnimalClass, LocalDate } from '@/protocols/types';

import { ordersOf } from './dates';
import { orderInHeading, proposeMapping } from './headings';
import { findRepeats } from './repeats';
import { type Column, dateFields, readRow, type ReadRow } from './rows';
import type { AnimalValues, DateOrder, HerdAnimal, ImportField, Problem, Sentence, Sheet, ValueField } from './types';

export interface Change {
  field: ValueField;
  from: HerdAnimal[ValueField];
  to: HerdAnimal[ValueField];
}
export interface PlannedRow {
  line: number;
  action: 'create' | 'update' | 'skip' | 'refuse';
  tag: string;
  values: AnimalValues;
  /** The animal of the herd that the row is about. */
  animalId: string | null;
  changes: Change[];
  problems: Problem[];
}
export interface Question extends Sentence {
  kind: 'dateOrder' | 'missingColumn' | 'defaultClass';
  columns: string[];
}
export interface ImportPlan {
  mapping: Record<string, ImportField | null>;
  columns: { header: string; field: ImportField | null; sample: string[] }[];
  questions: Question[];
  counts: Record<PlannedRow['action'], number>;
  rows: PlannedRow[];
}
export interface ImportInput {
  sheet: Sheet;
  mapping?: Record<string, ImportField | null> | undefined;
  dateOrder?: DateOrder | undefined;
  defaultClass?: AnimalClass | undefined;
  herd: readonly HerdAnimal[];
  /** Today's date at the property. */
  today: LocalDate;
}

const fold = (tag: string) => tag.toLowerCase();

/** Headings that were given the same field: nobody can tell which of them counts. */
export function doubleFields(mapping: Record<string, ImportField | null>): ImportField[] {
  const fields = Object.values(mapping).filter((field) => field !== null);
  return [...new Set(fields.filter((field, i) => fields.indexOf(field) !== i))];
}

/** The order of a date column: what its heading spells, what its values prove, else what was answered. */
function orderOf(
  header: string,
  values: readonly string[],
  input: ImportInput,
): { order: DateOrder | null; ask: boolean } {
  const orders = ordersOf(values, input.today);
  if (!orders) return { order: null, ask: false };
  const spelled = orderInHeading(header);
  if (spelled && orders.includes(spelled)) return { order: spelled, ask: false };
  const [only] = orders;
  if (orders.length === 1 && only) return { order: only, ask: false };
  return { order: input.dateOrder ?? null, ask: !input.dateOrder };
}

function columnsOf(input: ImportInput, mapping: Record<string, ImportField | null>) {
  const ask: string[] = [];
  const columns: Column[] = [];
  input.sheet.headers.forEach((header, index) => {
    const field = mapping[header];
    if (!field) return;
    let order: DateOrder | null = null;
    if ((dateFields as readonly string[]).includes(field)) {
      const values = input.sheet.rows.map((row) => row.cells[index] ?? '');
      const found = orderOf(header, values, input);
      order = found.order;
      if (found.ask) ask.push(header);
    }
    columns.push({ index, header, field, order });
  });
  return { columns, ask };
}

/** What becomes of a row beside the animal of the herd that has its tag. */
function against(row: ReadRow, animal: HerdAnimal | undefined, byEid: ReadonlyMap<string, HerdAnimal>): Problem[] {
  const holder = row.values.eid === undefined ? undefined : byEid.get(row.values.eid);
  const problems: Problem[] = [];
  if (holder && holder.id !== animal?.id) {
    problems.push({
      field: 'eid',
      key: 'server.import.eidOfAnother',
      params: { eid: holder.eid ?? '', tag: holder.tag },
    });
  }
  if (animal?.state === 'left')
    problems.push({ field: 'tag', key: 'server.import.animalLeft', params: { tag: animal.tag } });
  const birth = row.values.birth ?? animal?.birth ?? null;
  const calving = row.values.lastCalving ?? animal?.lastCalving ?? null;
  if (birth && calving && calving <= birth) {
    problems.push({ field: 'lastCalving', key: 'server.import.calvedBeforeBirth' });
  }
  return problems;
}

const changesOf = (values: AnimalValues, animal: HerdAnimal): Change[] =>
  (Object.keys(values) as ValueField[])
    .map((field) => ({ field, from: animal[field], to: values[field] ?? null }))
    .filter(({ from, to }) => to !== from);

interface Herd {
  byTag: ReadonlyMap<string, HerdAnimal>;
  byFoldedTag: ReadonlyMap<string, HerdAnimal>;
  byEid: ReadonlyMap<string, HerdAnimal>;
}

function planRow(row: ReadRow, repeats: Problem[], herd: Herd, defaultClass: AnimalClass | undefined): PlannedRow {
  const animal = herd.byTag.get(row.tag) ?? herd.byFoldedTag.get(fold(row.tag));
  const problems = [...row.problems, ...repeats, ...against(row, animal, herd.byEid)];
  const values = animal || row.values.class || !defaultClass ? row.values : { ...row.values, class: defaultClass };
  const planned = { line: row.line, tag: row.tag, values, animalId: animal?.id ?? null, changes: [], problems };
  if (problems.length > 0) return { ...planned, action: 'refuse' };
  if (!animal) return { ...planned, action: 'create' };
  const changes = changesOf(row.values, animal);
  return { ...planned, changes, action: changes.length > 0 ? 'update' : 'skip' };
}

/** What is unanswered: without it nothing can be committed. */
function questionsOf(plan: {
  rows: readonly PlannedRow[];
  columns: readonly Column[];
  ask: string[];
  sheet: Sheet;
}): Question[] {
  const questions: Question[] = [];
  if (!plan.columns.some((column) => column.field === 'tag')) {
    questions.push({ kind: 'missingColumn', key: 'server.import.askTag', columns: plan.sheet.headers });
  }
  if (plan.ask.length > 0) {
    const params = { columns: plan.ask };
    questions.push({ kind: 'dateOrder', key: 'server.import.askDateOrder', params, columns: plan.ask });
  }
  const without = plan.rows.filter((row) => row.action === 'create' && !row.values.class).length;
  if (without > 0) {
    const columns = plan.columns.filter((column) => column.field === 'class').map((column) => column.header);
    const key = columns.length > 0 ? 'server.import.askClassEmpty' : 'server.import.askClass';
    questions.push({ kind: 'defaultClass', key, params: { count: without }, columns });
  }
  return questions;
}

const sampleSize = 3;

/**
 * What an import would do, row by row. Nothing is written and nothing is guessed: what the file leaves open is a
 * question, what is wrong refuses its row. The herd as it stands and today's date come in, so that a commit can plan
 * again inside its transaction and get what then holds.
 */
export function planImport(input: ImportInput): ImportPlan {
  const { sheet } = input;
  const valuesOf = (index: number) => sheet.rows.map((row) => (row.cells[index] ?? '').trim());
  const given = input.mapping;
  const mapping = given
    ? Object.fromEntries(sheet.headers.map((h) => [h, (Object.hasOwn(given, h) ? given[h] : null) ?? null]))
    : proposeMapping(sheet.headers, valuesOf);
  const { columns, ask } = columnsOf(input, mapping);
  const hasTag = columns.some((column) => column.field === 'tag');
  const read = hasTag ? sheet.rows.map((row) => readRow(row, columns, sheet.headers.length, input.today)) : [];
  const repeats = findRepeats(read);
  const herd: Herd = {
    byTag: new Map(input.herd.map((animal) => [animal.tag, animal])),
    byFoldedTag: new Map(input.herd.map((animal) => [fold(animal.tag), animal])),
    byEid: new Map(input.herd.flatMap((animal) => (animal.eid === null ? [] : [[animal.eid, animal] as const]))),
  };
  const rows = read.map((row) => planRow(row, repeats.get(row.line) ?? [], herd, input.defaultClass));
  const counts = { create: 0, update: 0, skip: 0, refuse: 0 };
  for (const row of rows) counts[row.action] += 1;
  return {
    mapping,
    columns: sheet.headers.map((header, index) => ({
      header,
      field: mapping[header] ?? null,
      sample: valuesOf(index)
        .filter((value) => value !== '')
        .slice(0, sampleSize),
    })),
    questions: questionsOf({ rows, columns, ask, sheet }),
    counts,
    rows,
  };
}
