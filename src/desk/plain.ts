import { formatAddress, parseAddress, parseZone, formatZone } from '../host/address';
import type { DraftCell, OurCell, WorkbookPort } from '../host/port';

/** The sheet that remembers which formulas were made plain. */
const KEPT = 'Formulas kept';
const HEADINGS = ['Cell', 'Formula', 'Rows', 'Columns'];

/**
 * Replaces the formulas of ours on a sheet by what they show, and keeps them on a sheet of their own.
 * @returns how many were replaced
 */
export async function makePlain(port: WorkbookPort, sheet: string): Promise<number> {
  const cells = (await port.ourCells()).filter(({ address }) => parseAddress(address)?.sheet === sheet);
  if (cells.length === 0) return 0;
  const rows = cells.map(({ address, formula, values }): DraftCell[] => [address, formula, values.length, values[0].length]);
  await keep(port, rows);
  for (const { address, values } of cells) await port.write(address, values.map((row) => row.map(plainCell)));
  return cells.length;
}

/**
 * Puts formulas that were made plain back into their cells.
 * @returns how many were put back
 */
export async function makeLive(port: WorkbookPort, sheet: string): Promise<number> {
  const kept = await port.read(formatAddress({ sheet: KEPT, cell: KEPT_CELLS }));
  const rows = (kept?.values ?? []).slice(1).map((row, i) => ({ row, at: i + 2 }));
  let count = 0;
  for (const { row: [address, formula, height, width], at } of rows) {
    const parsed = typeof address === 'string' ? parseAddress(address) : null;
    if (parsed?.sheet !== sheet || typeof address !== 'string' || typeof formula !== 'string') continue;
    // What was spilled must be blank before the formula can fill it again.
    await port.write(address, Array.from({ length: Number(height) }, () => Array.from({ length: Number(width) }, () => null)));
    await port.write(address, [[{ formula }]]);
    await port.write(formatAddress({ sheet: KEPT, cell: `A${at}` }), [[null, null, null, null]]);
    count++;
  }
  return count;
}

/** How it stands with formulas and plain values. */
export interface PlainState {
  /** Sheets that hold formulas of ours. */
  readonly live: readonly string[];
  /** Sheets whose formulas were made plain. */
  readonly plain: readonly string[];
  /** Formulas of ours that the host has lost: they show #NAME?, or are spelt as only files spell them. */
  readonly lost: readonly OurCell[];
}

/** Looks through the workbook once. */
export async function plainState(port: WorkbookPort): Promise<PlainState> {
  const sheetsOf = (addresses: readonly unknown[]): string[] => [
    ...new Set(addresses.flatMap((address) => (typeof address === 'string' ? (parseAddress(address)?.sheet ?? []) : []))),
  ];
  const names = await port.sheetNames();
  const kept = names.includes(KEPT) ? await port.read(formatAddress({ sheet: KEPT, cell: KEPT_CELLS })) : null;
  const cells = await port.ourCells();
  return {
    live: sheetsOf(cells.map(({ address }) => address)),
    plain: sheetsOf((kept?.values ?? []).slice(1).map(([address]) => address)),
    lost: cells.filter(({ formula, values }) => isLost(values[0]?.[0]) || mended(formula) !== formula),
  };
}

/**
 * Enters formulas anew that the host has lost.
 * @returns how many
 */
export async function repair(port: WorkbookPort): Promise<number> {
  const { lost } = await plainState(port);
  for (const { address, formula } of lost) await port.write(address, [[{ formula: mended(formula) }]]);
  return lost.length;
}

/** A formula as a person types it: `_xldudf_DUTY_ASSIGN(` and `@DUTY.ASSIGN(` are both `DUTY.ASSIGN(`. */
export function mended(formula: string): string {
  return formula.replace(/@?(?:_xldudf_)?DUTY[._]([A-Z]+)\(/giu, (_, id: string) => `DUTY.${id.toUpperCase()}(`);
}

const KEPT_CELLS = formatZone(parseZone('A1:D400')!);

async function keep(port: WorkbookPort, rows: readonly DraftCell[][]): Promise<void> {
  const names = await port.sheetNames();
  if (!names.includes(KEPT)) {
    await port.addSheets([{ name: KEPT, rows: [HEADINGS, ...rows], headingRows: [0], widths: [24, 60, 8, 8] }]);
    return;
  }
  for (const row of rows) await port.appendRow(formatAddress({ sheet: KEPT, cell: KEPT_CELLS }), row);
}

function isLost(value: unknown): boolean {
  if (typeof value === 'object' && value !== null && 'basicValue' in value) return value.basicValue === '#NAME?';
  return value === '#NAME?' || value === '#BAD_EXPR';
}

function plainCell(value: unknown): DraftCell {
  if (value === null || value === undefined || value === '') return null;
  return typeof value === 'number' || typeof value === 'string' ? value : JSON.stringify(value);
}
