/**
 * The part of the sheet engine that the workbench uses, typed here as we need it. The engine itself
 * is a separate file beside the page (@odoo/o-spreadsheet, LGPL-3.0-or-later), loaded as it was
 * published; this is all that our code knows of it.
 */

import type { EngineCondition } from './alarms';
import type { EngineCheck } from './checks';

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
  /** What was typed, for what is no formula. */
  readonly content?: string;
  readonly compiledFormula?: { toFormulaString(getters: EngineGetters): string };
}

/** What a cell comes to; `type` is 'error' for errors, whose code is the value. */
export interface EngineEvaluated {
  readonly type: string;
  readonly value: string | number | boolean | null;
  readonly message?: string;
  /** Where a text was taken for a link. */
  readonly link?: object;
}

/** What a model tells. */
export interface EngineGetters {
  getActiveSheetId(): string;
  getSelectedZones(): readonly EngineZone[];
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
  /** What a formula would come to in a cell. */
  evaluateFormulaResult(sheetId: string, formula: string, origin: EnginePosition): EngineCell | readonly (readonly EngineCell[])[];
  getRangeFromZone(sheetId: string, zone: EngineZone): unknown;
  getRangeDataFromZone(sheetId: string, zone: EngineZone): unknown;
  getLocale(): EngineLocale;
  getNamedRanges(): readonly { readonly name: string; readonly range: { readonly sheetId: string; readonly zone: EngineZone } }[];
}

/** A change, or something asked of the page; only the former can be undone. */
export interface EngineCommand {
  readonly type: string;
}

/** A workbook in the engine. */
export interface EngineModel {
  readonly getters: EngineGetters;
  readonly selection: { selectCell(col: number, row: number): unknown };
  dispatch(command: string, payload?: object): { readonly isSuccessful: boolean };
  exportData(): EngineData;
  on(type: 'command-dispatched', owner: object, callback: (command: EngineCommand) => void): void;
  /** Whatever may change what is drawn, a selection too. */
  on(type: 'update', owner: object, callback: () => void): void;
  off(type: 'command-dispatched' | 'update', owner: object): void;
}

/** A workbook as the engine loads and exports it. */
export interface EngineData {
  readonly version: string;
  readonly sheets: readonly EngineSheet[];
  readonly styles: Readonly<Record<string, EngineStyle>>;
  readonly formats: Readonly<Record<string, string>>;
  readonly borders: Readonly<Record<string, EngineBorder>>;
  readonly settings: { readonly locale: EngineLocale; readonly disableCellAnimations?: boolean };
  readonly namedRanges: Readonly<Record<string, string>>;
}

/** How numbers and dates are typed and shown. */
export interface EngineLocale {
  readonly name: string;
  readonly code: string;
  readonly thousandsSeparator: string;
  readonly decimalSeparator: string;
  /** 1 is Monday. */
  readonly weekStart: number;
  readonly dateFormat: string;
  readonly timeFormat: string;
  readonly formulaArgSeparator: string;
}

/** One sheet of its data. */
export interface EngineSheet {
  readonly id: string;
  readonly name: string;
  readonly colNumber: number;
  readonly rowNumber: number;
  readonly cells: Readonly<Record<string, string>>;
  /** Numbers of styles, formats and borders, by the zone they hold in, such as `A1:B2`. */
  readonly styles: Readonly<Record<string, number>>;
  readonly formats: Readonly<Record<string, number>>;
  readonly borders: Readonly<Record<string, number>>;
  readonly cols: Readonly<Record<string, EngineHeader>>;
  readonly rows: Readonly<Record<string, EngineHeader>>;
  readonly merges: readonly string[];
  readonly conditionalFormats?: readonly EngineCondition[];
  readonly dataValidationRules?: readonly EngineCheck[];
  readonly isVisible: boolean;
  readonly areGridLinesVisible?: boolean;
  readonly color?: string;
  readonly panes?: { readonly xSplit: number; readonly ySplit: number };
}

/** A column or a row: its size in pixels. */
export interface EngineHeader {
  readonly size?: number;
  readonly isHidden?: boolean;
}

/** The lines around a cell. */
export type EngineBorder = Readonly<Partial<Record<'top' | 'right' | 'bottom' | 'left', EngineLine>>>;

/** One of them. */
export interface EngineLine {
  readonly style: 'thin' | 'medium' | 'thick' | 'dashed' | 'dotted';
  readonly color: string;
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
  readonly verticalAlign?: 'top' | 'middle' | 'bottom';
  readonly wrapping?: 'overflow' | 'wrap' | 'clip';
  /** Of slanted text, in radians; negative where it climbs. */
  readonly rotation?: number;
  /** What the engine keeps without looking at it. */
  readonly unseen?: object;
}

/** The engine as its file defines it. */
export interface Engine {
  readonly Model: new (data: object, config?: object) => EngineModel;
  readonly Spreadsheet: unknown;
  readonly CompiledFormula: { IsBadExpression(formula: string): boolean };
  /** What a part of the engine is made from that handles commands. */
  readonly UIPlugin: new (...args: never[]) => { dispatch(command: string, payload: object): unknown };
  readonly registries: {
    readonly functionRegistry: {
      add(name: string, fn: EngineFunction): void;
      replace(name: string, fn: EngineFunction): void;
      contains(name: string): boolean;
    };
    readonly featurePluginRegistry: { replace(name: string, plugin: unknown): void };
    readonly errorTypes: Set<string>;
    readonly cellMenuRegistry: EngineRegistry;
    readonly rowMenuRegistry: EngineRegistry;
    readonly colMenuRegistry: EngineRegistry;
  };
  readonly helpers: {
    isNumber(text: string, locale: object): boolean;
    isDateTime(text: string, locale: object): boolean;
    /** Throws where the format is unknown. */
    formatValue(value: number, how: { format: string; locale: object }): string;
  };
  readonly constants: { readonly DEFAULT_LOCALE: EngineLocale };
  isCoreCommand(command: EngineCommand): boolean;
}

/** A list of things by name. */
export interface EngineRegistry {
  getKeys(): Iterable<string>;
  remove(name: string): void;
}
