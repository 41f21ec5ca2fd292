import { formatAddress, formatZone, parseAddress, parseZone } from '../address';
import { ALARM, firstBlankRow, type Block, type DraftCell, type SheetDraft } from '../port';
import { regionsOf, roomBelow } from '../regions';
import { freeSheetName } from '../sheetNames';
import { find, WITH_HEADINGS } from './find';

const HEADING = { fill: '#e3efe9' };
const TITLE = { size: 14, colour: '#1f5a4c' };
/** Points a character takes, about. */
const CHARACTER = 6;

/** Blank cells come as ''. */
export function toValues(values: readonly (readonly unknown[])[]): unknown[][] {
  return values.map((row) => row.map((cell) => (cell === '' ? null : cell)));
}

/** As Excel's `formulas` takes it: a text that begins like a formula is kept text by an apostrophe. */
function toFormula(cell: DraftCell): string | number {
  if (cell === null) return '';
  if (typeof cell === 'object') return cell.formula;
  if (typeof cell === 'number') return cell;
  return cell === '' ? '' : `'${cell}`;
}

function blockOf(range: Excel.Range, name: string | null): Block {
  return { address: blockAddress(range), name, values: toValues(range.values) };
}

/** The address of a range as formulas write it. */
function blockAddress(range: Excel.Range): string {
  const { sheet, cell } = parseAddress(range.address)!;
  return formatAddress({ sheet, cell });
}

/** Reads and writes the tables of a workbook in Excel. */
export class ExcelTables {
  async sheetNames(): Promise<string[]> {
    return Excel.run(async (context) => {
      const { worksheets } = context.workbook;
      worksheets.load('items/name');
      await context.sync();
      return worksheets.items.map(({ name }) => name);
    });
  }

  async selection(): Promise<Block | null> {
    return Excel.run(async (context) => {
      const selected = context.workbook.getSelectedRange().load('cellCount');
      await context.sync();
      const range = selected.cellCount === 1 ? selected.getSurroundingRegion() : selected;
      range.load('address, values');
      await context.sync();
      const block = blockOf(range, null);
      return block.values.every((row) => row.every((cell) => cell === null)) ? null : block;
    });
  }

  async blocks(): Promise<Block[]> {
    return Excel.run(async (context) => {
      const { names, tables, worksheets } = context.workbook;
      names.load('items/name, items/type');
      tables.load('items/name');
      worksheets.load('items/name');
      await context.sync();
      const ranges = [
        ...names.items.filter(({ type }) => type === 'Range').map((item) => ({ name: item.name, range: item.getRangeOrNullObject() })),
        // By its plain name a formula takes a table without its headings.
        ...tables.items.map((table) => ({ name: `${table.name}${WITH_HEADINGS}`, range: table.getRange() })),
      ];
      for (const { range } of ranges) range.load('address, values');
      const used = worksheets.items.map((sheet) => sheet.getUsedRangeOrNullObject(true).load('address, values'));
      await context.sync();
      const named = ranges.filter(({ range }) => !range.isNullObject).map(({ name, range }) => blockOf(range, name));
      const known = new Set(named.map(({ address }) => address));
      const regions = used.filter((range) => !range.isNullObject).flatMap((range) => regionBlocks(blockOf(range, null)));
      return [...named, ...regions.filter(({ address }) => !known.has(address))];
    });
  }

  async read(reference: string): Promise<Block | null> {
    return Excel.run(async (context) => {
      const { range, name } = await find(context, reference);
      if (range === null) return null;
      range.load('address, values');
      await context.sync();
      return blockOf(range, name);
    });
  }

  async write(address: string, cells: readonly (readonly DraftCell[])[]): Promise<void> {
    const parsed = parseAddress(address);
    if (parsed === null || cells.length === 0) return;
    await Excel.run(async (context) => {
      const sheet = context.workbook.worksheets.getItem(parsed.sheet);
      fill(sheet.getRange(parsed.cell), cells);
      await context.sync();
    });
  }

  async appendRow(reference: string, cells: readonly DraftCell[]): Promise<string | null> {
    return Excel.run(async (context) => {
      const { range, table } = await find(context, reference);
      if (range === null) return null;
      range.load('values');
      await context.sync();
      const at = firstBlankRow(toValues(range.values));
      if (at === -1 && table === null) return null;
      if (at === -1) table!.rows.add();
      const start = (at === -1 ? table!.getRange().getLastRow().getCell(0, 0) : range.getCell(at, 0)).load('address');
      fill(start, [cells]);
      await context.sync();
      return blockAddress(start);
    });
  }

  async addSheets(drafts: readonly SheetDraft[]): Promise<string[]> {
    const taken = new Set((await this.sheetNames()).map((name) => name.toLowerCase()));
    return Excel.run(async (context) => {
      const { worksheets, names } = context.workbook;
      names.load('items/name, items/type');
      await context.sync();
      // A name whose cells are gone (#REF!) stands in the way of nothing.
      const wanted = new Set(drafts.flatMap((draft) => (draft.names ?? []).map(({ name }) => name.toLowerCase())));
      const isDead = ({ name, type }: Excel.NamedItem): boolean => type === 'Error' && wanted.has(name.toLowerCase());
      const known = new Set(names.items.filter((item) => !isDead(item)).map(({ name }) => name.toLowerCase()));
      for (const item of names.items.filter(isDead)) item.delete();
      const made = drafts.map((draft) => ({ draft, sheet: worksheets.add(freeSheetName(draft.name, taken)).load('name') }));
      for (const { draft, sheet } of made) {
        for (const { name, cells } of draft.names ?? []) if (!known.has(name.toLowerCase())) names.add(name, sheet.getRange(cells));
      }
      for (const { draft, sheet } of made) {
        if (draft.rows.length > 0) fill(sheet.getRange('A1'), squared(draft.rows));
        dress(sheet, draft);
      }
      await context.sync();
      return made.map(({ sheet }) => sheet.name);
    });
  }
}

/** The last row of a sheet, from 0. */
const LAST_ROW = 1_048_575;

/** The filled regions of a used range. */
function regionBlocks({ address, values }: Block): Block[] {
  const { sheet, cell } = parseAddress(address)!;
  const { top, left } = parseZone(cell)!;
  const zones = regionsOf(values.length, values[0]?.length ?? 0, (row, column) => values[row][column] !== null);
  return zones.map((zone) => {
    const moved = { top: zone.top + top, bottom: zone.bottom + top, left: zone.left + left, right: zone.right + left };
    const rows = values.slice(zone.top, zone.bottom + 1).map((row) => row.slice(zone.left, zone.right + 1));
    const room = roomBelow(zone, zones, LAST_ROW - top);
    return { address: formatAddress({ sheet, cell: formatZone(moved) }), name: null, values: rows, room };
  });
}

function squared(rows: readonly (readonly DraftCell[])[]): DraftCell[][] {
  const width = Math.max(1, ...rows.map((row) => row.length));
  return rows.map((row) => Array.from({ length: width }, (_, c) => row[c] ?? null));
}

function fill(start: Excel.Range, cells: readonly (readonly DraftCell[])[]): void {
  const rows = squared(cells);
  const target = start.getResizedRange(rows.length - 1, rows[0].length - 1);
  target.formulas = rows.map((row) => row.map(toFormula));
}

function dress(sheet: Excel.Worksheet, draft: SheetDraft): void {
  const { rows, headingRows = [], titleRows = [], widths = [], wholes = [], alarms = [] } = draft;
  for (const cell of alarms) {
    const { textComparison } = sheet.getRange(cell).conditionalFormats.add(Excel.ConditionalFormatType.containsText);
    textComparison.format.font.color = '#9c3b12';
    textComparison.format.fill.color = '#fbe9df';
    textComparison.rule = { operator: Excel.ConditionalTextOperator.beginsWith, text: ALARM };
  }
  for (const row of headingRows) {
    const { format } = sheet.getRangeByIndexes(row, 0, 1, Math.max(1, rows[row].length));
    format.font.bold = true;
    format.fill.color = HEADING.fill;
  }
  for (const row of titleRows) {
    const { font } = sheet.getRangeByIndexes(row, 0, 1, 1).format;
    font.bold = true;
    font.size = TITLE.size;
    font.color = TITLE.colour;
  }
  widths.forEach((width, column) => (sheet.getRangeByIndexes(0, column, 1, 1).format.columnWidth = width * CHARACTER));
  for (const { column, from, least } of wholes) {
    const range = sheet.getRangeByIndexes(from, column, 1000, 1);
    range.dataValidation.rule = { wholeNumber: { formula1: least, operator: 'GreaterThanOrEqualTo' } };
    range.dataValidation.errorAlert = {
      showAlert: true,
      style: 'Warning',
      title: 'Whole number',
      message: `A whole number from ${least} on is expected here.`,
    };
  }
}
