/** A rectangle of cells, both ends included, from 0. */
export interface Zone {
  readonly top: number;
  readonly left: number;
  readonly bottom: number;
  readonly right: number;
}

/**
 * The filled regions of a sheet: rectangles round cells that touch each other, a blank row or column
 * between any two.
 *
 * @param isFilled whether a cell holds anything
 */
export function regionsOf(rows: number, columns: number, isFilled: (row: number, column: number) => boolean): Zone[] {
  const zones: Zone[] = [];
  const split = (zone: Zone, byRow: boolean, wasSplit: boolean): void => {
    const parts = byRow ? bands(zone.top, zone.bottom, (row) => someIn(zone.left, zone.right, (column) => isFilled(row, column)))
      : bands(zone.left, zone.right, (column) => someIn(zone.top, zone.bottom, (row) => isFilled(row, column)));
    for (const [from, to] of parts) {
      const part = byRow ? { ...zone, top: from, bottom: to } : { ...zone, left: from, right: to };
      const isSame = part.top === zone.top && part.bottom === zone.bottom && part.left === zone.left && part.right === zone.right;
      if (isSame && !wasSplit) zones.push(part);
      else split(part, !byRow, !isSame);
    }
  };
  if (rows > 0 && columns > 0) split({ top: 0, left: 0, bottom: rows - 1, right: columns - 1 }, true, true);
  return zones;
}

/** The region that holds a cell, or touches it; null where there is none. */
export function regionAt(zones: readonly Zone[], row: number, column: number): Zone | null {
  const holds = ({ top, bottom, left, right }: Zone): boolean => row >= top && row <= bottom && column >= left && column <= right;
  return zones.find(holds) ?? null;
}

/** Rows that a range may go on over below what is filled, at most. */
const MOST_ROOM = 500;

/**
 * The blank rows below a region, up to a blank row above the next one in the same columns.
 *
 * @param others what is filled on the sheet; the region itself may be among it
 * @param last the last row of the sheet, from 0
 */
export function roomBelow(zone: Zone, others: readonly Zone[], last: number): number {
  const below = others.filter(({ top, left, right }) => top > zone.bottom && left <= zone.right && right >= zone.left);
  const end = below.reduce((least, { top }) => Math.min(least, top - 2), Math.min(last, zone.bottom + MOST_ROOM));
  return Math.max(0, end - zone.bottom);
}

/** Runs of lines that hold anything. */
function bands(from: number, to: number, isFilled: (line: number) => boolean): [number, number][] {
  const runs: [number, number][] = [];
  let start = -1;
  for (let line = from; line <= to + 1; line++) {
    const filled = line <= to && isFilled(line);
    if (filled && start === -1) start = line;
    if (!filled && start !== -1) {
      runs.push([start, line - 1]);
      start = -1;
    }
  }
  return runs;
}

function someIn(from: number, to: number, test: (line: number) => boolean): boolean {
  for (let line = from; line <= to; line++) if (test(line)) return true;
  return false;
}
