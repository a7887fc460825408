import { t } from '@/shared/messages';
import { day } from '@/shared/when';

/** Whether an animal is known not to be pregnant, in words. */
export const emptyWords = (knownEmpty: boolean | null): string =>
  t(
    knownEmpty === true
      ? 'herd.knownEmpty.yes'
      : knownEmpty === false
        ? 'herd.knownEmpty.no'
        : 'herd.knownEmpty.unknown',
  );

/** A local date with its month as a word, `6 Oct 2026`, so that no order of figures misleads. */
export const dateWords = (date: string): string =>
  day(Date.parse(`${date}T12:00:00Z`), 'UTC', undefined, true).replace(/^\S+ /, '');
