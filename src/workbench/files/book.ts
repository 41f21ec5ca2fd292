import type { ConditionalRule, DataValidation, WriteSheet } from 'hucre';

/** A workbook between a file and the sheet engine: what both of them understand. */
export interface Book {
  readonly sheets: readonly BookSheet[];
  /** Named ranges; the reference as a formula writes it, such as `Inputs!A1:C40`. */
  readonly names: readonly BookName[];
  /** Names for anything but one range (constants, formulas, names of one sheet only): kept for the file, unknown here. */
  readonly otherNames?: readonly StoredName[];
  /** What the file held beyond this, in words; empty where nothing is lost. */
  readonly lost: readonly string[];
  /** The sheet in view, from 0; the first where it is left out. */
  readonly active?: number;
  /** Typeface and size of cells that say nothing of them; the usual ones where it is left out. */
  readonly font?: { readonly name: string; readonly size: number };
}

/** A named range. */
export interface BookName {
  readonly name: string;
  readonly reference: string;
}

/** A name as a file stores it. */
export interface StoredName {
  readonly name: string;
  /** What it stands for, without equals sign. */
  readonly content: string;
  /** The only sheet it is known on. */
  readonly sheet?: string;
}

/** One sheet. */
export interface BookSheet {
  readonly name: string;
  readonly hidden: boolean;
  readonly cells: readonly BookCell[];
  /** Column widths in pixels, by column from 0. */
  readonly widths: ReadonlyMap<number, number>;
  /** Row heights in pixels, by row from 0, where they were set. */
  readonly heights?: ReadonlyMap<number, number>;
  /** Hidden columns and rows, from 0. */
  readonly hiddenColumns?: readonly number[];
  readonly hiddenRows?: readonly number[];
  /** False where the lines between the cells are not drawn. */
  readonly gridLines?: boolean;
  /** Colour of the tab as `#rrggbb`. */
  readonly tabColour?: string;
  /** Cells drawn as an alarm while their text says that something is wrong. */
  readonly alarms?: readonly string[];
  /** What may be typed into ranges. */
  readonly checks?: readonly BookCheck[];
  /** How the sheet is printed and enlarged: kept for the file, unknown to the engine. */
  readonly aside?: BookAside;
  /** Conditional formats beside the alarms. */
  readonly conditions?: readonly BookCondition[];
  /** Merged ranges as `A1:B2`. */
  readonly merges: readonly string[];
  /** Rows and columns that stay in view. */
  readonly frozen: { readonly rows: number; readonly columns: number };
}

/** What a file holds of a whole sheet beyond its cells. */
export type BookAside = Pick<WriteSheet, 'pageSetup' | 'headerFooter'> & { readonly zoomScale?: number; readonly rightToLeft?: boolean };

/** What may be typed into ranges, as a file words it; formulas are spelled as typed, without equals sign. */
export interface BookCheck {
  readonly ranges: readonly string[];
  readonly rule: Omit<DataValidation, 'range'>;
}

/** How cells look while something holds, as a file words it; formulas are spelled as typed, without equals sign. */
export interface BookCondition {
  readonly ranges: readonly string[];
  readonly rule: Omit<ConditionalRule, 'range' | 'priority' | 'formula'> & { readonly formulas: readonly string[] };
}

/** One cell that holds or shows something. */
export interface BookCell {
  /** Row and column from 0. */
  readonly row: number;
  readonly column: number;
  /** As a person types it, with its equals sign; null for a plain value. */
  readonly formula: string | null;
  /** The value, or the formula's last one. */
  readonly value: string | number | boolean | null;
  /** True where the value is the code of an error, such as `#N/A`. */
  readonly isError?: boolean;
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
  readonly vertical?: 'top' | 'middle' | 'bottom';
  readonly wrap?: boolean;
  readonly border?: BookBorder;
  /** In degrees as files count them: 1 to 90 climbing, 91 to 180 falling. */
  readonly rotation?: number;
  readonly unseen?: BookUnseen;
}

/** What belongs to the look of a cell and is kept for the file, though the page does not draw it. */
export interface BookUnseen {
  readonly font?: string;
  readonly underline?: 'double' | 'singleAccounting' | 'doubleAccounting';
  readonly script?: 'superscript' | 'subscript';
  readonly indent?: number;
  readonly shrink?: true;
  readonly horizontal?: 'fill' | 'justify' | 'centerContinuous' | 'distributed';
  readonly upright?: true;
}

/** The lines around a cell. */
export type BookBorder = Readonly<Partial<Record<'top' | 'right' | 'bottom' | 'left', BookLine>>>;

/** One of them. */
export interface BookLine {
  readonly style: 'thin' | 'medium' | 'thick' | 'dashed' | 'dotted';
  readonly colour: string;
}
