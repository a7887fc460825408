/** Values a message can hold. */
export type MessageParams = Record<string, string | number | readonly string[] | undefined>;

const plural = /\{(\w+), plural,((?:[^{}]|\{[^{}]*\})*)\}/g;
const choice = /(=\d+|zero|one|two|few|many|other)\s*\{([^{}]*)\}/g;

const show = (value: MessageParams[string], locale: string): string => {
  if (value === undefined) return '';
  if (typeof value === 'number') return new Intl.NumberFormat(locale).format(value);
  if (typeof value === 'string') return value;
  return value.join(', ');
};

/**
 * Fills a message: `{name}` and `{count, plural, one {# head} other {# head}}` (the plural part of ICU MessageFormat,
 * Unicode Technical Standard 35). Numbers are written for the locale. A missing value leaves an empty place.
 */
export function fill(message: string, params: MessageParams, locale: string): string {
  const withPlurals = message.replace(plural, (_, key: string, body: string) => {
    const count = Number(params[key] ?? 0);
    const forms = new Map([...body.matchAll(choice)].map((m) => [m[1] ?? '', m[2] ?? '']));
    const form =
      forms.get(`=${count}`) ?? forms.get(new Intl.PluralRules(locale).select(count)) ?? forms.get('other') ?? '';
    return form.replaceAll('#', show(count, locale));
  });
  return withPlurals.replace(/\{(\w+)\}/g, (_, key: string) => show(params[key], locale));
}
