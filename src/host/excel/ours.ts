import type { Range } from '../../sheet/range';
import { columnLetters, formatAddress, parseAddress, parseZone } from '../address';
import { callsUs, type OurCell } from '../port';
import { toValues } from './tables';

/** The formula of a cell, or null. A text that begins with `=` is told as its own formula; no formula shows itself. */
export function formulaIn(content: unknown, value: unknown): string | null {
  return typeof content === 'string' && content.startsWith('=') && content !== value ? content : null;
}

/** Every cell of the workbook with a formula of ours. */
export async function ourCells(): Promise<OurCell[]> {
  if (!Office.context.requirements.isSetSupported('ExcelApi', '1.9')) return oursAmong(usedRanges);
  // Cells of a kind are not told of sheets that are protected: then all that is used is looked through.
  return oursAmong(formulaRanges).catch(() => oursAmong(usedRanges));
}

async function oursAmong(find: (context: Excel.RequestContext) => Promise<Excel.Range[]>): Promise<OurCell[]> {
  return Excel.run(async (context) => {
    const ranges = await find(context);
    for (const range of ranges) range.load('address, formulas, values');
    await context.sync();
    return ranges.flatMap((range) => {
      const { sheet, cell } = parseAddress(range.address)!;
      const { top, left } = parseZone(cell)!;
      return (range.formulas as unknown[][]).flatMap((row, r) =>
        row.flatMap((content, c): OurCell[] => {
          const value: unknown = range.values[r][c];
          const formula = formulaIn(content, value);
          if (formula === null || !callsUs(formula)) return [];
          const address = formatAddress({ sheet, cell: `${columnLetters(left + c)}${top + r + 1}` });
          return [{ address, formula, value: value === '' ? null : value }];
        }),
      );
    });
  });
}

/** All that is used, sheet by sheet. */
async function usedRanges(context: Excel.RequestContext): Promise<Excel.Range[]> {
  const { worksheets } = context.workbook;
  worksheets.load('items/name');
  await context.sync();
  const used = worksheets.items.map((sheet) => sheet.getUsedRangeOrNullObject().load('isNullObject'));
  await context.sync();
  return used.filter(({ isNullObject }) => !isNullObject);
}

/** Only the cells that hold formulas. */
async function formulaRanges(context: Excel.RequestContext): Promise<Excel.Range[]> {
  const used = await usedRanges(context);
  const found = used.map((range) => range.getSpecialCellsOrNullObject(Excel.SpecialCellType.formulas).load('isNullObject'));
  await context.sync();
  const areas = found.filter(({ isNullObject }) => !isNullObject).map((range) => range.areas.load('items/address'));
  await context.sync();
  return areas.flatMap(({ items }) => items);
}

/** What formulas show with all they spill over. */
export async function shownBy(addresses: readonly string[]): Promise<Range[]> {
  return Excel.run(async (context) => {
    const knowsSpills = Office.context.requirements.isSetSupported('ExcelApi', '1.12');
    const loaded = addresses.map((address) => {
      const { sheet, cell } = parseAddress(address)!;
      const range = context.workbook.worksheets.getItem(sheet).getRange(cell).load('values');
      return { range, spill: knowsSpills ? range.getSpillingToRangeOrNullObject().load('values') : null };
    });
    await context.sync();
    return loaded.map(({ range, spill }) => toValues(spill === null || spill.isNullObject ? range.values : spill.values));
  });
}
