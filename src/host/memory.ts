import { columnLetters, formatAddress, formatZone, parseAddress, parseCell, parseReference, parseZone } from './address';
import { callsUs, firstBlankRow, type Block, type Calculation, type DraftCell, type OurCell, type SheetDraft, type WorkbookPort } from './port';
import { regionAt, regionsOf, roomBelow, type Zone } from './regions';
import { freeSheetName } from './sheetNames';
import type { Range } from '../sheet/range';

type Content = string | number | null | { readonly formula: string };

/** A workbook that only keeps what is written: for tests, and for pages without a spreadsheet. */
export class MemoryWorkbook implements WorkbookPort {
  readonly kind = 'memory';
  readonly #sheets = new Map<string, Map<string, Content>>();
  readonly #names = new Map<string, string>();
  readonly #listeners = new Set<() => void>();
  readonly #selectListeners = new Set<(address: string) => void>();
  selected: string | null = null;
  recalculations = 0;
  /** As the host would tell it. */
  calculated: Calculation = { isManual: false, isPending: false };

  /** Puts a formula into a cell, or takes it away, and tells whoever listens. */
  type(address: string, formula: string | null): void {
    this.#put(address, formula === null ? null : { formula });
    this.#tell();
  }

  onRecalculated(listener: () => void): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  formulasAt(addresses: readonly string[]): Promise<readonly (string | null)[]> {
    return Promise.resolve(addresses.map((address) => formulaOf(this.#at(address))));
  }

  select(address: string): Promise<void> {
    const parsed = parseAddress(address);
    if (parsed !== null && this.#sheets.has(parsed.sheet)) {
      this.selected = address;
      for (const listener of this.#selectListeners) listener(address);
    }
    return Promise.resolve();
  }

  recalculate(): Promise<void> {
    this.recalculations++;
    this.#tell();
    return Promise.resolve();
  }

  sheetNames(): Promise<readonly string[]> {
    return Promise.resolve([...this.#sheets.keys()]);
  }

  selection(): Promise<Block | null> {
    const parsed = this.selected === null ? null : parseAddress(this.selected);
    const zone = parsed === null ? null : parseZone(parsed.cell);
    if (parsed === null || zone === null) return Promise.resolve(null);
    if (parsed.cell.includes(':')) return Promise.resolve(this.#block(parsed.sheet, zone));
    const region = regionAt(this.#regions(parsed.sheet), zone.top, zone.left);
    return Promise.resolve(region === null ? null : this.#block(parsed.sheet, region));
  }

  onSelected(listener: (address: string) => void): () => void {
    this.#selectListeners.add(listener);
    return () => this.#selectListeners.delete(listener);
  }

  async blocks(): Promise<readonly Block[]> {
    const named = await Promise.all([...this.#names.keys()].map((name) => this.read(name)));
    const regions = [...this.#sheets.keys()].flatMap((sheet) => {
      const zones = this.#regions(sheet);
      return zones.map((zone): Block => ({ ...this.#block(sheet, zone), room: roomBelow(zone, zones, Infinity) }));
    });
    const known = new Set(named.map((block) => block?.address));
    return [...named.filter((block) => block !== null), ...regions.filter(({ address }) => !known.has(address))];
  }

  read(reference: string): Promise<Block | null> {
    const address = this.#names.get(reference.toLowerCase()) ?? reference;
    const parsed = parseAddress(address);
    if (parsed === null || !this.#sheets.has(parsed.sheet)) return Promise.resolve(null);
    const rows = [...this.#sheets.get(parsed.sheet)!.keys()].map((cell) => parseCell(cell)!.row);
    const zone = parseReference(parsed.cell, Math.max(-1, ...rows) + 1);
    return Promise.resolve(zone === null ? null : this.#block(parsed.sheet, zone));
  }

  write(address: string, cells: readonly (readonly DraftCell[])[]): Promise<void> {
    const parsed = parseAddress(address)!;
    const start = parseCell(parsed.cell)!;
    cells.forEach((row, r) => row.forEach((cell, c) => this.#put(cellAddress(parsed.sheet, start.row + r, start.column + c), cell)));
    this.#tell();
    return Promise.resolve();
  }

  async appendRow(reference: string, cells: readonly DraftCell[]): Promise<string | null> {
    const block = await this.read(reference);
    const at = block === null ? -1 : firstBlankRow(block.values);
    if (block === null || at === -1) return null;
    const { sheet, cell } = parseAddress(block.address)!;
    const zone = parseZone(cell)!;
    const address = cellAddress(sheet, zone.top + at, zone.left);
    await this.write(address, [cells]);
    return address;
  }

  addSheets(drafts: readonly SheetDraft[]): Promise<readonly string[]> {
    const taken = new Set([...this.#sheets.keys()].map((name) => name.toLowerCase()));
    const names = drafts.map((draft) => {
      const name = freeSheetName(draft.name, taken);
      this.#sheets.set(name, new Map());
      draft.rows.forEach((row, r) => row.forEach((cell, c) => this.#put(cellAddress(name, r, c), cell)));
      for (const { name: own, cells } of draft.names ?? []) {
        if (!this.#names.has(own.toLowerCase())) this.#names.set(own.toLowerCase(), formatAddress({ sheet: name, cell: cells }));
      }
      return name;
    });
    this.#tell();
    return Promise.resolve(names);
  }

  ourCells(): Promise<readonly OurCell[]> {
    const cells = [...this.#sheets].flatMap(([sheet, contents]) =>
      [...contents].flatMap(([cell, content]) => {
        const formula = formulaOf(content);
        return formula !== null && callsUs(formula) ? [{ address: formatAddress({ sheet, cell }), formula, value: null }] : [];
      }),
    );
    return Promise.resolve(cells);
  }

  shownBy(addresses: readonly string[]): Promise<readonly Range[]> {
    return Promise.resolve(addresses.map(() => [[null]]));
  }

  calculation(): Promise<Calculation> {
    return Promise.resolve(this.calculated);
  }

  #at(address: string): Content {
    const parsed = parseAddress(address);
    return parsed === null ? null : (this.#sheets.get(parsed.sheet)?.get(parsed.cell) ?? null);
  }

  #put(address: string, content: Content): void {
    const { sheet, cell } = parseAddress(address)!;
    const cells = this.#sheets.get(sheet) ?? new Map<string, Content>();
    this.#sheets.set(sheet, cells);
    if (content === null) cells.delete(cell);
    else cells.set(cell, content);
  }

  #regions(sheet: string): Zone[] {
    const cells = this.#sheets.get(sheet)!;
    const places = [...cells.keys()].map((cell) => parseCell(cell)!);
    const rows = Math.max(0, ...places.map(({ row }) => row + 1));
    const columns = Math.max(0, ...places.map(({ column }) => column + 1));
    return regionsOf(rows, columns, (row, column) => cells.has(`${columnLetters(column)}${row + 1}`));
  }

  #block(sheet: string, zone: Zone): Block {
    const address = formatAddress({ sheet, cell: formatZone(zone) });
    const name = [...this.#names].find(([, reference]) => reference === address)?.[0] ?? null;
    const values = Array.from({ length: zone.bottom - zone.top + 1 }, (_, r) =>
      Array.from({ length: zone.right - zone.left + 1 }, (__, c) => {
        const content = this.#at(cellAddress(sheet, zone.top + r, zone.left + c));
        return content !== null && typeof content === 'object' ? null : content;
      }),
    );
    return { address, name, values };
  }

  #tell(): void {
    for (const listener of [...this.#listeners]) listener();
  }
}

function formulaOf(content: Content): string | null {
  return content !== null && typeof content === 'object' ? content.formula : null;
}

function cellAddress(sheet: string, row: number, column: number): string {
  return formatAddress({ sheet, cell: `${columnLetters(column)}${row + 1}` });
}
