import fc from 'fast-check';
import loadHighs from 'highs';
import { describe, expect, it } from 'vitest';
import type { Case } from '../../src/cover/case';
import { openPairs } from '../../src/cover/openPairs';
import { planOf } from '../../src/cover/plan';
import { solve } from '../../src/cover/solve';
import { search } from '../../src/exact/search';
import { readCase } from '../../src/sheet/readCase';
import { allPlans, compareValues, valueOf, type Seats } from '../helpers/bruteForce';
import { hardRanges, hardSpecs, type HardSpec } from '../helpers/hardSpec';
import { rangesOf, specs } from '../helpers/spec';

const highs = await loadHighs();

function caseOf(spec: HardSpec): Case {
  const { case: kase, faults } = readCase(hardRanges(spec));
  if (kase === null) throw new Error(faults[0].message);
  return kase;
}

/** Seats beside the Fixed ones. */
function seatsFound(kase: Case): Seats {
  const { held, verdicts, moreSeats } = search(highs, kase, { seconds: 30 });
  expect(verdicts.map(({ gap }) => gap)).toEqual(verdicts.map(() => 0));
  expect(moreSeats).toBeGreaterThanOrEqual(0);
  return [...held].map((i) => [kase.pairs.duty[i], kase.pairs.person[i]] as const);
}

describe('the search', () => {
  it('finds a plan that is best in every aim, as trying all plans finds', () => {
    fc.assert(
      fc.property(hardSpecs(), (spec) => {
        const found = seatsFound(caseOf(spec));
        const plans = [...allPlans(spec)];
        expect(plans.some((plan) => plan.length === found.length && plan.every(([d, p]) => found.some(([e, q]) => d === e && p === q)))).toBe(true);
        const best = plans.map((plan) => valueOf(spec, plan)).reduce((a, b) => (compareValues(a, b) <= 0 ? a : b));
        expect(valueOf(spec, found)).toEqual(best);
      }),
      { numRuns: 1_500 },
    );
  });

  it('gives the same plan as the flow where a case is one', () => {
    fc.assert(
      fc.property(specs({ aims: true }), (spec) => {
        const { case: kase } = readCase(rangesOf(spec));
        const solution = solve(kase!);
        if ('crossing' in solution) throw new Error('limits cross');
        const { held } = search(highs, kase!, { seconds: 30 });
        expect(planOf(kase!, held).seats).toEqual(solution.plan.seats);
      }),
      { numRuns: 1_000 },
    );
  });

  it('solves as a flow what is nested, and gives the same plan', () => {
    let flows = 0;
    fc.assert(
      fc.property(hardSpecs({ duties: 4, people: 3 }), (spec) => {
        const kase = caseOf({ ...spec, together: [], duties: spec.duties.map((duty) => ({ ...duty, load: 1 })) });
        const solution = solve(kase);
        if ('crossing' in solution) return;
        flows++;
        expect(solution.faults).toEqual([]);
        expect(planOf(kase, search(highs, kase, { seconds: 30 }).held).seats).toEqual(solution.plan.seats);
      }),
      { numRuns: 1_000 },
    );
    expect(flows).toBeGreaterThan(300);
  });

  it('does not depend on the formulation', () => {
    fc.assert(
      fc.property(hardSpecs({ duties: 6, people: 4 }), (spec) => {
        const kase = caseOf(spec);
        const [cliques, pairs] = (['cliques', 'pairs'] as const).map((formulation) => search(highs, kase, { seconds: 30, formulation }).held);
        expect(pairs).toEqual(cliques);
      }),
      { numRuns: 300 },
    );
  });

  it('is not changed by a rest of no minutes', () => {
    fc.assert(
      fc.property(hardSpecs(), (spec) => {
        const ranges = hardRanges({ ...spec, rest: 0 });
        const without = ranges.map((range, i) => (i === 3 ? range!.filter(([rule]) => rule !== 'Rest') : range));
        const [one, other] = [ranges, without].map((tables) => readCase(tables).case!);
        expect(search(highs, other, { seconds: 30 }).held).toEqual(search(highs, one, { seconds: 30 }).held);
      }),
      { numRuns: 100 },
    );
  });

  it('leaves no pair of a person too close in time', () => {
    fc.assert(
      fc.property(hardSpecs({ duties: 8, people: 4 }), (spec) => {
        const kase = caseOf({ ...spec, fixed: [] });
        const open = openPairs(kase);
        const held = search(highs, kase, { seconds: 30 }).held;
        for (let p = 0; p < kase.people.length; p++) {
          const own = [...held].filter((i) => kase.pairs.person[i] === p).map((i) => kase.pairs.duty[i]);
          for (const set of open.sets) {
            expect(own.filter((d) => set.duties.includes(d)).length).toBeLessThanOrEqual(Math.min(set.everyone, set.single.get(p) ?? Infinity));
          }
        }
      }),
      { numRuns: 200 },
    );
  });
});
