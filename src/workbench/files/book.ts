/** A workbook between a file and the sheet engine: what both of them understand. */
export interface Book {
  readonly sheets: readonly BookSheet[];
  /** Named ranges; the reference as a formula writes it, such as `Inputs!A1:C40`. */
  readonly names: readonly { readonly name: string; readonly reference: string }[];
  /** What the file held beyond this, in words; empty where nothing is lost. */
  readonly lost: readonly string[];
}

/** One sheet. */
export interface BookSheet {
  readonly name: string;
  readonly hidden: boolean;
  readonly cells: readonly BookCell[];
  /** Column widths in pixels, by column from 0. */
  readonly widths: ReadonlyMap<number, number>;
  /** Merged ranges as `A1:B2`. */
  readonly merges: readonly string[];
  /** Rows and columns that stay in view. */
  readonly frozen: { readonly rows: number; readonly columns: number };
}

/** One cell that holds or shows something. */
export interface BookCell {
  /** Row and column from 0. */
  readonly row: number;
  readonly column: number;
  /** As a person types it, with its equals sign; null for a plain value. */
  readonly formula: string | null;
  /** The value, or the formula's last one; an error as its code in `error`. */
  readonly value: string | number | boolean | null;
  readonly error?: string;
  readonly style: BookStyle | null;
  /** A number format such as `0.00`; null for the general one. */
  readonly format: string | null;
  /** For a formula that spills: how far, in rows and columns. */
  readonly spill?: { readonly rows: number; readonly columns: number };
}

/** How a cell looks; what is left out is as usual. */
export interface BookStyle {
  readonly bold?: boolean;
  readonly italic?: boolean;
  readonly underline?: boolean;
  readonly strikethrough?: boolean;
  /** Colours as `#rrggbb`. */
  readonly colour?: string;
  readonly fill?: string;
  readonly size?: number;
  readonly align?: 'left' | 'center' | 'right';
  readonly wrap?: boolean;
}
