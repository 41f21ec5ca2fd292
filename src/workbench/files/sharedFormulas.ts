import type { Cell } from 'hucre';
import { columnLetters, parseCell } from '../../host/address';

/**
 * Files may store a formula that was filled down once, at its first cell, and only mark the others.
 *
 * @param cells the cells of a sheet by `row,column`, both from 0
 * @returns the formula of every marked cell, by the same keys, without equals sign
 */
export function sharedFormulas(cells: ReadonlyMap<string, Cell>): Map<string, string> {
  const first = new Map<number, { readonly row: number; readonly column: number; readonly formula: string }>();
  for (const [key, { formula, formulaType, formulaSharedIndex: index }] of cells) {
    if (formulaType !== 'shared' || index === undefined || formula === undefined || formula === '') continue;
    const [row, column] = key.split(',').map(Number);
    first.set(index, { row, column, formula });
  }
  const formulas = new Map<string, string>();
  for (const [key, { formula, formulaType, formulaSharedIndex: index }] of cells) {
    const master = formulaType === 'shared' && formula === '' && index !== undefined ? first.get(index) : undefined;
    if (master === undefined) continue;
    const [row, column] = key.split(',').map(Number);
    formulas.set(key, shift(master.formula, row - master.row, column - master.column));
  }
  return formulas;
}

/** What must not be taken for a reference: texts and quoted sheet names. */
const NONE = /"(?:[^"]|"")*"|'(?:[^']|'')*'!/u;
/** A cell, and a range of whole columns; neither is the beginning of a name, of a function or of a sheet. */
const CELL = /(?<![\w.])(\$?)([A-Z]{1,3})(\$?)([1-9]\d*)(?![\w.(!])/u;
const COLUMNS = /(?<![\w.])(\$?)([A-Z]{1,3}):(\$?)([A-Z]{1,3})(?![\w.(!])/u;
const PARTS = new RegExp([NONE, CELL, COLUMNS].map(({ source }) => source).join('|'), 'giu');

/** Moves the references of a formula that have no dollar sign. */
function shift(formula: string, rows: number, columns: number): string {
  return formula.replace(PARTS, (whole, ...groups: (string | undefined)[]) => {
    const [fixedColumn, letters, fixedRow, digits, fixedFrom, from, fixedTo, to] = groups;
    if (letters !== undefined && digits !== undefined) {
      const column = moved(letters, fixedColumn === '$' ? 0 : columns);
      const row = Number(digits) + (fixedRow === '$' ? 0 : rows);
      return column === null || row < 1 ? '#REF!' : `${fixedColumn}${column}${fixedRow}${row}`;
    }
    if (from === undefined || to === undefined) return whole;
    const first = moved(from, fixedFrom === '$' ? 0 : columns);
    const last = moved(to, fixedTo === '$' ? 0 : columns);
    return first === null || last === null ? '#REF!' : `${fixedFrom}${first}:${fixedTo}${last}`;
  });
}

function moved(letters: string, columns: number): string | null {
  const column = (parseCell(`${letters}1`)?.column ?? 0) + columns;
  return column < 0 ? null : columnLetters(column);
}
