import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { demoBook } from '../../scripts/demo.mjs';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { registerInEngine } from '../../src/host/workbench/register';
import { answerSheets } from '../../src/workbench/answerSheets';
import type { Book, BookCell } from '../../src/workbench/files/book';
import { fromEngine, toEngineData } from '../../src/workbench/files/engineData';
import { openCsv } from '../../src/workbench/files/openCsv';
import { openXlsx } from '../../src/workbench/files/openXlsx';
import { saveXlsx } from '../../src/workbench/files/saveXlsx';
import { toStored, toTyped, usesOurs } from '../../src/workbench/files/spelling';
import { engine } from '../helpers/engine';

const DEMO = join(import.meta.dirname, '../../assets/demo.xlsx');
registerInEngine(engine, FUNCTIONS, new Journal());

/** What is in a book, so that two books can be compared: no blank styled cells, no order. */
function contents(book: Book) {
  return {
    names: [...book.names].sort((a, b) => a.name.localeCompare(b.name)),
    sheets: book.sheets.map(({ name, hidden, cells, widths, merges, frozen }) => ({
      name,
      hidden,
      cells: cells
        .filter(({ formula, value }) => formula !== null || (value !== null && value !== ''))
        .map(({ row, column, formula, value, style, format }) => ({
          row,
          column,
          formula: formula?.replaceAll(' ', '') ?? null,
          value: formula === null ? value : null,
          style,
          format,
        }))
        .sort((a, b) => a.row - b.row || a.column - b.column),
      widths: [...widths].sort((a, b) => a[0] - b[0]),
      merges,
      frozen,
    })),
  };
}

/** A book without what formulas fill, which comes back with the calculation. */
function typed(book: Book): Book {
  const filled = (cells: readonly BookCell[]) => {
    const places = new Set<string>();
    for (const { row, column, spill } of cells) {
      for (let r = 0; spill !== undefined && r < spill.rows; r++) {
        for (let c = 0; c < spill.columns; c++) if (r + c > 0) places.add(`${row + r} ${column + c}`);
      }
    }
    return places;
  };
  return {
    ...book,
    sheets: book.sheets.map((sheet) => {
      const places = filled(sheet.cells);
      return { ...sheet, cells: sheet.cells.filter(({ row, column }) => !places.has(`${row} ${column}`)) };
    }),
  };
}

describe('the demo workbook', () => {
  it('is what its script writes today', async () => {
    const written = contents(typed((await demoBook()) as Book));
    const stored = contents(await openXlsx(new Uint8Array(readFileSync(DEMO))));
    expect(stored).toEqual(written);
  });

  it('stores our formulas as Excel stores them, dynamic and with their values', async () => {
    const { readXlsx } = await import('hucre');
    const { sheets } = await readXlsx(new Uint8Array(readFileSync(DEMO)), { readStyles: true });
    const results = sheets.find(({ name }) => name === 'Results')!;
    const cell = results.cells!.get('1,3')!;
    expect(cell).toMatchObject({ formula: '_xldudf_DUTY_ASSIGN(Pairs, People, Duties, Rules)', formulaType: 'array', formulaDynamic: true });
    expect(results.rows[2][4]).toBe('Carys Wren');
  });

  it('comes out of the engine as it went in, with the same answers', async () => {
    const book = await openXlsx(new Uint8Array(readFileSync(DEMO)));
    const model = new engine.Model(toEngineData(book, engine));
    const out = fromEngine(model);
    expect(contents(typed(out))).toEqual(contents(book));
    const again = await openXlsx(await saveXlsx(out));
    expect(contents(again)).toEqual(contents(book));
    const stored = (await import('hucre')).readXlsx(new Uint8Array(readFileSync(DEMO)));
    const results = (await stored).sheets.find(({ name }) => name === 'Results')!;
    for (const { row, column, value } of out.sheets.find(({ name }) => name === 'Results')!.cells) {
      if (value !== null && value !== '') expect(results.rows[row][column]).toBe(value);
    }
  });
});

describe('values in a saved file', () => {
  it('come back as they were, whatever they look like', async () => {
    const value = fc.oneof(
      fc.constantFrom('001', '1', 'TRUE', '=1+1', '+44', '-3', "'quoted", '@x', '#N/A', '12:30', '1/2/2020', '1e5', ' a ', 'a\nb', '<b>', '🙂'),
      fc.string({ unit: 'grapheme', minLength: 1, maxLength: 20 }).filter((text) => /^[^\p{C}\p{Z}]/u.test(text)),
      fc.integer(),
      fc.boolean(),
    );
    await fc.assert(
      fc.asyncProperty(fc.array(value, { minLength: 1, maxLength: 8 }), async (values) => {
        const cells = values.map((entry, row): BookCell => ({ row, column: 0, formula: null, value: entry, style: null, format: null }));
        const sheet = { name: 'S', hidden: false, cells, widths: new Map(), merges: [], frozen: { rows: 0, columns: 0 } };
        const book: Book = { sheets: [sheet], names: [], lost: [] };
        const inEngine = fromEngine(new engine.Model(toEngineData(book, engine)));
        const opened = await openXlsx(await saveXlsx(inEngine));
        expect(opened.sheets[0].cells.map((cell) => cell.value)).toEqual(values);
      }),
      { numRuns: 150 },
    );
  });
});

describe('formulas in files', () => {
  it.each([
    ['=DUTY.ASSIGN(Pairs, People)', '_xldudf_DUTY_ASSIGN(Pairs, People)'],
    ['=ROWS(DUTY.UNCOVERED(A1:B9,3))', 'ROWS(_xldudf_DUTY_UNCOVERED(A1:B9,3))'],
    ["=COUNTA(G2#)+ROWS('My sheet'!$B$4#)", "COUNTA(_xlfn.ANCHORARRAY(G2))+ROWS(_xlfn.ANCHORARRAY('My sheet'!$B$4))"],
    ['=SORT(UNIQUE(A1:A9))', '_xlfn._xlws.SORT(_xlfn.UNIQUE(A1:A9))'],
    ['="DUTY.ASSIGN( is text"&A1', '"DUTY.ASSIGN( is text"&A1'],
  ])('%s is stored as %s and read back', (typedFormula, stored) => {
    expect(toStored(typedFormula)).toBe(stored);
    expect(toTyped(stored)).toBe(typedFormula);
  });

  it('are ours where a function of ours is called, not where it is quoted', () => {
    expect(usesOurs('=ROWS(duty.grid(A1:B2,1))')).toBe(true);
    expect(usesOurs('=SUM(A1:A2)')).toBe(false);
  });
});

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

  it('keep "001" and "1,5" as text and read 12 and 1.5 as numbers', () => {
    const { cells } = openCsv('x.csv', '001;1,5;12;1.5;-3\n', new Set());
    expect(cells.map(({ value }) => value)).toEqual(['001', '1,5', 12, 1.5, -3]);
  });

  it('get sheet names that a workbook allows, each once', () => {
    const taken = new Set<string>();
    const names = ['pairs.csv', 'PAIRS.csv', 'a/b[c]:d?.csv', `${'x'.repeat(60)}.csv`, `${'x'.repeat(60)}.tsv`, '.csv'];
    expect(names.map((name) => openCsv(name, '', taken).name)).toEqual([
      'pairs',
      'PAIRS 2',
      'a b c  d',
      'x'.repeat(31),
      `${'x'.repeat(29)} 2`,
      'Sheet',
    ]);
  });
});

describe('sheets of answers', () => {
  it('are made where pairs and people are, under names that are free', () => {
    const taken = new Set<string>();
    const sheets = [
      openCsv('who.csv', 'Person,Duty\nAnn,Choir\n', taken),
      openCsv('Results.csv', 'Person,Maximum\nAnn,1\n', taken),
    ];
    const book = answerSheets({ sheets, names: [{ name: 'People', reference: 'who!A1' }], lost: [] })!;
    expect(book.sheets.map(({ name }) => name)).toEqual(['who', 'Results', 'Results2', 'Grid']);
    expect(book.names.map(({ name, reference }) => `${name} ${reference}`)).toEqual(['People who!A1', 'Pairs who!A1:B2', 'People2 Results!A1:B2']);
    expect(book.sheets[3].cells[0].formula).toBe('=DUTY.GRID(Pairs, People2)');
    expect(answerSheets({ sheets: sheets.slice(0, 1), names: [], lost: [] })).toBeNull();
  });
});
