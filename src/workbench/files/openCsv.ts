import Papa from 'papaparse';
import type { BookCell, BookSheet } from './book';
import { freeSheetName } from '../../host/sheetNames';

/** A number as people write it in such files; "001" and "1,5" stay text. */
const NUMBER = /^-?(0|[1-9]\d{0,14})(\.\d+)?$/u;
const SEPARATORS = [',', ';', '\t', '|'];

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
  const name = freeSheetName(fileName.replace(/\.[^.]*$/u, ''), taken);
  return { name, hidden: false, cells, widths: widthsOf(cells), merges: [], frozen: { rows: 0, columns: 0 } };
}

/** The text of a file: UTF-8, or UTF-16 with its mark, or else what older office programs in the West write. */
export function decodeText(bytes: Uint8Array): string {
  const [first, second] = bytes;
  if (first === 0xff && second === 0xfe) return new TextDecoder('utf-16le').decode(bytes);
  if (first === 0xfe && second === 0xff) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('windows-1252').decode(bytes);
  }
}

/** The separator that occurs most in the first line, quoted parts aside: headings hold few of the others. */
function separatorOf(text: string): string {
  const firstLine = (/^[^\r\n]*/u.exec(text)?.[0] ?? '').replace(/"[^"]*"/gu, '');
  const count = (separator: string): number => firstLine.split(separator).length;
  return SEPARATORS.reduce((best, separator) => (count(separator) > count(best) ? separator : best));
}

/** Columns wide enough for most of what is in them. */
function widthsOf(cells: readonly BookCell[]): Map<number, number> {
  const longest = new Map<number, number>();
  for (const { column, value } of cells) {
    longest.set(column, Math.max(longest.get(column) ?? 0, Math.min(36, String(value).length)));
  }
  return new Map([...longest].map(([column, length]) => [column, Math.max(70, Math.round(length * 7 + 16))]));
}
