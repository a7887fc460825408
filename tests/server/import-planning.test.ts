import { describe, expect, it } from 'vitest';

import { doubleFields, type ImportInput, planImport } from '@/server/sheets/import/plan';
import { readSheet } from '@/server/sheets/import/sheet';
import type { HerdAnimal } from '@/server/sheets/import/types';

import { makeMob, mobCells, mobCsv, type MobOptions, writeCsv } from '../support/mob-csv';

const today = '2026-10-01';
const plan = (text: string, more: Partial<ImportInput> = {}) => {
  const sheet = readSheet(new TextEncoder().encode(text));
  if ('unreadable' in sheet) throw new Error(sheet.unreadable.key);
  return planImport({ sheet, herd: [], today, ...more });
};
const cow = (id: string, tag: string, more: Partial<HerdAnimal> = {}): HerdAnimal => ({
  id,
  tag,
  state: 'present',
  eid: null,
  class: 'heifer',
  breed: null,
  birth: null,
  sire: null,
  dam: null,
  lastCalving: null,
  lastService: null,
  knownEmpty: null,
  weightKg: null,
  condition: null,
  paddock: null,
  note: null,
  ...more,
});
const keys = (row: { problems: { key: string }[] } | undefined) => row?.problems.map((problem) => problem.key) ?? [];

describe('a mob of 186', () => {
  const ways: [string, MobOptions][] = [
    ['commas, ISO dates', { head: 186 }],
    ['semicolons, decimal commas, day first', { head: 186, delimiter: ';', decimalComma: true, dates: 'dmy' }],
    ['tabs, month first, spaced EIDs', { head: 186, delimiter: '\t', dates: 'mdy', spacedEids: true }],
    ['commas, decimal commas in quotation marks, month names', { head: 186, decimalComma: true, dates: 'names' }],
  ];
  it.each(ways)('%s: every animal is read as it is', (_, options) => {
    const found = plan(mobCsv(options));
    expect(found.questions).toEqual([]);
    expect(found.counts).toEqual({ create: 186, update: 0, skip: 0, refuse: 0 });
    expect(found.rows.map((row) => ({ tag: row.tag, ...row.values }))).toEqual(
      makeMob(options).map((animal) => ({ ...animal, class: 'heifer' })),
    );
  });

  it('asks for the order of dates that can be read both ways, and reads them as answered', () => {
    const text = mobCsv({ head: 186, dates: 'dmy', ambiguousDates: true });
    const open = plan(text);
    expect(open.questions).toEqual([
      {
        kind: 'dateOrder',
        key: 'server.import.askDateOrder',
        params: { columns: ['Date of birth'] },
        columns: ['Date of birth'],
      },
    ]);
    expect(open.rows.every((row) => row.values.birth === undefined || /-(\d\d)-\1$/.test(row.values.birth))).toBe(true);
    const answered = plan(text, { dateOrder: 'dmy' });
    expect(answered.questions).toEqual([]);
    expect(answered.rows.map((row) => row.values.birth)).toEqual(
      makeMob({ head: 186, ambiguousDates: true }).map((animal) => animal.birth),
    );
  });

  it('lets one column prove its order without guessing that of another', () => {
    const found = plan('Tag,Class,DOB,Last calving\n1,cow,25/03/2020,03/04/2026\n');
    expect(found.questions.map((question) => question.columns)).toEqual([['Last calving']]);
    expect(found.rows[0]?.values).toEqual({ class: 'cow', birth: '2020-03-25' });
  });

  it('takes the order that a heading spells', () => {
    const found = plan('Tag,Class,DOB (mm/dd/yyyy)\n1,cow,03/04/2020\n');
    expect(found.questions).toEqual([]);
    expect(found.rows[0]?.values.birth).toBe('2020-03-04');
  });

  it('refuses each spoiled row by its line and keeps the others', () => {
    const cells = mobCells({ head: 186, dates: 'dmy' });
    const spoil = (line: number, column: number, value: string) => {
      const row = cells[line - 1];
      if (row) row[column] = value;
    };
    spoil(10, 1, '9.99E+14');
    spoil(20, 4, '31/02/2024');
    spoil(30, 2, 'steer');
    spoil(40, 0, '');
    spoil(50, 0, cells[50]?.[0] ?? '');
    spoil(60, 1, cells[60]?.[1] ?? '');
    spoil(70, 5, '1,234');
    const found = plan(writeCsv(cells));
    expect(found.counts).toEqual({ create: 177, update: 0, skip: 0, refuse: 9 });
    const refused = found.rows.filter((row) => row.action === 'refuse');
    expect(refused.map((row) => [row.line, ...keys(row)])).toEqual([
      [10, 'server.import.eidExponent'],
      [20, 'server.import.dateImpossible'],
      [30, 'server.import.classUnknown'],
      [40, 'server.import.tagMissing'],
      [50, 'server.import.tagTwice'],
      [51, 'server.import.tagTwice'],
      [60, 'server.import.eidTwice'],
      [61, 'server.import.eidTwice'],
      [70, 'server.import.numberUnreadable'],
    ]);
    expect(refused.find((row) => row.line === 50)?.problems[0]?.params).toEqual({ lines: ['51'] });
    expect(refused.find((row) => row.line === 61)?.problems[0]?.params).toEqual({ lines: ['60'] });
  });
});

describe('columns', () => {
  it('asks for the tag when no column is one, and reads no row', () => {
    const found = plan('Beast,Class\n1,cow\n');
    expect(found.questions).toMatchObject([{ kind: 'missingColumn', columns: ['Beast', 'Class'] }]);
    expect(found.rows).toEqual([]);
    expect(plan('Beast,Class\n1,cow\n', { mapping: { Beast: 'tag', Class: 'class' } }).counts.create).toBe(1);
  });

  it('asks for a class only when a new animal has none', () => {
    const text = 'Tag,Class\n1,cow\n2,\n';
    expect(plan(text).questions).toMatchObject([{ kind: 'defaultClass', params: { count: 1 }, columns: ['Class'] }]);
    expect(plan(text, { defaultClass: 'heifer' }).rows.map((row) => row.values.class)).toEqual(['cow', 'heifer']);
    expect(plan(text, { herd: [cow('a', '2')] }).questions).toEqual([]);
    expect(plan('Tag\n1\n').questions).toMatchObject([{ kind: 'defaultClass', columns: [] }]);
  });

  it('takes a column of 15-figure numbers headed "Tag" for the EID when another holds the tag', () => {
    const found = plan('Tag,VID,Class\n999000123456789,0012,cow\n');
    expect(found.mapping).toEqual({ Tag: 'eid', VID: 'tag', Class: 'class' });
  });

  it('leaves out what was left out, and never reads headings as properties of an object', () => {
    const found = plan('Tag,Class,Breed,constructor\n1,cow,Angus cross,x\n', {
      mapping: { Tag: 'tag', Class: 'class' },
    });
    expect(found.mapping).toEqual({ Tag: 'tag', Class: 'class', Breed: null, constructor: null });
    expect(found.rows[0]?.values).toEqual({ class: 'cow' });
  });

  it('notices two columns for one field', () => {
    expect(doubleFields({ A: 'tag', B: 'tag', C: 'eid', D: null, E: null })).toEqual(['tag']);
  });

  it('refuses a row with more cells than headings: a decimal comma that was not quoted', () => {
    expect(keys(plan('Tag,Class,Weight\n1,cow,412,5\n').rows[0])).toEqual(['server.import.tooManyCells']);
  });
});

describe('beside the herd', () => {
  const herd = [
    cow('a', '0012', { eid: '999000000000012', breed: 'Hereford', weightKg: 400 }),
    cow('b', 'B7', { eid: '999000000000099' }),
    cow('c', '13', { state: 'left' }),
  ];

  it('lists what changes, field by field; an empty cell leaves what is there', () => {
    const found = plan('Tag,Class,Breed,Weight\n0012,first calver,,412.5\n', { herd });
    expect(found.rows[0]).toMatchObject({
      action: 'update',
      animalId: 'a',
      changes: [
        { field: 'class', from: 'heifer', to: 'firstCalver' },
        { field: 'weightKg', from: 400, to: 412.5 },
      ],
    });
  });

  it('skips a row that changes nothing', () => {
    expect(plan('Tag,Breed,Weight\n0012,Hereford,400\n', { herd }).counts).toMatchObject({ skip: 1, update: 0 });
  });

  it('keeps leading zeros: 12 is not 0012', () => {
    expect(plan('Tag,Class\n12,cow\n', { herd }).rows[0]).toMatchObject({ action: 'create', tag: '12' });
    expect(plan('Tag,Class\n"=""0012""",cow\n', { herd }).rows[0]).toMatchObject({ action: 'update', tag: '0012' });
  });

  it('takes tags that differ in capitals for the same animal', () => {
    expect(plan('Tag,Class\nb7,cow\n', { herd }).rows[0]).toMatchObject({ action: 'update', animalId: 'b' });
    expect(plan('Tag,Class\nx1,cow\nX1,cow\n').counts.refuse).toBe(2);
  });

  it('refuses an EID of another animal, with its tag, and an animal that has left', () => {
    const found = plan('Tag,Class,EID\n99,cow,999000000000099\n13,cow,\n', { herd });
    expect(found.rows.map(keys)).toEqual([['server.import.eidOfAnother'], ['server.import.animalLeft']]);
    const spaced = plan('Tag,Class,EID\n0012,cow,999 000000000099\n', { herd });
    expect(spaced.rows.map(keys)).toEqual([['server.import.eidOfAnother']]);
    // twice in the file as well: both faults are said
    const both = plan('Tag,Class,EID\n99,cow,999000000000099\n0012,cow,999 000000000099\n', { herd });
    for (const row of both.rows) expect(keys(row)).toEqual(['server.import.eidTwice', 'server.import.eidOfAnother']);
    expect(found.rows[0]?.problems[0]?.params).toEqual({ eid: '999000000000099', tag: 'B7' });
  });

  it('refuses a calving that is not after the birth, wherever each is known from', () => {
    const born = [cow('a', '1', { birth: '2025-01-01' })];
    expect(keys(plan('Tag,Class,Calved\n1,cow,2024-12-31\n', { herd: born }).rows[0])).toEqual([
      'server.import.calvedBeforeBirth',
    ]);
  });

  it('keeps text that a spreadsheet would run as the text it is', () => {
    const found = plan('Tag,Class,Note\n1,cow,=1+1\n2,cow,@x\n-3,cow,+y\n');
    expect(found.rows.map((row) => [row.tag, row.values.note])).toEqual([
      ['1', '=1+1'],
      ['2', '@x'],
      ['-3', '+y'],
    ]);
  });

  it('importing what an import made changes nothing', () => {
    const first = plan(mobCsv({ head: 186 }));
    const made = first.rows.map((row, i) => cow(`id${i}`, row.tag, { ...row.values }));
    expect(
      plan(mobCsv({ head: 186, dates: 'dmy', delimiter: ';', decimalComma: true }), { herd: made }).counts,
    ).toEqual({
      create: 0,
      update: 0,
      skip: 186,
      refuse: 0,
    });
  });

  it('20,000 rows are planned in seconds, even when every tag is the same', () => {
    const text = `Tag,Class\n${'1,cow\n'.repeat(20_000)}`;
    const found = plan(text);
    expect(found.counts.refuse).toBe(20_000);
    expect(found.rows[0]?.problems[0]?.params).toEqual({ lines: ['3', '4', '5', '6', '7', '…'] });
  }, 10_000);
});
