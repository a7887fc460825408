import type { LocalDate } from '@/protocols/types';

import type { DateOrder, Sentence } from './types';

/** January to December: English, Spanish and Portuguese; the first three letters tell them apart. */
const months: readonly (readonly string[])[] = [
  ['jan', 'ene'],
  ['feb', 'fev'],
  ['mar'],
  ['apr', 'abr'],
  ['may', 'mai'],
  ['jun'],
  ['jul'],
  ['aug', 'ago'],
  ['sep', 'set'],
  ['oct', 'out'],
  ['nov'],
  ['dec', 'dic', 'dez'],
];
const monthOf = (word: string) => months.findIndex((names) => names.includes(word.slice(0, 3))) + 1;

interface Triple {
  year: number;
  month: number;
  day: number;
}
/** What a cell looks like before any order is assumed. */
type Shape =
  { known: Triple } | { parts: [number, number, number]; shortYear: boolean } | { dayNumber: true } | { other: true };

/** A year of two figures is the newest one that is not in the future. */
const fullYear = (year: number, thisYear: number) => {
  if (year >= 100) return year;
  const candidate = thisYear - (thisYear % 100) + year;
  return candidate > thisYear ? candidate - 100 : candidate;
};

function withMonthName(text: string, thisYear: number): Triple | null {
  const words = text.toLowerCase().match(/[a-z]{3,}|\d+/g) ?? [];
  const named = words.filter((word) => !/\d/.test(word)).map(monthOf);
  const [month, another] = named.filter((found) => found > 0);
  const figures = words.filter((word) => /^\d{1,4}$/.test(word)).map((word) => ({ word, value: Number(word) }));
  const [first, second] = figures;
  if (!month || another || !first || !second || figures.length > 2) return null;
  const yearFirst = first.word.length === 4;
  const [year, day] = yearFirst ? [first, second] : [second, first];
  if (day.word.length > 2 || year.word.length === 3 || year.word.length === 1) return null;
  return { year: fullYear(year.value, thisYear), month, day: day.value };
}

function shapeOf(value: string, thisYear: number): Shape {
  const text = value
    .trim()
    .replace(/[T ]\d{1,2}:\d{2}(:\d{2}(\.\d+)?)?\s*([ap]\.?m\.?)?(Z|[+-]\d{2}:?\d{2})?$/i, '')
    .replace(/(\d)(st|nd|rd|th)\b/i, '$1');
  const iso = /^(\d{4})([-/. ]?)(\d{1,2})\2(\d{1,2})$/.exec(text);
  if (iso && (iso[2] !== '' || text.length === 8)) {
    return { known: { year: Number(iso[1]), month: Number(iso[3]), day: Number(iso[4]) } };
  }
  const numeric = /^(\d{1,2})([-/. ])(\d{1,2})\2(\d{2}|\d{4})$/.exec(text);
  if (numeric) {
    const [, a, , b, c = ''] = numeric;
    return { parts: [Number(a), Number(b), Number(c)], shortYear: c.length === 2 };
  }
  const named = withMonthName(text.normalize('NFD').replace(/\p{M}/gu, ''), thisYear);
  if (named) return { known: named };
  return /^\d{4,5}([.,]\d+)?$/.test(text) ? { dayNumber: true } : { other: true };
}

const inOrder = ([a, b, c]: [number, number, number], order: DateOrder, thisYear: number): Triple => {
  if (order === 'ymd') return { year: fullYear(a, thisYear), month: b, day: c };
  return { year: fullYear(c, thisYear), month: order === 'dmy' ? b : a, day: order === 'dmy' ? a : b };
};

/** Longer ago than any animal of the herd was born. */
const oldestYears = 40;
const inRange = (t: Triple) => t.month >= 1 && t.month <= 12 && t.day >= 1 && t.day <= 31;
const iso = (t: Triple): LocalDate =>
  `${String(t.year).padStart(4, '0')}-${String(t.month).padStart(2, '0')}-${String(t.day).padStart(2, '0')}`;

const allOrders: DateOrder[] = ['dmy', 'mdy', 'ymd'];
/** Every order in which three numbers can be a date, with that date. */
function fitsOf(shape: { parts: [number, number, number]; shortYear: boolean }, thisYear: number) {
  const fits = new Map<DateOrder, LocalDate>();
  for (const order of allOrders) {
    if (order === 'ymd' && !shape.shortYear) continue;
    const read = inOrder(shape.parts, order, thisYear);
    // a short year must at least be one that an animal of the herd can have lived in
    if (inRange(read) && (!shape.shortYear || read.year > thisYear - oldestYears)) fits.set(order, iso(read));
  }
  return fits;
}

/**
 * The orders that every date of a column fits. One order: the column itself tells. Several: it must be asked.
 * None: the column mixes orders, so it must be asked too. A column that reads the same in every order needs none and
 * answers null, as does one without such dates.
 */
export function ordersOf(values: readonly string[], today: LocalDate): DateOrder[] | null {
  const thisYear = Number(today.slice(0, 4));
  let fitting: DateOrder[] | null = null;
  let differs = false;
  for (const value of values) {
    const shape = shapeOf(value, thisYear);
    if (!('parts' in shape)) continue;
    const fits = fitsOf(shape, thisYear);
    if (fits.size === 0) continue;
    differs ||= new Set(fits.values()).size > 1 || fits.size === 1;
    fitting = (fitting ?? allOrders).filter((order) => fits.has(order));
  }
  return fitting && differs ? fitting : null;
}

const exists = (t: Triple) => {
  const date = new Date(Date.UTC(t.year, t.month - 1, t.day));
  return date.getUTCMonth() === t.month - 1 && date.getUTCDate() === t.day;
};

function readParts(
  shape: { parts: [number, number, number]; shortYear: boolean },
  order: DateOrder | null,
  thisYear: number,
): Triple | 'waiting' | null {
  if (order) return order === 'ymd' && !shape.shortYear ? null : inOrder(shape.parts, order, thisYear);
  const fits = fitsOf(shape, thisYear);
  const [only] = fits.keys();
  if (!only) return null;
  return new Set(fits.values()).size > 1 ? 'waiting' : inOrder(shape.parts, only, thisYear);
}

/**
 * One date. `order` null: not known yet, then a date that needs it answers `waiting`.
 * Dates in the future and longer ago than a cow lives are refused: they are slips of the keyboard.
 */
export function readDate(
  value: string,
  order: DateOrder | null,
  today: LocalDate,
): { date: LocalDate } | { waiting: true } | Sentence {
  const thisYear = Number(today.slice(0, 4));
  const shape = shapeOf(value, thisYear);
  if ('dayNumber' in shape) return { key: 'server.import.dateNumber', params: { value } };
  if ('other' in shape) return { key: 'server.import.dateUnreadable', params: { value } };
  const read = 'known' in shape ? shape.known : readParts(shape, order, thisYear);
  if (read === 'waiting') return { waiting: true };
  if (!read || !inRange(read) || !exists(read)) return { key: 'server.import.dateImpossible', params: { value } };
  const date = iso(read);
  if (date > today) return { key: 'server.import.dateFuture', params: { value } };
  if (read.year < thisYear - oldestYears) return { key: 'server.import.dateOld', params: { value } };
  return { date };
}
