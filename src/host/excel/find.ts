import { formatZone, parseAddress, parseColumns, parseReference, parseZone } from '../address';

/** As formulas name a table with its headings; by its plain name they take it without. */
export const WITH_HEADINGS = '[#All]';

/** What a reference stands for. */
interface Found {
  readonly range: Excel.Range | null;
  readonly name: string | null;
  readonly table: Excel.Table | null;
}

/** Looks for what a formula names: cells, whole columns, a named range or a table. */
export async function find(context: Excel.RequestContext, reference: string): Promise<Found> {
  const { names, tables, worksheets } = context.workbook;
  const name = reference.trim();
  const parsed = parseAddress(name);
  const nothing: Found = { range: null, name: null, table: null };
  if (parsed !== null) {
    const sheet = worksheets.getItemOrNullObject(parsed.sheet).load('isNullObject');
    await context.sync();
    if (sheet.isNullObject) return nothing;
    if (parseZone(parsed.cell) !== null) return { ...nothing, range: sheet.getRange(parsed.cell) };
    if (parseColumns(parsed.cell) === null) return nothing;
    const used = sheet.getUsedRangeOrNullObject(true).load('rowIndex, rowCount');
    await context.sync();
    const zone = parseReference(parsed.cell, used.isNullObject ? 0 : used.rowIndex + used.rowCount)!;
    return { ...nothing, range: sheet.getRange(formatZone(zone)) };
  }
  const isWhole = name.endsWith(WITH_HEADINGS);
  const plain = isWhole ? name.slice(0, -WITH_HEADINGS.length) : name;
  const item = names.getItemOrNullObject(plain).load('isNullObject, type');
  const table = tables.getItemOrNullObject(plain).load('isNullObject');
  await context.sync();
  if (!table.isNullObject) return { range: isWhole ? table.getRange() : table.getDataBodyRange(), name, table };
  return { ...nothing, range: isWhole || item.isNullObject || item.type !== 'Range' ? null : item.getRange(), name };
}
