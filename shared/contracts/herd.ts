import { z } from 'zod';

import { t } from '../messages';
import { animalClass, id, instant, localDate, note, pageQuery } from './common';

export const animal = z.object({
  id,
  tag: z.string(),
  /** 15 figures without space, or null. */
  eid: z.string().nullable(),
  class: animalClass,
  breed: z.string().nullable(),
  birth: localDate.nullable(),
  sire: z.string().nullable(),
  dam: z.string().nullable(),
  lastCalving: localDate.nullable(),
  lastService: localDate.nullable(),
  /** Known not pregnant: true, known pregnant: false, not known: null. */
  knownEmpty: z.boolean().nullable(),
  weightKg: z.number().nullable(),
  condition: z.number().nullable(),
  paddock: z.string().nullable(),
  note: z.string().nullable(),
  state: z.enum(['present', 'left']),
  /** Cohort that is running now, if the animal is in one. */
  cohort: z.object({ id, name: z.string() }).nullable(),
  updatedAt: instant,
});
export type Animal = z.infer<typeof animal>;

export const animalQuery = pageQuery.extend({
  search: z.string().max(80).optional(),
  class: animalClass.optional(),
  available: z.enum(['yes']).optional(),
});
export const animalPatch = z.object({
  class: animalClass.optional(),
  breed: z.string().max(80).nullish(),
  birth: localDate.nullish(),
  lastCalving: localDate.nullish(),
  lastService: localDate.nullish(),
  knownEmpty: z.boolean().nullish(),
  weightKg: z.number().positive().max(2000).nullish(),
  condition: z.number().min(1).max(9).nullish(),
  paddock: z.string().max(80).nullish(),
  note: note.nullish(),
});
export const animalEvent = z.object({
  at: instant,
  kind: z.string(),
  title: z.string(),
  detail: z.string().nullable(),
  by: z.string().nullable(),
});
export const animalDetail = animal.extend({ propertyId: id, events: z.array(animalEvent) });

export const importFields = [
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
] as const;
export const importField = z.enum(importFields);
export const dateOrder = z.enum(['dmy', 'mdy', 'ymd']);

export const importRequest = z.object({
  /** Also the id of the import: a repeated commit with the same id changes nothing. */
  id,
  fileName: z.string().max(200),
  /** The file's bytes; encoding, byte-order mark and delimiter are found by the server. At most 4 MB. */
  contentBase64: z.base64().max(6_000_000, { error: t('field.file') }),
  /** Column header to field; null leaves a column out. Absent: the server proposes. */
  mapping: z.record(z.string(), importField.nullable()).optional(),
  dateOrder: dateOrder.optional(),
  /** Class for rows whose class column is missing or empty. */
  defaultClass: animalClass.optional(),
});
export type ImportRequest = z.infer<typeof importRequest>;

export const importRow = z.object({
  /** Line in the file, header = 1. */
  line: z.number().int(),
  action: z.enum(['create', 'update', 'skip', 'refuse']),
  tag: z.string(),
  eid: z.string().nullable(),
  /** For an update: field, what is there, what it becomes. */
  changes: z.array(z.object({ field: z.string(), from: z.string().nullable(), to: z.string().nullable() })),
  problems: z.array(z.object({ field: z.string(), message: z.string() })),
});
export const importPreview = z.object({
  fileName: z.string(),
  encoding: z.string(),
  delimiter: z.string(),
  columns: z.array(z.object({ header: z.string(), field: importField.nullable(), sample: z.array(z.string()) })),
  mapping: z.record(z.string(), importField.nullable()),
  /** What must be answered before it can commit. */
  questions: z.array(
    z.object({
      kind: z.enum(['dateOrder', 'missingColumn', 'defaultClass']),
      message: z.string(),
      columns: z.array(z.string()),
    }),
  ),
  counts: z.object({ create: z.number(), update: z.number(), skip: z.number(), refuse: z.number() }),
  rows: z.array(importRow),
});
export type ImportPreview = z.infer<typeof importPreview>;
export const importResult = z.object({
  id,
  counts: importPreview.shape.counts,
  animalIds: z.array(id),
  /** True when this id was committed before: nothing was done again. */
  repeated: z.boolean(),
});
