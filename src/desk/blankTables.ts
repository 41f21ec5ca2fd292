import { columnLetters } from '../host/address';
import type { DraftCell, SheetDraft, WorkbookPort } from '../host/port';
import { answerDrafts } from './answers';

/** Rows of a table below its headings. */
const ROOM = 200;

interface Column {
  readonly heading: string;
  readonly meaning: string;
  readonly width: number;
  /** The least whole number, where only whole numbers go in. */
  readonly least?: number;
}

interface Table {
  readonly name: string;
  readonly title: string;
  readonly columns: readonly Column[];
}

const TABLES: readonly Table[] = [
  {
    name: 'Pairs',
    title: 'Who may take what',
    columns: [
      { heading: 'Duty', meaning: 'one row for every duty and person who may take it', width: 26 },
      { heading: 'Person', meaning: '', width: 22 },
      { heading: 'Rank', meaning: '1 = most welcome; may stay blank', width: 8, least: 0 },
    ],
  },
  {
    name: 'People',
    title: 'How much each can take',
    columns: [
      { heading: 'Person', meaning: 'everyone once', width: 22 },
      { heading: 'Maximum', meaning: 'the most duties', width: 11, least: 0 },
      { heading: 'Minimum', meaning: 'the fewest', width: 11, least: 0 },
    ],
  },
  {
    name: 'Duties',
    title: 'What must be covered',
    columns: [
      { heading: 'Duty', meaning: 'every duty once', width: 26 },
      { heading: 'Need', meaning: 'people needed', width: 9, least: 0 },
      { heading: 'Priority', meaning: '1 = most urgent', width: 9, least: 1 },
      { heading: 'Slot', meaning: 'one duty a slot', width: 14 },
      { heading: 'Group', meaning: 'a day, a site', width: 14 },
    ],
  },
  {
    name: 'Rules',
    title: 'Promises and exceptions',
    columns: [
      { heading: 'Rule', meaning: 'Fixed, Barred, Away, Limit', width: 12 },
      { heading: 'Duty', meaning: 'or a slot or group, for Limit', width: 24 },
      { heading: 'Person', meaning: '', width: 22 },
      { heading: 'Value', meaning: 'a number, or when someone is Away', width: 22 },
    ],
  },
];

/** Titles, meanings and headings come first. */
const HEADING_ROW = 2;

/**
 * Empty, labelled input tables, with the answers to them ready on further sheets.
 *
 * @returns the sheets, the first with the tables
 */
export async function blankDrafts(port: WorkbookPort): Promise<SheetDraft[]> {
  const inputs = await tableSheet(port, 'Inputs', TABLES);
  return [inputs, ...answerDrafts(inputs.names.map(({ name }) => name), { rows: 2 * ROOM, people: ROOM / 2, isLarge: false })];
}

/** An empty table for rules alone, for a case that has none: decisions need a place to stand in. */
export async function blankRules(port: WorkbookPort): Promise<SheetDraft & { readonly reference: string }> {
  const draft = await tableSheet(port, 'Rules', TABLES.filter(({ name }) => name === 'Rules'));
  return { ...draft, reference: draft.names[0].name };
}

/** Tables beside each other on a sheet, each with a name of its own. */
async function tableSheet(port: WorkbookPort, sheet: string, tables: readonly Table[]): Promise<SheetDraft & Required<Pick<SheetDraft, 'names'>>> {
  const rows: DraftCell[][] = [[], [], []];
  const widths: number[] = [];
  const names: { name: string; cells: string }[] = [];
  const wholes: { column: number; from: number; least: number }[] = [];
  for (const { name, title, columns } of tables) {
    const left = widths.length;
    rows[0][left] = title;
    columns.forEach(({ heading, meaning, width, least }, c) => {
      rows[1][left + c] = meaning === '' ? null : meaning;
      rows[HEADING_ROW][left + c] = heading;
      widths.push(width);
      if (least !== undefined) wholes.push({ column: left + c, from: HEADING_ROW + 1, least });
    });
    const last = columnLetters(left + columns.length - 1);
    names.push({ name: await freeName(port, name), cells: `${columnLetters(left)}${HEADING_ROW + 1}:${last}${HEADING_ROW + 1 + ROOM}` });
    widths.push(3);
  }
  const squared = rows.map((row) => Array.from({ length: widths.length - 1 }, (_, i) => row[i] ?? null));
  return { name: sheet, rows: squared, titleRows: [0], headingRows: [HEADING_ROW], widths, names, wholes };
}

async function freeName(port: WorkbookPort, name: string): Promise<string> {
  for (let number = 1; ; number++) {
    const candidate = number === 1 ? name : `${name}${number}`;
    if ((await port.read(candidate)) === null) return candidate;
  }
}
