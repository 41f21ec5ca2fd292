import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { absenceOf, absences } from '../../src/cover/absences';
import { choices } from '../../src/cover/choices';
import { remedies } from '../../src/cover/remedies';
import { knots as knotsOfFlow, shortages, type Knot } from '../../src/cover/shortage';
import { solve } from '../../src/cover/solve';
import { readCase } from '../../src/sheet/readCase';
import type { Range } from '../../src/sheet/range';
import { bestValues, cheapestRemedy, coverHolding, mostCovered } from '../helpers/oracle';
import { rangesOf, specs, type Spec } from '../helpers/spec';

function solved(spec: Spec, extraRules: Range = []) {
  const ranges = rangesOf(spec);
  const rules = [...ranges[3]!, ...extraRules];
  const { case: kase, faults } = readCase([...ranges.slice(0, 3), rules, ranges[4]]);
  if (kase === null) throw faults[0];
  const solution = solve(kase);
  if ('crossing' in solution) throw new Error('limits cross');
  return { ...solution, kase };
}

/** Numbers of the spec for the names of the case. */
function back(spec: Spec, answer: ReturnType<typeof solved>) {
  const duty = (d: number): number => spec.duties.findIndex(({ name }) => name === answer.kase.duties[d].name);
  const person = (p: number): number => spec.people.findIndex(({ name }) => name === answer.kase.people[p].name);
  return { duty, person };
}

describe('choices', () => {
  it('are what forcing every pair in and out gives', async () => {
    await fc.assert(
      fc.asyncProperty(specs({ duties: 5, people: 4, rules: 4 }), async (spec) => {
        const answer = solved(spec);
        const { duty, person } = back(spec, answer);
        const use = choices(answer);
        const best = (await bestValues(spec)).cover;
        const isFixed = (d: number, p: number): boolean => spec.rules.some((r) => r.rule === 'Fixed' && r.duty === d && r.person === p);
        for (let i = 0; i < use.length; i++) {
          const [d, p] = [duty(answer.kase.pairs.duty[i]), person(answer.kase.pairs.person[i])];
          if (isFixed(d, p)) {
            expect(use[i]).toBe('Always');
            continue;
          }
          const without = { ...spec, rules: [...spec.rules, { rule: 'Barred' as const, duty: d, person: p }] };
          const canBeOut = JSON.stringify((await bestValues(without)).cover) === JSON.stringify(best);
          const canBeIn = JSON.stringify(await coverHolding(spec, d, p)) === JSON.stringify(best);
          expect(use[i]).toBe(canBeIn ? (canBeOut ? 'Sometimes' : 'Always') : 'Never');
        }
      }),
      { numRuns: 250 },
    );
  });
});

describe('absences', () => {
  it('lose what solving again without the person loses', async () => {
    await fc.assert(
      fc.asyncProperty(specs(), async (spec) => {
        const answer = solved(spec);
        const { person } = back(spec, answer);
        for (const absence of absences(answer.kase, answer)) {
          expect(absenceOf(answer.kase, answer, absence.person)).toEqual(absence);
          const p = person(absence.person);
          const away: Spec = {
            ...spec,
            people: spec.people.map((entry, i) => (i === p ? { ...entry, maximum: 0 } : entry)),
            pairs: spec.pairs.filter(([, other]) => other !== p),
            rules: spec.rules.filter((rule) => !(rule.rule === 'Fixed' && rule.person === p)),
          };
          expect(absence.lost).toBe(answer.plan.covered - (await mostCovered(away)));
          expect(absence.dutiesLost.length > 0 || absence.lost === 0).toBe(true);
          for (const { by } of absence.takenOver) expect(by).not.toContain(absence.person);
          const { plan, kase } = solved(away);
          const lostByClass = new Map<number, number>();
          kase.duties.forEach(({ priority, need }, d) => lostByClass.set(priority, (lostByClass.get(priority) ?? 0) - Math.min(need, plan.heldOfDuty[d])));
          answer.kase.duties.forEach(({ priority, need }, d) => lostByClass.set(priority, (lostByClass.get(priority) ?? 0) + Math.min(need, answer.plan.heldOfDuty[d])));
          for (const d of absence.dutiesLost) expect(lostByClass.get(answer.kase.duties[d].priority)).toBeGreaterThan(0);
        }
      }),
      { numRuns: 300 },
    );
  });
});

describe('remedies', () => {
  const prices = fc.tuple(fc.constantFrom(1, 0, 3, null), fc.constantFrom(2, 1, 0, null));

  it('reach the cover and the price that HiGHS reaches, and taking any one away loses cover', async () => {
    await fc.assert(
      fc.asyncProperty(specs({ duties: 6, people: 4, rules: 4 }), prices, async (spec, [place, eligibility]) => {
        const answer = solved(spec, [['Price', 'place', '', place], ['Price', 'eligibility', '', eligibility]]);
        const found = remedies(answer.kase);
        if (found === null || 'crossing' in found) throw new Error('no remedies');
        expect(found.faults).toEqual([]);
        const price = found.changes.reduce((sum, change) => sum + change.price, 0);
        expect({ covered: found.covered, price }).toEqual(await cheapestRemedy(spec, place, eligibility));
        const { duty, person } = back(spec, answer);
        const apply = (left: typeof found.changes): Spec => ({
          ...spec,
          people: spec.people.map((entry, p) => ({
            ...entry,
            maximum: entry.maximum + left.filter((change) => change.duty === null && person(change.person) === p).length,
          })),
          pairs: [...spec.pairs, ...left.flatMap((c) => (c.duty === null ? [] : [[duty(c.duty), person(c.person), null] as const]))],
        });
        expect(await mostCovered(apply(found.changes))).toBe(found.covered);
        for (const change of found.changes) {
          expect(await mostCovered(apply(found.changes.filter((other) => other !== change)))).toBeLessThan(found.covered);
        }
      }),
      { numRuns: 300 },
    );
  });
});

describe('bottlenecks', () => {
  it('are disjoint, smallest and connected, and their shorts add up to all uncovered seats', () => {
    fc.assert(
      fc.property(specs({ duties: 6, people: 4 }), (spec) => {
        const answer = solved(spec);
        const { kase, plan } = answer;
        const found = shortages(kase, answer.reduction.open, plan, knotsOfFlow(kase, answer));
        const knots = [...new Set(found.map(({ knot }) => knot))] as Knot[];
        expect(knots.every((knot) => knot !== null)).toBe(true);
        const all = knots.flatMap(({ duties }) => duties);
        expect(new Set(all).size).toBe(all.length);
        expect(knots.reduce((sum, { needed, places }) => sum + needed - places, 0)).toBe(plan.needed - plan.covered);
        for (const { duties, needed, places } of knots) {
          for (let mask = 1; mask < (1 << duties.length) - 1; mask++) {
            const part = new Set(duties.filter((_, i) => ((mask >> i) & 1) === 1).map((d) => kase.duties[d].name));
            const alone = solved({ ...spec, duties: spec.duties.map((duty) => (part.has(duty.name) ? duty : { ...duty, need: 0 })) });
            const short = alone.plan.needed - alone.plan.covered;
            expect(short).toBeLessThan(needed - places);
          }
        }
      }),
      { numRuns: 300 },
    );
  });
});
