import type { Sheet, Workbook } from 'hucre';
import { isAlarm } from './alarms';

/** Parts of a file, by where they lie in it, that the workbench cannot carry over. */
const PARTS: readonly (readonly [RegExp, string])[] = [
  [/vbaProject\.bin$/iu, 'macros'],
  [/^xl\/(charts|chartsheets)\//iu, 'charts'],
  [/^xl\/media\//iu, 'pictures'],
  [/^xl\/diagrams\//iu, 'diagrams'],
  [/^xl\/pivotTables\//iu, 'pivot tables'],
  [/^xl\/(slicers|timelines)\//iu, 'slicers'],
  [/^xl\/(comments|threadedComments)/iu, 'comments and notes'],
  [/^xl\/externalLinks\//iu, 'links to other workbooks'],
  [/^xl\/(connections\.xml|queryTables\/|model\/)/iu, 'data connections'],
  [/^xl\/embeddings\//iu, 'embedded documents'],
  [/^xl\/(ctrlProps|activeX)\//iu, 'buttons and other controls'],
  [/^_xmlsignatures\//iu, 'the digital signature'],
];

/** The same for what the file library reads from the sheets. */
const FEATURES: readonly (readonly [string, (sheet: Sheet) => boolean])[] = [
  ['tables as such (their ranges stay, under their names)', ({ tables }) => holds(tables)],
  ['filters', ({ autoFilter, tables }) => autoFilter !== undefined && !holds(tables)],
  ['conditional formats', ({ conditionalRules }) => holds(conditionalRules?.filter((rule) => !isAlarm(rule)))],
  ['input checks (data validation)', ({ dataValidations }) => holds(dataValidations)],
  ['sheet protection', ({ protection }) => protection?.sheet === true],
  ['sparklines', ({ sparklines }) => holds(sparklines)],
  ['text boxes', ({ textBoxes }) => holds(textBoxes)],
  ['headers and footers', ({ headerFooter }) => headerFooter !== undefined && Object.keys(headerFooter).length > 0],
  ['print areas', ({ pageSetup }) => pageSetup?.printArea !== undefined],
  ['links', (sheet) => someCell(sheet, ({ hyperlink }) => hyperlink !== undefined)],
  ['text formatted inside a cell', (sheet) => someCell(sheet, ({ richText }) => (richText?.length ?? 0) > 1)],
  ['slanted text', (sheet) => someCell(sheet, ({ style }) => (style?.alignment?.textRotation ?? 0) !== 0)],
  ['patterned fills', (sheet) => someCell(sheet, ({ style }) => isPatterned(style))],
];

/** @returns in words, what of a file is not in its book */
export function lostParts(bytes: Uint8Array, workbook: Workbook): string[] {
  const files = fileNames(bytes);
  const parts = PARTS.filter(([pattern]) => files.some((name) => pattern.test(name)));
  const features = FEATURES.filter(([, isThere]) => workbook.sheets.some(isThere));
  return [...parts.map(([, words]) => words), ...features.map(([words]) => words)];
}

function holds(list: readonly unknown[] | undefined): boolean {
  return list !== undefined && list.length > 0;
}

type FileCell = NonNullable<Sheet['cells']> extends Map<string, infer C> ? C : never;

function someCell({ cells }: Sheet, test: (cell: FileCell) => boolean): boolean {
  for (const cell of cells?.values() ?? []) if (test(cell)) return true;
  return false;
}

function isPatterned(style: FileCell['style']): boolean {
  const fill = style?.fill;
  return fill !== undefined && (fill.type === 'gradient' || !['none', 'solid', 'gray125'].includes(fill.pattern));
}

const DIRECTORY_ENTRY = 0x02014b50;
const END_OF_DIRECTORY = 0x06054b50;

/** The names in the directory at the end of a zip file (APPNOTE.TXT, 4.3.12 and 4.3.16). */
function fileNames(bytes: Uint8Array): string[] {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let end = bytes.length - 22;
  while (end >= 0 && view.getUint32(end, true) !== END_OF_DIRECTORY) end--;
  if (end < 0) return [];
  const names: string[] = [];
  let at = view.getUint32(end + 16, true);
  while (at + 46 <= end && view.getUint32(at, true) === DIRECTORY_ENTRY) {
    const length = view.getUint16(at + 28, true);
    names.push(new TextDecoder().decode(bytes.subarray(at + 46, at + 46 + length)));
    at += 46 + length + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  return names;
}
