import { t } from '@/shared/messages';

/** Whether an animal is known not to be pregnant, in words. */
export const emptyWords = (knownEmpty: boolean | null): string =>
  t(
    knownEmpty === true
      ? 'herd.knownEmpty.yes'
      : knownEmpty === false
        ? 'herd.knownEmpty.no'
        : 'herd.knownEmpty.unknown',
  );
