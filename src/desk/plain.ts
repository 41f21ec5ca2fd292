import { bytesToHex } from '@noble/hashes/utils.js';
import { sha256 } from '@noble/hashes/sha2.js';
import { formatAddress, formatZone, parseAddress, parseZone } from '../host/address';
import type { DraftCell, OurCell, WorkbookPort } from '../host/port';
import type { Range } from '../sheet/range';

/** The sheet that remembers which formulas were made plain. */
const KEPT = 'Formulas kept';
const HEADINGS = ['Cell', 'Formula', 'Rows', 'Columns', 'Values'];
/** Formulas that can be kept at one time. */
const ROOM = 400;

/** What became of formulas that were to be replaced or put back. */
export interface Exchange {
  readonly done: number;
  /** For each formula that was left, why, in words. */
  readonly left: readonly string[];
}

/**
 * Replaces the formulas of ours on a sheet by what they show, and keeps them on a sheet of their own.
 * What shows an error, or is still being worked out, is left as it is.
 */
export async function makePlain(port: WorkbookPort, sheet: string): Promise<Exchange> {
  const cells = (await port.ourCells()).filter(({ address }) => parseAddress(address)?.sheet === sheet);
  const left: string[] = [];
  let done = 0;
  const shown = await port.shownBy(cells.map(({ address }) => address));
  for (const [i, { address, formula }] of cells.entries()) {
    const values = shown[i];
    if (!hasAnswer(values)) {
      left.push(`${address} shows no answer.`);
      continue;
    }
    const plain = values.map((row) => row.map(plainCell));
    // Kept before it is replaced: a formula is never lost.
    const isKept = await keep(port, [address, formula, plain.length, plain[0].length, digest(plain)]);
    if (!isKept) {
      left.push(`${address}: the sheet ${KEPT} is full. Make formulas live again, or delete rows there.`);
      continue;
    }
    await port.write(address, plain);
    done++;
  }
  return { done, left };
}

/** Puts formulas that were made plain back into their cells, where the cells still hold just what was put there. */
export async function makeLive(port: WorkbookPort, sheet: string): Promise<Exchange> {
  const left: string[] = [];
  let done = 0;
  for (const { address, formula, zone, digest: expected, row } of await keptFormulas(port)) {
    if (parseAddress(address)?.sheet !== sheet) continue;
    const block = await port.read(zone);
    if (block === null || digest(block.values) !== expected) {
      left.push(`${zone} does not hold what was put there: rows were moved or cells changed. The formula is kept in ${formatAddress({ sheet: KEPT, cell: `B${row}` })}.`);
      continue;
    }
    // What was spilled must be blank before the formula can fill it again.
    await port.write(address, block.values.map((cells) => cells.map(() => null)));
    await port.write(address, [[{ formula }]]);
    await port.write(formatAddress({ sheet: KEPT, cell: `A${row}` }), [HEADINGS.map(() => null)]);
    done++;
  }
  return { done, left };
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

/** @param cells all that the port knows of ours */
export async function plainState(port: WorkbookPort, cells: readonly OurCell[]): Promise<PlainState> {
  return {
    live: sheetsOf(cells),
    plain: sheetsOf(await keptFormulas(port)),
    lost: cells.filter(({ formula, value }) => isLost(value) || mended(formula) !== formula),
  };
}

function sheetsOf(cells: readonly { readonly address: string }[]): string[] {
  return [...new Set(cells.flatMap(({ address }) => parseAddress(address)?.sheet ?? []))];
}

/**
 * Enters formulas anew that the host has lost.
 * @returns how many
 */
export async function repair(port: WorkbookPort): Promise<number> {
  const { lost } = await plainState(port, await port.ourCells());
  for (const { address, formula } of lost) await port.write(address, [[{ formula: mended(formula) }]]);
  return lost.length;
}

/**
 * A formula as a person types it, whatever a file or another program has made of it: of
 * `_xldudf_DUTY_ASSIGN(`, `_xlfn._xldudf_DUTY_ASSIGN(`, `@DUTY.ASSIGN(` and `duty_assign (` each is
 * `DUTY.ASSIGN(`. Texts in quotes stay.
 */
export function mended(formula: string): string {
  const call = /(?<![A-Z0-9_.])@?(?:_xl[a-z]+[._])*DUTY[._]([A-Z]+)\s*\(/giu;
  const parts = formula.split(/("(?:[^"]|"")*")/u);
  return parts.map((part, i) => (i % 2 === 1 ? part : part.replace(call, (_, id: string) => `DUTY.${id.toUpperCase()}(`))).join('');
}

/** A formula on the sheet of those kept. */
interface Kept {
  readonly address: string;
  readonly formula: string;
  /** The cells its values were put into. */
  readonly zone: string;
  readonly digest: string;
  /** Its row on the sheet. */
  readonly row: number;
}

const KEPT_CELLS = formatAddress({ sheet: KEPT, cell: `A1:E${ROOM}` });

async function keptFormulas(port: WorkbookPort): Promise<Kept[]> {
  if (!(await port.sheetNames()).includes(KEPT)) return [];
  const { values = [] } = (await port.read(KEPT_CELLS)) ?? {};
  return values.slice(1).flatMap(([address, formula, rows, columns, hash], i): Kept[] => {
    if (typeof address !== 'string' || typeof formula !== 'string' || typeof hash !== 'string') return [];
    const parsed = parseAddress(address);
    const zone = parsed === null ? null : parseZone(parsed.cell);
    if (parsed === null || zone === null) return [];
    const all = { ...zone, bottom: zone.top + Number(rows) - 1, right: zone.left + Number(columns) - 1 };
    return [{ address, formula, zone: formatAddress({ sheet: parsed.sheet, cell: formatZone(all) }), digest: hash, row: i + 2 }];
  });
}

/** @returns false where there is no room */
async function keep(port: WorkbookPort, row: readonly DraftCell[]): Promise<boolean> {
  if ((await port.sheetNames()).includes(KEPT)) return (await port.appendRow(KEPT_CELLS, row)) !== null;
  const [name] = await port.addSheets([{ name: KEPT, rows: [HEADINGS, row], headingRows: [0], widths: [24, 60, 8, 8, 20] }]);
  return name === KEPT;
}

/** Tells whether cells still hold the same. Blank cells are blank, whatever the host reads them as. */
function digest(values: Range): string {
  const text = JSON.stringify(values.map((row) => row.map((cell) => (cell === '' || cell === undefined ? null : cell))));
  return bytesToHex(sha256(new TextEncoder().encode(text))).slice(0, 16);
}

function hasAnswer(values: Range): boolean {
  const [[first] = []] = values;
  const isError = typeof first === 'object' && first !== null;
  return first !== undefined && first !== null && !isError && !(typeof first === 'string' && /^#[A-Z_/0!?]+$/u.test(first));
}

function isLost(value: unknown): boolean {
  if (typeof value === 'object' && value !== null && 'basicValue' in value) return value.basicValue === '#NAME?';
  return value === '#NAME?' || value === '#BAD_EXPR';
}

function plainCell(value: unknown): DraftCell {
  if (value === null || value === undefined || value === '') return null;
  return typeof value === 'number' || typeof value === 'string' ? value : JSON.stringify(value);
}
