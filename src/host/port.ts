/** The narrow port through which the pane sees whatever workbook holds the formulas. */
export interface WorkbookPort {
  readonly kind: 'excel' | 'workbench' | 'memory';

  /**
   * Calls the listener after the workbook changed or was recalculated.
   * @returns a function that ends the subscription
   */
  onRecalculated(listener: () => void): () => void;

  /**
   * @param addresses cells as `Sheet!B4`, a sheet name quoted as in formulas where it must be
   * @returns for each, the formula it holds now, as a person would type it, or null
   */
  formulasAt(addresses: readonly string[]): Promise<readonly (string | null)[]>;

  /** Brings the cell into view and selects it. An address that is gone is ignored. */
  select(address: string): Promise<void>;

  /** Makes the host calculate every formula anew. */
  recalculate(): Promise<void>;
}
