import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Journal } from '../../../src/functions/journal';
import { FUNCTIONS } from '../../../src/functions/registry';
import { registerInEngine } from '../../../src/host/workbench/register';
import type { Book, BookCell, BookSheet } from '../../../src/workbench/files/book';
import { formatTable } from '../../../src/workbench/files/formats';
import { fromEngine } from '../../../src/workbench/files/fromEngine';
import { openXlsx } from '../../../src/workbench/files/openXlsx';
import { saveXlsx } from '../../../src/workbench/files/saveXlsx';
import { toEngineData } from '../../../src/workbench/files/toEngine';
import { engine } from '../../helpers/engine';

registerInEngine(engine, FUNCTIONS, new Journal(), () => undefined);

/** A sheet with these cells and nothing else set. */
function sheetOf(cells: readonly BookCell[], name = 'S'): BookSheet {
  return { name, hidden: false, cells, widths: new Map(), merges: [], frozen: { rows: 0, columns: 0 } };
}

/** A cell in column A. */
function cell(row: number, value: BookCell['value'], more: Partial<BookCell> = {}): BookCell {
  return { row, column: 0, formula: null, value, style: null, format: null, ...more };
}

/** Through the engine, into a file and out of it again. */
async function throughAll(book: Book): Promise<Book> {
  const out = fromEngine(new engine.Model(toEngineData(book, engine)), formatTable(book, engine).toFile);
  return openXlsx(await saveXlsx({ ...out, otherNames: book.otherNames ?? [] }));
}

const bookOf = (...sheets: BookSheet[]): Book => ({ sheets, names: [], lost: [] });

describe('values in a saved file', () => {
  it('come back as they were, whatever they look like', async () => {
    const value = fc.oneof(
      fc.constantFrom('001', '1', 'TRUE', '=1+1', '+44', '-3', "'quoted", '@x', '#N/A', '12:30', '1/2/2020', '31/12/2026', '1e5', '5%', ' a ', 'a\nb'),
      fc.constantFrom('<b>', '🙂', '£5', '#1 team', '[Ann](https://a.example)', 'https://a.example/x', 'x'.repeat(5_000)),
      fc.string({ unit: 'grapheme', minLength: 1, maxLength: 20 }).filter((text) => /^[^\p{C}\p{Z}]/u.test(text)),
      fc.integer(),
      fc.boolean(),
    );
    await fc.assert(
      fc.asyncProperty(fc.array(value, { minLength: 1, maxLength: 8 }), async (values) => {
        const opened = await throughAll(bookOf(sheetOf(values.map((entry, row) => cell(row, entry)))));
        expect(opened.sheets[0].cells.map((read) => read.value)).toEqual(values);
      }),
      { numRuns: 150 },
    );
  });

  it('are errors where they were errors', async () => {
    const opened = await throughAll(bookOf(sheetOf([cell(0, '#N/A', { isError: true })])));
    expect(opened.sheets[0].cells).toMatchObject([{ value: '#N/A', isError: true }]);
  });
});

describe('the look of a saved file', () => {
  it('comes back: fonts, fills, lines, alignment, sizes, hidden parts, tabs', async () => {
    const look = {
      bold: true,
      italic: true,
      underline: true,
      strikethrough: true,
      colour: '#204060',
      fill: '#e3efe9',
      size: 14,
      align: 'center',
      vertical: 'middle',
      wrap: true,
      border: { top: { style: 'thin', colour: '#ff0000' }, bottom: { style: 'thick', colour: '#000000' } },
    } as const;
    const sheet: BookSheet = {
      ...sheetOf([cell(0, 'x', { style: look }), cell(5, null, { style: { fill: '#ffffaa' } })]),
      widths: new Map([[0, 201], [2, 61]]),
      heights: new Map([[0, 40]]),
      hiddenColumns: [1],
      hiddenRows: [3],
      gridLines: false,
      tabColour: '#336699',
      merges: ['C1:D2'],
      frozen: { rows: 1, columns: 1 },
    };
    const { sheets } = await throughAll(bookOf(sheet, { ...sheetOf([cell(0, 1)], 'Hidden one'), hidden: true }));
    expect(sheets[0].cells.find(({ row }) => row === 0)?.style).toEqual(look);
    expect(sheets[0].cells.find(({ row }) => row === 5)).toMatchObject({ value: null, style: { fill: '#ffffaa' } });
    expect(sheets[0]).toMatchObject({
      hiddenColumns: [1],
      hiddenRows: [3],
      gridLines: false,
      tabColour: '#336699',
      merges: ['C1:D2'],
      frozen: { rows: 1, columns: 1 },
    });
    expect([sheets[0].widths.get(0), sheets[0].widths.get(2), sheets[0].heights?.get(0)]).toEqual([201, 61, 40]);
    expect(sheets.map(({ hidden }) => hidden)).toEqual([false, true]);
  });

  it.each(['0.00', '#,##0', '0%', 'h:mm', 'm/d/yy h:mm', 'dd/mm/yyyy', 'h:mm AM/PM', '[$-809]dd mmmm yyyy;@', '#,##0 ;[Red](#,##0)', '[h]:mm:ss'])(
    'comes back with the number format %s, and the engine shows a number, not an error',
    async (format) => {
      const book = bookOf(sheetOf([cell(0, 45000.375, { format })]));
      const model = new engine.Model(toEngineData(book, engine));
      const sheetId = model.getters.getActiveSheetId();
      expect(model.getters.getEvaluatedCell({ sheetId, col: 0, row: 0 })).toMatchObject({ type: 'number', value: 45000.375 });
      expect((await throughAll(book)).sheets[0].cells).toMatchObject([{ value: 45000.375, format }]);
    },
  );

  it('has no format rather than an error where the engine knows nothing like it', () => {
    const model = new engine.Model(toEngineData(bookOf(sheetOf([cell(0, 0.5, { format: '# ?/?' })])), engine));
    const sheetId = model.getters.getActiveSheetId();
    expect(model.getters.getEvaluatedCell({ sheetId, col: 0, row: 0 })).toMatchObject({ type: 'number', value: 0.5 });
  });
});

describe('formulas and names of a saved file', () => {
  it('come back, those the engine cannot calculate too', async () => {
    const formulas = ['=LET(x,1,x+1)', '=Rate*2', '=FORECAST.ETS(A1,A2:A3,A4:A5)', '=SUM(B1:B9)', '=SUM(B1:B9*2)', '=_xlfn.SOMETHING.NEW(1)'];
    const book: Book = {
      ...bookOf(sheetOf(formulas.map((formula, row) => cell(row, null, { formula })))),
      names: [{ name: 'Pairs', reference: 'S!A1:B9' }],
      otherNames: [{ name: 'Rate', content: '0.2' }, { name: 'Local', content: 'S!$A$1', sheet: 'S' }],
    };
    const opened = await throughAll(book);
    expect(opened.sheets[0].cells.map(({ formula }) => formula)).toEqual(formulas);
    expect(opened.names).toEqual(book.names);
    expect(opened.otherNames).toEqual(book.otherNames);
  });

  it('are stored as arrays where ranges are looked at as a whole, and as plain formulas elsewhere', async () => {
    const formulas = ['=SUM(B1:B9)', '=SUM(B1:B9*2)', '=UNIQUE(B1:B9)', '=ROWS(DUTY.ASSIGN(B1:C9,2))', '=COUNTIF(B:B,"x")', '=A1+B1', '=LEN(B1:B2)'];
    const book = bookOf(sheetOf(formulas.map((formula, row) => cell(row * 20, 0, { formula }))));
    const { readXlsx } = await import('hucre');
    const { sheets } = await readXlsx(await saveXlsx(book), { readStyles: true });
    const arrays = formulas.filter((_, row) => sheets[0].cells?.get(`${row * 20},0`)?.formulaDynamic === true);
    expect(arrays).toEqual(['=SUM(B1:B9*2)', '=UNIQUE(B1:B9)', '=ROWS(DUTY.ASSIGN(B1:C9,2))', '=LEN(B1:B2)']);
  });

  it('store an answer that spills with the range it fills and its values', async () => {
    const pairs = [['Choir', 'Ann'], ['Organ', 'Bob']];
    const cells = pairs.flatMap((values, row) => values.map((value, column) => cell(row, value, { column })));
    const book = bookOf(sheetOf([...cells, cell(0, null, { column: 3, formula: '=DUTY.ASSIGN(A1:B2,1)' })]));
    const bytes = await saveXlsx(fromEngine(new engine.Model(toEngineData(book, engine))));
    const { readXlsx } = await import('hucre');
    const { sheets } = await readXlsx(bytes, { readStyles: true });
    expect(sheets[0].cells?.get('0,3')).toMatchObject({
      formula: '_xldudf_DUTY_ASSIGN(A1:B2,1)',
      formulaType: 'array',
      formulaRef: 'D1:G3',
      formulaDynamic: true,
      value: 'Duty',
    });
    expect(sheets[0].rows.map((row) => row.slice(3, 5))).toEqual([['Duty', 'Person'], ['Choir', 'Ann'], ['Organ', 'Bob']]);
  });
});
