import { describe, expect, it } from 'vitest';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import type { Range } from '../../src/sheet/range';

/** A small library desk. */
const PAIRS: Range = [
  ['Duty', 'Person', 'Rank'],
  ['Mon desk', 'Ada', 1],
  ['Mon desk', 'Bo', 2],
  ['Mon stacks', 'Ada', 1],
  ['Mon stacks', 'Cy', 1],
  ['Tue desk', 'Bo', 1],
  ['Tue desk', 'Cy', 2],
];
const PEOPLE: Range = [['Person', 'Maximum', 'Minimum'], ['Ada', 1, 0], ['Bo', 2, 1], ['Cy', 1, 1]];
const DUTIES: Range = [['Duty', 'Need', 'Priority', 'Slot'], ['Mon desk', 1, 1, 'Mon'], ['Mon stacks', 1, 2, 'Mon'], ['Tue desk', 1, 2, 'Tue']];
const RULES: Range = [['Rule', 'Duty', 'Person', 'Value'], ['Fixed', 'Tue desk', 'Bo', ''], ['Barred', 'Mon desk', 'Cy', ''], ['Away', '', 'Ada', 'Tue']];

function spill(id: string, ...ranges: (Range | null)[]): (string | number | boolean)[][] {
  const answer = invoke(FUNCTIONS.find((fn) => fn.id === id)!, ranges, 'A!A1', new Journal());
  if (answer.kind !== 'spill') throw new Error(JSON.stringify(answer));
  return answer.spill.map((row) => [...row]);
}

function findings(plan: Range): string[] {
  return spill('CHECK', plan, PAIRS, PEOPLE, DUTIES, RULES).slice(1).map((row) => row.filter((cell) => cell !== '').join(' | '));
}

describe('CHECK', () => {
  it('finds nothing wrong with what ASSIGN spilled', () => {
    const plan = spill('ASSIGN', PAIRS, PEOPLE, DUTIES, RULES);
    expect(findings(plan)).toEqual(['Nothing is wrong: every rule is kept, and no plan covers more']);
  });

  it.each<[string, string[][], string[]]>([
    ['a person who is not eligible', [['Mon desk', 'Ada'], ['Mon stacks', 'Bo'], ['Tue desk', 'Bo']], [
      'Not eligible | Mon stacks | Bo | The pairs do not list this person for this duty.',
      'Below minimum | Cy | Holds 0; the minimum is 1.',
    ]],
    ['a barred person', [['Mon desk', 'Cy'], ['Mon stacks', 'Ada'], ['Tue desk', 'Bo']], ['Barred | Mon desk | Cy | A Barred rule says never.']],
    ['a broken slot, a maximum and a Fixed seat not kept', [['Mon desk', 'Ada'], ['Mon stacks', 'Ada'], ['Tue desk', 'Cy']], [
      'Fixed not kept | Tue desk | Bo | A Fixed rule gives this seat to this person; the plan does not.',
      'Over maximum | Ada | Holds 2; the maximum is 1.',
      'Over a limit | Ada | Holds 2 in "Mon"; at most 1 is allowed.',
      'Below minimum | Bo | Holds 0; the minimum is 1.',
    ]],
    ['someone away', [['Mon desk', 'Bo'], ['Mon stacks', 'Cy'], ['Tue desk', 'Bo'], ['Tue desk', 'Ada']], [
      'Not eligible | Tue desk | Ada | The pairs do not list this person for this duty.',
      'Too many | Tue desk | 2 people hold it; it needs 1.',
    ]],
    ['uncovered seats, and how many more there could be', [['Mon stacks', 'Cy'], ['Tue desk', 'Bo']], [
      'Uncovered | Mon desk | Nobody holds it; it needs 1.',
      'Short of the best | The plan covers 2 seats; 3 can be covered, 1 more.',
      'Short of the best | Priority 1: the plan covers 0 seats; 1 can be covered without giving up a more urgent one.',
    ]],
    ['names that are not listed, and rows given twice', [['Mon desk', 'Bo'], ['Mon desk', 'bo'], ['Mon stacks', 'Cyy'], ['Thu desk', 'Ada'], ['Tue desk', 'Bo']], [
      'Row given twice | Row 2 of the plan: Mon desk with Bo stands in row 1 already.',
      'Person not listed | Row 3 of the plan: "Cyy" is not in the people table: the seat cannot be kept.',
      'Duty not listed | Row 4 of the plan: "Thu desk" is not in the duties table: the row is left out.',
      'Not eligible | Mon stacks | Cyy | The pairs do not list this person for this duty.',
      'Below minimum | Cy | Holds 0; the minimum is 1.',
      'Over maximum | Cyy | Holds 1; the maximum is 0.',
    ]],
  ])('finds %s', (_, plan, expected) => {
    expect(findings(plan).map((row) => row.replace(/ Did you mean .*/u, ''))).toEqual(expected);
  });

  it('takes the uncovered rows of ASSIGN for what they are', () => {
    const plan: Range = [['Duty', 'Person', 'Rank', 'Note'], ['Mon desk', '', '', 'Uncovered'], ['Mon stacks', 'Cy', 1, ''], ['Tue desk', 'Bo', 1, '']];
    expect(findings(plan)[0]).toBe('Uncovered | Mon desk | Nobody holds it; it needs 1.');
  });
});

describe('with a plan in force', () => {
  const current: Range = [['Duty', 'Person'], ['Mon desk', 'Ada'], ['Mon stacks', 'Cy'], ['Tue desk', 'Bo']];
  const withoutAda: Range = [['Person', 'Maximum', 'Minimum'], ['Ada', 0, 0], ['Bo', 2, 1], ['Cy', 1, 1]];

  it('ASSIGN says what is Kept, New and Fixed', () => {
    expect(spill('ASSIGN', PAIRS, withoutAda, DUTIES, RULES, current).slice(1)).toEqual([
      ['Mon desk', 'Bo', 2, 'New'],
      ['Mon stacks', 'Cy', 1, 'Kept'],
      ['Tue desk', 'Bo', 1, 'Fixed'],
    ]);
  });

  it('STEPS says who takes over, who is free, and what is uncovered', () => {
    expect(spill('STEPS', PAIRS, withoutAda, DUTIES, RULES, current).slice(1)).toEqual([[1, 'Mon desk', 'Ada', 'Bo', '1; Ada is now free']]);
    const tight: Range = [['Person', 'Maximum'], ['Bo', 1], ['Cy', 1]];
    expect(spill('STEPS', PAIRS, tight, DUTIES, RULES, current).slice(1)).toEqual([
      [1, 'Mon desk', 'Ada', '(nobody)', '1; Ada is now free; now uncovered'],
    ]);
    expect(spill('STEPS', PAIRS, PEOPLE, DUTIES, RULES, current)[1][0]).toBe('No moves: the current plan is the best plan');
    expect(spill('STEPS', PAIRS, PEOPLE, DUTIES, RULES)[1][0]).toBe('No current plan is given');
  });

  it('people who only exchange duties put one down first', () => {
    const pairs: Range = [['A', 'Ann', 2], ['A', 'Bob', 1], ['B', 'Ann', 1], ['B', 'Bob', 2]];
    const order: Range = [['Rule', 'Duty', 'Person', 'Value'], ['Order', '', '', 'ranks']];
    expect(spill('STEPS', pairs, [[1]], null, order, [['A', 'Ann'], ['B', 'Bob']]).slice(1)).toEqual([
      [1, 'A', 'Ann', '(nobody)', '1'],
      [2, 'B', 'Bob', 'Ann', '1'],
      [3, 'A', '(nobody)', 'Bob', '1'],
    ]);
  });

  it('SUMMARY counts what is kept, the ranks and the minimums missed', () => {
    const items = new Map(spill('SUMMARY', PAIRS, withoutAda, DUTIES, RULES, current).map(([item, value]) => [item, value]));
    expect([items.get('Current kept'), items.get('Rank total'), items.get('Minimums missed')]).toEqual([2, 4, 0]);
  });
});

describe('LOADS', () => {
  it('says who is below the minimum and why it could not be helped', () => {
    const people: Range = [['Person', 'Maximum', 'Minimum'], ['Ada', 1, 2], ['Bo', 2, 2], ['Cy', 2, 2], ['Di', 1, 1]];
    const notes = spill('LOADS', PAIRS, people, DUTIES).map((row) => row[7]);
    expect(notes[1]).toBe('Below the minimum by 1: the maximum is 1.');
    expect(notes[4]).toBe('Below the minimum by 1: no duty is open to them.');
    expect(notes.slice(2, 4).filter((note) => String(note).includes('no duty can pass to them')).length).toBeGreaterThan(0);
  });
});
