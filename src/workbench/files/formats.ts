import { isDateFormat } from 'hucre';
import type { Engine } from '../../host/workbench/engine';
import type { Book } from './book';

/**
 * The engine knows fewer number formats than files hold, and shows an error for a cell whose format
 * it does not know. So each format is given to it as near as it can show it, and put back on saving.
 */
export interface FormatTable {
  /** By the file's format; null where the engine can show nothing like it. */
  readonly toEngine: ReadonlyMap<string, string | null>;
  /** By the engine's format. */
  readonly toFile: ReadonlyMap<string, string>;
}

/** All formats of a book. */
export function formatTable(book: Book, engine: Engine): FormatTable {
  const toEngine = new Map<string, string | null>();
  const toFile = new Map<string, string>();
  for (const { cells } of book.sheets) {
    for (const { format } of cells) {
      if (format === null || toEngine.has(format)) continue;
      const shown = nearest(format, engine);
      toEngine.set(format, shown);
      // Where several formats look alike here, the one that the engine shows unchanged is put back, or else the first.
      if (shown !== null && (shown === format || !toFile.has(shown))) toFile.set(shown, format);
    }
  }
  return { toEngine, toFile };
}

function nearest(format: string, engine: Engine): string | null {
  const isDate = isDateFormat(format);
  const candidates = [format, plainer(format, isDate), ...(isDate ? ['dd/mm/yyyy hh:mm'] : [])];
  return candidates.find((candidate) => candidate !== '' && isShown(candidate, engine)) ?? null;
}

function isShown(format: string, { helpers, constants }: Engine): boolean {
  try {
    for (const value of [1234.5, -1, 0]) helpers.formatValue(value, { format, locale: constants.DEFAULT_LOCALE });
    return true;
  } catch {
    return false;
  }
}

/** The format without colours, conditions and spacing, its times spelt as the engine spells them. */
function plainer(format: string, isDate: boolean): string {
  const parts = format.split(/("[^"]*"|\\.)/u).map((part, i) => {
    if (i % 2 === 1) return part;
    const plain = part
      .replace(/\[\$([^\]-]*)(?:-[^\]]*)?\]/gu, (_, symbol: string) => (symbol === '' ? '' : `[$${symbol}]`))
      .replace(/\[h+\]/giu, 'hhhh')
      .replace(/\[(?!\$)[^\]]*\]/gu, '')
      .replace(/[_*]./gu, '')
      .replaceAll('?', '');
    if (!isDate) return plain;
    return plain
      .replace(/AM\/PM|A\/P/giu, 'a')
      .replace(/(?<!h)h(?!h)/giu, 'hh')
      .replace(/(?<!s)s(?!s)/giu, 'ss')
      .replace(/\.0+/gu, '');
  });
  const plain = parts.join('');
  return isDate ? (plain.split(';')[0] ?? '').trim() : plain;
}
