import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Solved } from '../../src/functions/solved';
import { aboutDuty, aboutPerson } from '../../src/pane/whatIf/about';
import { rangesOf, specs } from '../helpers/spec';
import type { Range } from '../../src/sheet/range';

const PAIRS: Range = [['Choir', 'Ann'], ['Choir', 'Bob'], ['Organ', 'Ann'], ['Bells', 'Ann']];
const DUTIES: Range = [['Duty', 'Need'], ['Choir', 1], ['Organ', 1], ['Bells', 1]];

describe('what is said of a duty and a person', () => {
  it('is the seats of a duty, and why it is short', () => {
    const solved = new Solved([PAIRS, [['Ann', 1], ['Bob', 1]], DUTIES, null]);
    expect(aboutDuty(solved, 0)).toEqual(['Needs 1, held by 1.']);
    const short = solved.outcome.plan.heldOfDuty[1] === 0 ? 1 : 2;
    expect(aboutDuty(solved, short)).toEqual([
      'Needs 1, held by 0.',
      'Part of bottleneck 1: only Ann can take these 2 duties (Organ; Bells), and has room for at most 1 of the 2 seats needed.',
    ]);
  });

  it('is the seats of a person, and what would be lost without them', () => {
    const solved = new Solved([PAIRS, [['Person', 'Maximum', 'Minimum'], ['Ann', 2, 1], ['Bob', 1, ''], ['Cy', 3, '']], DUTIES, null]);
    expect(aboutPerson(solved, 0)).toEqual(['Holds 2 of at most 2 and at least 1.', 'If they were away, 2 seats are lost; short then: Organ; Bells.']);
    expect(aboutPerson(solved, 2)).toEqual(['Holds 0 of at most 3.']);
    const spare = new Solved([PAIRS, [['Ann', 3], ['Bob', 1]], DUTIES, null]);
    const bob = aboutPerson(spare, 1);
    expect(bob).toEqual(spare.outcome.plan.loadByPerson[1] === 0 ? ['Holds 0 of at most 1.'] : ['Holds 1 of at most 1.', 'If they were away, 0 seats are lost.']);
  });

  it('tells of each absence what solving without the person loses, though nobody asked for all of them', () => {
    fc.assert(
      fc.property(specs({ duties: 6, people: 4 }), (spec) => {
        const solved = new Solved(rangesOf(spec));
        solved.case.people.forEach(({ name }, p) => {
          const [, absence] = aboutPerson(solved, p);
          if (absence === undefined) return;
          const gone = spec.people.findIndex((one) => one.name === name);
          const without = new Solved(
            rangesOf({
              ...spec,
              people: spec.people.map((one, i) => (i === gone ? { ...one, maximum: 0 } : one)),
              pairs: spec.pairs.filter(([, q]) => q !== gone),
              rules: spec.rules.filter((rule) => !(rule.rule === 'Fixed' && rule.person === gone)),
            }),
          );
          const lost = solved.outcome.plan.covered - without.outcome.plan.covered;
          expect(absence).toMatch(new RegExp(`^If they were away, ${lost} (?:seat is|seats are) lost`, 'u'));
        });
      }),
      { numRuns: 300 },
    );
  });
});
