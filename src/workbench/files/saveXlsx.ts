import { writeXlsx, type Cell, type CellStyle, type CellValue, type ColumnDef, type WriteSheet } from 'hucre';
import { columnLetters, parseCell } from '../../host/address';
import type { Book, BookCell, BookSheet, BookStyle } from './book';
import { toStored, usesOurs } from './spelling';

const PIXELS_A_DIGIT = 7;

/** Writes an .xlsx file with formulas, their last values, and what they spilled. */
export async function saveXlsx(book: Book): Promise<Uint8Array> {
  return writeXlsx({
    sheets: book.sheets.map(writeSheet),
    namedRanges: book.names.map(({ name, reference }) => ({ name, range: absolute(reference) })),
  });
}

function writeSheet(sheet: BookSheet): WriteSheet {
  const rows: CellValue[][] = [];
  const cells = new Map<string, Partial<Cell>>();
  for (const cell of sheet.cells) {
    (rows[cell.row] ??= [])[cell.column] = cell.value;
    const written = writeCell(cell);
    if (written !== null) cells.set(`${cell.row},${cell.column}`, written);
  }
  const width = Math.max(0, ...sheet.cells.map(({ column }) => column + 1), ...[...sheet.widths.keys()].map((c) => c + 1));
  return {
    name: sheet.name,
    rows: Array.from(rows, (row) => Array.from(row ?? [], (value) => value ?? null)),
    cells,
    columns: Array.from({ length: width }, (_, column): ColumnDef => {
      const pixels = sheet.widths.get(column);
      return pixels === undefined ? {} : { width: (pixels - 5) / PIXELS_A_DIGIT };
    }),
    merges: sheet.merges.flatMap((merge) => {
      const [from, to] = merge.split(':').map((corner) => parseCell(corner));
      if (from === null || to === null || from === undefined || to === undefined) return [];
      return [{ startRow: from.row, startCol: from.column, endRow: to.row, endCol: to.column }];
    }),
    ...(sheet.frozen.rows + sheet.frozen.columns > 0 ? { freezePane: sheet.frozen } : {}),
    ...(sheet.hidden ? { hidden: true } : {}),
  };
}

/** The parts of a cell beyond its value; null where there are none. */
function writeCell({ row, column, formula, value, error, style, format, spill }: BookCell): Partial<Cell> | null {
  const look = writeStyle(style, format);
  if (formula === null) return look === null ? null : { style: look };
  const isArray = spill !== undefined || usesOurs(formula);
  const last = spill === undefined ? { row, column } : { row: row + spill.rows - 1, column: column + spill.columns - 1 };
  const corner = `${columnLetters(column)}${row + 1}`;
  return {
    type: 'formula',
    formula: toStored(formula),
    formulaResult: error ?? value,
    ...(isArray
      ? {
          formulaType: 'array' as const,
          formulaDynamic: true,
          formulaRef: spill === undefined ? corner : `${corner}:${columnLetters(last.column)}${last.row + 1}`,
        }
      : {}),
    ...(look === null ? {} : { style: look }),
  };
}

function writeStyle(style: BookStyle | null, format: string | null): CellStyle | null {
  if (style === null && format === null) return null;
  const { bold, italic, underline, strikethrough, colour, fill, size, align, wrap } = style ?? {};
  const font = given({ bold, italic, underline, strikethrough, size, color: colour === undefined ? undefined : { rgb: rgb(colour) } });
  const alignment = given({ horizontal: align, wrapText: wrap });
  return given({
    font: Object.keys(font).length > 0 ? font : undefined,
    alignment: Object.keys(alignment).length > 0 ? alignment : undefined,
    fill: fill === undefined ? undefined : ({ type: 'pattern', pattern: 'solid', fgColor: { rgb: rgb(fill) } } as const),
    numFmt: format ?? undefined,
  }) as CellStyle;
}

function given<T extends object>(entries: T): Partial<T> {
  return Object.fromEntries(Object.entries(entries).filter(([, value]) => value !== undefined)) as Partial<T>;
}

function rgb(colour: string): string {
  return `FF${colour.slice(1).toUpperCase()}`;
}

/** `Inputs!A1:C4` becomes `Inputs!$A$1:$C$4`, as files store names. */
function absolute(reference: string): string {
  const at = reference.lastIndexOf('!');
  const cells = reference.slice(at + 1).replace(/\$?([A-Z]{1,3})\$?(\d+)/giu, (_, letters: string, row: string) => `$${letters}$${row}`);
  return `${reference.slice(0, at + 1)}${cells}`;
}
