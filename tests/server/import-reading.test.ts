import { describe, expect, it } from 'vitest';

import { readClass, readKnownEmpty, readNumber, readWeight } from '@/server/sheets/import/cells';
import { ordersOf, readDate } from '@/server/sheets/import/dates';
import { decode } from '@/server/sheets/import/decode';
import { findEid } from '@/server/sheets/import/eid';
import { fieldOfHeading, orderInHeading } from '@/server/sheets/import/headings';
import { mostColumns, mostRows, readSheet } from '@/server/sheets/import/sheet';

const today = '2026-10-01';
const bytes = (text: string) => new TextEncoder().encode(text);
const sheet = (text: string | Uint8Array) => {
  const read = readSheet(typeof text === 'string' ? bytes(text) : text);
  if ('unreadable' in read) throw new Error(read.unreadable.key);
  return read;
};
const refusal = (text: string | Uint8Array) => {
  const read = readSheet(typeof text === 'string' ? bytes(text) : text);
  return 'unreadable' in read ? read.unreadable.key : null;
};
const utf16 = (text: string, littleEndian: boolean) => {
  const out = new DataView(new ArrayBuffer(2 + text.length * 2));
  out.setUint16(0, 0xfeff, littleEndian);
  for (let i = 0; i < text.length; i++) out.setUint16(2 + i * 2, text.charCodeAt(i), littleEndian);
  return new Uint8Array(out.buffer);
};

describe('encodings', () => {
  it.each([
    ['UTF-8', bytes('Tag\nPeñón')],
    ['UTF-8', new Uint8Array([0xef, 0xbb, 0xbf, ...bytes('Tag\nPeñón')])],
    ['UTF-16 LE', utf16('Tag\nPeñón', true)],
    ['UTF-16 BE', utf16('Tag\nPeñón', false)],
    // ñ is F1 and ó is F3 in Windows-1252 (WHATWG Encoding Standard, index windows-1252)
    ['Windows-1252', new Uint8Array([...bytes('Tag\nPe'), 0xf1, 0xf3, ...bytes('n')])],
  ])('%s', (encoding, file) => {
    expect(decode(file)).toEqual({ text: 'Tag\nPeñón', encoding });
  });

  it('keeps the euro sign that Windows-1252 has and Latin-1 has not', () => {
    expect(decode(new Uint8Array([0x80]))).toEqual({ text: '€', encoding: 'Windows-1252' });
  });

  it('says so when the file is a workbook or no text at all', () => {
    expect(refusal(new Uint8Array([0x50, 0x4b, 0x03, 0x04, 0x14]))).toBe('server.import.workbook');
    expect(refusal(new Uint8Array([0x54, 0x00, 0x61]))).toBe('server.import.notText');
  });
});

describe('delimiters', () => {
  it.each([';', ',', '\t', '|'])('finds %j', (delimiter) => {
    const read = sheet([`Tag`, 'Class', 'Weight'].join(delimiter) + '\n' + ['0012', 'Cow', '412'].join(delimiter));
    expect(read.delimiter).toBe(delimiter);
    expect(read.rows).toEqual([{ line: 2, cells: ['0012', 'Cow', '412'] }]);
  });

  it('is not misled by decimal commas, which outnumber the semicolons', () => {
    const read = sheet('Tag;BCS;Weight, kg\n12;3,5;412,5\n13;4,0;398,0\n');
    expect(read.delimiter).toBe(';');
    expect(read.headers).toEqual(['Tag', 'BCS', 'Weight, kg']);
    expect(read.rows[0]?.cells).toEqual(['12', '3,5', '412,5']);
  });

  it('obeys a line that names the delimiter, and counts it as a line', () => {
    const read = sheet('sep=;\nTag;Class\n12;Cow\n');
    expect(read.delimiter).toBe(';');
    expect(read.rows).toEqual([{ line: 3, cells: ['12', 'Cow'] }]);
  });
});

describe('rows and headings', () => {
  it('counts lines as the file has them: blank rows, titles and line ends inside quotation marks', () => {
    const read = sheet('Spring list 2026\r\n\r\nTag,Note\r\n1,"two\r\nlines"\r\n\r\n2,x\r\n');
    expect(read.headers).toEqual(['Tag', 'Note']);
    expect(read.rows.map((row) => [row.line, row.cells[0]])).toEqual([
      [4, '1'],
      [7, '2'],
    ]);
  });

  it('tells columns of the same name apart and drops empty ones', () => {
    const read = sheet('Tag,Note,Note,,\n1,a,b,c,\n');
    expect(read.headers).toEqual(['Tag', 'Note', 'Note (2)', 'Column 4']);
  });

  it('refuses an open quotation mark, too many rows and too many columns', () => {
    expect(refusal('Tag,Note\n1,"open\n2,x\n')).toBe('server.import.quotes');
    expect(refusal(`Tag\n${'1\n'.repeat(mostRows + 1)}`)).toBe('server.import.tooManyRows');
    expect(refusal(`${'Tag,'.repeat(mostColumns + 1)}\n1\n`)).toBe('server.import.tooManyColumns');
    expect(refusal('Tag,Class\n')).toBe('server.import.noRows');
    expect(refusal('')).toBe('server.import.noRows');
    expect(refusal(new Uint8Array(4 * 1024 * 1024 + 1).fill(65))).toBe('server.import.tooLarge');
  });

  it.each([
    ['Visual tag', 'tag'],
    ['VID', 'tag'],
    ['Tag No.', 'tag'],
    ['RFID', 'eid'],
    ['Electronic ID', 'eid'],
    ['D.O.B.', null],
    ['DOB', 'birth'],
    ['Date of birth', 'birth'],
    ['Birth date (dd/mm/yyyy)', 'birth'],
    ['Last calving date', 'lastCalving'],
    ['Date calved', 'lastCalving'],
    ['Weight (kg)', 'weightKg'],
    ['Condition score', 'condition'],
    ['Mob', 'paddock'],
    ['Birth weight', null],
    ['Sire breed', null],
    ['constructor', null],
  ])('%s heads %s', (heading, field) => {
    expect(fieldOfHeading(heading)?.field ?? null).toBe(field);
  });

  it('reads the order of dates from a heading', () => {
    expect(orderInHeading('DOB (dd/mm/yyyy)')).toBe('dmy');
    expect(orderInHeading('DOB MM-DD-YY')).toBe('mdy');
    expect(orderInHeading('Birth yyyy-mm-dd')).toBe('ymd');
    expect(orderInHeading('Day of birth')).toBe(null);
  });
});

describe('EIDs', () => {
  it.each(['999000123456789', '999 000123456789', "'999000123456789", '999 0001 2345 6789', '999000123456789.0'])(
    'reads %s',
    (value) => expect(findEid(value)).toEqual({ eid: '999000123456789' }),
  );
  it.each([
    ['9.82E+14', 'server.import.eidExponent'],
    ['9,82123E+14', 'server.import.eidExponent'],
    ['982000000000000', 'server.import.eidZeros'],
    ['98200012345678', 'server.import.eidLength'],
    ['9820001234567890', 'server.import.eidLength'],
    ['982O00123456789', 'server.import.eidNotFigures'],
  ])('refuses %s', (value, key) => expect(findEid(value)).toMatchObject({ key }));
});

describe('dates', () => {
  it.each([
    ['2024-08-14', '2024-08-14'],
    ['2024/8/4', '2024-08-04'],
    ['20240814', '2024-08-14'],
    ['2024-08-14T00:00:00', '2024-08-14'],
    ['14 Aug 2024', '2024-08-14'],
    ['14-Aug-24', '2024-08-14'],
    ['Aug 14, 2024', '2024-08-14'],
    ['Wed 14th August 2024', '2024-08-14'],
    ['14 de agosto de 2024', '2024-08-14'],
    ['3 março 2024', '2024-03-03'],
    ['14-Aug-98', '1998-08-14'],
    ['05/05/2024', '2024-05-05'],
  ])('%s needs no order', (value, date) => {
    expect(readDate(value, null, today)).toEqual({ date });
  });

  it('waits for the order where day and month can change places', () => {
    expect(readDate('03/04/2024', null, today)).toEqual({ waiting: true });
    expect(readDate('03/04/2024', 'dmy', today)).toEqual({ date: '2024-04-03' });
    expect(readDate('03/04/2024', 'mdy', today)).toEqual({ date: '2024-03-04' });
    expect(readDate('24-08-14', 'ymd', today)).toEqual({ date: '2024-08-14' });
  });

  it.each([
    ['31/02/2024', 'server.import.dateImpossible'],
    ['29/02/2023', 'server.import.dateImpossible'],
    ['14/13/2024', 'server.import.dateImpossible'],
    ['2024-06-31', 'server.import.dateImpossible'],
    ['02/10/2026', 'server.import.dateFuture'],
    ['01/01/1950', 'server.import.dateOld'],
    ['45518', 'server.import.dateNumber'],
    ['Aug 2024', 'server.import.dateUnreadable'],
    ['about Easter', 'server.import.dateUnreadable'],
  ])('refuses %s', (value, key) => expect(readDate(value, 'dmy', today)).toMatchObject({ key }));

  it('keeps 29 February of a leap year', () => {
    expect(readDate('29/02/2024', 'dmy', today)).toEqual({ date: '2024-02-29' });
  });

  it('does not read an order that the value does not have', () => {
    expect(readDate('14/08/2024', 'ymd', today)).toMatchObject({ key: 'server.import.dateImpossible' });
  });

  it('lets a column prove its order, and asks when it cannot', () => {
    expect(ordersOf(['03/04/2024', '25/04/2024'], today)).toEqual(['dmy']);
    expect(ordersOf(['03/04/2024', '04/25/2024'], today)).toEqual(['mdy']);
    expect(ordersOf(['03/04/2024', '12/12/2023'], today)).toEqual(['dmy', 'mdy']);
    expect(ordersOf(['25/04/2024', '04/25/2024'], today)).toEqual([]);
    expect(ordersOf(['2024-03-04', '4 Mar 2024', '05/05/2024', ''], today)).toEqual(null);
    expect(ordersOf(['28/04/19', '03/04/19'], today)).toEqual(['dmy']);
    expect(ordersOf(['19/04/03', '18/12/30'], today)).toEqual(['ymd']);
    // 14 April 2019, or 19 April 2014
    expect(ordersOf(['14/04/19'], today)).toEqual(['dmy', 'ymd']);
    // an impossible day still proves the order
    expect(ordersOf(['31/02/2024', '03/04/2024'], today)).toEqual(['dmy']);
  });
});

describe('other cells', () => {
  it.each([
    ['Heifer', 'heifer'],
    ['HEIFERS', 'heifer'],
    ['maiden heifer', 'heifer'],
    ['Heifer with calf', 'firstCalver'],
    ['First-calf heifer', 'firstCalver'],
    ['Cows', 'cow'],
    ['dairy heifer', 'dairyHeifer'],
    ['Milking cow', 'dairyCow'],
  ])('class %s', (word, name) => expect(readClass(word)).toEqual({ class: name }));

  it('refuses a class that is none or could be two', () => {
    expect(readClass('steer')).toMatchObject({ key: 'server.import.classUnknown' });
    expect(readClass('Dairy')).toMatchObject({ key: 'server.import.classDairy' });
  });

  it('reads decimals with comma or point and refuses what could be thousands', () => {
    expect([readNumber('412,5'), readNumber('412.5'), readNumber('1,234'), readNumber('12a')]).toEqual([
      412.5,
      412.5,
      null,
      null,
    ]);
  });

  it('turns pounds into kilograms when cell or heading says so', () => {
    // 1,000 lb is 453.59237 kg by definition
    expect(readWeight('1000 lb', 'Weight')).toEqual({ weightKg: 453.6 });
    expect(readWeight('1000', 'Weight (lbs)')).toEqual({ weightKg: 453.6 });
    expect(readWeight('412,5 kg', 'Weight')).toEqual({ weightKg: 412.5 });
    expect(readWeight('0', 'Weight')).toMatchObject({ key: 'server.import.weightRange' });
  });

  it('turns yes and no by what the heading asks', () => {
    expect(readKnownEmpty('yes', 'Known empty')).toEqual({ knownEmpty: true });
    expect(readKnownEmpty('Y', 'Pregnant?')).toEqual({ knownEmpty: false });
    expect(readKnownEmpty('No', 'In calf')).toEqual({ knownEmpty: true });
    expect(readKnownEmpty('no', 'Not pregnant')).toEqual({ knownEmpty: false });
    expect(readKnownEmpty('PTE', 'Preg test')).toEqual({ knownEmpty: true });
    expect(readKnownEmpty('maybe', 'Preg test')).toMatchObject({ key: 'server.import.emptyUnreadable' });
  });
});
