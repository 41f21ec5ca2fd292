import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import { handOverSheets } from '../../src/desk/handOver';
import { Solved } from '../../src/functions/solved';
import { WorkbenchWorkbook } from '../../src/host/workbench/workbook';
import type { Range } from '../../src/sheet/range';
import { registerBulk } from '../../src/host/workbench/bulk';
import { engine } from '../helpers/engine';
registerBulk(engine);
import { rangesOf, specs } from '../helpers/spec';

console.debug = () => undefined;

/** A clinic: rooms in the morning and the evening, someone fixed, someone away, a limit on evenings. */
const CLINIC: Range[] = [
  [['Duty', 'Person', 'Rank'], ['Mon early', 'Ada', 1], ['Mon early', 'Bo', 2], ['Mon late', 'Ada', 1], ['Mon late', 'Bo', 1], ['Tue early', 'Cy', 1], ['Tue early', 'Bo', 1], ['Tue late', 'Ada', 3], ['Tue late', 'Cy', 1]],
  [['Person', 'Maximum'], ['Ada', 2], ['Bo', 2], ['Cy', 1], ['=1+1', 0]],
  [['Duty', 'Need', 'Slot', 'Group'], ['Mon early', 1, 'Mon', 'early'], ['Mon late', 1, 'Mon evening', 'late'], ['Tue early', 1, 'Tue', 'early'], ['Tue late', 1, 'Tue evening', 'late']],
  [['Rule', 'Duty', 'Person', 'Value'], ['Fixed', 'Mon early', 'Ada', ''], ['Barred', 'Tue early', 'Cy', ''], ['Away', '', 'Bo', 'late'], ['Limit', 'late', '', 1]],
  [['Duty', 'Person'], ['Mon late', 'Bo']],
];

let port: WorkbenchWorkbook;
beforeAll(() => {
  port = new WorkbenchWorkbook(new engine.Model({}), engine);
});

async function handOver(ranges: readonly (Range | null)[], prefix = 'Handed'): Promise<string[]> {
  port = new WorkbenchWorkbook(new engine.Model({}), engine);
  return [...(await port.addSheets(handOverSheets(new Solved(ranges), '1 December 2026', prefix)))];
}

function at(sheet: string, row: number, col: number): unknown {
  const { getters } = port.model;
  return getters.getEvaluatedCell({ sheetId: getters.getSheetIdByName(sheet)!, row, col }).value;
}

async function column(sheet: string, letters: string): Promise<unknown[]> {
  return (await port.read(`'${sheet}'!${letters}1:${letters}60`))!.values.map(([value]) => value);
}

const verdict = (): unknown => at('Check', 1, 0);

describe('handing over', () => {
  it('makes sheets of plain values for everyone concerned', async () => {
    expect(await handOver(CLINIC)).toEqual(['Handed over', 'Plan by duty', 'Plan by person', 'Uncovered', 'Moves', 'Check']);
    expect(at('Handed over', 1, 1)).toBe('1 December 2026');
    expect((await column('Plan by duty', 'B')).slice(0, 5)).toEqual(['Person', 'Ada', expect.anything(), 'Bo', expect.anything()]);
    expect(await column('Plan by person', 'A')).toContain('=1+1');
    expect(verdict()).toMatch(/^All is well/u);
    expect(at('Handed over', 8, 1)).toMatch(/^All is well/u);
    for (const sheet of ['Plan by duty', 'Plan by person', 'Uncovered', 'Moves']) {
      const { getters } = port.model;
      const formulas = getters.getCells(getters.getSheetIdByName(sheet)!).filter(({ isFormula }) => isFormula);
      expect(formulas).toEqual([]);
    }
  });

  it.each<[string, number, string]>([
    ['someone who may not take it', 1, 'Cy'],
    ['someone unknown', 4, 'Dora'],
    ['nobody', 3, ''],
    ['someone barred', 3, 'Cy'],
    ['someone away', 2, 'Bo'],
  ])('turns red when a seat is given to %s', async (_, row, person) => {
    await handOver(CLINIC);
    await port.write(`'Plan by duty'!B${row + 1}`, [[person]]);
    expect(verdict()).toMatch(/^Something is wrong: \d+ faults/u);
  });

  it('counts a person over a limit of a group, and over the maximum', async () => {
    const free = CLINIC.map((range, i) => (i === 3 ? [['Rule', 'Duty', 'Person', 'Value'], ['Limit', 'late', 'Ada', 1]] : range));
    await handOver(free);
    expect(verdict()).toMatch(/^All is well/u);
    await port.write("'Plan by duty'!B3", [['Ada']]);
    await port.write("'Plan by duty'!B5", [['Ada']]);
    expect(verdict()).toMatch(/^Something is wrong/u);
  });

  it('leaves a change that is as good in peace', async () => {
    const ranges: Range[] = [[['Duty', 'Person'], ['Desk', 'Ann'], ['Desk', 'Ben']], [['Person', 'Maximum'], ['Ann', 1], ['Ben', 1]], [['Duty', 'Need'], ['Desk', 1]]];
    await handOver(ranges);
    const other = at('Plan by duty', 1, 1) === 'Ann' ? 'Ben' : 'Ann';
    await port.write("'Plan by duty'!B2", [[other]]);
    expect(verdict()).toMatch(/^All is well/u);
  });

  it('holds for every plan of random cases, and never where a seat is moved to someone who may not take it', async () => {
    const samples = fc.sample(specs({ duties: 5, people: 4 }), { seed: 11, numRuns: 25 });
    let tampered = 0;
    for (const [i, spec] of samples.entries()) {
      await handOver(rangesOf(spec), `H${i}x`);
      expect(verdict(), JSON.stringify(spec)).toMatch(/^All is well/u);
      const plan = (await port.read("'Plan by duty'!A2:B40"))!.values.filter(([duty]) => duty !== null);
      const row = plan.findIndex(([, person]) => person !== null);
      if (row === -1) continue;
      const may = (name: unknown): boolean => spec.pairs.some(([d, p]) => spec.duties[d].name === plan[row][0] && spec.people[p].name === name) ||
        spec.rules.some((rule) => rule.rule === 'Fixed' && spec.duties[rule.duty].name === plan[row][0] && spec.people[rule.person].name === name);
      const stranger = spec.people.find(({ name }) => !may(name));
      if (stranger === undefined) continue;
      await port.write(`'Plan by duty'!B${row + 2}`, [[stranger.name]]);
      expect(verdict()).toMatch(/^Something is wrong/u);
      tampered++;
    }
    expect(tampered).toBeGreaterThan(0);
  });
});
