import { columnLetters, formatAddress } from '../../host/address';
import type { BookName } from './book';

/** A table of a file, as formulas may name it. */
export interface FileTable {
  readonly name: string;
  readonly sheet: string;
  /** Rows and columns from 0, headings and totals included. */
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly headings: readonly string[];
  readonly hasTotals: boolean;
}

/** Each table under its name, headings included, unless the name is taken. */
export function tableNames(tables: readonly FileTable[], taken: ReadonlySet<string>): BookName[] {
  return tables
    .filter(({ name }) => !taken.has(name.toLowerCase()))
    .map((table) => ({ name: table.name, reference: zone(table, table.top, table.bottom, 0, table.headings.length - 1) }));
}

/**
 * Replaces references by table and column, such as `Pairs[Duty]` or `Pairs[#All]`, by the ranges
 * they stand for: the sheet engine knows no others.
 *
 * @param formula without equals sign
 * @param tables by name in lower case
 * @param row the row of the formula, from 0, for `[@Need]`
 * @returns the formula; what cannot be told stays as it was
 */
export function withoutTables(formula: string, tables: ReadonlyMap<string, FileTable>, row: number): string {
  if (tables.size === 0) return formula;
  return formula.replace(TABLE_REFERENCE, (whole, name: string | undefined, inside: string | undefined) => {
    const table = name === undefined ? undefined : tables.get(name.toLowerCase());
    if (table === undefined) return whole;
    return rangeOf(table, inside === undefined ? '' : inside.slice(1, -1), row) ?? whole;
  });
}

const TABLE_REFERENCE =
  /"(?:[^"]|"")*"|'(?:[^']|'')*'!|(?<![\w.!])([\p{L}_\\][\p{L}\p{N}_.]*)(\[(?:[^[\]']|'.|\[(?:[^[\]']|'.)*\])*\])?(?![\p{L}\p{N}_.(![])/giu;

function rangeOf(table: FileTable, inside: string, row: number): string | null {
  const specifier = /^(@)?\s*(.*)$/su.exec(inside.trim());
  const parts = Array.from((specifier?.[2] ?? '').matchAll(/\[((?:[^[\]']|'.)*)\]\s*(:)?/gu), ([, text, colon]) => ({ text, colon }));
  const whole = parts.length > 0 ? parts : inside === '' ? [] : [{ text: specifier?.[2] ?? '', colon: undefined }];
  const areas = whole.filter(({ text }) => text.startsWith('#')).map(({ text }) => text.toLowerCase());
  const columns = whole.filter(({ text }) => text !== '' && !text.startsWith('#')).map(({ text }) => columnOf(table, text));
  if (columns.includes(-1)) return null;
  const rows = specifier?.[1] === '@' ? { from: row, to: row } : rowsOf(table, areas, row);
  if (rows === null) return null;
  const first = columns.length === 0 ? 0 : Math.min(...columns);
  const last = columns.length === 0 ? table.headings.length - 1 : Math.max(...columns);
  return zone(table, rows.from, rows.to, first, last);
}

function columnOf({ headings }: FileTable, text: string): number {
  const name = text.replace(/'(.)/gu, '$1').trim().toLowerCase();
  return headings.findIndex((heading) => heading.trim().toLowerCase() === name);
}

function rowsOf({ top, bottom, hasTotals }: FileTable, areas: readonly string[], row: number): { from: number; to: number } | null {
  const end = hasTotals ? bottom - 1 : bottom;
  if (areas.length === 0 || areas.join() === '#data') return { from: top + 1, to: end };
  if (areas.includes('#all')) return { from: top, to: bottom };
  if (areas.includes('#this row')) return { from: row, to: row };
  if (areas.includes('#headers')) return { from: top, to: areas.includes('#data') ? end : top };
  if (areas.includes('#totals') && hasTotals) return { from: areas.includes('#data') ? top + 1 : bottom, to: bottom };
  return null;
}

function zone({ sheet, left }: FileTable, from: number, to: number, first: number, last: number): string {
  const start = `$${columnLetters(left + first)}$${from + 1}`;
  const end = `$${columnLetters(left + last)}$${to + 1}`;
  return formatAddress({ sheet, cell: start === end ? start : `${start}:${end}` });
}
