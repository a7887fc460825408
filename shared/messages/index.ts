import { en } from './en';
import { fill, type MessageParams } from './format';

export type { MessageParams } from './format';
export type MessageKey = keyof typeof en;

const catalogues: Record<string, Partial<Record<MessageKey, string>>> = { en };

/**
 * The words for a key, in the locale's language, English where a translation is missing.
 * Trade words differ by country too (crush, chute): the full locale is asked first.
 */
export function t(key: MessageKey, params: MessageParams = {}, locale = 'en-AU'): string {
  const language = locale.split('-')[0] ?? 'en';
  const message = catalogues[locale]?.[key] ?? catalogues[language]?.[key] ?? en[key];
  return fill(message, params, locale);
}

/** True when the catalogue has the key: for keys made of data, such as `step.deviceIn`. */
export const hasMessage = (key: string): key is MessageKey => key in en;

/** Words for a key made of data; the fallback when the catalogue lacks it. */
export const tData = (key: string, fallback: string, params: MessageParams = {}, locale?: string): string =>
  hasMessage(key) ? t(key, params, locale) : fallback;
