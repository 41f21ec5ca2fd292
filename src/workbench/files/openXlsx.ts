import { dateToSerial, readXlsx, type Cell, type CellValue, type Sheet, type Workbook } from 'hucre';
import { columnLetters, parseCell } from '../../host/address';
import type { Book, BookAside, BookCell, BookName, BookSheet, StoredName } from './book';
import { lostParts } from './lost';
import { sharedFormulas } from './sharedFormulas';
import { toTyped } from './spelling';
import { tableNames, withoutTables, type FileTable } from './structured';
import { isAlarm } from './alarms';
import { readChecks, readConditions, type Spell } from './readRules';
import { given, readColour, readStyle, USUAL_FONT } from './styles';

/** Pixels of a column as wide as one digit, near enough for the usual fonts. */
const PIXELS_A_DIGIT = 7;
const PIXELS_A_POINT = 4 / 3;
/** Names that can stand for one range here: a sheet and one rectangle, or whole columns. */
const ONE_RANGE = /^(?:'(?:[^']|'')+'|[\p{L}_][\p{L}\p{N}_.]*)!\$?[A-Z]{1,3}(?:\$?\d+)?(?::\$?[A-Z]{1,3}(?:\$?\d+)?)?$/iu;

/** What a sheet is read with. */
interface Surroundings {
  readonly theme: readonly string[];
  /** The font of cells that say nothing of theirs. */
  readonly font: typeof USUAL_FONT;
  readonly tables: ReadonlyMap<string, FileTable>;
}

/**
 * Reads an .xlsx file.
 *
 * @throws Error with a sentence for the person where the file is no workbook
 */
export async function openXlsx(bytes: Uint8Array): Promise<Book> {
  let workbook: Workbook;
  try {
    workbook = await readXlsx(bytes, { readStyles: true });
  } catch (error) {
    throw new Error(`This file cannot be read as an .xlsx workbook (${error instanceof Error ? error.message : String(error)}).`, { cause: error });
  }
  const tables = fileTables(workbook);
  const surroundings = {
    theme: workbook.themeColors ?? [],
    font: { name: workbook.defaultFont?.name ?? USUAL_FONT.name, size: workbook.defaultFont?.size ?? USUAL_FONT.size },
    tables: new Map(tables.map((table) => [table.name.toLowerCase(), table])),
  };
  const { names, otherNames } = readNames(workbook);
  const taken = new Set(names.map(({ name }) => name.toLowerCase()));
  return {
    sheets: workbook.sheets.map((sheet) => readSheet(sheet, surroundings)),
    names: [...names, ...tableNames(tables, taken)].map(({ name, reference }) => ({ name, reference: plain(reference) })),
    otherNames,
    lost: await lostParts(bytes, workbook),
    active: workbook.activeSheet ?? 0,
    font: surroundings.font,
  };
}

function readNames({ namedRanges }: Workbook): { names: BookName[]; otherNames: StoredName[] } {
  const names: BookName[] = [];
  const otherNames: StoredName[] = [];
  for (const { name, range, scope } of namedRanges ?? []) {
    if (name.startsWith('_xlnm.')) continue;
    if (scope === undefined && ONE_RANGE.test(range)) names.push({ name, reference: range });
    else otherNames.push({ name, content: range, ...given({ sheet: scope }) });
  }
  return { names, otherNames };
}

/** A reference without dollar signs; the name of its sheet may hold some. */
function plain(reference: string): string {
  const at = reference.lastIndexOf('!');
  return reference.slice(0, at) + reference.slice(at).replaceAll('$', '');
}

function fileTables({ sheets }: Workbook): FileTable[] {
  return sheets.flatMap((sheet) =>
    (sheet.tables ?? []).flatMap(({ name, range, columns, showTotalRow }): FileTable[] => {
      const [from, to] = (range ?? '').split(':').map((corner) => parseCell(corner));
      if (from === undefined || from === null || to === undefined || to === null) return [];
      const headings = columns.map((column) => column.name);
      return [{ name, sheet: sheet.name, top: from.row, bottom: to.row, left: from.column, headings, hasTotals: showTotalRow === true }];
    }),
  );
}

function readSheet(sheet: Sheet, surroundings: Surroundings): BookSheet {
  const cells: BookCell[] = [];
  const spilled = spilledCells(sheet);
  const filledDown = sharedFormulas(sheet.cells ?? new Map<string, Cell>());
  sheet.rows.forEach((values, row) => {
    values.forEach((value, column) => {
      const key = `${row},${column}`;
      const stored = filledDown.get(key) ?? sheet.cells?.get(key)?.formula;
      const formula = stored === undefined || stored === '' ? null : toTyped(withoutTables(stored, surroundings.tables, row));
      const read = readCell(row, column, spilled.has(key) ? null : value, formula, sheet.cells?.get(key), surroundings);
      if (read !== null) cells.push(read);
    });
  });
  const spell: Spell = (formula, row) => toTyped(withoutTables(formula, surroundings.tables, row)).slice(1);
  const columns = [...(sheet.columns ?? []).entries()];
  const rows = [...(sheet.rowDefs ?? [])];
  return {
    name: sheet.name,
    hidden: sheet.hidden === true || sheet.veryHidden === true,
    cells,
    widths: sizes(columns, ({ width }) => (width === undefined ? undefined : width * PIXELS_A_DIGIT + 5)),
    heights: sizes(rows, ({ height }) => (height === undefined ? undefined : height * PIXELS_A_POINT)),
    hiddenColumns: columns.flatMap(([column, { hidden }]) => (hidden === true ? [column] : [])),
    hiddenRows: rows.flatMap(([row, { hidden }]) => (hidden === true ? [row] : [])),
    gridLines: sheet.view?.showGridLines !== false,
    ...given({ tabColour: readColour(sheet.view?.tabColor, surroundings.theme) }),
    ...given({ alarms: alarmsOf(sheet) }),
    checks: readChecks(sheet, spell),
    conditions: readConditions(sheet, spell, surroundings.theme),
    aside: readAside(sheet),
    merges: (sheet.merges ?? []).map(
      ({ startRow, startCol, endRow, endCol }) => `${columnLetters(startCol)}${startRow + 1}:${columnLetters(endCol)}${endRow + 1}`,
    ),
    frozen: { rows: sheet.freezePane?.rows ?? 0, columns: sheet.freezePane?.columns ?? 0 },
  };
}

/** Without what names cells: it would not follow when rows are inserted. */
function readAside({ pageSetup, headerFooter, view }: Sheet): BookAside {
  const setup = given({ ...pageSetup, printArea: undefined, printTitlesRow: undefined, printTitlesColumn: undefined });
  return given({
    pageSetup: Object.keys(setup).length === 0 ? undefined : setup,
    headerFooter,
    zoomScale: view?.zoomScale,
    rightToLeft: view?.rightToLeft,
  });
}

/** The cells that are alarms; undefined where there are none. */
function alarmsOf({ conditionalRules = [] }: Sheet): string[] | undefined {
  const cells = conditionalRules.filter(isAlarm).map(({ range }) => range);
  return cells.length === 0 ? undefined : cells;
}

/** Sizes in whole pixels, where there are any. */
function sizes<T>(headers: readonly (readonly [number, T])[], pixels: (header: T) => number | undefined): Map<number, number> {
  return new Map(
    headers.flatMap(([at, header]) => {
      const size = pixels(header);
      return size === undefined ? [] : [[at, Math.round(size)] as const];
    }),
  );
}

/** The cells a stored array formula fills beyond its own, as `row,column`: their values come back with the calculation. */
function spilledCells({ cells }: Sheet): Set<string> {
  const spilled = new Set<string>();
  for (const cell of cells?.values() ?? []) {
    if (cell.formulaType !== 'array' || cell.formulaRef === undefined) continue;
    const [from, to] = cell.formulaRef.split(':').map((corner) => parseCell(corner));
    if (from === null || to === null || from === undefined || to === undefined) continue;
    for (let row = from.row; row <= to.row; row++) {
      for (let column = from.column; column <= to.column; column++) {
        if (row !== from.row || column !== from.column) spilled.add(`${row},${column}`);
      }
    }
  }
  return spilled;
}

function readCell(
  row: number,
  column: number,
  value: CellValue,
  formula: string | null,
  cell: Cell | undefined,
  { theme, font }: Surroundings,
): BookCell | null {
  const style = readStyle(cell?.style, theme, font);
  const isDate = value instanceof Date;
  const plain = isDate ? dateToSerial(value) : value;
  if (formula === null && plain === null && style === null) return null;
  const stored = cell?.style?.numFmt;
  const format = stored === undefined || stored === 'General' ? (isDate ? 'dd/mm/yyyy' : null) : stored;
  return { row, column, formula, value: plain, ...(cell?.type === 'error' ? { isError: true } : {}), style, format };
}
