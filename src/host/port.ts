import type { Range } from '../sheet/range';

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

  /** The names of the sheets, in order. */
  sheetNames(): Promise<readonly string[]>;

  /** What is selected, or where it is one cell the filled region round it; null where that is blank. */
  selection(): Promise<Block | null>;

  /**
   * Calls the listener with the address of the selected cell whenever another one is selected.
   * @returns a function that ends the subscription
   */
  onSelected(listener: (address: string) => void): () => void;

  /** Everything that may be a table: named ranges and what the sheets hold, each once. */
  blocks(): Promise<readonly Block[]>;

  /**
   * @param reference an address, whole columns of a sheet such as `Sheet!A:C` among them, or a name, as
   *   in an argument of a formula; columns are read down to a blank row below what is filled
   * @returns null where it is neither
   */
  read(reference: string): Promise<Block | null>;

  /** Writes cells from the address on, which is the top left one. */
  write(address: string, cells: readonly (readonly DraftCell[])[]): Promise<void>;

  /**
   * Puts a row into the first blank row of a range. A table of Excel that is full grows by the row.
   * @returns the address of the row; null where the range is full or not there
   */
  appendRow(reference: string, cells: readonly DraftCell[]): Promise<string | null>;

  /**
   * Adds sheets behind the last. What exists is never written over: a name that is taken is altered,
   * and a name of a range that is taken is left as it is.
   * @returns the names given to the sheets
   */
  addSheets(drafts: readonly SheetDraft[]): Promise<readonly string[]>;

  /** Every cell that holds one of our functions, or did before the host lost it. */
  ourCells(): Promise<readonly OurCell[]>;

  /**
   * @param addresses cells with formulas
   * @returns for each, what it shows with all it spills over, row by row; blanks null
   */
  shownBy(addresses: readonly string[]): Promise<readonly Range[]>;

  /** How it stands with the calculation of the workbook. */
  calculation(): Promise<Calculation>;
}

/** Whether a workbook is calculated. */
export interface Calculation {
  /** True where it is calculated only when someone asks. */
  readonly isManual: boolean;
  /** True where something has changed that is not calculated yet; null where the host does not tell. */
  readonly isPending: boolean | null;
}

/** A filled rectangle of cells. */
export interface Block {
  /** As `Sheet!A1:D20`. */
  readonly address: string;
  /** The named range or table that is exactly this, as a formula takes it; null where there is none. */
  readonly name: string | null;
  /** Row by row; blanks null. */
  readonly values: Range;
  /** Blank rows below it that a range may go on over, so that rows added later count too; none where it is not said. */
  readonly room?: number;
}

/** What is written into a cell. A string is always text, even one that begins with `=`. */
export type DraftCell = string | number | null | { readonly formula: string };

/** A sheet to be made. */
export interface SheetDraft {
  readonly name: string;
  readonly rows: readonly (readonly DraftCell[])[];
  /** Rows drawn as headings, from 0. */
  readonly headingRows?: readonly number[];
  /** Rows drawn as titles, from 0. */
  readonly titleRows?: readonly number[];
  /** Widths in characters, by column. */
  readonly widths?: readonly number[];
  /** Cells such as `B9`, or rectangles of them, that are drawn as an alarm while their text begins as `ALARM` does. */
  readonly alarms?: readonly string[];
  /** Rows and columns its formulas may come to fill, for a host whose sheets are no larger than they must be. */
  readonly room?: { readonly rows: number; readonly columns: number };
  /** Names for rectangles of this sheet, such as `{ name: 'Pairs', cells: 'A2:C40' }`. */
  readonly names?: readonly { readonly name: string; readonly cells: string }[];
  /** Columns, from 0, in which only whole numbers from `least` on may be typed, below the row `from`. */
  readonly wholes?: readonly { readonly column: number; readonly from: number; readonly least: number }[];
}

/** How the text of an alarm begins. */
export const ALARM = 'Wrong';

/** A cell with one of our functions. */
export interface OurCell {
  readonly address: string;
  readonly formula: string;
  /** What the cell itself shows; null where it is blank. */
  readonly value: unknown;
}

/** Whether a formula calls one of our functions, however the host spells it. */
export function callsUs(formula: string): boolean {
  return /(?:^|[^A-Z0-9_])(?:_xldudf_)?DUTY[._][A-Z]+\(/iu.test(formula);
}

/** The first row with nothing in it, from 0; -1 where there is none. */
export function firstBlankRow(rows: Range): number {
  return rows.findIndex((row) => row.every((cell) => cell === null || cell === undefined || cell === ''));
}
