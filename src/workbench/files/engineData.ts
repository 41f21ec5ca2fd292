import { columnLetters, parseCell } from '../../host/address';
import type { Engine, EngineData, EngineModel, EngineSheet, EngineStyle } from '../../host/workbench/engine';
import type { Book, BookCell, BookSheet, BookStyle } from './book';

/** The version of its data that the engine at hand writes and reads as it is. */
const DATA_VERSION = '19.3.2';
/** Room beyond what a file holds, for what is typed and spilled. */
const SPARE_ROWS = 200;
const SPARE_COLUMNS = 12;

/** A book as the engine loads it. */
export function toEngineData(book: Book, engine: Engine): EngineData {
  const styles = new Numbered<EngineStyle>();
  const formats = new Numbered<string>();
  const sheets = book.sheets.map((sheet, i) => toEngineSheet(sheet, `sheet${i + 1}`, styles, formats, engine));
  return {
    version: DATA_VERSION,
    sheets,
    styles: styles.table(),
    formats: formats.table(),
    namedRanges: Object.fromEntries(book.names.map(({ name, reference }) => [name, reference])),
  };
}

/** Numbers things from 1, equal ones alike. */
class Numbered<T> {
  readonly #numbers = new Map<string, number>();
  readonly #table: Record<string, T> = {};

  number(thing: T): number {
    const key = JSON.stringify(thing);
    const known = this.#numbers.get(key);
    if (known !== undefined) return known;
    const number = this.#numbers.size + 1;
    this.#numbers.set(key, number);
    this.#table[number] = thing;
    return number;
  }

  table(): Record<string, T> {
    return this.#table;
  }
}

function toEngineSheet(
  sheet: BookSheet,
  id: string,
  styles: Numbered<EngineStyle>,
  formats: Numbered<string>,
  engine: Engine,
): EngineSheet {
  const cells: Record<string, string> = {};
  const styleOf: Record<string, number> = {};
  const formatOf: Record<string, number> = {};
  let rowNumber = 0;
  let colNumber = 0;
  for (const { row, column, formula, value, style, format } of sheet.cells) {
    const place = `${columnLetters(column)}${row + 1}`;
    const content = formula ?? literal(value, engine);
    if (content !== '') cells[place] = content;
    if (style !== null) styleOf[place] = styles.number(toEngineStyle(style));
    if (format !== null) formatOf[place] = formats.number(format);
    rowNumber = Math.max(rowNumber, row + 1);
    colNumber = Math.max(colNumber, column + 1);
  }
  const { rows, columns } = sheet.frozen;
  return {
    id,
    name: sheet.name,
    rowNumber: Math.max(100, rowNumber + SPARE_ROWS),
    colNumber: Math.max(26, colNumber + SPARE_COLUMNS),
    cells,
    styles: styleOf,
    formats: formatOf,
    cols: Object.fromEntries([...sheet.widths].map(([column, size]) => [column, { size }])),
    merges: sheet.merges,
    isVisible: !sheet.hidden,
    panes: { xSplit: columns, ySplit: rows },
  };
}

/** A value as it would be typed; text that would be read as something else gets an apostrophe before it. */
function literal(value: BookCell['value'], { helpers, constants }: Engine): string {
  if (value === null) return '';
  if (typeof value === 'boolean') return value ? 'TRUE' : 'FALSE';
  if (typeof value === 'number') return String(value);
  const text = value.trim();
  const misread =
    /^['=+\-@#]/u.test(value) ||
    /^(true|false)$/iu.test(text) ||
    helpers.isNumber(text, constants.DEFAULT_LOCALE) ||
    helpers.isDateTime(text, constants.DEFAULT_LOCALE);
  return misread ? `'${value}` : value;
}

function toEngineStyle({ colour, fill, size, wrap, ...rest }: BookStyle): EngineStyle {
  return {
    ...rest,
    ...(colour === undefined ? {} : { textColor: colour }),
    ...(fill === undefined ? {} : { fillColor: fill }),
    ...(size === undefined ? {} : { fontSize: size }),
    ...(wrap === true ? { wrapping: 'wrap' as const } : {}),
  };
}

/** The workbook in the engine as a book: contents, last values, and how far formulas spill. */
export function fromEngine(model: EngineModel): Book {
  const data = model.exportData();
  return {
    sheets: data.sheets.map((sheet) => fromEngineSheet(sheet, data, model)),
    names: Object.entries(data.namedRanges).map(([name, reference]) => ({ name, reference })),
    lost: [],
  };
}

function fromEngineSheet(sheet: EngineSheet, data: EngineData, model: EngineModel): BookSheet {
  const { getters } = model;
  const styleOf = byCell(sheet.styles, (number) => fromEngineStyle(data.styles[number]));
  const formatOf = byCell(sheet.formats, (number) => data.formats[number]);
  const cells = new Map<string, BookCell>();
  const put = (row: number, column: number, formula: string | null, spill?: { rows: number; columns: number }): void => {
    const place = `${columnLetters(column)}${row + 1}`;
    const evaluated = getters.getEvaluatedCell({ sheetId: sheet.id, col: column, row });
    // A typed error code is kept as it was typed; only a formula comes to an error.
    const isError = evaluated.type === 'error' && formula !== null;
    cells.set(place, {
      row,
      column,
      formula,
      value: isError ? null : evaluated.value,
      ...(isError ? { error: String(evaluated.value) } : {}),
      style: styleOf.get(place) ?? null,
      format: formatOf.get(place) ?? null,
      ...(spill === undefined ? {} : { spill }),
    });
  };
  for (const place of new Set([...styleOf.keys(), ...formatOf.keys()])) {
    const cell = parseCell(place);
    if (cell !== null) put(cell.row, cell.column, null);
  }
  for (const { id, isFormula, compiledFormula } of getters.getCells(sheet.id)) {
    const { col: column, row } = getters.getCellPosition(id);
    const formula = isFormula ? (compiledFormula?.toFormulaString(getters) ?? null) : null;
    const zone = isFormula ? getters.getSpreadZone({ sheetId: sheet.id, col: column, row }) : undefined;
    for (let r = zone?.top ?? 0; zone !== undefined && r <= zone.bottom; r++) {
      for (let c = zone.left; c <= zone.right; c++) put(r, c, null);
    }
    const spill = zone === undefined ? undefined : { rows: zone.bottom - zone.top + 1, columns: zone.right - zone.left + 1 };
    put(row, column, formula, spill);
  }
  return {
    name: sheet.name,
    hidden: !sheet.isVisible,
    cells: [...cells.values()],
    widths: new Map(
      Object.entries(sheet.cols).flatMap(([column, { size }]) => (size === undefined ? [] : [[Number(column), size] as const])),
    ),
    merges: sheet.merges,
    frozen: { rows: sheet.panes?.ySplit ?? 0, columns: sheet.panes?.xSplit ?? 0 },
  };
}

/** Spreads what is said of zones over their cells. */
function byCell<T>(zones: Readonly<Record<string, number>>, lookUp: (number: number) => T | undefined): Map<string, T> {
  const cells = new Map<string, T>();
  for (const [zone, number] of Object.entries(zones)) {
    const thing = lookUp(number);
    const [from, to] = zone.split(':').map((corner) => parseCell(corner));
    if (thing === undefined || from === null || from === undefined) continue;
    const last = to ?? from;
    for (let row = from.row; row <= last.row; row++) {
      for (let column = from.column; column <= last.column; column++) cells.set(`${columnLetters(column)}${row + 1}`, thing);
    }
  }
  return cells;
}

function fromEngineStyle(style: EngineStyle | undefined): BookStyle | undefined {
  if (style === undefined) return undefined;
  const { bold, italic, underline, strikethrough, textColor, fillColor, fontSize, align, wrapping } = style;
  const entries = Object.entries({
    bold,
    italic,
    underline,
    strikethrough,
    colour: textColor?.toLowerCase(),
    fill: fillColor?.toLowerCase(),
    size: fontSize,
    align,
    wrap: wrapping === 'wrap' ? true : undefined,
  });
  return Object.fromEntries(entries.filter(([, value]) => value !== undefined && value !== false));
}
