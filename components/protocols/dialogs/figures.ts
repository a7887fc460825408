import { t } from '@/shared/messages';

/** A figure as typed: empty is none; a comma or a point; anything else is an error to be shown, never guessed. */
export function readFigure(text: string): { value: number | undefined; error?: string } {
  const clean = text.trim().replace(',', '.');
  if (clean === '') return { value: undefined };
  const value = Number(clean);
  return /^\d+(\.\d+)?$/.test(clean) && Number.isFinite(value)
    ? { value }
    : { value: undefined, error: t('protocols.notAFigure') };
}

export const writeFigure = (value: number | undefined): string => (value === undefined ? '' : String(value));
