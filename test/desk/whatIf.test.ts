import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { check } from '../../src/cover/check';
import { consequenceOf, consequenceWords, optionsOfDuty } from '../../src/desk/whatIf';
import { Solved } from '../../src/functions/solved';
import { rangesOf, specs } from '../helpers/spec';

/** A plan may leave these open without passing a limit. */
const EXPECTED = new Set<string>(['Uncovered', 'Below minimum']);

describe('what follows where someone is made to hold a duty', () => {
  it('is what the tables with a Fixed row more come to, and the moves lead there', () => {
    let tried = 0;
    fc.assert(
      fc.property(specs({ aims: true, duties: 6, people: 4 }), (spec) => {
        const solved = new Solved(rangesOf({ ...spec, current: null }));
        const { plan, open } = solved.outcome;
        for (const option of optionsOfDuty(solved, 0)) {
          if (!option.isOpen || option.isHeld) continue;
          tried++;
          const { lost, moves, urgent, passes } = consequenceOf(solved, option)!;
          const person = solved.case.people[option.person].name;
          const fixed = { rule: 'Fixed' as const, duty: 0, person: spec.people.findIndex(({ name }) => name === person) };
          const again = new Solved(rangesOf({ ...spec, current: null, rules: [...spec.rules, fixed] }));
          expect(plan.covered - lost).toBe(again.outcome.plan.covered);
          expect(option.words).toBe(lost === 0 && urgent === null && passes.length === 0 ? 'costs no seat' : 'costs cover');
          const key = (d: number, p: number): string => `${d} ${p}`;
          const held = new Set(plan.seats.map((seat) => key(seat.duty, seat.person)));
          for (const { duty, from, to } of moves) {
            if (from !== null) expect(held.delete(key(duty, from))).toBe(true);
            if (to !== null) held.add(key(duty, to));
          }
          expect(held.has(key(option.duty, option.person))).toBe(true);
          const seats = [...held].map((text) => ({ duty: Number(text.split(' ')[0]), person: Number(text.split(' ')[1]) }));
          const wrong = (list: typeof seats): number => check(solved.case, open, list).filter(({ kind }) => !EXPECTED.has(kind)).length;
          const before = wrong(plan.seats.map(({ duty, person: p }) => ({ duty, person: p })));
          if (passes.length === 0) expect(wrong(seats)).toBeLessThanOrEqual(before);
          else expect(wrong(seats)).toBeGreaterThan(0);
          expect(consequenceWords(solved.case, consequenceOf(solved, option)!)[0]).toMatch(passes.length === 0 ? /^Costs /u : /^Passes a limit: /u);
        }
      }),
      { numRuns: 400 },
    );
    expect(tried).toBeGreaterThan(200);
  });
});
