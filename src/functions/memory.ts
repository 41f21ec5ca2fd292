import type { Range } from '../sheet/range';
import { Solved } from './solved';

/** Cases kept; a workbook that asks about more at once solves the oldest anew. */
const KEPT = 8;

/** The same for cases that were searched. */
const KEPT_SEARCHED = 64;

/** Remembered cases, most recently used first. */
const remembered: { ranges: readonly (Range | null)[]; solved: Solved }[] = [];

/**
 * The case of these ranges, solved at most once while it is remembered.
 *
 * Ranges are compared cell by cell, so two cases are never taken for one; a comparison ends at the
 * first cell that differs.
 */
export function recall(ranges: readonly (Range | null)[]): Solved {
  const at = remembered.findIndex((entry) => sameRanges(entry.ranges, ranges));
  const entry = at === -1 ? { ranges, solved: new Solved(ranges) } : remembered.splice(at, 1)[0];
  remembered.unshift(entry);
  forget();
  return entry.solved;
}

/** A case that was searched is kept longer: to forget it while a cell asks for it would mean to search it anew for ever. */
function forget(): void {
  for (let i = remembered.length - 1; i >= KEPT; i--) {
    if (i >= KEPT_SEARCHED || !remembered[i].solved.wasSearched) remembered.splice(i, 1);
  }
}

function sameRanges(one: readonly (Range | null)[], other: readonly (Range | null)[]): boolean {
  const length = Math.max(one.length, other.length);
  for (let i = 0; i < length; i++) if (!sameRange(one[i] ?? null, other[i] ?? null)) return false;
  return true;
}

function sameRange(one: Range | null, other: Range | null): boolean {
  if (one === other) return true;
  if (one === null || other === null) return false;
  if (one.length !== other.length) return false;
  for (let r = 0; r < one.length; r++) {
    const a = one[r];
    const b = other[r];
    if (a.length !== b.length) return false;
    for (let c = 0; c < a.length; c++) if (a[c] !== b[c] && !sameCell(a[c], b[c])) return false;
  }
  return true;
}

/** Cells that are not identical are the same where both are blank or both hold the same error. */
function sameCell(one: unknown, other: unknown): boolean {
  const a = one ?? null;
  const b = other ?? null;
  if (a === null || b === null || typeof a !== 'object' || typeof b !== 'object') return a === b;
  return JSON.stringify(a) === JSON.stringify(b);
}
