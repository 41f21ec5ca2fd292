import { columnLetters, formatAddress, formatZone, parseAddress, parseCell, parseReference, parseZone } from '../address';
import { callsUs, firstBlankRow, type Block, type DraftCell, type OurCell, type SheetDraft } from '../port';
import { regionAt, regionsOf, roomBelow, type Zone } from '../regions';
import { freeSheetName } from '../sheetNames';
import type { Range } from '../../sheet/range';
import type { Engine, EngineModel, EngineZone } from './engine';
import { literal } from './literal';
import { addAlarm } from './alarms';
import { runBulk } from './bulk';
import { addWholes } from './checks';
import { widthInPixels } from './widths';

const HEADING = { bold: true, fillColor: '#e3efe9' };
const TITLE = { bold: true, fontSize: 14, textColor: '#1f5a4c' };
/** Rows and columns of a new sheet beyond what is written, for spills. */
const SPARE_ROWS = 400;
const SPARE_COLUMNS = 20;

/** Reads and writes the tables of a workbook in the engine. */
export class EngineTables {
  readonly #model: EngineModel;
  readonly #engine: Engine;

  constructor(model: EngineModel, engine: Engine) {
    this.#model = model;
    this.#engine = engine;
  }

  selection(): Block | null {
    const { getters } = this.#model;
    const zone = getters.getSelectedZones().at(-1)!;
    const sheetId = getters.getActiveSheetId();
    if (zone.top !== zone.bottom || zone.left !== zone.right) return this.#block(sheetId, zone);
    const region = regionAt(this.#regions(sheetId), zone.top, zone.left);
    return region === null ? null : this.#block(sheetId, region);
  }

  blocks(): Block[] {
    const { getters } = this.#model;
    const named = getters.getNamedRanges().map(({ range }) => this.#block(range.sheetId, range.zone));
    const known = new Set(named.map(({ address }) => address));
    const regions = getters.getSheetIds().flatMap((sheetId) => {
      const zones = this.#regions(sheetId);
      const filled = [...zones, ...this.#spills(sheetId)];
      const last = getters.getNumberRows(sheetId) - 1;
      return zones.map((zone): Block => ({ ...this.#block(sheetId, zone), room: roomBelow(zone, filled, last) }));
    });
    return [...named, ...regions.filter(({ address }) => !known.has(address))];
  }

  read(reference: string): Block | null {
    const { getters } = this.#model;
    const named = getters.getNamedRanges().find(({ name }) => name.toLowerCase() === reference.trim().toLowerCase());
    if (named !== undefined) return this.#block(named.range.sheetId, named.range.zone);
    const parsed = parseAddress(reference.trim());
    const sheetId = parsed === null ? undefined : getters.getSheetIdByName(parsed.sheet);
    if (parsed === null || sheetId === undefined) return null;
    const rows = getters.getCells(sheetId).map(({ id }) => getters.getCellPosition(id).row);
    const last = Math.min(rows.reduce((a, b) => Math.max(a, b), -1) + 1, getters.getNumberRows(sheetId) - 1);
    const zone = parseReference(parsed.cell, last);
    return zone === null ? null : this.#block(sheetId, zone);
  }

  write(address: string, cells: readonly (readonly DraftCell[])[]): void {
    const parsed = parseAddress(address);
    const start = parsed === null ? null : parseCell(parsed.cell);
    const sheetId = parsed === null ? undefined : this.#model.getters.getSheetIdByName(parsed.sheet);
    if (start !== null && sheetId !== undefined) this.#put(sheetId, start.row, start.column, cells);
  }

  appendRow(reference: string, cells: readonly DraftCell[]): string | null {
    const block = this.read(reference);
    const at = block === null ? -1 : firstBlankRow(block.values);
    if (block === null || at === -1) return null;
    const { sheet, cell } = parseAddress(block.address)!;
    const { top, left } = parseZone(cell)!;
    const address = formatAddress({ sheet, cell: `${columnLetters(left)}${top + at + 1}` });
    this.write(address, [cells]);
    return address;
  }

  addSheets(drafts: readonly SheetDraft[]): string[] {
    const { getters } = this.#model;
    const taken = new Set(getters.getSheetIds().map((id) => getters.getSheetName(id).toLowerCase()));
    const made = drafts.map((draft) => ({ draft, name: freeSheetName(draft.name, taken), sheetId: crypto.randomUUID() }));
    runBulk(this.#model, () => {
      // Names first: a formula on one sheet may use what another holds.
      for (const { draft, name, sheetId } of made) this.#makeSheet(sheetId, name, draft);
      for (const { draft, sheetId } of made) this.#put(sheetId, 0, 0, draft.rows, true);
    });
    return made.map(({ name }) => name);
  }

  ourCells(): OurCell[] {
    const { getters } = this.#model;
    return getters.getSheetIds().flatMap((sheetId) =>
      getters.getCells(sheetId).flatMap((cell) => {
        const formula = cell.isFormula ? (cell.compiledFormula?.toFormulaString(getters) ?? '') : '';
        if (!callsUs(formula)) return [];
        const position = getters.getCellPosition(cell.id);
        const address = formatAddress({ sheet: getters.getSheetName(sheetId), cell: `${columnLetters(position.col)}${position.row + 1}` });
        const { value } = getters.getEvaluatedCell(position);
        return [{ address, formula, value: value === '' ? null : value }];
      }),
    );
  }

  /** What a formula shows with all it spills over. */
  shownBy(address: string): Range {
    const { getters } = this.#model;
    const parsed = parseAddress(address);
    const cell = parsed === null ? null : parseCell(parsed.cell);
    const sheetId = parsed === null ? undefined : getters.getSheetIdByName(parsed.sheet);
    if (cell === null || sheetId === undefined) return [[null]];
    const own = { top: cell.row, bottom: cell.row, left: cell.column, right: cell.column };
    return this.#block(sheetId, getters.getSpreadZone({ sheetId, row: cell.row, col: cell.column }) ?? own).values;
  }

  #makeSheet(sheetId: string, name: string, draft: SheetDraft): void {
    const { getters } = this.#model;
    const columns = Math.max(0, ...draft.rows.map((row) => row.length));
    const { room = { rows: 0, columns: 0 } } = draft;
    this.#model.dispatch('CREATE_SHEET', { sheetId, name, position: getters.getSheetIds().length });
    this.#enlarge(sheetId, Math.max(draft.rows.length, room.rows) + SPARE_ROWS, Math.max(columns, room.columns) + SPARE_COLUMNS);
    for (const { name: own, cells } of draft.names ?? []) {
      const range = getters.getRangeDataFromZone(sheetId, parseZone(cells)!);
      // Without the sheet the engine measures the range against the sheet in view.
      this.#model.dispatch('CREATE_NAMED_RANGE', { sheetId, name: own, ranges: [range] });
    }
    this.#dress(sheetId, draft);
  }

  #enlarge(sheetId: string, rows: number, columns: number): void {
    const { getters } = this.#model;
    const about = { sheetId, sheetName: getters.getSheetName(sheetId), position: 'after' };
    const [hasRows, hasColumns] = [getters.getNumberRows(sheetId), getters.getNumberCols(sheetId)];
    if (rows > hasRows) this.#model.dispatch('ADD_COLUMNS_ROWS', { ...about, dimension: 'ROW', base: hasRows - 1, quantity: rows - hasRows });
    if (columns > hasColumns) {
      this.#model.dispatch('ADD_COLUMNS_ROWS', { ...about, dimension: 'COL', base: hasColumns - 1, quantity: columns - hasColumns });
    }
  }

  #put(sheetId: string, top: number, left: number, cells: readonly (readonly DraftCell[])[], skipsBlanks = false): void {
    const locale = this.#model.getters.getLocale();
    runBulk(this.#model, () => {
      cells.forEach((row, r) =>
        row.forEach((cell, c) => {
          if (cell === null && skipsBlanks) return;
          const content = cell !== null && typeof cell === 'object' ? cell.formula : literal(cell, this.#engine, locale);
          this.#model.dispatch('UPDATE_CELL', { sheetId, row: top + r, col: left + c, content });
        }),
      );
    });
  }

  #dress(sheetId: string, { rows, headingRows = [], titleRows = [], widths = [], wholes = [], alarms = [] }: SheetDraft): void {
    for (const cell of alarms) addAlarm(this.#model, sheetId, cell);
    const look = (lines: readonly number[], style: object): void => {
      const filled = lines.filter((row) => rows[row].length > 0);
      const target = filled.map((row) => ({ top: row, bottom: row, left: 0, right: rows[row].length - 1 }));
      if (target.length > 0) this.#model.dispatch('SET_FORMATTING', { sheetId, target, style });
    };
    look(headingRows, HEADING);
    look(titleRows, TITLE);
    const sheetName = this.#model.getters.getSheetName(sheetId);
    widths.forEach((width, column) => {
      const size = widthInPixels(width);
      this.#model.dispatch('RESIZE_COLUMNS_ROWS', { sheetId, sheetName, dimension: 'COL', elements: [column], size });
    });
    for (const whole of wholes) addWholes(this.#model, sheetId, whole, rows.length + SPARE_ROWS - 1);
  }

  #regions(sheetId: string): Zone[] {
    const { getters } = this.#model;
    const filled = new Set<string>();
    let [rows, columns] = [0, 0];
    for (const cell of getters.getCells(sheetId)) {
      const { row, col } = getters.getCellPosition(cell.id);
      // What is spilled is an answer, not a table; a formula's own cell stands for it.
      const { value } = getters.getEvaluatedCell({ sheetId, row, col });
      if (value === null || value === '') continue;
      filled.add(`${row} ${col}`);
      [rows, columns] = [Math.max(rows, row + 1), Math.max(columns, col + 1)];
    }
    return regionsOf(rows, columns, (row, column) => filled.has(`${row} ${column}`));
  }

  /** What formulas fill beside their own cells. */
  #spills(sheetId: string): Zone[] {
    const { getters } = this.#model;
    const formulas = getters.getCells(sheetId).filter(({ isFormula }) => isFormula);
    return formulas.flatMap(({ id }) => getters.getSpreadZone(getters.getCellPosition(id)) ?? []);
  }

  #block(sheetId: string, { top, left, bottom, right }: EngineZone): Block {
    const { getters } = this.#model;
    const address = formatAddress({ sheet: getters.getSheetName(sheetId), cell: formatZone({ top, left, bottom, right }) });
    const named = getters.getNamedRanges().find(
      ({ range: { sheetId: own, zone } }) =>
        own === sheetId && zone.top === top && zone.left === left && zone.bottom === bottom && zone.right === right,
    );
    const values = Array.from({ length: bottom - top + 1 }, (_, r) =>
      Array.from({ length: right - left + 1 }, (__, c) => {
        const { value } = getters.getEvaluatedCell({ sheetId, row: top + r, col: left + c });
        return value === '' ? null : value;
      }),
    );
    return { address, name: named?.name ?? null, values };
  }
}
