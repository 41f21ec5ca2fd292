import { columnLetters, formatAddress, parseAddress, parseCell } from '../address';
import type { Block, Calculation, DraftCell, OurCell, SheetDraft, WorkbookPort } from '../port';
import type { Range } from '../../sheet/range';
import type { Engine, EngineModel, EnginePosition } from './engine';
import { EngineTables } from './tables';

/** The pane's view of the workbook in the workbench. The model changes when another file is opened. */
export class WorkbenchWorkbook implements WorkbookPort {
  readonly kind = 'workbench';
  #model: EngineModel;
  readonly #engine: Engine;
  readonly #selectListeners = new Set<(address: string) => void>();
  #selected = '';
  readonly #listeners = new Set<() => void>();
  #isTold = true;
  #isDue = false;

  constructor(model: EngineModel, engine: Engine) {
    this.#model = model;
    this.#engine = engine;
    this.#listen();
  }

  get model(): EngineModel {
    return this.#model;
  }

  /** Takes another workbook in place of this one. */
  replace(model: EngineModel): void {
    this.#model.off('command-dispatched', this);
    this.#model.off('update', this);
    this.#model = model;
    this.#listen();
    this.#tellSoon();
  }

  onRecalculated(listener: () => void): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  formulasAt(addresses: readonly string[]): Promise<readonly (string | null)[]> {
    const { getters } = this.#model;
    return Promise.resolve(
      addresses.map((address) => {
        const position = this.#position(address);
        if (position === null) return null;
        return getters.getCell(position)?.compiledFormula?.toFormulaString(getters) ?? null;
      }),
    );
  }

  select(address: string): Promise<void> {
    const position = this.#position(address);
    if (position !== null) {
      const { getters } = this.#model;
      const from = getters.getActiveSheetId();
      if (!getters.isSheetVisible(position.sheetId)) this.#model.dispatch('SHOW_SHEET', { sheetId: position.sheetId });
      if (from !== position.sheetId) {
        this.#model.dispatch('ACTIVATE_SHEET', { sheetIdFrom: from, sheetIdTo: position.sheetId });
      }
      this.#model.selection.selectCell(position.col, position.row);
    }
    return Promise.resolve();
  }

  /** Calculates every formula anew once this turn is over; several askings are one calculation. */
  recalculateSoon(): void {
    if (this.#isDue) return;
    this.#isDue = true;
    setTimeout(() => {
      this.#isDue = false;
      this.#model.dispatch('EVALUATE_CELLS');
    });
  }

  recalculate(): Promise<void> {
    this.#model.dispatch('EVALUATE_CELLS');
    return Promise.resolve();
  }

  sheetNames(): Promise<readonly string[]> {
    const { getters } = this.#model;
    return Promise.resolve(getters.getSheetIds().map((id) => getters.getSheetName(id)));
  }

  selection(): Promise<Block | null> {
    return Promise.resolve(this.#tables.selection());
  }

  onSelected(listener: (address: string) => void): () => void {
    this.#selectListeners.add(listener);
    return () => this.#selectListeners.delete(listener);
  }

  blocks(): Promise<readonly Block[]> {
    return Promise.resolve(this.#tables.blocks());
  }

  read(reference: string): Promise<Block | null> {
    return Promise.resolve(this.#tables.read(reference));
  }

  write(address: string, cells: readonly (readonly DraftCell[])[]): Promise<void> {
    this.#tables.write(address, cells);
    return Promise.resolve();
  }

  appendRow(reference: string, cells: readonly DraftCell[]): Promise<string | null> {
    return Promise.resolve(this.#tables.appendRow(reference, cells));
  }

  addSheets(drafts: readonly SheetDraft[]): Promise<readonly string[]> {
    return Promise.resolve(this.#tables.addSheets(drafts));
  }

  ourCells(): Promise<readonly OurCell[]> {
    return Promise.resolve(this.#tables.ourCells());
  }

  shownBy(addresses: readonly string[]): Promise<readonly Range[]> {
    return Promise.resolve(addresses.map((address) => this.#tables.shownBy(address)));
  }

  /** The engine calculates at once, always. */
  calculation(): Promise<Calculation> {
    return Promise.resolve({ isManual: false, isPending: false });
  }

  get #tables(): EngineTables {
    return new EngineTables(this.#model, this.#engine);
  }

  #tellSelection(): void {
    const { getters } = this.#model;
    const { sheetId, col, row } = getters.getActivePosition();
    const address = formatAddress({ sheet: getters.getSheetName(sheetId), cell: `${columnLetters(col)}${row + 1}` });
    if (address === this.#selected) return;
    this.#selected = address;
    for (const listener of [...this.#selectListeners]) listener(address);
  }

  /** Null for a cell that is not there. */
  #position(address: string): EnginePosition | null {
    const { getters } = this.#model;
    const parsed = parseAddress(address);
    const cell = parsed === null ? null : parseCell(parsed.cell);
    const sheetId = parsed === null ? undefined : getters.getSheetIdByName(parsed.sheet);
    if (cell === null || sheetId === undefined) return null;
    if (cell.column >= getters.getNumberCols(sheetId) || cell.row >= getters.getNumberRows(sheetId)) return null;
    return { sheetId, col: cell.column, row: cell.row };
  }

  #listen(): void {
    this.#model.on('command-dispatched', this, () => this.#tellSoon());
    this.#model.on('update', this, () => this.#tellSelection());
  }

  /** One change is many commands, and the calculation comes after them: listeners are told once, when all is done. */
  #tellSoon(): void {
    if (!this.#isTold) return;
    this.#isTold = false;
    queueMicrotask(() => {
      this.#isTold = true;
      for (const listener of [...this.#listeners]) listener();
    });
  }
}
