import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { readXlsx, type Workbook } from 'hucre';
import { beforeAll, describe, expect, it } from 'vitest';
import { demoFile } from '../../scripts/demo.mjs';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import { registerInEngine } from '../../src/host/workbench/register';
import type { Book, BookCell } from '../../src/workbench/files/book';
import { fromEngine } from '../../src/workbench/files/fromEngine';
import { openXlsx } from '../../src/workbench/files/openXlsx';
import { saveXlsx } from '../../src/workbench/files/saveXlsx';
import { toEngineData } from '../../src/workbench/files/toEngine';
import { engine } from '../helpers/engine';
import { unzip } from '../helpers/zip';

const bytes = new Uint8Array(readFileSync(join(import.meta.dirname, '../../assets/demo.xlsx')));
registerInEngine(engine, FUNCTIONS, new Journal(), () => undefined);

/** What a person typed in a book, so that two books can be compared. */
function typed({ sheets, names }: Book) {
  const order = (a: BookCell, b: BookCell) => a.row - b.row || a.column - b.column;
  return {
    names: [...names].sort((a, b) => a.name.localeCompare(b.name)),
    sheets: sheets.map(({ name, cells, widths, frozen }) => ({
      name,
      cells: cells
        .filter(({ formula, value, style }) => formula !== null || style !== null || (value !== null && value !== ''))
        .map(({ row, column, formula, value, style }) => ({
          row,
          column,
          formula: formula?.replaceAll(' ', '') ?? null,
          value: formula === null && style === null ? value : null,
          style,
        }))
        .sort((a, b) => order(a as BookCell, b as BookCell)),
      widths: [...widths].sort((a, b) => a[0] - b[0]),
      frozen,
    })),
  };
}

describe('the demo workbook', () => {
  let stored: Workbook;
  let book: Book;
  beforeAll(async () => {
    stored = await readXlsx(bytes, { readStyles: true });
    book = await openXlsx(bytes);
  });

  it('is, part by part, what its script writes (npm run demo writes it anew)', async () => {
    expect(unzip(await demoFile())).toEqual(unzip(bytes));
  });

  it('stores our formulas as Excel stores them, dynamic and with what they fill', () => {
    const cells = stored.sheets.flatMap(({ cells: sheet }) => [...(sheet?.values() ?? [])]).filter(({ formula }) => formula?.includes('_xldudf_'));
    expect(cells.map(({ formula }) => formula)).toEqual(
      ['SUMMARY', 'ASSIGN', 'UNCOVERED', 'LOADS', 'FINDINGS', 'GRID', 'BOTTLENECKS', 'REMEDIES', 'ABSENCES', 'CHOICES', 'PROOF'].map((id) => `_xldudf_DUTY_${id}(Pairs, People, Duties, Rules)`),
    );
    for (const cell of cells) expect(cell).toMatchObject({ formulaType: 'array', formulaDynamic: true });
    const [summary] = cells;
    expect(summary.formulaRef).toBe('A2:B13');
  });

  it('comes out of the engine as it went in', async () => {
    const out = await openXlsx(await saveXlsx(fromEngine(new engine.Model(toEngineData(book, engine)))));
    expect(typed(out)).toEqual(typed(book));
  });

  it('is answered by the engine with the very values it stores, none of them an error', () => {
    const { getters } = new engine.Model(toEngineData(book, engine));
    for (const { name, rows } of stored.sheets) {
      const sheetId = getters.getSheetIdByName(name)!;
      rows.forEach((values, row) => {
        values.forEach((value, col) => {
          const here = getters.getEvaluatedCell({ sheetId, col, row });
          expect(here.type).not.toBe('error');
          expect(here.value ?? '').toBe(value ?? '');
        });
      });
    }
  });
});
