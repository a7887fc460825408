import { findEid } from './eid';
import type { DateOrder, ImportField } from './types';

/** Words of the trade that head a column, the plainest first: where two columns fit one field, the earlier word wins. */
const words: Record<ImportField, readonly string[]> = {
  tag: [
    'visual tag',
    'vid',
    'visual id',
    'management tag',
    'ear tag',
    'eartag',
    'tag',
    'tag id',
    'cow id',
    'cow',
    'animal id',
    'animal',
    'animal number',
    'animal no',
    'number',
    'no',
    'id',
    'caravana',
    'brinco',
  ],
  eid: [
    'eid',
    'rfid',
    'electronic id',
    'electronic tag',
    'eid tag',
    'rfid tag',
    'eid rfid',
    'transponder',
    'microchip',
  ],
  class: ['class', 'stock class', 'category', 'animal class', 'animal type', 'type', 'categoria'],
  breed: ['breed', 'breed type', 'raza', 'raca'],
  birth: ['birth', 'dob', 'born', 'birthdate', 'birthday', 'birth day'],
  sire: ['sire', 'sire id', 'sire tag', 'sire name', 'father', 'bull'],
  dam: ['dam', 'dam id', 'dam tag', 'dam name', 'mother'],
  lastCalving: ['last calving', 'calving', 'calved', 'last calved', 'calved on', 'fresh', 'freshened', 'parto'],
  lastService: ['last service', 'last served', 'last ai', 'last bred', 'served', 'service', 'last mating', 'bred'],
  knownEmpty: [
    'known empty',
    'empty',
    'not pregnant',
    'open',
    'preg status',
    'pregnancy status',
    'pregnancy',
    'pregnant',
    'preg test',
    'in calf',
  ],
  weightKg: ['weight', 'liveweight', 'live weight', 'lwt', 'lw', 'wt', 'body weight', 'bodyweight', 'peso'],
  condition: ['condition score', 'condition', 'bcs', 'cs', 'body condition', 'body condition score', 'fat score'],
  paddock: ['paddock', 'mob', 'location', 'pen', 'field', 'pasture', 'herd group', 'mob name', 'lote', 'potrero'],
  note: ['note', 'notes', 'comment', 'comments', 'remark', 'remarks'],
};

/** Said beside the name of a column, not part of it: units, date patterns, "no.". */
const noise = /^(no|nr|num|number|date|of|on|the|kg|kgs|lb|lbs|d+|m+|y+)$/;

const plain = (header: string) =>
  header
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, ' ')
    .trim();

const byWord = new Map(
  (Object.keys(words) as ImportField[]).flatMap((field) =>
    words[field].map((word, rank) => [word, { field, rank }] as const),
  ),
);

/** The field a heading names, or null. Only whole names count: "birth weight" is neither birth nor weight. */
export function fieldOfHeading(header: string): { field: ImportField; rank: number } | null {
  const name = plain(header);
  const core = name.split(' ').filter((word) => !noise.test(word));
  return byWord.get(name) ?? byWord.get(core.join(' ')) ?? null;
}

/**
 * A field for each heading; null where none is certain. Where two columns name one field, the plainer name gets it.
 * A column headed "tag" that holds nothing but 15-figure numbers is the EID.
 */
export function proposeMapping(
  headers: readonly string[],
  valuesOf: (column: number) => readonly string[],
): Record<string, ImportField | null> {
  const best = new Map<ImportField, { column: number; rank: number }>();
  headers.forEach((header, column) => {
    const named = fieldOfHeading(header);
    if (!named) return;
    const values = valuesOf(column).filter((value) => value !== '');
    const electronic = named.field === 'tag' && values.length > 0 && values.every((value) => 'eid' in findEid(value));
    const field = electronic ? 'eid' : named.field;
    const held = best.get(field);
    if (!held || named.rank < held.rank) best.set(field, { column, rank: named.rank });
  });
  const fieldOf = new Map([...best].map(([field, { column }]) => [column, field]));
  return Object.fromEntries(headers.map((header, column) => [header, fieldOf.get(column) ?? null]));
}

/** The order of a date that the heading itself spells, such as "DOB (dd/mm/yyyy)". */
export function orderInHeading(header: string): DateOrder | null {
  if (/\bd{1,2}\W?m{1,3}\W?y{2,4}\b/i.test(header)) return 'dmy';
  if (/\bm{1,3}\W?d{1,2}\W?y{2,4}\b/i.test(header)) return 'mdy';
  return /\by{2,4}\W?m{1,3}\W?d{1,2}\b/i.test(header) ? 'ymd' : null;
}
