/** Control characters other than tab and line end, which RFC 5545 section 3.1 does not allow in content. */
const control = new RegExp('[\\u0000-\\u0008\\u000b\\u000c\\u000e-\\u001f\\u007f]', 'g');

/** Text that people typed, before it goes into a calendar: no control characters, and U+2028/9 as line ends. */
export const plain = (text: string): string => text.replace(control, '').replace(/[\u2028\u2029\u0085]/g, '\n');

/** One line of it. */
export const plainLine = (text: string): string =>
  plain(text)
    .replace(/[\r\n\t]+/g, ' ')
    .trim();

/** TEXT value of RFC 5545 section 3.3.11, for properties that the generator writes as they are given. */
export const escapeText = (text: string): string => plainLine(text).replace(/[\\;,]/g, (sign) => `\\${sign}`);
