import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Case } from '../../src/cover/case';
import { check } from '../../src/cover/check';
import { PairState } from '../../src/cover/openPairs';
import type { Plan } from '../../src/cover/plan';
import { solve, type Solution } from '../../src/cover/solve';
import { Trials, type Trial } from '../../src/cover/trials';
import { minimumsMissed } from '../../src/functions/measures';
import { readCase } from '../../src/sheet/readCase';
import { allPlans, compareValues, valueOf } from '../helpers/bruteForce';
import type { HardSpec } from '../helpers/hardSpec';
import { rangesOf, specs, type Spec } from '../helpers/spec';

function caseOf(spec: Spec): Case {
  const { case: kase, faults } = readCase(rangesOf(spec));
  if (kase === null) throw faults[0];
  return kase;
}

function solved(kase: Case): Solution {
  const solution = solve(kase);
  if ('crossing' in solution) throw new Error('limits cross');
  return solution;
}

const key = ({ duty, person }: { duty: number; person: number }): string => `${duty} ${person}`;

/** Cover by priority, most urgent first, then minimums missed, then seats of another plan that are kept. */
function valuesOf(kase: Case, plan: Plan, before: Plan): { cover: number[]; missed: number; kept: number } {
  const priorities = [...new Set(kase.duties.map(({ priority }) => priority))].sort((a, b) => a - b);
  const covered = (d: number): number => Math.min(kase.duties[d].need, plan.heldOfDuty[d]);
  const held = new Set(plan.seats.map(key));
  return {
    cover: priorities.map((priority) => kase.duties.reduce((sum, duty, d) => sum + (duty.priority === priority ? covered(d) : 0), 0)),
    missed: minimumsMissed(kase, plan),
    kept: before.seats.filter((seat) => held.has(key(seat))).length,
  };
}

/** The same tables with the pair Fixed, and the plan at hand to be kept as far as can be. */
function withFixed(kase: Case, pair: number, { seats }: Plan): Case {
  const place = (order: Int32Array, number: number): number => order.indexOf(number);
  const fixed = [...kase.fixed, { duty: kase.pairs.duty[pair], person: kase.pairs.person[pair] }];
  fixed.sort((a, b) => place(kase.dutyOrder, a.duty) - place(kase.dutyOrder, b.duty) || place(kase.personOrder, a.person) - place(kase.personOrder, b.person));
  return { ...kase, fixed, current: seats.map(({ duty, person }) => ({ duty, person })), order: ['changes', 'ranks', 'evenness'] };
}

/** What a trial claims agrees with the plan it leads to. */
function expectHonest(kase: Case, trial: Trial, before: Plan, after: Plan): void {
  const covered = (plan: Plan, d: number): number => Math.min(kase.duties[d].need, plan.heldOfDuty[d]);
  const count = (list: readonly number[], d: number): number => list.filter((e) => e === d).length;
  kase.duties.forEach((_, d) => expect(covered(after, d) - covered(before, d)).toBe(count(trial.gains, d) - count(trial.loses, d)));
  const priorities = [...new Set(kase.duties.map(({ priority }) => priority))].sort((a, b) => a - b);
  const [one, other] = [valuesOf(kase, before, before), valuesOf(kase, after, before)];
  const more = priorities.map((_, c) => other.cover[c] - one.cover[c]);
  expect(priorities.filter((_, c) => more[c] < 0)).toEqual(trial.worse === null ? [] : [trial.worse]);
  expect(priorities.filter((_, c) => more[c] > 0)).toEqual(trial.better === null ? [] : [trial.better]);
  expect(other.missed - one.missed).toBe(trial.missed);
}

describe('what follows where a person is made to hold a pair', () => {
  it('is as good in cover by priority, in minimums and in seats kept as solving the case anew with the pair Fixed', () => {
    let [tried, dear, odd] = [0, 0, 0];
    fc.assert(
      fc.property(specs({ aims: true, duties: 8, people: 6 }), (spec) => {
        const kase = caseOf(spec);
        const solution = solved(kase);
        const { plan, reduction } = solution;
        const trials = new Trials(kase, solution);
        const all = kase.duties.flatMap((_, d) => trials.ofDuty(d));
        const held = new Set(plan.seats.map(key));
        const expected = Array.from(reduction.open.state.keys()).filter((i) => {
          return reduction.open.state[i] === PairState.Open && !held.has(`${kase.pairs.duty[i]} ${kase.pairs.person[i]}`);
        });
        expect(all.map(({ pair }) => pair).sort((a, b) => a - b)).toEqual(expected);
        for (const trial of all) {
          tried++;
          if (trial.worse !== null) dear++;
          if (trial.passesMaximum || trial.passesNeed) odd++;
          const after = trials.planWith(trial);
          expectHonest(kase, trial, plan, after);
          expect(valuesOf(kase, after, plan)).toEqual(valuesOf(kase, solved(withFixed(kase, trial.pair, plan)).plan, plan));
          const [was, is] = [plan, after].map(({ seats }) => new Set(check(kase, reduction.open, seats).map((wrong) => JSON.stringify(wrong))));
          const passed = [...is].filter((text) => !was.has(text) && !/"(?:Uncovered|Below minimum)"/u.test(text));
          expect(passed.length > 0).toBe(trial.passesMaximum || trial.passesNeed);
        }
      }),
      { numRuns: 1500 },
    );
    // Every kind of outcome has been seen often.
    expect(Math.min(tried, dear, odd)).toBeGreaterThan(500);
  });

  it('is as cheap asked by the person as asked by the duty', () => {
    fc.assert(
      fc.property(specs({ aims: true, duties: 8, people: 6 }), (spec) => {
        const kase = caseOf(spec);
        const solution = solved(kase);
        const trials = new Trials(kase, solution);
        const worth = (trial: Trial): unknown => [trial.pair, valuesOf(kase, trials.planWith(trial), solution.plan)];
        const byDuty = kase.duties.flatMap((_, d) => trials.ofDuty(d)).sort((a, b) => a.pair - b.pair);
        const byPerson = kase.people.flatMap((_, p) => trials.ofPerson(p)).sort((a, b) => a.pair - b.pair);
        expect(byPerson.map(worth)).toEqual(byDuty.map(worth));
      }),
      { numRuns: 500 },
    );
  });

  it('is the best of all plans that hold the pair, where every plan is tried', () => {
    let tried = 0;
    fc.assert(
      fc.property(specs({ aims: true, duties: 4, people: 3, rules: 4 }), (spec) => {
        const kase = caseOf(spec);
        const solution = solved(kase);
        const trials = new Trials(kase, solution);
        const duty = (d: number): number => spec.duties.findIndex(({ name }) => name === kase.duties[d].name);
        const person = (p: number): number => spec.people.findIndex(({ name }) => name === kase.people[p].name);
        const current = solution.plan.seats.map((seat) => [duty(seat.duty), person(seat.person)] as const);
        for (const trial of kase.duties.flatMap((_, d) => trials.ofDuty(d))) {
          tried++;
          const forced = [duty(kase.pairs.duty[trial.pair]), person(kase.pairs.person[trial.pair])] as const;
          const hard = { ...plainSpec(spec), current, order: ['changes' as const] };
          const withForced = { ...hard, fixed: [...hard.fixed, forced] };
          const best = [...allPlans(withForced)].map((seats) => valueOf(withForced, seats)).sort(compareValues)[0];
          const after = trials.planWith(trial).seats.map((seat) => [duty(seat.duty), person(seat.person)] as const);
          expect(valueOf({ ...hard, fixed: [] }, after)).toEqual(best);
        }
      }),
      { numRuns: 400 },
    );
    expect(tried).toBeGreaterThan(500);
  });
});

/** The same case in the words of the full enumeration, which knows Away only as pairs that are barred. */
function plainSpec(spec: Spec): HardSpec {
  const fixed = spec.rules.flatMap((rule) => (rule.rule === 'Fixed' ? [[rule.duty, rule.person] as const] : []));
  const barred = spec.rules.flatMap((rule) => {
    if (rule.rule === 'Barred') return [[rule.duty, rule.person] as const];
    if (rule.rule !== 'Away') return [];
    return spec.duties.flatMap(({ slot, group }, d) => (slot === rule.label || group === rule.label ? [[d, rule.person] as const] : []));
  });
  return {
    duties: spec.duties.map((duty) => ({ ...duty, time: null, load: 1 })),
    people: spec.people,
    pairs: spec.pairs,
    fixed,
    barred,
    limits: spec.rules.flatMap((rule) => (rule.rule === 'Limit' ? [rule] : [])),
    clash: [],
    together: [],
    rest: 0,
    current: spec.current,
    order: ['changes', 'ranks', 'evenness'],
  };
}
