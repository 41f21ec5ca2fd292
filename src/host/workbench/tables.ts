import { columnLetters, formatAddress, formatZone, parseAddress, parseCell, parseZone } from '../address';
import { callsUs, firstBlankRow, type Block, type DraftCell, type OurCell, type SheetDraft } from '../port';
import { regionAt, regionsOf, type Zone } from '../regions';
import { freeSheetName } from '../sheetNames';
import type { Engine, EngineModel, EngineZone } from './engine';
import { literal } from './literal';
import { alarmStep } from './alarms';
import { runBulk } from './bulk';
import { wholesStep } from './checks';

const HEADING = { bold: true, fillColor: '#e3efe9' };
const TITLE = { bold: true, fontSize: 14, textColor: '#1f5a4c' };
/** Pixels a character takes, about, and beside the text. */
const CHARACTER = 7;
const MARGIN = 12;
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
    const regions = getters.getSheetIds().flatMap((sheetId) => this.#regions(sheetId).map((zone) => this.#block(sheetId, zone)));
    return [...named, ...regions.filter(({ address }) => !known.has(address))];
  }

  read(reference: string): Block | null {
    const { getters } = this.#model;
    const named = getters.getNamedRanges().find(({ name }) => name.toLowerCase() === reference.trim().toLowerCase());
    if (named !== undefined) return this.#block(named.range.sheetId, named.range.zone);
    const parsed = parseAddress(reference.trim());
    const zone = parsed === null ? null : parseZone(parsed.cell);
    const sheetId = parsed === null ? undefined : getters.getSheetIdByName(parsed.sheet);
    return zone === null || sheetId === undefined ? null : this.#block(sheetId, zone);
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
    // Names first: a formula on one sheet may use what another holds.
    const made = drafts.map((draft) => ({ draft, name: freeSheetName(draft.name, taken), sheetId: crypto.randomUUID() }));
    for (const { draft, name, sheetId } of made) {
      const columns = Math.max(0, ...draft.rows.map((row) => row.length)) + SPARE_COLUMNS;
      const position = getters.getSheetIds().length;
      this.#model.dispatch('CREATE_SHEET', { sheetId, name, position });
      this.#enlarge(sheetId, draft.rows.length + SPARE_ROWS, columns);
      for (const { name: own, cells } of draft.names ?? []) {
        const range = getters.getRangeDataFromZone(sheetId, parseZone(cells)!);
        // Without the sheet the engine measures the range against the sheet in view.
        this.#model.dispatch('CREATE_NAMED_RANGE', { sheetId, name: own, ranges: [range] });
      }
      this.#dress(sheetId, draft);
    }
    for (const { draft, sheetId } of made) this.#put(sheetId, 0, 0, draft.rows, true);
    return made.map(({ name }) => name);
  }

  ourCells(): OurCell[] {
    const { getters } = this.#model;
    return getters.getSheetIds().flatMap((sheetId) =>
      getters.getCells(sheetId).flatMap((cell) => {
        const formula = cell.isFormula ? (cell.compiledFormula?.toFormulaString(getters) ?? '') : '';
        if (!callsUs(formula)) return [];
        const position = getters.getCellPosition(cell.id);
        const own = { top: position.row, bottom: position.row, left: position.col, right: position.col };
        const zone = getters.getSpreadZone(position) ?? own;
        const address = formatAddress({ sheet: getters.getSheetName(sheetId), cell: formatZone(own) });
        return [{ address, formula, values: this.#block(sheetId, zone).values }];
      }),
    );
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
    const steps = cells.flatMap((row, r) =>
      row.flatMap((cell, c) => {
        if (cell === null && skipsBlanks) return [];
        const content = cell !== null && typeof cell === 'object' ? cell.formula : literal(cell, this.#engine, locale);
        return [{ command: 'UPDATE_CELL', payload: { sheetId, row: top + r, col: left + c, content } }];
      }),
    );
    runBulk(this.#model, steps);
  }

  #dress(sheetId: string, { rows, headingRows = [], titleRows = [], widths = [], wholes = [], alarms = [] }: SheetDraft): void {
    runBulk(this.#model, alarms.map((cell) => alarmStep(this.#model.getters, sheetId, cell)));
    const look = (lines: readonly number[], style: object): void => {
      const filled = lines.filter((row) => rows[row].length > 0);
      const target = filled.map((row) => ({ top: row, bottom: row, left: 0, right: rows[row].length - 1 }));
      if (target.length > 0) this.#model.dispatch('SET_FORMATTING', { sheetId, target, style });
    };
    look(headingRows, HEADING);
    look(titleRows, TITLE);
    const sheetName = this.#model.getters.getSheetName(sheetId);
    widths.forEach((width, column) => {
      const size = width * CHARACTER + MARGIN;
      this.#model.dispatch('RESIZE_COLUMNS_ROWS', { sheetId, sheetName, dimension: 'COL', elements: [column], size });
    });
    runBulk(this.#model, wholes.map((whole) => wholesStep(this.#model.getters, sheetId, whole, rows.length + SPARE_ROWS - 1)));
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
