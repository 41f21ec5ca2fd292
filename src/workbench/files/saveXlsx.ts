import { writeXlsx, type Cell, type CellValue, type ColumnDef, type RowDef, type WriteSheet } from 'hucre';
import { columnLetters, parseCell } from '../../host/address';
import { alarmRules } from './alarms';
import { writeChecks } from './checks';
import { writeConditions } from './conditions';
import type { Book, BookCell, BookSheet } from './book';
import { isArrayFormula, toStored } from './spelling';
import { given, writeColour, writeStyle } from './styles';

const PIXELS_A_DIGIT = 7;
const PIXELS_A_POINT = 4 / 3;
/** Texts that look like an error are stored as formatted text, or they would come back as the error. */
const ERROR_TEXT = /^#(?:N\/A|DIV\/0!|VALUE!|REF!|NAME\?|NUM!|NULL!|SPILL!|CALC!|BUSY!|GETTING_DATA)$/u;

/**
 * Writes an .xlsx file with formulas, their last values, and what they spilled.
 *
 * @param written when the file was made; now where it is left out
 */
export async function saveXlsx(book: Book, written = new Date()): Promise<Uint8Array> {
  return writeXlsx({
    sheets: book.sheets.map(writeSheet),
    namedRanges: [
      ...book.names.map(({ name, reference }) => ({ name, range: absolute(reference) })),
      ...(book.otherNames ?? []).map(({ name, content, sheet }) => ({ name, range: content, ...given({ scope: sheet }) })),
    ],
    ...given({ activeSheet: book.active, defaultFont: book.font }),
    properties: { creator: 'Dutyproof workbench', created: written, modified: written },
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
  return {
    name: sheet.name,
    rows: Array.from(rows, (row) => Array.from(row ?? [], (value) => value ?? null)),
    cells,
    columns: writeColumns(sheet),
    rowDefs: writeRows(sheet),
    merges: sheet.merges.flatMap((merge) => {
      const [from, to] = merge.split(':').map((corner) => parseCell(corner));
      if (from === null || to === null || from === undefined || to === undefined) return [];
      return [{ startRow: from.row, startCol: from.column, endRow: to.row, endCol: to.column }];
    }),
    ...given({ pageSetup: sheet.aside?.pageSetup, headerFooter: sheet.aside?.headerFooter }),
    view: {
      ...given({ zoomScale: sheet.aside?.zoomScale, rightToLeft: sheet.aside?.rightToLeft }),
      showGridLines: sheet.gridLines !== false,
      ...(sheet.tabColour === undefined ? {} : { tabColor: writeColour(sheet.tabColour) }),
    },
    ...(sheet.frozen.rows + sheet.frozen.columns > 0 ? { freezePane: sheet.frozen } : {}),
    ...(sheet.hidden ? { hidden: true } : {}),
    dataValidations: writeChecks(sheet.checks),
    conditionalRules: [...alarmRules(sheet.alarms ?? []), ...writeConditions(sheet.conditions ?? [], (sheet.alarms ?? []).length + 1)],
  };
}

function writeColumns({ cells, widths, hiddenColumns = [] }: BookSheet): ColumnDef[] {
  const hidden = new Set(hiddenColumns);
  const last = [...cells.map(({ column }) => column), ...widths.keys(), ...hidden].reduce((most, column) => Math.max(most, column), -1);
  return Array.from({ length: last + 1 }, (_, column): ColumnDef => {
    const pixels = widths.get(column);
    return {
      ...(pixels === undefined ? {} : { width: (pixels - 5) / PIXELS_A_DIGIT }),
      ...(hidden.has(column) ? { hidden: true } : {}),
    };
  });
}

function writeRows({ heights = new Map<number, number>(), hiddenRows = [] }: BookSheet): Map<number, RowDef> {
  const hidden = new Set(hiddenRows);
  return new Map(
    [...new Set([...heights.keys(), ...hidden])].map((row): [number, RowDef] => {
      const pixels = heights.get(row);
      return [
        row,
        { ...(pixels === undefined ? {} : { height: pixels / PIXELS_A_POINT }), ...(hidden.has(row) ? { hidden: true } : {}) },
      ];
    }),
  );
}

/** The parts of a cell beyond its value; null where there are none. */
function writeCell({ row, column, formula, value, isError, style, format, spill }: BookCell): Partial<Cell> | null {
  const look = writeStyle(style, format);
  if (formula === null) {
    const isText = typeof value === 'string' && isError !== true && ERROR_TEXT.test(value);
    if (look === null && !isText) return null;
    return { ...(isText ? { richText: [{ text: value }] } : {}), ...given({ style: look ?? undefined }) };
  }
  const last = spill === undefined ? { row, column } : { row: row + spill.rows - 1, column: column + spill.columns - 1 };
  const corner = `${columnLetters(column)}${row + 1}`;
  return {
    type: 'formula',
    formula: toStored(formula),
    formulaResult: value,
    ...(spill !== undefined || isArrayFormula(formula)
      ? {
          formulaType: 'array' as const,
          formulaDynamic: true,
          formulaRef: spill === undefined ? corner : `${corner}:${columnLetters(last.column)}${last.row + 1}`,
        }
      : {}),
    ...given({ style: look ?? undefined }),
  };
}

/** `Inputs!A1:C4` becomes `Inputs!$A$1:$C$4`, as files store names. */
function absolute(reference: string): string {
  const at = reference.lastIndexOf('!');
  const cells = reference.slice(at + 1).replace(/\$?([A-Z]{1,3})\$?(\d+)/giu, (_, letters: string, row: string) => `$${letters}$${row}`);
  return `${reference.slice(0, at + 1)}${/\d/u.test(cells) ? cells : cells.replace(/\$?([A-Z]{1,3})/giu, '$$$1')}`;
}
