import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solve, type Solution } from '../../src/cover/solve';
import type { Case } from '../../src/cover/case';
import { gains } from '../../src/cover/gains';
import { knots, shortages } from '../../src/cover/shortage';
import { readCase } from '../../src/sheet/readCase';
import { bestValues, mostCovered } from '../helpers/oracle';
import { rangesOf, specs, type Spec } from '../helpers/spec';

function solved(spec: Spec): Solution & { kase: Case } {
  const { case: kase, faults } = readCase(rangesOf(spec));
  if (kase === null) throw faults[0];
  const solution = solve(kase);
  if ('crossing' in solution) throw new Error('limits cross');
  return { ...solution, kase };
}

function coverOf({ kase, plan }: { kase: Case; plan: Solution['plan'] }): Map<number, number> {
  const covered = new Map<number, number>();
  kase.duties.forEach(({ need, priority }, d) => {
    covered.set(priority, (covered.get(priority) ?? 0) + Math.min(need, plan.heldOfDuty[d]));
  });
  return covered;
}

describe('the covering plan against an integer programme', () => {
  it('covers each priority class as well as HiGHS does, aim by aim', async () => {
    await fc.assert(
      fc.asyncProperty(specs(), async (spec) => {
        const answer = solved(spec);
        const { cover } = await bestValues(spec);
        expect([...coverOf(answer)].sort((a, b) => a[0] - b[0])).toEqual(cover);
        expect(answer.faults).toEqual([]);
      }),
      { numRuns: 1500 },
    );
  });

  it('loses no seat in total by putting the urgent classes first', async () => {
    await fc.assert(
      fc.asyncProperty(specs(), async (spec) => {
        expect(solved(spec).plan.covered).toBe(await mostCovered(spec));
      }),
      { numRuns: 700 },
    );
  });

  it('keeps every rule, limit and need', () => {
    fc.assert(
      fc.property(specs(), (spec) => {
        const { plan, kase } = solved(spec);
        const pairs = new Set(spec.pairs.map(([d, p]) => `${d} ${p}`));
        const byName = plan.seats.map(({ duty, person, fixed }) => ({
          d: spec.duties.findIndex(({ name }) => name === kase.duties[duty].name),
          p: spec.people.findIndex(({ name }) => name === kase.people[person].name),
          fixed,
        }));
        expect(new Set(byName.map(({ d, p }) => `${d} ${p}`)).size).toBe(plan.seats.length);
        const fixedSeats = byName.filter(({ fixed }) => fixed);
        const keeps = (most: number, test: (d: number, p: number) => boolean): void => {
          const allowed = Math.max(most, fixedSeats.filter(({ d, p }) => test(d, p)).length);
          expect(byName.filter(({ d, p }) => test(d, p)).length).toBeLessThanOrEqual(allowed);
        };
        for (const { d, p, fixed } of byName) if (!fixed) expect(pairs.has(`${d} ${p}`)).toBe(true);
        spec.duties.forEach(({ need }, duty) => keeps(need, (d) => d === duty));
        spec.people.forEach(({ maximum }, person) => {
          keeps(maximum, (_, p) => p === person);
          for (const slot of new Set(spec.duties.map((duty) => duty.slot).filter(Boolean))) {
            keeps(1, (d, p) => p === person && spec.duties[d].slot === slot);
          }
        });
        for (const rule of spec.rules) {
          if (rule.rule === 'Fixed') expect(byName.some(({ d, p }) => d === rule.duty && p === rule.person)).toBe(true);
          if (rule.rule === 'Barred') keeps(0, (d, p) => d === rule.duty && p === rule.person);
          if (rule.rule === 'Away') keeps(0, (d, p) => p === rule.person && carries(spec, d, rule.label));
          if (rule.rule === 'Limit') {
            spec.people.forEach((_, person) => {
              if (rule.person !== null && rule.person !== person) return;
              keeps(rule.most, (d, p) => p === person && carries(spec, d, rule.label));
            });
          }
        }
      }),
      { numRuns: 1500 },
    );
  });
});

function carries(spec: Spec, d: number, label: string): boolean {
  return spec.duties[d].slot === label || spec.duties[d].group === label;
}

describe('gains', () => {
  it('are what solving again with one place more gives, for every person', () => {
    fc.assert(
      fc.property(specs(), (spec) => {
        const { kase, plan, reduction, residual } = solved(spec);
        const gain = gains(reduction, residual);
        kase.people.forEach((person, p) => {
          const i = spec.people.findIndex(({ name }) => name === person.name);
          const fixed = spec.rules.filter((rule) => rule.rule === 'Fixed' && rule.person === i).length;
          const people = spec.people.map((entry, j) =>
            j === i ? { ...entry, maximum: Math.max(entry.maximum, fixed) + 1 } : entry,
          );
          expect(gain[p]).toBe(solved({ ...spec, people }).plan.covered - plan.covered);
        });
      }),
      { numRuns: 600 },
    );
  });
});

describe('knots', () => {
  it('hold exactly as many of their own seats as their people ever can, and all shortage lies in them', () => {
    fc.assert(
      fc.property(specs(), (spec) => {
        const solution = solved(spec);
        const { kase, plan } = solution;
        const found = shortages(kase, solution.reduction.open, plan, knots(kase, solution));
        expect(found.reduce((sum, { short }) => sum + short, 0)).toBe(plan.needed - plan.covered);
        for (const { knot } of found) {
          if (knot === null) continue;
          const inside = new Set(knot.duties.map((d) => kase.duties[d].name));
          const alone = {
            ...spec,
            duties: spec.duties.map((duty) => (inside.has(duty.name) ? duty : { ...duty, need: 0 })),
          };
          const { plan: best, kase: sameCase } = solved(alone);
          const held = knot.duties.reduce((sum, d) => {
            const there = sameCase.duties.findIndex(({ key }) => key === kase.duties[d].key);
            return sum + Math.min(kase.duties[d].need, best.heldOfDuty[there]);
          }, 0);
          expect(knot.places).toBe(held);
          expect(knot.places).toBeLessThan(knot.needed);
        }
      }),
      { numRuns: 600 },
    );
  });
});
