import { isBlank } from './cell';

/** The largest number any column takes. */
const LARGEST = 1_000_000;

const WHOLE = /^\+?\d{1,7}(\.0*)?$/u;

/** What a number cell holds: nothing, a whole number (perhaps written as text), or something else. */
export type NumberCell =
  | { readonly kind: 'blank' }
  | { readonly kind: 'number'; readonly value: number; readonly asText: boolean }
  | { readonly kind: 'other' };

/** Reads a whole number from `least` to `most`. */
export function readWhole(cell: unknown, least: number, most = LARGEST): NumberCell {
  if (isBlank(cell)) return { kind: 'blank' };
  const asText = typeof cell === 'string';
  if (asText && !WHOLE.test(cell.trim())) return { kind: 'other' };
  if (!asText && typeof cell !== 'number') return { kind: 'other' };
  // Adding 0 makes 0 of -0.
  const value = Number(cell) + 0;
  if (!Number.isInteger(value) || value < least || value > most) return { kind: 'other' };
  return { kind: 'number', value, asText };
}

/** What a number column expects, as the rest of the sentence "expected ...". */
export function wholeExpected(least: number, most = LARGEST): string {
  return `a whole number from ${least} to ${String(most).replace(/\B(?=(\d{3})+$)/gu, ',')}`;
}
