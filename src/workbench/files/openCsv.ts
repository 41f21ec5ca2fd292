import Papa from 'papaparse';
import type { BookCell, BookSheet } from './book';

/** A number as people write it in such files; "001" and "1,5" stay text. */
const NUMBER = /^-?(0|[1-9]\d{0,14})(\.\d+)?$/u;

/** The longest name a sheet may have, and what it may not hold. */
const LONGEST_NAME = 31;
const FORBIDDEN = /[[\]:*?/\\]/gu;

/**
 * Reads a .csv or .tsv file as a sheet: separators and quotes are recognised, a byte order mark and
 * line ends of either kind are dropped.
 *
 * @param taken names of sheets that are there already, in lower case; the new one is added
 */
export function openCsv(fileName: string, text: string, taken: Set<string>): BookSheet {
  const plain = text.replace(/^\uFEFF/u, '');
  const { data } = Papa.parse<string[]>(plain, { skipEmptyLines: false, delimiter: separatorOf(plain) });
  const cells: BookCell[] = [];
  data.forEach((values, row) => {
    values.forEach((value, column) => {
      if (value === '') return;
      cells.push({ row, column, formula: null, value: NUMBER.test(value) ? Number(value) : value, style: null, format: null });
    });
  });
  return { name: sheetName(fileName, taken), hidden: false, cells, widths: widthsOf(cells), merges: [], frozen: { rows: 0, columns: 0 } };
}

/** The separator that occurs most in the first line, quoted parts aside: headings hold few of the others. */
function separatorOf(text: string): string {
  const firstLine = (/^[^\r\n]*/u.exec(text)?.[0] ?? '').replace(/"[^"]*"/gu, '');
  const count = (separator: string): number => firstLine.split(separator).length;
  return [',', ';', '\t', '|'].reduce((best, separator) => (count(separator) > count(best) ? separator : best));
}

/** The file's name without its ending, cut and numbered until it is a free sheet name. */
function sheetName(fileName: string, taken: Set<string>): string {
  const base = fileName.replace(/\.[^.]*$/u, '').replace(FORBIDDEN, ' ').replace(/^'+|'+$/gu, '').trim() || 'Sheet';
  for (let number = 1; ; number++) {
    const ending = number === 1 ? '' : ` ${number}`;
    const name = base.slice(0, LONGEST_NAME - ending.length) + ending;
    if (taken.has(name.toLowerCase())) continue;
    taken.add(name.toLowerCase());
    return name;
  }
}

/** Columns wide enough for most of what is in them. */
function widthsOf(cells: readonly BookCell[]): Map<number, number> {
  const longest = new Map<number, number>();
  for (const { column, value } of cells) {
    longest.set(column, Math.max(longest.get(column) ?? 0, Math.min(36, String(value).length)));
  }
  return new Map([...longest].map(([column, length]) => [column, Math.max(70, Math.round(length * 7 + 16))]));
}
