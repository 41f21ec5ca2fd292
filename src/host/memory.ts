import type { WorkbookPort } from './port';

/** A workbook that is a list of formulas: for tests, and for pages without a spreadsheet. */
export class MemoryWorkbook implements WorkbookPort {
  readonly kind = 'memory';
  readonly #formulas = new Map<string, string>();
  readonly #listeners = new Set<() => void>();
  selected: string | null = null;
  recalculations = 0;

  /** Puts a formula into a cell, or takes it away, and tells whoever listens. */
  write(address: string, formula: string | null): void {
    if (formula === null) this.#formulas.delete(address);
    else this.#formulas.set(address, formula);
    this.#tell();
  }

  onRecalculated(listener: () => void): () => void {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  }

  formulasAt(addresses: readonly string[]): Promise<readonly (string | null)[]> {
    return Promise.resolve(addresses.map((address) => this.#formulas.get(address) ?? null));
  }

  select(address: string): Promise<void> {
    if (this.#formulas.has(address)) this.selected = address;
    return Promise.resolve();
  }

  recalculate(): Promise<void> {
    this.recalculations++;
    this.#tell();
    return Promise.resolve();
  }

  #tell(): void {
    for (const listener of this.#listeners) listener();
  }
}
