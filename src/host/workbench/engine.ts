/**
 * The part of the sheet engine that the workbench uses, typed here as we need it. The engine itself
 * is a separate file beside the page (@odoo/o-spreadsheet, LGPL-3.0-or-later), loaded as it was
 * published; this is all that our code knows of it.
 */

/** A cell as functions get and give it. */
export interface EngineCell {
  readonly value: unknown;
  readonly message?: string;
  readonly format?: string;
  readonly position?: EnginePosition;
}

/** A cell: column and row from 0. */
export interface EnginePosition {
  readonly sheetId: string;
  readonly col: number;
  readonly row: number;
}

/** A rectangle of cells, both ends included, from 0. */
export interface EngineZone {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** An argument of a function: a column-major matrix, one cell, or undefined where it was left out. */
export type EngineArgument = readonly (readonly EngineCell[])[] | EngineCell | undefined;

/** What a function sees as `this`. */
export interface EngineContext {
  readonly getters: EngineGetters;
  readonly __originCellPosition?: EnginePosition;
  readonly __originSheetId: string;
  updateDependencies?(position: EnginePosition): void;
  addDependencies?(position: EnginePosition, ranges: readonly unknown[]): void;
  getFormulaResult(position: EnginePosition): EngineCell;
}

/** A function as the engine registers it. */
export interface EngineFunction {
  readonly description: string;
  readonly args: readonly {
    readonly name: string;
    readonly description: string;
    readonly type: readonly string[];
    readonly acceptMatrix?: boolean;
    readonly acceptErrors?: boolean;
    readonly optional?: boolean;
  }[];
  readonly compute: (this: EngineContext, ...args: EngineArgument[]) => unknown;
  readonly hidden?: boolean;
}

/** What is typed in a cell. */
export interface EngineContent {
  readonly id: number;
  readonly isFormula: boolean;
  readonly compiledFormula?: { toFormulaString(getters: EngineGetters): string };
}

/** What a cell comes to; `type` is 'error' for errors, whose code is the value. */
export interface EngineEvaluated {
  readonly type: string;
  readonly value: string | number | boolean | null;
  readonly message?: string;
}

/** What a model tells. */
export interface EngineGetters {
  getActiveSheetId(): string;
  getActivePosition(): EnginePosition;
  getSheetIds(): readonly string[];
  getSheetName(sheetId: string): string;
  getSheetIdByName(name: string): string | undefined;
  isSheetVisible(sheetId: string): boolean;
  getNumberCols(sheetId: string): number;
  getNumberRows(sheetId: string): number;
  getCells(sheetId: string): readonly EngineContent[];
  getCellPosition(id: number): EnginePosition;
  getCell(position: EnginePosition): EngineContent | undefined;
  getEvaluatedCell(position: EnginePosition): EngineEvaluated;
  getSpreadZone(position: EnginePosition): EngineZone | undefined;
  getRangeFromZone(sheetId: string, zone: EngineZone): unknown;
}

/** A workbook in the engine. */
export interface EngineModel {
  readonly getters: EngineGetters;
  readonly selection: { selectCell(col: number, row: number): unknown };
  dispatch(command: string, payload?: object): { readonly isSuccessful: boolean };
  exportData(): EngineData;
  on(type: 'update', owner: object, callback: () => void): void;
  off(type: 'update', owner: object): void;
}

/** A workbook as the engine loads and exports it. */
export interface EngineData {
  readonly version: string;
  readonly sheets: readonly EngineSheet[];
  readonly styles: Readonly<Record<string, EngineStyle>>;
  readonly formats: Readonly<Record<string, string>>;
  readonly namedRanges: Readonly<Record<string, string>>;
}

/** One sheet of its data. */
export interface EngineSheet {
  readonly id: string;
  readonly name: string;
  readonly colNumber: number;
  readonly rowNumber: number;
  readonly cells: Readonly<Record<string, string>>;
  /** Numbers of styles and formats, by the zone they hold in, such as `A1:B2`. */
  readonly styles: Readonly<Record<string, number>>;
  readonly formats: Readonly<Record<string, number>>;
  readonly cols: Readonly<Record<string, { readonly size?: number }>>;
  readonly merges: readonly string[];
  readonly isVisible: boolean;
  readonly panes?: { readonly xSplit: number; readonly ySplit: number };
}

/** How a cell looks. */
export interface EngineStyle {
  readonly bold?: boolean;
  readonly italic?: boolean;
  readonly underline?: boolean;
  readonly strikethrough?: boolean;
  readonly textColor?: string;
  readonly fillColor?: string;
  readonly fontSize?: number;
  readonly align?: 'left' | 'center' | 'right';
  readonly wrapping?: 'overflow' | 'wrap' | 'clip';
}

/** The engine as its file defines it. */
export interface Engine {
  readonly Model: new (data: object, config?: object) => EngineModel;
  readonly Spreadsheet: unknown;
  readonly registries: {
    readonly functionRegistry: {
      add(name: string, fn: EngineFunction): void;
      replace(name: string, fn: EngineFunction): void;
    };
    readonly errorTypes: Set<string>;
  };
  readonly helpers: {
    isNumber(text: string, locale: object): boolean;
    isDateTime(text: string, locale: object): boolean;
  };
  readonly constants: { readonly DEFAULT_LOCALE: object };
}
