import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Case } from '../../src/cover/case';
import { check } from '../../src/cover/check';
import { solve } from '../../src/cover/solve';
import { steps, type Move } from '../../src/cover/steps';
import { readCase } from '../../src/sheet/readCase';
import { rangesOf, specs, type Spec } from '../helpers/spec';

function solved(spec: Spec) {
  const { case: kase, faults } = readCase(rangesOf(spec));
  if (kase === null) throw faults[0];
  const solution = solve(kase);
  if ('crossing' in solution) throw new Error('limits cross');
  return { ...solution, kase, open: solution.reduction.open };
}

const withCurrent = specs({ aims: true }).map((spec) => ({ ...spec, current: spec.current ?? spec.pairs.map(([d, p]) => [d, p] as const) }));

/** A plan in force that keeps every rule: the best plan of the case with other ranks and fewer people. */
const soundCurrent = fc.tuple(specs({ aims: true }), fc.nat()).map(([spec, which]): Spec => {
  const { kase, plan } = solved({ ...spec, current: null, rules: [] });
  const current = plan.seats.map(({ duty, person }): [number, number] => [
    spec.duties.findIndex(({ name }) => name === kase.duties[duty].name),
    spec.people.findIndex(({ name }) => name === kase.people[person].name),
  ]);
  const gone = which % spec.people.length;
  const people = spec.people.map((entry, p) => (p === gone ? { ...entry, maximum: 0 } : entry));
  return { ...spec, rules: [], people, current, order: ['ranks', 'evenness', 'changes'] };
});

/** Carries the moves out one by one. */
function replay(kase: Case, chains: readonly (readonly Move[])[], afterEach: (seats: Set<number>, move: Move) => void): Set<number> {
  const number = (duty: number, person: number): number => duty * kase.people.length + person;
  const seats = new Set((kase.current ?? []).map(({ duty, person }) => number(duty, person)));
  for (const move of chains.flat()) {
    if (move.from !== null) expect(seats.delete(number(move.duty, move.from))).toBe(true);
    if (move.to !== null) {
      expect(seats.has(number(move.duty, move.to))).toBe(false);
      seats.add(number(move.duty, move.to));
    }
    afterEach(seats, move);
  }
  return seats;
}

describe('the moves from the plan in force', () => {
  it('lead to the best plan when carried out one by one', () => {
    fc.assert(
      fc.property(withCurrent, (spec) => {
        const { kase, open, plan } = solved(spec);
        const seats = replay(kase, steps(kase, open, plan), () => undefined);
        const best = plan.seats.map(({ duty, person }) => duty * kase.people.length + person);
        expect([...seats].sort((a, b) => a - b)).toEqual(best.sort((a, b) => a - b));
      }),
      { numRuns: 1500 },
    );
  });

  it('are none where the best plan is in force', () => {
    fc.assert(
      fc.property(specs({ aims: true }), (spec) => {
        const { kase, plan } = solved({ ...spec, current: null });
        const current = plan.seats.map(({ duty, person }) => [kase.duties[duty].name, kase.people[person].name]);
        const ranges = rangesOf({ ...spec, order: ['changes', 'ranks', 'evenness'] });
        const { case: again } = readCase([...ranges.slice(0, 4), [['Duty', 'Person'], ...current]]);
        const solution = solve(again!);
        if ('crossing' in solution) throw new Error('limits cross');
        expect(steps(again!, solution.reduction.open, solution.plan)).toEqual([]);
      }),
      { numRuns: 500 },
    );
  });

  it('put nobody over a limit on the way, where the plan in force keeps all limits but those of whoever is gone', () => {
    fc.assert(
      fc.property(soundCurrent, (spec) => {
        const { kase, open, plan } = solved(spec);
        const gone = kase.people.findIndex(({ maximum, name }) => maximum === 0 && spec.current!.some(([, p]) => spec.people[p].name === name));
        replay(kase, steps(kase, open, plan), (numbers) => {
          const seats = [...numbers].map((n) => ({ duty: Math.floor(n / kase.people.length), person: n % kase.people.length }));
          const over = check(kase, open, seats).filter(({ kind, person }) => kind.startsWith("Over") && person !== gone);
          expect(over).toEqual([]);
        });
      }),
      { numRuns: 1500 },
    );
  });

  it('come chain by chain, the shortest first', () => {
    fc.assert(
      fc.property(withCurrent, (spec) => {
        const { kase, open, plan } = solved(spec);
        const chains = steps(kase, open, plan);
        const moves = chains.map((chain) => chain.filter(({ to, duty }, i) => to !== null || !chain.slice(i).some((m) => m.duty === duty && m.from === null)).length);
        expect(moves).toEqual([...moves].sort((a, b) => a - b));
      }),
      { numRuns: 300 },
    );
  });
});

describe('checking a plan', () => {
  it('finds nothing but what cannot be helped in the best plan', () => {
    fc.assert(
      fc.property(specs({ aims: true }), (spec) => {
        const { kase, open, plan } = solved(spec);
        const fixed = new Set(kase.fixed.map(({ person }) => person));
        const found = check(kase, open, plan.seats);
        const allowed = found.filter(
          ({ kind, person, duty }) =>
            kind === 'Uncovered' ||
            kind === 'Below minimum' ||
            (person !== null && fixed.has(person)) ||
            (kind === 'Too many' && kase.fixed.some((seat) => seat.duty === duty)),
        );
        expect(found).toEqual(allowed);
      }),
      { numRuns: 1000 },
    );
  });
});
