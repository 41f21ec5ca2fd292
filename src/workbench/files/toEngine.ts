import { columnLetters } from '../../host/address';
import { loadedAlarms } from '../../host/workbench/alarms';
import { literal } from '../../host/workbench/literal';
import type { Engine, EngineBorder, EngineData, EngineHeader, EngineLocale, EngineSheet, EngineStyle } from '../../host/workbench/engine';
import type { Book, BookSheet, BookStyle } from './book';
import { toEngineChecks } from './checks';
import { toEngineConditions } from './conditions';
import { formatTable, type FormatTable } from './formats';
import { given } from './styles';

/** The version of its data that the engine at hand writes and reads as it is. */
const DATA_VERSION = '19.3.2';
/** Room beyond what a file holds, for what is typed and spilled. */
const SPARE_ROWS = 300;
const SPARE_COLUMNS = 12;

/** Dates as in Britain; numbers and formulas as files hold them, so that what is typed is what is stored. */
const LOCALE: EngineLocale = {
  name: 'English (UK)',
  code: 'en_GB',
  thousandsSeparator: ',',
  decimalSeparator: '.',
  weekStart: 1,
  dateFormat: 'dd/mm/yyyy',
  timeFormat: 'hh:mm:ss',
  formulaArgSeparator: ',',
};

/** Rows and columns of a sheet. */
export interface Room {
  readonly rows: number;
  readonly columns: number;
}

/**
 * A book as the engine loads it.
 *
 * @param room how large sheets must be at least, by name
 */
export function toEngineData(book: Book, engine: Engine, room: ReadonlyMap<string, Room> = new Map()): EngineData {
  const numbered = { styles: new Numbered<EngineStyle>(), formats: new Numbered<string>(), borders: new Numbered<EngineBorder>() };
  const formats = formatTable(book, engine);
  const sheets = book.sheets.map((sheet, i) => {
    const loaded = {
      ...toEngineSheet(sheet, engineId(i), numbered, formats, engine),
      dataValidationRules: toEngineChecks(sheet.checks ?? [], book.names, engine),
    };
    const { rows, columns } = room.get(sheet.name) ?? { rows: 0, columns: 0 };
    return { ...loaded, rowNumber: Math.max(loaded.rowNumber, rows), colNumber: Math.max(loaded.colNumber, columns) };
  });
  return {
    version: DATA_VERSION,
    sheets,
    styles: numbered.styles.table(),
    formats: numbered.formats.table(),
    borders: numbered.borders.table(),
    settings: { locale: LOCALE, disableCellAnimations: true },
    namedRanges: Object.fromEntries(book.names.map(({ name, reference }) => [name, reference])),
  };
}

/** By what the engine knows the sheets of a book, counted from 0; sheets made later have other ids. */
export function engineId(sheet: number): string {
  return `sheet${sheet + 1}`;
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
  numbered: { styles: Numbered<EngineStyle>; formats: Numbered<string>; borders: Numbered<EngineBorder> },
  formats: FormatTable,
  engine: Engine,
): EngineSheet {
  const cells: Record<string, string> = {};
  const looks = { styles: {} as Record<string, number>, formats: {} as Record<string, number>, borders: {} as Record<string, number> };
  let rowNumber = 0;
  let colNumber = 0;
  for (const cell of sheet.cells) {
    const place = `${columnLetters(cell.column)}${cell.row + 1}`;
    const content = cell.formula ?? (cell.isError === true ? String(cell.value) : literal(cell.value, engine, LOCALE));
    if (content !== '') cells[place] = content;
    const { border, ...style } = toEngineStyle(cell.style ?? {});
    if (Object.keys(style).length > 0) looks.styles[place] = numbered.styles.number(style);
    if (border !== undefined) looks.borders[place] = numbered.borders.number(border);
    const format = cell.format === null ? null : (formats.toEngine.get(cell.format) ?? null);
    if (format !== null) looks.formats[place] = numbered.formats.number(format);
    rowNumber = Math.max(rowNumber, cell.row + 1);
    colNumber = Math.max(colNumber, cell.column + 1);
  }
  return {
    id,
    name: sheet.name,
    rowNumber: Math.max(100, rowNumber + SPARE_ROWS),
    colNumber: Math.max(26, colNumber + SPARE_COLUMNS),
    cells,
    ...looks,
    cols: headers(sheet.widths, sheet.hiddenColumns),
    rows: headers(sheet.heights, sheet.hiddenRows),
    merges: sheet.merges,
    conditionalFormats: [...loadedAlarms(sheet.alarms ?? []), ...toEngineConditions(sheet.conditions ?? [], engine)],
    isVisible: !sheet.hidden,
    areGridLinesVisible: sheet.gridLines !== false,
    ...given({ color: sheet.tabColour }),
    panes: { xSplit: sheet.frozen.columns, ySplit: sheet.frozen.rows },
  };
}

function headers(sizes: ReadonlyMap<number, number> = new Map(), hidden: readonly number[] = []): Record<string, EngineHeader> {
  const table: Record<string, EngineHeader> = {};
  for (const [at, size] of sizes) table[at] = { size };
  for (const at of hidden) table[at] = { ...table[at], isHidden: true };
  return table;
}

type Look = EngineStyle & { readonly border?: EngineBorder };

function toEngineStyle({ colour, fill, size, wrap, vertical, border, rotation, ...rest }: BookStyle): Look {
  const lines = Object.entries(border ?? {}).map(([side, line]) => [side, { style: line.style, color: line.colour }]);
  return {
    ...rest,
    ...given({ textColor: colour, fillColor: fill, fontSize: size, verticalAlign: vertical }),
    ...(rotation === undefined ? {} : { rotation: radians(rotation) }),
    ...(wrap === true ? { wrapping: 'wrap' as const } : {}),
    ...(lines.length > 0 ? { border: Object.fromEntries(lines) as EngineBorder } : {}),
  };
}

/** Files count degrees from 1 to 90 where text climbs, and from 91 where it falls. */
function radians(degrees: number): number {
  return ((degrees <= 90 ? -degrees : degrees - 90) / 180) * Math.PI;
}
