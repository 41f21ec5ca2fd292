import { beforeEach, describe, expect, it } from 'vitest';
import { argumentAt, argumentsOf, decide, decisionsOf, undecide } from '../../src/desk/decide';
import { MemoryWorkbook } from '../../src/host/memory';

describe('the arguments of a formula', () => {
  it.each<[string, string[] | null]>([
    ['=DUTY.ASSIGN(Pairs, People, Duties, Rules)', ['Pairs', 'People', 'Duties', 'Rules']],
    ["=ROWS(DUTY.UNCOVERED('My, sheet'!A1:B9,People,,Rules))", ["'My, sheet'!A1:B9", 'People', '', 'Rules']],
    ['=_xldudf_DUTY_ASSIGN(_xldudf_DUTY_PAIRS(Grid),3)', ['_xldudf_DUTY_PAIRS(Grid)', '3']],
    ['=DUTY.CHECK(IF(A1=",",B1:C2,D1:E2),P)', ['IF(A1=",",B1:C2,D1:E2)', 'P']],
    ['=SUM(A1:A3)', null],
    ['=DUTY.ASSIGN(Pairs', null],
  ])('of %s', (formula, expected) => {
    expect(argumentsOf(formula)).toEqual(expected);
  });
});

describe('decisions in the rules', () => {
  let port: MemoryWorkbook;
  beforeEach(async () => {
    port = new MemoryWorkbook();
    await port.addSheets([
      {
        name: 'Rules',
        rows: [['Person', 'Rule', 'Note', 'Duty', 'Value'], ['Ada', 'Barred', 'family', 'Desk', null]],
        names: [{ name: 'Rules', cells: 'A1:E5' }],
      },
      { name: 'Results', rows: [[{ formula: '=DUTY.ASSIGN(Pairs, People, Duties, Rules)' }], [{ formula: '=DUTY.ASSIGN(Pairs, People)' }]] },
    ]);
  });

  it('are written under the headings where they belong, read again, and taken away', async () => {
    expect(await decide(port, 'Results!A1', 'Fixed', '=Late desk', 'Bo')).toContain('It stands in Rules!A3');
    expect((await port.read('Rules!A3:E3'))!.values).toEqual([['Bo', 'Fixed', null, '=Late desk', null]]);
    const decisions = await decisionsOf(port, 'Results!A1');
    expect(decisions.map(({ word, duty, person }) => [word, duty, person])).toEqual([['Barred', 'Desk', 'Ada'], ['Fixed', '=Late desk', 'Bo']]);
    expect(await undecide(port, 'Results!A1', decisions[0])).toBe('Taken away: Barred, Ada, Desk.');
    expect((await port.read('Rules!A2:E2'))!.values).toEqual([[null, null, 'family', null, null]]);
    await undecide(port, 'Results!A1', decisions[1]);
    expect(await decisionsOf(port, 'Results!A1')).toHaveLength(0);
  });

  it('say what is missing where they cannot be written', async () => {
    expect(await argumentAt(port, 'Results!A2', 3)).toBeNull();
    expect(await decide(port, 'Results!A2', 'Fixed', 'Desk', 'Bo')).toContain('fourth argument');
    for (let i = 0; i < 3; i++) await decide(port, 'Results!A1', 'Fixed', `Desk ${i}`, 'Bo');
    expect(await decide(port, 'Results!A1', 'Fixed', 'Desk', 'Bo')).toContain('no blank row left');
  });

  it('are not taken away from where something else stands by now', async () => {
    const [decision] = await decisionsOf(port, 'Results!A1');
    await port.write('Rules!A2', [['Bo']]);
    expect(await undecide(port, 'Results!A1', decision)).toContain('no longer holds this decision');
    expect((await port.read('Rules!A2:D2'))!.values).toEqual([['Bo', 'Barred', 'family', 'Desk']]);
  });

  it.each(['A1:E5', '$A$1:$E$5', 'Rules!A1:E5', 'Rules!$A$1:$E$5', 'Rules'])('are found where a formula on the sheet of the rules names them %s', async (rules) => {
    await port.write('Rules!H1', [[{ formula: `=DUTY.ASSIGN(Pairs, People, Duties, ${rules})` }]]);
    expect(await argumentAt(port, 'Rules!H1', 3)).not.toBeNull();
    expect(await decisionsOf(port, 'Rules!H1')).toHaveLength(1);
    expect(await decide(port, 'Rules!H1', 'Fixed', 'Desk', 'Bo')).toContain('It stands in Rules!A3');
  });
});
