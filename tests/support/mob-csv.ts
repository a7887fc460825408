import type { AnimalClass } from '@/protocols/types';

/**
 * A file of an invented mob, the same for the same seed. Each way of writing is a trap that files from yards hold:
 * spaces in EIDs, leading zeros, decimal commas, dates in one order or another, repeated and damaged identities.
 */
export interface MobOptions {
  head: number;
  seed?: number;
  delimiter?: ',' | ';' | '\t';
  /** How dates are written. */
  dates?: 'iso' | 'dmy' | 'mdy' | 'names';
  /** Every day of the month is 12 or less, so that day and month can be taken for each other. */
  ambiguousDates?: boolean;
  decimalComma?: boolean;
  spacedEids?: boolean;
  className?: string;
}
export interface MobAnimal {
  tag: string;
  eid: string;
  breed: string;
  birth: string;
  weightKg: number;
  condition: number;
  paddock: string;
}

/** Mulberry32 (public domain, from memory): small, and the same everywhere. */
export function chance(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = state;
    mixed = Math.imul(mixed ^ (mixed >>> 15), mixed | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

const two = (n: number) => String(n).padStart(2, '0');

/** Heifers about two years old at the end of 2026, tags from 0101 upwards with their leading zero. */
export function makeMob({ head, seed = 7, ambiguousDates = false }: MobOptions): MobAnimal[] {
  const next = chance(seed);
  const breeds = ['Shorthorn cross', 'Hereford', 'Angus cross'];
  const paddocks = ['Creek', 'Top Dam', 'House'];
  return Array.from({ length: head }, (_, i) => ({
    tag: String(101 + i).padStart(4, '0'),
    // 999 marks a test code in ISO 11784: no real animal carries it (from memory)
    eid: `999${String(100000000000 + i * 7 + Math.floor(next() * 6) + 1)}`,
    breed: breeds[Math.floor(next() * breeds.length)] ?? 'Hereford',
    birth: `2024-${two(8 + Math.floor(next() * 3))}-${two(1 + Math.floor(next() * (ambiguousDates ? 12 : 28)))}`,
    weightKg: Math.round((310 + next() * 110) * 10) / 10,
    condition: 2 + Math.round(next() * 4) / 2,
    paddock: paddocks[Math.floor(next() * paddocks.length)] ?? 'Creek',
  }));
}

const monthNames = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
export function writeDate(date: string, style: NonNullable<MobOptions['dates']>): string {
  const [year = '', month = '', day = ''] = date.split('-');
  if (style === 'dmy') return `${day}/${month}/${year}`;
  if (style === 'mdy') return `${month}/${day}/${year}`;
  return style === 'names' ? `${Number(day)} ${monthNames[Number(month) - 1]} ${year}` : date;
}

export const mobHeadings = ['Visual tag', 'EID', 'Class', 'Breed', 'Date of birth', 'Weight (kg)', 'BCS', 'Mob'];

/** Cells of a mob, headings first: tests spoil single cells before writing them. */
export function mobCells(options: MobOptions): string[][] {
  const { dates = 'iso', decimalComma = false, spacedEids = false, className = 'Heifer' } = options;
  const figure = (n: number) => (decimalComma ? String(n).replace('.', ',') : String(n));
  const rows = makeMob(options).map((animal) => [
    animal.tag,
    spacedEids ? `${animal.eid.slice(0, 3)} ${animal.eid.slice(3)}` : animal.eid,
    className,
    animal.breed,
    writeDate(animal.birth, dates),
    figure(animal.weightKg),
    figure(animal.condition),
    animal.paddock,
  ]);
  return [mobHeadings, ...rows];
}

/** Cells as text of a file; a cell that holds the delimiter, a quotation mark or a line end is quoted (RFC 4180). */
export const writeCsv = (cells: string[][], delimiter = ','): string =>
  cells
    .map((row) =>
      row
        .map((cell) => (cell.includes(delimiter) || /["\n\r]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell))
        .join(delimiter),
    )
    .join('\r\n') + '\r\n';

export const mobCsv = (options: MobOptions): string => writeCsv(mobCells(options), options.delimiter ?? ',');

/** Class of every animal that `mobCsv` writes when none is asked for. */
export const mobClass: AnimalClass = 'heifer';
