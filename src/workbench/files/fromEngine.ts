import { alarmCells } from '../../host/workbench/alarms';
import { columnLetters, parseCell } from '../../host/address';
import { usualCode } from '../../host/workbench/cells';
import type {
  EngineBorder,
  EngineContent,
  EngineData,
  EngineHeader,
  EngineModel,
  EngineSheet,
  EngineStyle,
} from '../../host/workbench/engine';
import type { Book, BookBorder, BookCell, BookSheet, BookStyle } from './book';
import { fromEngineChecks } from './checks';
import { fromEngineConditions } from './conditions';
import { given } from './styles';
import { engineId } from './toEngine';

/** Codes of formulas that the engine cannot read; what they come to elsewhere is not known here. */
const UNREAD: ReadonlySet<unknown> = new Set(['#BAD_EXPR', '#NAME?']);

/**
 * The workbook in the engine as a book: contents, last values, and how far formulas spill.
 *
 * @param formats the file's number formats by those the engine shows in their place
 * @param opened the book as it was opened, for what the engine cannot hold
 */
export function fromEngine(model: EngineModel, formats: ReadonlyMap<string, string> = new Map(), opened?: Book): Book {
  const data = model.exportData();
  return {
    sheets: data.sheets.map((sheet) => ({
      ...fromEngineSheet(sheet, data, model, formats),
      ...given({ aside: opened?.sheets.find((_, i) => engineId(i) === sheet.id)?.aside }),
    })),
    names: Object.entries(data.namedRanges).map(([name, reference]) => ({ name, reference })),
    ...given({ otherNames: opened?.otherNames, font: opened?.font }),
    lost: [],
    active: Math.max(0, data.sheets.findIndex(({ id }) => id === model.getters.getActiveSheetId())),
  };
}

function fromEngineSheet(sheet: EngineSheet, data: EngineData, model: EngineModel, formats: ReadonlyMap<string, string>): BookSheet {
  const columns = Object.entries(sheet.cols);
  const rows = Object.entries(sheet.rows);
  return {
    name: sheet.name,
    hidden: !sheet.isVisible,
    cells: readCells(sheet, data, model, formats),
    widths: sizes(columns),
    heights: sizes(rows),
    hiddenColumns: hidden(columns),
    hiddenRows: hidden(rows),
    gridLines: sheet.areGridLinesVisible !== false,
    ...given({ tabColour: sheet.color?.toLowerCase() }),
    alarms: alarmCells(sheet.conditionalFormats),
    checks: fromEngineChecks(sheet.dataValidationRules),
    conditions: fromEngineConditions(sheet.conditionalFormats),
    merges: sheet.merges,
    frozen: { rows: sheet.panes?.ySplit ?? 0, columns: sheet.panes?.xSplit ?? 0 },
  };
}

function readCells(sheet: EngineSheet, data: EngineData, model: EngineModel, formats: ReadonlyMap<string, string>): BookCell[] {
  const { getters } = model;
  const styleOf = byCell(sheet.styles, (number) => data.styles[number]);
  const borderOf = byCell(sheet.borders, (number) => data.borders[number]);
  const formatOf = byCell(sheet.formats, (number) => data.formats[number]);
  const cells = new Map<string, BookCell>();
  const put = (row: number, column: number, content?: EngineContent, spill?: { rows: number; columns: number }): void => {
    const place = `${columnLetters(column)}${row + 1}`;
    const formula = content?.isFormula === true ? (content.compiledFormula?.toFormulaString(getters) ?? null) : null;
    const format = formatOf.get(place);
    cells.set(place, {
      row,
      column,
      formula,
      ...readValue(model, { sheetId: sheet.id, col: column, row }, formula, content),
      style: fromEngineStyle(styleOf.get(place), borderOf.get(place)),
      format: format === undefined ? null : (formats.get(format) ?? format),
      ...(spill === undefined ? {} : { spill }),
    });
  };
  for (const place of new Set([...styleOf.keys(), ...borderOf.keys(), ...formatOf.keys()])) {
    const cell = parseCell(place);
    if (cell !== null) put(cell.row, cell.column);
  }
  for (const content of getters.getCells(sheet.id)) {
    const { col, row } = getters.getCellPosition(content.id);
    const zone = content.isFormula ? getters.getSpreadZone({ sheetId: sheet.id, col, row }) : undefined;
    for (let r = zone?.top ?? 0; zone !== undefined && r <= zone.bottom; r++) {
      for (let c = zone.left; c <= zone.right; c++) put(r, c);
    }
    put(row, col, content, zone === undefined ? undefined : { rows: zone.bottom - zone.top + 1, columns: zone.right - zone.left + 1 });
  }
  return [...cells.values()];
}

function readValue(
  { getters }: EngineModel,
  position: { sheetId: string; col: number; row: number },
  formula: string | null,
  content: EngineContent | undefined,
): Pick<BookCell, 'value' | 'isError'> {
  const { type, value, link } = getters.getEvaluatedCell(position);
  if (formula !== null && UNREAD.has(value)) return { value: null };
  if (type === 'error') return { value: usualCode(String(value)), isError: true };
  // A text with a link in it is shown without the link: what was typed is what is kept.
  if (link !== undefined && formula === null && content?.content !== undefined) return { value: content.content.replace(/^'/u, '') };
  return { value };
}

function sizes(headers: readonly [string, EngineHeader][]): Map<number, number> {
  return new Map(headers.flatMap(([at, { size }]) => (size === undefined ? [] : [[Number(at), size] as const])));
}

function hidden(headers: readonly [string, EngineHeader][]): number[] {
  return headers.flatMap(([at, { isHidden }]) => (isHidden === true ? [Number(at)] : []));
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

function fromEngineStyle(style: EngineStyle | undefined, border: EngineBorder | undefined): BookStyle | null {
  const { bold, italic, underline, strikethrough, textColor, fillColor, fontSize } = style ?? {};
  const { align, verticalAlign, wrapping, rotation = 0, unseen } = style ?? {};
  const lines = Object.entries(border ?? {}).map(([side, line]) => [side, { style: line.style, colour: line.color.toLowerCase() }]);
  const read = given({
    bold: bold === true ? bold : undefined,
    italic: italic === true ? italic : undefined,
    underline: underline === true ? underline : undefined,
    strikethrough: strikethrough === true ? strikethrough : undefined,
    colour: textColor?.toLowerCase(),
    fill: fillColor?.toLowerCase(),
    size: fontSize,
    align,
    vertical: verticalAlign,
    wrap: wrapping === 'wrap' ? true : undefined,
    rotation: rotation === 0 ? undefined : degrees(rotation),
    unseen,
    border: lines.length > 0 ? (Object.fromEntries(lines) as BookBorder) : undefined,
  });
  return Object.keys(read).length === 0 ? null : read;
}

/** An angle as files count it: up to 90 where text climbs, from 91 where it falls. */
function degrees(radians: number): number {
  const angle = Math.round((radians / Math.PI) * 180);
  return angle < 0 ? -angle : angle + 90;
}
