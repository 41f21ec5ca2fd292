import type { Spill } from './range';

type Cell = string | number | boolean;

/** Excel's limits: columns of a sheet, characters of a cell. */
export const SHEET_COLUMNS = 16_384;
const CELL_CHARACTERS = 32_767;

/**
 * A table under its headings. Where there is nothing to list, the row under the headings says so in
 * its first column.
 *
 * @param rows each as wide as the headings or narrower; what is missing is blank
 * @param nothing what the only row says where there are none
 */
export function writeTable(headings: readonly string[], rows: readonly (readonly Cell[])[], nothing: string): Spill {
  const body = rows.length === 0 ? [[nothing]] : rows;
  return [headings, ...body].map((row) =>
    Array.from(headings, (_, column) => {
      const cell = row[column] ?? '';
      return typeof cell === 'string' ? cutText(cell) : cell;
    }),
  );
}

/** A text that is no longer than a cell can hold. */
export function cutText(text: string): string {
  return text.length <= CELL_CHARACTERS ? text : `${text.slice(0, CELL_CHARACTERS - 1)}…`;
}

/** Names in one cell, separated by `; `; the end of a long list is only counted. */
export function joinNames(names: readonly string[], most = Infinity): string {
  const shown: string[] = [];
  let length = 0;
  for (const name of names) {
    length += name.length + 2;
    if (shown.length === most || length > CELL_CHARACTERS - 40) break;
    shown.push(name);
  }
  const rest = names.length - shown.length;
  return rest === 0 ? shown.join('; ') : `${shown.join('; ')}; … and ${rest} more`;
}
