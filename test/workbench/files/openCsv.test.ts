import { describe, expect, it } from 'vitest';
import { decodeText, openCsv } from '../../../src/workbench/files/openCsv';
import { freeSheetName, isSheetName } from '../../../src/host/sheetNames';

describe('text files', () => {
  it.each([
    ['commas', 'Duty,Person\nChoir,Ann\n'],
    ['semicolons, quotes and a byte order mark', '\uFEFFDuty;Person\r\n"Choir";Ann\r\n'],
    ['tabs', 'Duty\tPerson\nChoir\tAnn'],
  ])('with %s are read as rows', (_, text) => {
    const { cells } = openCsv('x.csv', text, new Set());
    expect(cells.map(({ row, column, value }) => [row, column, value])).toEqual([
      [0, 0, 'Duty'],
      [0, 1, 'Person'],
      [1, 0, 'Choir'],
      [1, 1, 'Ann'],
    ]);
  });

  it('keep separators and line ends inside quotes', () => {
    const { cells } = openCsv('x.csv', 'Duty;Person\r\n"Organ; large\r\nhall";"Ann ""A."""\r\n', new Set());
    expect(cells.slice(2).map(({ value }) => value)).toEqual(['Organ; large\r\nhall', 'Ann "A."']);
  });

  it('keep "001" and "1,5" as text and read 12 and 1.5 as numbers', () => {
    const { cells } = openCsv('x.csv', '001;1,5;12;1.5;-3\n', new Set());
    expect(cells.map(({ value }) => value)).toEqual(['001', '1,5', 12, 1.5, -3]);
  });

  it('are decoded from what office programs write', () => {
    expect(decodeText(new TextEncoder().encode('Zoë'))).toBe('Zoë');
    expect(decodeText(new Uint8Array([0x5a, 0x6f, 0xeb]))).toBe('Zoë');
    expect(decodeText(new Uint8Array([0xff, 0xfe, 0x5a, 0, 0x6f, 0, 0xeb, 0]))).toBe('Zoë');
    expect(decodeText(new Uint8Array([0xfe, 0xff, 0, 0x5a, 0, 0x6f, 0, 0xeb]))).toBe('Zoë');
    expect(decodeText(new Uint8Array())).toBe('');
  });

  it('get sheet names that a workbook allows, each once', () => {
    const taken = new Set<string>();
    const names = ['pairs.csv', 'PAIRS.csv', 'a/b[c]:d?.csv', `${'x'.repeat(60)}.csv`, `${'x'.repeat(60)}.tsv`, '.csv'];
    const given = names.map((name) => openCsv(name, '', taken).name);
    expect(given).toEqual(['pairs', 'PAIRS 2', 'a b c  d', 'x'.repeat(31), `${'x'.repeat(29)} 2`, 'Sheet']);
    expect(given.every(isSheetName)).toBe(true);
  });
});

describe('sheet names', () => {
  it.each(['x'.repeat(32), 'a:b', "'quoted'", ' blank', ''])('such as "%s" are not for files, and get one that is', (name) => {
    expect(isSheetName(name)).toBe(name === '');
    expect(isSheetName(freeSheetName(name, new Set()))).toBe(true);
  });
});
