import type { Sheet, Workbook } from 'hucre';
import { isWhole } from './readRules';
import { zipEntries } from './zip';

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
  ['sheet protection', ({ protection }) => protection?.sheet === true],
  ['sparklines', ({ sparklines }) => holds(sparklines)],
  ['text boxes', ({ textBoxes }) => holds(textBoxes)],
  ['print areas and repeated headings', ({ pageSetup }) => (pageSetup?.printArea ?? pageSetup?.printTitlesRow ?? pageSetup?.printTitlesColumn) !== undefined],
  ['page breaks', ({ rowBreaks, colBreaks }) => holds(rowBreaks) || holds(colBreaks)],
  ['grouped rows and columns', (sheet) => isGrouped(sheet)],
  ['check boxes', (sheet) => someCell(sheet, ({ checkbox }) => checkbox === true)],
  ['links', (sheet) => someCell(sheet, ({ hyperlink }) => hyperlink !== undefined)],
  ['text formatted inside a cell', (sheet) => someCell(sheet, ({ richText }) => (richText?.length ?? 0) > 1)],
  ['fine kinds of borders (double, dash-dot and diagonal lines)', (sheet) => someCell(sheet, ({ style }) => hasFineBorder(style))],
  ['patterned fills', (sheet) => someCell(sheet, ({ style }) => isPatterned(style))],
];

/** The same for rules that the file library passes over: their tag, and how many of them it read. */
const RULES: readonly (readonly [string, string, (sheet: Sheet) => number])[] = [
  ['some conditional formats', 'cfRule', ({ conditionalRules = [] }) => conditionalRules.filter(isWhole).length],
  ['some input checks (data validation)', 'dataValidation', ({ dataValidations = [] }) => dataValidations.length],
];
/** A column or a row with a style of its own. */
const WHOLE_LOOK = /<(?:col\s[^>]*\bstyle="[1-9]|row\s[^>]*\bcustomFormat="(?:1|true))/u;
const SHEET = /^xl\/worksheets\/[^/]+\.xml$/iu;

/** @returns in words, what of a file is not in its book */
export async function lostParts(bytes: Uint8Array, workbook: Workbook): Promise<string[]> {
  const entries = zipEntries(bytes);
  const parts = PARTS.filter(([pattern]) => entries.some(({ name }) => pattern.test(name)));
  const features = FEATURES.filter(([, isThere]) => workbook.sheets.some(isThere));
  const texts = await Promise.all(entries.filter(({ name }) => SHEET.test(name)).map(({ text }) => text()));
  const rules = RULES.filter(([, tag, count]) => tagsIn(texts, tag) > sum(workbook.sheets.map(count)));
  const looks = texts.some((text) => WHOLE_LOOK.test(text)) ? ['the look of blank cells that whole columns or rows have'] : [];
  const locks = workbook.workbookProtection === undefined ? [] : ['protection of the workbook'];
  return [...parts.map(([, words]) => words), ...[...features, ...rules].map(([words]) => words), ...looks, ...locks];
}

/** How often an element begins, under whatever prefix: newer kinds of rules are stored apart under their own. */
function tagsIn(texts: readonly string[], tag: string): number {
  return sum(texts.map((text) => text.match(new RegExp(`<(?:\\w+:)?${tag}[\\s/>]`, 'gu'))?.length ?? 0));
}

function sum(numbers: readonly number[]): number {
  return numbers.reduce((total, number) => total + number, 0);
}

function holds(list: readonly unknown[] | undefined): boolean {
  return list !== undefined && list.length > 0;
}

type FileCell = NonNullable<Sheet['cells']> extends Map<string, infer C> ? C : never;

function someCell({ cells }: Sheet, test: (cell: FileCell) => boolean): boolean {
  for (const cell of cells?.values() ?? []) if (test(cell)) return true;
  return false;
}

function isGrouped({ columns = [], rowDefs }: Sheet): boolean {
  return [...columns, ...(rowDefs?.values() ?? [])].some((header) => (header?.outlineLevel ?? 0) > 0);
}

function hasFineBorder(style: FileCell['style']): boolean {
  const { diagonal, ...sides } = style?.border ?? {};
  const isPlain = (line: unknown): boolean =>
    typeof line !== 'object' || line === null || !('style' in line) || ['thin', 'medium', 'thick', 'dotted', 'dashed'].includes(String(line.style));
  return diagonal !== undefined || !Object.values(sides).every(isPlain);
}

function isPatterned(style: FileCell['style']): boolean {
  const fill = style?.fill;
  return fill !== undefined && (fill.type === 'gradient' || !['none', 'solid', 'gray125'].includes(fill.pattern));
}
