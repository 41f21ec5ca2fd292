import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import type { Range } from '../../src/sheet/range';
import { rangesOf, specs } from '../helpers/spec';

/** Spills the function and folds names, so that only who holds what is compared. */
function spill(id: string, ranges: readonly (Range | null)[]): string[][] {
  const fn = FUNCTIONS.find((entry) => entry.id === id);
  if (fn === undefined) throw new Error(`no function ${id}`);
  const answer = invoke(fn, ranges, 'Sheet1!A1', new Journal());
  if (answer.kind === 'fault') return [[answer.message]];
  if (answer.kind === 'busy') throw new Error('a search');
  return answer.spill.map((row) => row.map((cell) => String(cell).toLowerCase()));
}

/** The rows below the headings in an order of their own. */
function sorted(rows: string[][]): string[] {
  return rows.slice(1).map((row) => row.join(' | ')).sort();
}

/** Shuffles the rows below the headings and respells names by the bits given. */
function disturb(range: Range | null, order: readonly number[], bits: readonly boolean[]): Range | null {
  if (range === null) return null;
  const [headings, ...rows] = range;
  const shuffled = rows
    .map((row, i) => ({ row, key: order[i % order.length] * 1000 + i }))
    .sort((a, b) => a.key - b.key)
    .map(({ row }) => row);
  let bit = 0;
  return [
    headings,
    ...shuffled.map((row) =>
      row.map((cell) => {
        if (typeof cell !== 'string' || cell === '') return cell;
        bit = (bit + 1) % bits.length;
        return bits[bit] ? ` ${cell.toUpperCase().replaceAll(' ', '  ')} ` : cell;
      }),
    ),
  ];
}

const disturbed = fc.record({
  spec: specs({ aims: true }),
  orders: fc.array(fc.array(fc.integer({ min: 0, max: 50 }), { minLength: 3, maxLength: 9 }), { minLength: 5, maxLength: 5 }),
  bits: fc.array(fc.boolean(), { minLength: 5, maxLength: 9 }),
});

describe('re-sorting rows and respelling names in another case', () => {
  it('never changes who holds what, nor anything else a function says of it', () => {
    fc.assert(
      fc.property(disturbed, ({ spec, orders, bits }) => {
        const ranges = rangesOf(spec);
        const other = ranges.map((range, i) => disturb(range, orders[i], bits));
        for (const id of ['ASSIGN', 'SUMMARY', 'STEPS']) {
          expect(sorted(spill(id, other))).toEqual(sorted(spill(id, ranges)));
        }
        const edges = (rows: string[][]): string[] => sorted(rows.map((row) => [row[0], ...row.slice(1, 4)]));
        expect(edges(spill('UNCOVERED', other))).toEqual(edges(spill('UNCOVERED', ranges)));
        const loads = (rows: string[][]): string[] => sorted(rows.map((row) => row.slice(0, 6)));
        expect(loads(spill('LOADS', other))).toEqual(loads(spill('LOADS', ranges)));
      }),
      { numRuns: 1000 },
    );
  });
});
