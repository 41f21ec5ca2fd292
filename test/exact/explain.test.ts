import fc from 'fast-check';
import loadHighs from 'highs';
import { describe, expect, it } from 'vitest';
import type { Case } from '../../src/cover/case';
import { runTask } from '../../src/exact/tasks';
import { readCase } from '../../src/sheet/readCase';
import { allPlans, compareValues, coverOf, type Seats } from '../helpers/bruteForce';
import { hardRanges, hardSpecs, type HardSpec } from '../helpers/hardSpec';

const highs = await loadHighs();

function ask(spec: HardSpec) {
  const { case: kase, faults } = readCase(hardRanges(spec));
  if (kase === null) throw new Error(faults[0].message);
  const found = runTask(highs, { task: 'plan', kase, found: null }, () => undefined);
  return { kase, found };
}

/** The best cover by priority, by trying all plans. */
function bestCover(spec: HardSpec, pairs?: Seats): number[] {
  let best: number[] | null = null;
  for (const plan of allPlans(spec, pairs)) {
    const cover = coverOf(spec, plan);
    if (best === null || compareValues(best, cover) < 0) best = cover;
  }
  return best!;
}

const sum = (list: readonly number[]): number => list.reduce((total, one) => total + one, 0);
const pairNumber = (kase: Case, d: number, p: number): number =>
  Array.from(kase.pairs.duty.keys()).findIndex((i) => kase.pairs.duty[i] === d && kase.pairs.person[i] === p);

describe('explanations by search', () => {
  it('CHOICES: always, sometimes and never, as over all plans that cover best', () => {
    fc.assert(
      fc.property(hardSpecs(), (spec) => {
        const { kase, found } = ask(spec);
        const use = runTask(highs, { task: 'choices', kase, found }, () => undefined);
        const best = bestCover(spec);
        const plans = [...allPlans(spec)].filter((plan) => compareValues(coverOf(spec, plan), best) === 0);
        for (const [d, p] of spec.pairs) {
          const isFixed = spec.fixed.some(([e, q]) => d === e && p === q);
          const holding = plans.filter((plan) => isFixed || plan.some(([e, q]) => d === e && p === q)).length;
          expect(use[pairNumber(kase, d, p)]).toBe(holding === plans.length ? 'Always' : holding === 0 ? 'Never' : 'Sometimes');
        }
      }),
      { numRuns: 400 },
    );
  });

  it('ABSENCES: what is lost is what solving again without the person finds', () => {
    fc.assert(
      fc.property(hardSpecs(), (spec) => {
        const { kase, found } = ask(spec);
        const answers = runTask(highs, { task: 'absences', kase, found }, () => undefined);
        const before = sum(bestCover(spec));
        spec.people.forEach((_, p) => {
          const isTheirs = ([, q]: Seats[number]): boolean => q === p;
          const without = { ...spec, pairs: spec.pairs.filter(([, q]) => q !== p), fixed: spec.fixed.filter((seat) => !isTheirs(seat)) };
          expect(answers[p]!.lost).toBe(Math.max(0, before - sum(bestCover(without))));
        });
      }),
      { numRuns: 300 },
    );
  });

  it('Gain: what one place more brings, as solving again with it finds', () => {
    fc.assert(
      fc.property(hardSpecs(), (spec) => {
        const plain = { ...spec, duties: spec.duties.map((duty) => ({ ...duty, load: 1 })) };
        const { kase, found } = ask(plain);
        const gains = runTask(highs, { task: 'gains', kase, found }, () => undefined);
        const before = sum(bestCover(plain));
        plain.people.forEach((_, p) => {
          const wide = { ...plain, people: plain.people.map((one, q) => (p === q ? { ...one, maximum: one.maximum + 1 } : one)) };
          expect(gains[p]).toBe(Math.max(0, sum(bestCover(wide)) - before));
        });
      }),
      { numRuns: 300 },
    );
  });

  it('BOTTLENECKS: each is short by itself, none of its duties can be spared, and the shorts add up', () => {
    fc.assert(
      fc.property(hardSpecs(), (spec) => {
        const { kase, found } = ask(spec);
        const knots = runTask(highs, { task: 'bottlenecks', kase, found }, () => undefined);
        const needed = sum(spec.duties.map(({ need }) => need));
        expect(sum(knots.map((knot) => knot.needed - knot.places))).toBe(needed - sum(bestCover(spec)));
        const all = knots.flatMap(({ duties }) => duties);
        expect(new Set(all).size).toBe(all.length);
        for (const { duties, needed: own, places } of knots) {
          const short = (list: readonly number[]): number => {
            const only = { ...spec, duties: spec.duties.map((duty, d) => ({ ...duty, need: list.includes(d) ? duty.need : 0 })), together: [] };
            return sum(list.map((d) => spec.duties[d].need)) - sum(bestCover(only, spec.pairs.filter(([d]) => list.includes(d)).map(([d, p]) => [d, p] as const)));
          };
          // Together ties duties inside and outside of a set, so that no set can be asked by itself.
          if (spec.together.length > 0) continue;
          expect(short(duties)).toBe(own - places);
          for (const d of duties) expect(short(duties.filter((other) => other !== d))).not.toBe(own - places);
        }
      }),
      { numRuns: 400 },
    );
  });

  it('REMEDIES: reach the most seats that changes can reach, at the least price', () => {
    fc.assert(
      fc.property(hardSpecs({ duties: 3, people: 2 }), (spec) => {
        const { kase, found } = ask(spec);
        const answer = runTask(highs, { task: 'remedies', kase, found }, () => undefined)!;
        const cells = spec.duties.flatMap((_, d) => spec.people.map((__, p) => [d, p] as const));
        let best = { covered: -1, price: Infinity };
        for (let mask = 0; mask < 2 ** spec.people.length; mask++) {
          const stretched = spec.people.map((one, p) => ({ ...one, maximum: one.maximum + ((mask >> p) & 1) }));
          for (const plan of allPlans({ ...spec, people: stretched }, cells)) {
            const isNew = plan.filter(([d, p]) => !spec.pairs.some(([e, q]) => d === e && p === q)).length;
            const price = 2 * isNew + sum(spec.people.map((_, p) => (mask >> p) & 1));
            const covered = sum(coverOf(spec, plan));
            if (covered > best.covered || (covered === best.covered && price < best.price)) best = { covered, price };
          }
        }
        expect({ covered: answer.covered, price: sum(answer.changes.map(({ price }) => price)) }).toEqual(best);
      }),
      { numRuns: 300 },
    );
  });
});
