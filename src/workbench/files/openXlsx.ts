import { readXlsx, type Cell, type CellStyle, type CellValue, type Sheet, type Workbook } from 'hucre';
import { columnLetters, parseCell } from '../../host/address';
import type { Book, BookCell, BookSheet, BookStyle } from './book';
import { toTyped } from './spelling';

/** Pixels of a column as wide as one digit, near enough for the usual fonts. */
const PIXELS_A_DIGIT = 7;
const DAY = 86_400_000;
/** Day 0 of a sheet's calendar. */
const CALENDAR_START = Date.UTC(1899, 11, 30);

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
  const names = (workbook.namedRanges ?? [])
    .filter(({ name }) => !name.startsWith('_xlnm.'))
    .map(({ name, range }) => ({ name, reference: range.replaceAll('$', '') }));
  return {
    sheets: workbook.sheets.map(readSheet),
    names: [...names, ...tableNames(workbook, new Set(names.map(({ name }) => name.toLowerCase())))],
    lost: lostParts(workbook),
  };
}

/** Tables become named ranges, headings included, unless the name is taken. */
function tableNames({ sheets }: Workbook, taken: ReadonlySet<string>): { name: string; reference: string }[] {
  return sheets.flatMap(({ name: sheet, tables }) =>
    (tables ?? []).flatMap(({ name, range }) => {
      if (range === undefined || taken.has(name.toLowerCase())) return [];
      return [{ name, reference: `${/^\w+$/u.test(sheet) ? sheet : `'${sheet.replaceAll("'", "''")}'`}!${range}` }];
    }),
  );
}

function readSheet(sheet: Sheet): BookSheet {
  const cells: BookCell[] = [];
  const spilled = spilledCells(sheet);
  sheet.rows.forEach((values, row) => {
    values.forEach((value, column) => {
      const cell = sheet.cells?.get(`${row},${column}`);
      if (spilled.has(`${columnLetters(column)}${row + 1}`)) value = null;
      const read = readCell(row, column, value, cell);
      if (read !== null) cells.push(read);
    });
  });
  return {
    name: sheet.name,
    hidden: sheet.hidden === true || sheet.veryHidden === true,
    cells,
    widths: new Map(
      (sheet.columns ?? []).flatMap(({ width }, column) =>
        width === undefined ? [] : [[column, Math.round(width * PIXELS_A_DIGIT + 5)] as const],
      ),
    ),
    merges: (sheet.merges ?? []).map(
      ({ startRow, startCol, endRow, endCol }) =>
        `${columnLetters(startCol)}${startRow + 1}:${columnLetters(endCol)}${endRow + 1}`,
    ),
    frozen: { rows: sheet.freezePane?.rows ?? 0, columns: sheet.freezePane?.columns ?? 0 },
  };
}

/** The cells a stored array formula fills beyond its own: their values come back with the calculation. */
function spilledCells({ cells }: Sheet): Set<string> {
  const spilled = new Set<string>();
  for (const cell of cells?.values() ?? []) {
    if (cell.formulaType !== 'array' || cell.formulaRef === undefined) continue;
    const [from, to] = cell.formulaRef.split(':').map((corner) => parseCell(corner));
    if (from === null || to === null || from === undefined || to === undefined) continue;
    for (let row = from.row; row <= to.row; row++) {
      for (let column = from.column; column <= to.column; column++) {
        if (row !== from.row || column !== from.column) spilled.add(`${columnLetters(column)}${row + 1}`);
      }
    }
  }
  return spilled;
}

function readCell(row: number, column: number, value: CellValue, cell: Cell | undefined): BookCell | null {
  const formula = cell?.formula === undefined ? null : toTyped(cell.formula);
  const style = readStyle(cell?.style);
  const isDate = value instanceof Date;
  const plain = isDate ? (value.getTime() - CALENDAR_START) / DAY : value;
  if (formula === null && plain === null && style === null) return null;
  const given = cell?.style?.numFmt;
  const format = given === undefined || given === 'General' ? (isDate ? 'yyyy-mm-dd hh:mm' : null) : given;
  return { row, column, formula, value: plain, style, format };
}

function readStyle(style: CellStyle | undefined): BookStyle | null {
  if (style === undefined) return null;
  const { font, fill, alignment } = style;
  const solid = fill?.type === 'pattern' && fill.pattern === 'solid' ? colour(fill.fgColor?.rgb) : undefined;
  const horizontal = alignment?.horizontal;
  const entries = Object.entries({
    bold: font?.bold === true ? true : undefined,
    italic: font?.italic === true ? true : undefined,
    underline: font?.underline !== undefined && font.underline !== false ? true : undefined,
    strikethrough: font?.strikethrough === true ? true : undefined,
    colour: colour(font?.color?.rgb),
    fill: solid,
    size: font?.size === undefined || font.size === 11 ? undefined : font.size,
    align: horizontal === 'left' || horizontal === 'center' || horizontal === 'right' ? horizontal : undefined,
    wrap: alignment?.wrapText === true ? true : undefined,
  }).filter(([, value]) => value !== undefined);
  return entries.length === 0 ? null : (Object.fromEntries(entries));
}

/** `FFAABBCC` and `AABBCC` become `#aabbcc`. */
function colour(rgb: string | undefined): string | undefined {
  return rgb === undefined || !/^[0-9a-f]{6,8}$/iu.test(rgb) ? undefined : `#${rgb.slice(-6).toLowerCase()}`;
}

const PARTS: readonly [keyof Sheet, string][] = [
  ['charts', 'charts'],
  ['images', 'pictures'],
  ['pivotTables', 'pivot tables'],
  ['conditionalRules', 'conditional formats'],
  ['dataValidations', 'input checks (data validation)'],
  ['threadedComments', 'comments'],
  ['sparklines', 'sparklines'],
  ['textBoxes', 'text boxes'],
  ['protection', 'sheet protection'],
  ['tables', 'tables (their ranges stay as named ranges)'],
  ['slicers', 'slicers'],
];

function lostParts(workbook: Workbook): string[] {
  const lost = PARTS.filter(([part]) =>
    workbook.sheets.some((sheet) => {
      const held = sheet[part];
      return Array.isArray(held) ? held.length > 0 : held !== undefined && held !== null;
    }),
  ).map(([, words]) => words);
  if ((workbook.externalLinks ?? []).length > 0) lost.push('links to other workbooks');
  return lost;
}
