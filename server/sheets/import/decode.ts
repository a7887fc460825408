import type { Unreadable } from './types';

/** Bytes that other kinds of file begin with: a workbook saved as itself is the usual mistake. */
const notText: readonly (readonly number[])[] = [
  [0x50, 0x4b, 0x03, 0x04],
  [0xd0, 0xcf, 0x11, 0xe0],
  [0x25, 0x50, 0x44, 0x46],
];
const begins = (bytes: Uint8Array, start: readonly number[]) => start.every((byte, i) => bytes[i] === byte);

/** What Windows-1252 has at 0x80 to 0x9F (WHATWG Encoding Standard, index windows-1252); all else is Latin-1. */
const from80 = '€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ';
/** Node 20's own decoder of that name reads Latin-1 and loses the euro sign and the curly quotation marks. */
const windows1252 = (bytes: Uint8Array) =>
  Buffer.from(bytes)
    .toString('latin1')
    .replace(/[\u0080-\u009f]/g, (c) => from80[c.charCodeAt(0) - 0x80] ?? c);

/**
 * Bytes to text. A byte-order mark decides; without one, bytes that are valid UTF-8 are UTF-8, and anything else is
 * taken as Windows-1252, which spreadsheets on Windows still write (every byte has a meaning there, so it never fails).
 */
export function decode(bytes: Uint8Array): { text: string; encoding: string } | Unreadable {
  if (notText.some((start) => begins(bytes, start))) return { unreadable: { key: 'server.import.workbook' } };
  const read = (label: string, encoding: string, skip: number) => ({
    text: new TextDecoder(label).decode(bytes.subarray(skip)),
    encoding,
  });
  if (begins(bytes, [0xef, 0xbb, 0xbf])) return read('utf-8', 'UTF-8', 3);
  if (begins(bytes, [0xff, 0xfe])) return read('utf-16le', 'UTF-16 LE', 2);
  if (begins(bytes, [0xfe, 0xff])) return read('utf-16be', 'UTF-16 BE', 2);
  if (bytes.includes(0)) return { unreadable: { key: 'server.import.notText' } };
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), encoding: 'UTF-8' };
  } catch {
    return { text: windows1252(bytes), encoding: 'Windows-1252' };
  }
}
