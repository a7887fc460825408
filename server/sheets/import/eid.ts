import type { Sentence } from './types';

/**
 * An electronic identity as 15 figures: 3 for country or manufacturer, 12 for the animal (ISO 11784:1996, from memory).
 * Written with or without spaces or hyphens. A spreadsheet that took it for a number has lost figures for good:
 * either it shows an exponent, or the end is nothing but zeros.
 */
export function findEid(value: string): { eid: string } | Sentence {
  const text = value.replace(/^'/, '').trim();
  if (/^\d+([.,]\d+)?e\+?\d+$/i.test(text)) return { key: 'server.import.eidExponent', params: { value } };
  const figures = text.replace(/[\s-]/g, '').replace(/[.,]0+$/, '');
  if (!/^\d+$/.test(figures)) return { key: 'server.import.eidNotFigures', params: { value } };
  if (figures.length !== 15) {
    return { key: 'server.import.eidLength', params: { value, count: figures.length } };
  }
  if (/0{9}$/.test(figures)) return { key: 'server.import.eidZeros', params: { value } };
  return { eid: figures };
}
