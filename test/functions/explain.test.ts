import { describe, expect, it } from 'vitest';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { FUNCTIONS } from '../../src/functions/registry';
import type { Range } from '../../src/sheet/range';

/** A small clinic: two evening surgeries that only Noor may take, and a ward round that anyone may. */
const PAIRS: Range = [
  ['Duty', 'Person'],
  ['Evening surgery', 'Noor'],
  ['Late surgery', 'Noor'],
  ['Ward round', 'Noor'],
  ['Ward round', 'Pim'],
  ['Vaccines', 'Pim'],
  ['Vaccines', 'Quin'],
  ['Night call', 'Quin'],
];
const PEOPLE: Range = [['Person', 'Maximum', 'Stretch'], ['Noor', 1, 1], ['Pim', 2, 1], ['Quin', 1, 0]];
const DUTIES: Range = [
  ['Duty', 'Need', 'Slot'],
  ['Evening surgery', 1, 'Mon'],
  ['Late surgery', 1, 'Tue'],
  ['Ward round', 1, 'Wed'],
  ['Vaccines', 1, 'Thu'],
  ['Night call', 1, 'Thu'],
  ['Theatre', 1, 'Fri'],
];
const RULES: Range = [['Rule', 'Duty', 'Person', 'Value'], ['Away', '', 'Quin', 'Thu']];

function rows(id: string, ...ranges: (Range | null)[]): unknown[][] {
  const answer = invoke(FUNCTIONS.find((fn) => fn.id === id)!, ranges, 'A!A1', new Journal());
  if (answer.kind !== 'spill') throw new Error(JSON.stringify(answer));
  return answer.spill.slice(1).map((row) => [...row]);
}

describe('the explanations of a small clinic', () => {
  it('BOTTLENECKS are the duties that hang on too few people', () => {
    expect(rows('BOTTLENECKS', PAIRS, PEOPLE, DUTIES, RULES)).toEqual([
      [1, 'Evening surgery; Late surgery', 'Noor', 2, 1, 1, 'Only Noor can take these 2 duties (Evening surgery; Late surgery), and has room for at most 1 of the 2 seats needed.'],
      [2, 'Night call', '', 1, 0, 1, 'Nobody may take this duty.'],
      [3, 'Theatre', '', 1, 0, 1, 'Nobody may take this duty.'],
    ]);
  });

  it('UNCOVERED says of each short duty why', () => {
    const reasons = new Map(rows('UNCOVERED', PAIRS, PEOPLE, DUTIES, RULES).map((row) => [row[0], row.slice(3)]));
    expect(reasons.get('Night call')).toEqual([0, 2, 'The only person listed for it is away at that time.']);
    expect(reasons.get('Theatre')).toEqual([0, 3, 'Nobody is listed as able to take it.']);
  });

  it('CHOICES says what is still open', () => {
    expect(rows('CHOICES', PAIRS, PEOPLE, DUTIES, RULES).map((row) => row.join(' '))).toEqual([
      'Evening surgery Noor Sometimes',
      'Late surgery Noor Sometimes',
      'Ward round Noor Never',
      'Ward round Pim Always',
      'Vaccines Pim Always',
      'Vaccines Quin Never',
      'Night call Quin Never',
    ]);
  });

  it('ABSENCES says whom the plan cannot lose, and who would take over', () => {
    const [noor, pim, quin] = rows('ABSENCES', PAIRS, PEOPLE, DUTIES);
    expect(noor.slice(0, 3)).toEqual(['Noor', 1, 1]);
    expect(pim[0]).toBe('Pim');
    expect(quin[0]).toBe('Quin');
    const [, alone] = rows('ABSENCES', [['Desk', 'Ann'], ['Desk', 'Bob'], ['Door', 'Bob']], [['Ann', 1], ['Bob', 1]]);
    expect(alone).toEqual(['Bob', 1, 1, 'Door', '']);
    expect(rows('ABSENCES', [['Desk', 'Ann'], ['Desk', 'Bob']], [['Ann', 1], ['Bob', 1]]).find((row) => row[1] === 1)![4]).toMatch(/^Desk \((Ann|Bob)\)$/u);
  });

  it('REMEDIES are the cheapest, and say what no change can mend', () => {
    const all = rows('REMEDIES', PAIRS, PEOPLE, DUTIES, RULES);
    expect(all.map((row) => row[1]).sort()).toEqual(['make eligible', 'make eligible', 'make eligible', 'one more place', 'one more place']);
    expect(all.reduce((sum, row) => sum + Number(row[4]), 0)).toBe(8);
    const places = rows('REMEDIES', PAIRS, PEOPLE, DUTIES, [...RULES, ['Price', 'eligibility', '', '']]);
    expect(places).toEqual([
      [1, 'one more place', 'Noor', '', 1],
      ['', '2 seats stay uncovered: no change that is allowed helps', '', '', ''],
    ]);
  });
});

describe('sentences about bottlenecks', () => {
  const many = Array.from({ length: 20 }, (_, i) => `Duty ${i}`);
  it('name a few duties and count the rest', () => {
    const pairs = many.flatMap((duty) => ['Ann', 'Bob'].map((person) => [duty, person]));
    const [row] = rows('BOTTLENECKS', pairs, [[3]]);
    expect(row[6]).toBe(
      'Only Ann and Bob can take these 20 duties (Duty 0; Duty 1; Duty 2; Duty 3; Duty 4; … and 15 more), and they have room for at most 6 of the 20 seats needed.',
    );
  });

  it('are shortened in a cell that could not hold all names', () => {
    const pairs = Array.from({ length: 3000 }, (_, i) => [`A duty with a rather long name, number ${i}`, 'Ann']);
    const [row] = rows('BOTTLENECKS', pairs, [[1]]);
    expect(String(row[1]).length).toBeLessThanOrEqual(32_767);
    expect(row[1]).toMatch(/; … and \d+ more$/u);
  });
});
