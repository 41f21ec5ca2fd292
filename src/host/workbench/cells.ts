import type { Range, Spill } from '../../sheet/range';
import type { EngineArgument, EngineCell } from './engine';

/** The engine's codes where sheets at large have others. */
const USUAL_CODES: Readonly<Record<string, string>> = {
  '#REF': '#REF!',
  '#ERROR': '#VALUE!',
  '#BAD_EXPR': '#NAME?',
  '#CYCLE': '#REF!',
};

/** The code of a formula that, directly or by way of others, needs its own result. */
export const CYCLE = '#CYCLE';

/** An error code of the engine as sheets at large write it: `#REF` becomes `#REF!`. */
export function usualCode(code: string): string {
  return USUAL_CODES[code] ?? code;
}

/** True for one cell, false for a matrix or an argument left out. */
export function isCell(argument: EngineArgument): argument is EngineCell {
  return argument !== undefined && !Array.isArray(argument);
}

/**
 * An argument as our functions take it: row by row, blanks null, errors as objects with the usual
 * code. Blank rows at the end are left off, so that a whole column costs what is in it.
 *
 * @param codes the error codes the engine knows; a text that merely begins with `#` is none
 * @returns null for an argument that was left out; else at least one row
 */
export function toRange(argument: EngineArgument, codes: ReadonlySet<string>): Range | null {
  if (argument === undefined) return null;
  if (isCell(argument)) return [[toCell(argument, codes)]];
  const rows = filledRows(argument);
  return Array.from({ length: rows }, (_, row) => argument.map((column) => toCell(column[row], codes)));
}

/** A spilled table as the engine takes it: column by column. */
export function fromSpill(spill: Spill): EngineCell[][] {
  return Array.from(spill[0], (_, column) => spill.map((row) => ({ value: row[column] })));
}

function filledRows(columns: readonly (readonly EngineCell[])[]): number {
  let rows = 1;
  for (const column of columns) {
    let last = column.length;
    while (last > rows && isBlank(column[last - 1])) last--;
    rows = Math.max(rows, last);
  }
  return rows;
}

function isBlank({ value }: EngineCell): boolean {
  return value === null || value === undefined || value === '';
}

function toCell({ value }: EngineCell, codes: ReadonlySet<string>): unknown {
  if (typeof value === 'string' && codes.has(value)) return { type: 'Error', basicValue: usualCode(value) };
  return value ?? null;
}
