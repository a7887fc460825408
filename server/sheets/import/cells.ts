import type { AnimalClass } from '@/protocols/types';

import type { Sentence } from './types';

/** Words of a class, compared without case, accents, points and plural s. A word that could mean two classes is not here. */
const classWords: Record<AnimalClass, readonly string[]> = {
  heifer: [
    'heifer',
    'hfr',
    'beef heifer',
    'yearling heifer',
    'maiden',
    'maiden heifer',
    'bulling heifer',
    'replacement heifer',
    'nulliparous',
    'novilla',
    'vaquillona',
    'novilha',
  ],
  firstCalver: [
    'first calver',
    'firstcalver',
    '1st calver',
    'first calf heifer',
    '1st calf heifer',
    'first calf cow',
    'fch',
    'heifer with calf',
    'calved heifer',
    'primiparous',
    'primipara',
  ],
  cow: ['cow', 'beef cow', 'mixed age cow', 'ma cow', 'mature cow', 'suckler', 'suckler cow', 'multiparous', 'vaca'],
  dairyHeifer: ['dairy heifer', 'dairyheifer', 'dairy replacement'],
  dairyCow: ['dairy cow', 'dairycow', 'milker', 'milking cow', 'lactating cow', 'dry dairy cow'],
};
const plain = (value: string) =>
  value
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, ' ')
    .trim()
    .replace(/s$/, '');
const classOf = new Map(
  (Object.keys(classWords) as AnimalClass[]).flatMap((name) => classWords[name].map((word) => [word, name] as const)),
);

export function readClass(value: string): { class: AnimalClass } | Sentence {
  const found = classOf.get(plain(value));
  if (found) return { class: found };
  const key = plain(value) === 'dairy' ? 'server.import.classDairy' : 'server.import.classUnknown';
  return { key, params: { value } };
}

/** A decimal with a comma or a point. `1,234` could be either of two numbers, so it is none. */
export function readNumber(value: string): number | null {
  const text = value.replace(/\s/g, '');
  if (!/^\d+([.,]\d+)?$/.test(text) || /^\d{1,3}[.,]\d{3}$/.test(text)) return null;
  return Number(text.replace(',', '.'));
}
const tenth = (n: number) => Math.round(n * 10) / 10;
/** International avoirdupois pound, exact by definition (International Yard and Pound Agreement, 1959; from memory). */
const kgPerPound = 0.45359237;

/** Kilograms; pounds when the cell or the heading says so. */
export function readWeight(value: string, heading: string): { weightKg: number } | Sentence {
  const unit = /^(.*?)\s*(kgs?|lbs?)\.?$/i.exec(value);
  const amount = readNumber(unit?.[1] ?? value);
  const pounds = unit ? /^lb/i.test(unit[2] ?? '') : /\blbs?\b/i.test(heading);
  const kg = amount === null ? null : tenth(pounds ? amount * kgPerPound : amount);
  if (kg === null) return { key: 'server.import.numberUnreadable', params: { value } };
  return kg > 0 && kg <= 2000 ? { weightKg: kg } : { key: 'server.import.weightRange', params: { value } };
}

export function readCondition(value: string): { condition: number } | Sentence {
  const condition = readNumber(value);
  if (condition === null) return { key: 'server.import.numberUnreadable', params: { value } };
  if (condition < 1 || condition > 9) return { key: 'server.import.conditionRange', params: { value } };
  return { condition: tenth(condition) };
}

const emptyWords = new Set([
  'empty',
  'pte',
  'open',
  'not pregnant',
  'not in calf',
  'non pregnant',
  'mt',
  'vacia',
  'vazia',
]);
const pregnantWords = new Set(['pregnant', 'ptic', 'in calf', 'preg', 'prenada', 'prenhe']);
const yes = new Set(['yes', 'y', 'true', '1', 'si', 'sim', 'x']);
const no = new Set(['no', 'n', 'false', '0', 'nao']);

/** Known empty: a word says it by itself; yes and no depend on what the heading asks. */
export function readKnownEmpty(value: string, heading: string): { knownEmpty: boolean } | Sentence {
  // `plain` takes a plural s off; "yes" must stay whole
  const word = /^yes$/i.test(value) ? 'yes' : plain(value);
  if (emptyWords.has(word)) return { knownEmpty: true };
  if (pregnantWords.has(word)) return { knownEmpty: false };
  const asksPregnant = /preg|calf|prenad|prenh/i.test(heading) && !/\b(not|non|empty)\b/i.test(heading);
  if (yes.has(word)) return { knownEmpty: !asksPregnant };
  if (no.has(word)) return { knownEmpty: asksPregnant };
  return { key: 'server.import.emptyUnreadable', params: { value } };
}

/** One line of text without control characters; text that a spreadsheet would run stays the text it is. */
export const cleanText = (value: string): string =>
  value
    .replace(/[\u0000-\u001f\u007f\u00a0]+/g, ' ')
    .replace(/ {2,}/g, ' ')
    .trim();

/** An identity keeps its leading zeros; the wrappings that spreadsheets use to keep them ('0012 and ="0012") come off. */
export const cleanIdentity = (value: string): string =>
  cleanText(value)
    .replace(/^="(.*)"$/, '$1')
    .replace(/^'(?=\d)/, '')
    .trim();
