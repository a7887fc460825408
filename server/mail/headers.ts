/**
 * Whatever could end a header line or hide in it: control characters and the Unicode line separators. Written as text,
 * because linters rightly distrust control characters in a literal.
 */
const breaks = new RegExp('[\\u0000-\\u001f\\u007f\\u0085\\u2028\\u2029]+', 'g');

/**
 * One safe header value: whatever people typed into names can't start another header (CWE-93).
 * Long subjects are cut; RFC 5322 section 2.1.1 allows 998 octets a line, people read some 120 characters.
 */
export const headerValue = (text: string, most = 200): string => {
  const clean = text.replace(breaks, ' ').replace(/ {2,}/g, ' ').trim();
  const letters = [...clean];
  return letters.length > most ? `${letters.slice(0, most - 1).join('')}…` : clean;
};

/** A stable Message-ID: a repeat of the same message is recognised by mail programs and by people who search. */
export const messageIdOf = (id: string, publicUrl: string): string => `<${id}@${new URL(publicUrl).hostname}>`;
