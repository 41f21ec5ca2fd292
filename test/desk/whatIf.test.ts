import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { check } from '../../src/cover/check';
import { PairState } from '../../src/cover/openPairs';
import { consequenceOf, optionsOfDuty, optionsOfPerson, type Option } from '../../src/desk/whatIf';
import { moveWords } from '../../src/desk/trialWords';
import { Solved } from '../../src/functions/solved';
import { rangesOf, specs, type Spec } from '../helpers/spec';
import type { Range } from '../../src/sheet/range';

/** A plan may leave these open without passing a limit. */
const EXPECTED = new Set<string>(['Uncovered', 'Below minimum']);

/** The case with one Fixed row more. */
function withFixed(spec: Spec, solved: Solved, { duty, person }: Option): Solved {
  const number = (list: readonly { name: string }[], name: string): number => list.findIndex((one) => one.name === name);
  const { duties, people } = solved.case;
  const rule = { rule: 'Fixed' as const, duty: number(spec.duties, duties[duty].name), person: number(spec.people, people[person].name) };
  return new Solved(rangesOf({ ...spec, current: null, rules: [...spec.rules, rule] }));
}

/** Seats fewer covered, by priority: most urgent first. */
function lostByPriority(before: Solved, after: Solved): number[] {
  const { duties } = before.case;
  const covered = ({ outcome: { plan } }: Solved, d: number): number => Math.min(duties[d].need, plan.heldOfDuty[d]);
  return [...new Set(duties.map(({ priority }) => priority))]
    .sort((a, b) => a - b)
    .map((wanted) => duties.reduce((sum, { priority }, d) => sum + (priority === wanted ? covered(before, d) - covered(after, d) : 0), 0));
}

describe('what follows where someone is made to hold a duty', () => {
  it('is what the tables with a Fixed row more come to, and the moves lead there', () => {
    let tried = 0;
    fc.assert(
      fc.property(specs({ aims: true, duties: 6, people: 4 }), (spec) => {
        const solved = new Solved(rangesOf({ ...spec, current: null }));
        const { plan, open } = solved.outcome;
        for (const option of optionsOfDuty(solved, 0)) {
          expect(option.trial !== null).toBe(option.isOpen && !option.isHeld);
          if (option.trial === null) continue;
          tried++;
          const again = withFixed(spec, solved, option);
          const lost = plan.covered - again.outcome.plan.covered;
          const byPriority = lostByPriority(solved, again);
          if (byPriority.every((count) => count === 0)) expect(option.words).toMatch(/^costs no seat/u);
          else if (lost === 1) expect(option.words).toMatch(/^costs 1 seat: Duty \d/u);
          else if (lost === -1) expect(option.words).toMatch(/^covers 1 seat more: Duty .*; passes the maximum/u);
          else expect(option.words).toMatch(/^costs a more urgent seat: Duty.* \(priority \d\) short instead of Duty.* \((?:priority \d|no priority)\)/u);
          const { moves } = consequenceOf(solved, option.trial);
          const key = (d: number, p: number): string => `${d} ${p}`;
          const held = new Set(plan.seats.map((seat) => key(seat.duty, seat.person)));
          for (const { duty, from, to } of moves) {
            if (from !== null) expect(held.delete(key(duty, from))).toBe(true);
            if (to !== null) held.add(key(duty, to));
          }
          expect(held.has(key(option.duty, option.person))).toBe(true);
          const seats = [...held].map((text) => ({ duty: Number(text.split(' ')[0]), person: Number(text.split(' ')[1]) }));
          const wrongs = (list: typeof seats): string[] =>
            check(solved.case, open, list).flatMap((wrong) => (EXPECTED.has(wrong.kind) ? [] : [JSON.stringify(wrong)]));
          const before = wrongs(plan.seats.map(({ duty, person }) => ({ duty, person })));
          const isPassed = wrongs(seats).some((wrong) => !before.includes(wrong));
          expect(isPassed).toBe(/passes the maximum|more than needed/u.test(option.words));
          if (isPassed) expect(option.words).toMatch(passedWords(solved, option));
        }
      }),
      { numRuns: 400 },
    );
    expect(tried).toBeGreaterThan(200);
  });

  it('lists what is held first, then what costs nothing, and last what cannot be', () => {
    fc.assert(
      fc.property(specs({ aims: true, duties: 6, people: 4 }), (spec) => {
        const solved = new Solved(rangesOf({ ...spec, current: null }));
        const { duties, people, pairs } = solved.case;
        const kindOf = ({ isHeld, isOpen, words }: Option): number => (isHeld ? 0 : !isOpen ? 4 : words === 'costs no seat' ? 1 : words.startsWith('costs no') ? 2 : 3);
        const lists = [...duties.map((_, d) => optionsOfDuty(solved, d)), ...people.map((_, p) => optionsOfPerson(solved, p))];
        for (const options of lists) {
          const kinds = options.filter(({ trial }) => trial === null || !(trial.passesMaximum || trial.passesNeed)).map(kindOf);
          expect(kinds).toEqual([...kinds].sort((a, b) => a - b));
        }
        const listed = new Set(Array.from(pairs.duty, (d, i) => `${d} ${pairs.person[i]}`));
        const beside = solved.case.fixed.filter(({ duty, person }) => !listed.has(`${duty} ${person}`)).length;
        expect(lists.flat()).toHaveLength(2 * (pairs.count + beside));
        for (const { isOpen, isHeld, words } of lists.flat()) if (!isOpen && !isHeld) expect(words).toMatch(/^(?:barred|away then|no room beside Fixed duties)$/u);
      }),
      { numRuns: 300 },
    );
  });
});

/** What is passed, counted from the plan at hand. */
function passedWords({ case: { duties, people }, outcome: { plan } }: Solved, { duty, person }: Option): RegExp {
  const held = (of: 'duty' | 'person', number: number): number => plan.seats.filter((seat) => seat[of] === number).length;
  const maximum = `passes the maximum \\(${held('person', person) + 1} of ${people[person].maximum}\\)`;
  const need = `is more than needed \\(${held('duty', duty) + 1} for ${duties[duty].need}\\)`;
  return new RegExp(`; (?:${maximum}|${need}|${maximum}; ${need})$`, 'u');
}

describe('the words of a trial', () => {
  const PAIRS: Range = [['Choir', 'Ann'], ['Choir', 'Bob'], ['Organ', 'Ann'], ['Bells', 'Bob'], ['Bells', 'Cy']];
  const words = (people: Range, duties: Range, duty: string, rules: Range = []): Record<string, string> => {
    const solved = new Solved([PAIRS, [['Person', 'Maximum', 'Minimum'], ...people], [['Duty', 'Need', 'Priority'], ...duties], rules.length === 0 ? null : rules]);
    const options = optionsOfDuty(solved, solved.case.duties.findIndex(({ name }) => name === duty));
    return Object.fromEntries(options.map((option) => [solved.case.people[option.person].name, option.words]));
  };

  it('name the duty that loses its seat, and the priority where there are several', () => {
    const people: Range = [['Ann', 1, ''], ['Bob', 1, ''], ['Cy', 0, '']];
    expect(words(people, [['Choir', 1, ''], ['Organ', 1, ''], ['Bells', 0, '']], 'Choir')).toEqual({ Bob: 'holds it in every plan that covers as well', Ann: 'costs 1 seat: Organ' });
    expect(words(people, [['Choir', 1, 2], ['Organ', 1, 1], ['Bells', 0, 1]], 'Choir').Ann).toBe('costs 1 seat: Organ (priority 1)');
    expect(words(people, [['Choir', 1, 2], ['Organ', 1, 1], ['Bells', 1, 3]], 'Bells').Bob).toBe('costs a more urgent seat: Choir (priority 2) short instead of Bells (priority 3)');
    expect(words(people, [['Choir', 1, 2], ['Organ', 1, 1], ['Bells', 1, '']], 'Bells').Bob).toBe('costs a more urgent seat: Choir (priority 2) short instead of Bells (no priority)');
  });

  it('tell what is short instead, minimums missed and limits passed', () => {
    const one: Range = [['Ann', 1, ''], ['Bob', 1, ''], ['Cy', 0, '']];
    const duties: Range = [['Choir', 1, ''], ['Organ', 1, ''], ['Bells', 1, '']];
    // Bob has one place, and either Choir or Bells stays short.
    const alone = words([['Ann', 0, ''], ...one.slice(1)], duties, 'Bells').Bob + words([['Ann', 0, ''], ...one.slice(1)], duties, 'Choir').Bob;
    expect(alone).toMatch(/costs no seat: (?:Choir short instead of Bells|Bells short instead of Choir)/u);
    expect(alone).toContain('holds it');
    const both: Range = [['Ann', 2, 2], ['Bob', 1, ''], ['Cy', 0, '']];
    expect(words(both, [['Choir', 1, ''], ['Organ', 1, ''], ['Bells', 0, '']], 'Choir').Bob).toBe('costs no seat; misses a minimum by 1 seat more');
    expect(words(one, duties, 'Bells').Cy).toMatch(/^covers 1 seat more: (?:Choir|Organ|Bells); passes the maximum \(1 of 0\)$/u);
  });

  it('say each move', () => {
    const kase = new Solved([PAIRS, [['Ann', 1], ['Bob', 1], ['Cy', 1]], null, null]).case;
    const [choir, ann, bob] = [kase.duties.findIndex(({ name }) => name === 'Choir'), 0, 1];
    expect(moveWords(kase, { duty: choir, from: ann, to: bob })).toBe('Ann gives Choir to Bob');
    expect(moveWords(kase, { duty: choir, from: ann, to: null })).toBe('Ann puts Choir down');
    expect(moveWords(kase, { duty: choir, from: null, to: bob })).toBe('Bob takes Choir');
  });

  it('admit where a seat that counts otherwise would have to be searched', () => {
    const open = solvedState();
    expect(open.isOpen && open.trial === null).toBe(true);
    expect(open.words).toBe('');
  });
});

/** The only pair of a duty that counts two and needs nobody: fixed, the case would be no flow any more. */
function solvedState(): Option {
  const solved = new Solved([[['Choir', 'Ann'], ['Rota', 'Ann']], [['Ann', 2]], [['Duty', 'Need', 'Load'], ['Choir', 1, 1], ['Rota', 0, 2]], null]);
  expect(solved.isFlow).toBe(true);
  expect(solved.outcome.open.state[1]).toBe(PairState.Open);
  return optionsOfDuty(solved, 1)[0];
}
