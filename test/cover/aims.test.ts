import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Case } from '../../src/cover/case';
import type { Plan } from '../../src/cover/plan';
import { solve, type Solution } from '../../src/cover/solve';
import { currentKept, minimumsMissed, rankTotal } from '../../src/functions/measures';
import { readCase } from '../../src/sheet/readCase';
import { bestValues, leastMissedAtAll, mostCovered } from '../helpers/oracle';
import { rangesOf, specs, type Spec } from '../helpers/spec';

function solved(spec: Spec): Solution & { kase: Case } {
  const { case: kase, faults } = readCase(rangesOf(spec));
  if (kase === null) throw faults[0];
  const solution = solve(kase);
  if ('crossing' in solution) throw new Error('limits cross');
  return { ...solution, kase };
}

function valuesOf(kase: Case, plan: Plan) {
  const cover = new Map<number, number>();
  kase.duties.forEach(({ need, priority }, d) => {
    cover.set(priority, (cover.get(priority) ?? 0) + Math.min(need, plan.heldOfDuty[d]));
  });
  return {
    cover: [...cover].sort((a, b) => a[0] - b[0]),
    missed: minimumsMissed(kase, plan),
    kept: currentKept(kase, plan),
    ranks: kase.ranked ? rankTotal(kase, plan) : 0,
    squares: kase.people.reduce((sum, { carried }, p) => sum + (carried + plan.heldByPerson[p]) ** 2, 0),
  };
}

/** Who holds what, in names. */
function seatsOf({ kase, plan }: { kase: Case; plan: Plan }): string[] {
  return plan.seats.map(({ duty, person }) => `${kase.duties[duty].name}: ${kase.people[person].name}`);
}

describe('the best plan against an integer programme', () => {
  it('has the values HiGHS finds, aim by aim, in every order of the aims', async () => {
    await fc.assert(
      fc.asyncProperty(specs({ aims: true }), async (spec) => {
        const { kase, plan, faults } = solved(spec);
        expect(faults).toEqual([]);
        const { missed, kept, ranks, squares, cover } = valuesOf(kase, plan);
        // A Fixed person whom no table lists counts in no minimum and carries nothing.
        expect({ cover, missed, kept, ranks, squares }).toEqual(await bestValues(spec));
      }),
      { numRuns: 2000 },
    );
  }, 300_000);

  it('misses no minimum for the sake of cover, and covers no less for the sake of minimums', async () => {
    await fc.assert(
      fc.asyncProperty(specs({ aims: true }), async (spec) => {
        const { kase, plan } = solved(spec);
        expect(plan.covered).toBe(await mostCovered(spec));
        expect(minimumsMissed(kase, plan)).toBe(await leastMissedAtAll(spec));
      }),
      { numRuns: 700 },
    );
  });
});

describe('changing a case', () => {
  it('by adding someone who may take nothing changes nothing', () => {
    fc.assert(
      fc.property(specs({ aims: true }), fc.constantFrom('Aaron', 'Person 2b', 'Zoe'), (spec, name) => {
        const people = [...spec.people, { name, maximum: 3, minimum: 0, carried: 0 }];
        expect(seatsOf(solved({ ...spec, people }))).toEqual(seatsOf(solved(spec)));
      }),
      { numRuns: 500 },
    );
  });

  it('by raising a maximum never lowers cover', () => {
    fc.assert(
      fc.property(specs({ aims: true }), fc.nat(), (spec, which) => {
        const people = spec.people.map((entry, p) =>
          p === which % spec.people.length ? { ...entry, maximum: entry.maximum + 1 } : entry,
        );
        expect(solved({ ...spec, people }).plan.covered).toBeGreaterThanOrEqual(solved(spec).plan.covered);
      }),
      { numRuns: 500 },
    );
  });

  it('by renaming a person changes no value of the plan', () => {
    fc.assert(
      fc.property(specs({ aims: true }), fc.nat(), (spec, which) => {
        const people = spec.people.map((entry, p) => (p === which % spec.people.length ? { ...entry, name: 'Aaron' } : entry));
        const [one, other] = [solved(spec), solved({ ...spec, people })];
        expect(valuesOf(other.kase, other.plan)).toEqual(valuesOf(one.kase, one.plan));
      }),
      { numRuns: 500 },
    );
  });

  it('by removing one person from a plan in force changes as few seats as can be', async () => {
    await fc.assert(
      fc.asyncProperty(specs({ aims: true }), fc.nat(), async (spec, which) => {
        const before = solved({ ...spec, current: null });
        const current = before.plan.seats.map(({ duty, person }): [number, number] => [
          spec.duties.findIndex(({ name }) => name === before.kase.duties[duty].name),
          spec.people.findIndex(({ name }) => name === before.kase.people[person].name),
        ]);
        const gone = which % spec.people.length;
        const people = spec.people.map((entry, p) => (p === gone ? { ...entry, maximum: 0, minimum: 0 } : entry));
        const next: Spec = { ...spec, people, current, order: ['changes', 'ranks', 'evenness'] };
        const { kase, plan } = solved(next);
        expect(currentKept(kase, plan)).toBe((await bestValues(next)).kept);
      }),
      { numRuns: 300 },
    );
  });
});
