import fc from 'fast-check';
import loadHighs from 'highs';
import { describe, expect, it } from 'vitest';
import type { Case } from '../../src/cover/case';
import { crowds, tooClose } from '../../src/cover/conflicts';
import { search } from '../../src/exact/search';
import { readCase } from '../../src/sheet/readCase';
import type { Range } from '../../src/sheet/range';

const highs = await loadHighs();

function caseOf(ranges: readonly (Range | null)[]): Case {
  const { case: kase, faults } = readCase(ranges);
  if (kase === null) throw new Error(faults[0].message);
  return kase;
}

describe('published examples', () => {
  /**
   * Ten workers, eight tasks of sizes 10, 7, 3, 12, 15, 4, 11, 5, at most 15 a worker, each task once.
   * Source: "Assignment with Task Sizes" of the OR-Tools guide (Apache 2.0), data as in its samples
   * assignment_task_sizes; the least cost printed for it is 326.
   */
  it('assignment with task sizes costs 326', () => {
    const costs = [
      [90, 76, 75, 70, 50, 74, 12, 68],
      [35, 85, 55, 65, 48, 101, 70, 83],
      [125, 95, 90, 105, 59, 120, 36, 73],
      [45, 110, 95, 115, 104, 83, 37, 71],
      [60, 105, 80, 75, 59, 62, 93, 88],
      [45, 65, 110, 95, 47, 31, 81, 34],
      [38, 51, 107, 41, 69, 99, 115, 48],
      [47, 85, 57, 71, 92, 77, 109, 36],
      [39, 63, 97, 49, 118, 56, 92, 61],
      [47, 101, 71, 60, 88, 109, 52, 90],
    ];
    const sizes = [10, 7, 3, 12, 15, 4, 11, 5];
    const kase = caseOf([
      [['Duty', 'Person', 'Rank'], ...costs.flatMap((row, w) => row.map((cost, t) => [`Task ${t}`, `Worker ${w}`, cost]))],
      [['Person', 'Maximum'], ...costs.map((_, w) => [`Worker ${w}`, 15])],
      [['Duty', 'Load'], ...sizes.map((size, t) => [`Task ${t}`, size])],
    ]);
    const { held, verdicts } = search(highs, kase, { seconds: 30 });
    expect(held.length).toBe(8);
    expect([...held].reduce((sum, i) => sum + kase.pairs.rank[i], 0)).toBe(326);
    expect(verdicts.every(({ gap }) => gap === 0)).toBe(true);
  });
});

/** Whole hours from 1 on: a row that is blank on older desktops reads as 0. */
const intervals = fc.array(fc.tuple(fc.integer({ min: 1, max: 30 }), fc.integer({ min: 1, max: 9 })), { minLength: 1, maxLength: 14 });

function hallCase(list: readonly (readonly [number, number])[], people: number): Case {
  const day = 46_000;
  return caseOf([
    [['Duty', 'Person'], ...list.flatMap((_, d) => Array.from({ length: people }, (__, p) => [`Duty ${d}`, `Person ${p}`]))],
    [['Person', 'Maximum'], ...Array.from({ length: people }, (_, p) => [`Person ${p}`, list.length])],
    [['Duty', 'Start', 'End'], ...list.map(([start, length], d) => [`Duty ${d}`, day + start / 24, day + (start + length) / 24])],
  ]);
}

describe('published methods for intervals', () => {
  /**
   * The most intervals that k machines can take: in the order of their starts, each is taken, and where
   * more than k are under way the one that ends last is given up.
   * Source: U. Faigle and W. M. Nawijn, Note on scheduling intervals on-line, Discrete Applied
   * Mathematics 58, 1995; M. C. Carlisle and E. L. Lloyd, ibid. 59, 1995.
   */
  it('as many duties are covered as the greedy method for identical machines takes', () => {
    fc.assert(
      fc.property(intervals, fc.integer({ min: 1, max: 3 }), (list, people) => {
        let taken: (readonly [number, number])[] = [];
        let done = 0;
        for (const one of [...list].sort((a, b) => a[0] - b[0])) {
          done += taken.filter(([start, length]) => start + length <= one[0]).length;
          taken = [...taken.filter(([start, length]) => start + length > one[0]), one];
          if (taken.length > people) taken = taken.sort((a, b) => a[0] + a[1] - b[0] - b[1]).slice(0, people);
        }
        expect(search(highs, hallCase(list, people), { seconds: 30 }).held.length).toBe(done + taken.length);
      }),
      { numRuns: 200 },
    );
  });

  /** An interval graph is perfect: as many people suffice as duties are ever under way together (common textbook fact). */
  it('everything is covered by as many people as duties are under way at once, and not by fewer', () => {
    fc.assert(
      fc.property(intervals, (list) => {
        const most = Math.max(...list.map(([at]) => list.filter(([start, length]) => start <= at && at < start + length).length));
        expect(search(highs, hallCase(list, most), { seconds: 30 }).held.length).toBe(list.length);
        if (most > 1) expect(search(highs, hallCase(list, most - 1), { seconds: 30 }).held.length).toBeLessThan(list.length);
      }),
      { numRuns: 150 },
    );
  });
});

describe('duties under way together', () => {
  const duties = fc.array(
    fc.array(fc.tuple(fc.integer({ min: 0, max: 40 }), fc.integer({ min: 1, max: 12 })), { maxLength: 2 }).map((times) => ({
      times: times.map(([start, length]) => ({ start, end: start + length })),
    })),
    { maxLength: 9 },
  );

  it('share a set exactly where they are too close, and no set lies inside another', () => {
    fc.assert(
      fc.property(duties, fc.constantFrom(0, 0, 3, 11), (list, rest) => {
        const sets = crowds(list, rest);
        for (let a = 0; a < list.length; a++) {
          for (let b = a + 1; b < list.length; b++) {
            expect(sets.some((set) => set.includes(a) && set.includes(b))).toBe(tooClose(list[a], list[b], rest));
          }
        }
        for (const set of sets) {
          expect(set.length).toBeGreaterThan(1);
          expect(sets.filter((other) => set.every((d) => other.includes(d)))).toEqual([set]);
        }
      }),
      { numRuns: 2_000 },
    );
  });
});
