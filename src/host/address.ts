import type { Zone } from './regions';

/** A cell address taken apart. */
export interface CellAddress {
  readonly sheet: string;
  /** The cell as `B4`, without dollar signs. */
  readonly cell: string;
}

const QUOTED = /^'((?:[^']|'')+)'!(.+)$/u;
const PLAIN_SHEET = /^[\p{L}_][\p{L}\p{N}_.]*$/u;
const CELL_LIKE = /^([a-z]{1,3}\d+|r\d*c\d*)$/iu;

/** Takes `Sheet!B4` or `'My sheet'!B4` apart; null for anything else. */
export function parseAddress(address: string): CellAddress | null {
  const quoted = QUOTED.exec(address);
  if (quoted !== null) return { sheet: quoted[1].replaceAll("''", "'"), cell: plainCell(quoted[2]) };
  const at = address.lastIndexOf('!');
  return at <= 0 ? null : { sheet: address.slice(0, at), cell: plainCell(address.slice(at + 1)) };
}

/** Writes an address as a formula would, the sheet name quoted where it must be. */
export function formatAddress({ sheet, cell }: CellAddress): string {
  const plain = PLAIN_SHEET.test(sheet) && !CELL_LIKE.test(sheet);
  return `${plain ? sheet : `'${sheet.replaceAll("'", "''")}'`}!${cell}`;
}

/** The letters of a column: 0 is A. */
export function columnLetters(column: number): string {
  let letters = '';
  for (let rest = column + 1; rest > 0; rest = Math.floor((rest - 1) / 26)) {
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  }
  return letters;
}

/** Column and row of a cell such as `B4`, both from 0; null where it is none. */
export function parseCell(cell: string): { readonly column: number; readonly row: number } | null {
  const match = /^([A-Z]{1,3})([1-9]\d*)$/iu.exec(cell);
  if (match === null) return null;
  const column = Array.from(match[1].toUpperCase()).reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0);
  return { column: column - 1, row: Number(match[2]) - 1 };
}

/** A rectangle such as `A1:D20` or one cell, ends included, from 0; null where it is none. */
export function parseZone(cells: string): Zone | null {
  const [from, to = from] = cells.split(':').map(parseCell);
  if (from === null || to === null || cells.split(':').length > 2) return null;
  return {
    top: Math.min(from.row, to.row),
    left: Math.min(from.column, to.column),
    bottom: Math.max(from.row, to.row),
    right: Math.max(from.column, to.column),
  };
}

/** The columns of a reference such as `A:C` or `$A:$C`, from 0; null where it is none. */
export function parseColumns(cells: string): { readonly left: number; readonly right: number } | null {
  const match = /^\$?([A-Z]{1,3}):\$?([A-Z]{1,3})$/iu.exec(cells);
  const [from, to] = (match?.slice(1) ?? []).map((letters) => parseCell(`${letters}1`)!.column);
  return match === null ? null : { left: Math.min(from, to), right: Math.max(from, to) };
}

/** A rectangle, or whole columns down to the row `last` from 0; null where it is neither. */
export function parseReference(cells: string, last: number): Zone | null {
  const columns = parseColumns(cells);
  return columns === null ? parseZone(cells) : { top: 0, bottom: last, ...columns };
}

/** The same written again; one cell without a colon. */
export function formatZone({ top, left, bottom, right }: Zone): string {
  const from = `${columnLetters(left)}${top + 1}`;
  return top === bottom && left === right ? from : `${from}:${columnLetters(right)}${bottom + 1}`;
}

function plainCell(cell: string): string {
  return cell.replaceAll('$', '');
}
