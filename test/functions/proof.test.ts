import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coverBounds } from '../../src/cover/bound';
import { solve } from '../../src/cover/solve';
import { invoke } from '../../src/functions/invoke';
import { Journal } from '../../src/functions/journal';
import { PROOF_CHECKS, PROOF_NAMES } from '../../src/functions/proofChecks';
import { PROOF } from '../../src/functions/proof';
import { columnLetters } from '../../src/host/address';
import { readCase } from '../../src/sheet/readCase';
import type { Range } from '../../src/sheet/range';
import { engine } from '../helpers/engine';
import { rangesOf, specs, type Spec } from '../helpers/spec';

type Table = (string | number | boolean | null)[][];

/** A workbook of plain values with the native formulas beside it; no function of ours is in it. */
function faultsOf(tables: readonly Table[], proof: Table): number[] {
  const cells: Record<string, string> = {};
  const namedRanges: Record<string, string> = {};
  let left = 0;
  const put = (rows: Table, names: Record<string, string>, length: number): void => {
    rows.forEach((row, r) => row.forEach((value, c) => {
      if (value !== '' && value !== null) cells[`${columnLetters(left + c)}${r + 1}`] = typeof value === 'number' ? String(value) : `'${String(value)}`;
    }));
    for (const [name, heading] of Object.entries(names)) {
      const letters = columnLetters(left + rows[0].indexOf(heading));
      namedRanges[name] = `S!${letters}2:${letters}${length}`;
    }
    left += rows[0].length + 1;
  };
  const { pairs, people, duties, rules, proof: proofNames } = PROOF_NAMES;
  [pairs, people, duties, rules].forEach((names, i) => put(tables[i], names, 60));
  put(proof, proofNames, 200);
  PROOF_CHECKS.forEach(({ formula }, i) => (cells[`${columnLetters(left)}${i + 1}`] = formula));
  const sheet = { id: 's', name: 'S', colNumber: left + 2, rowNumber: 220, cells, styles: {}, formats: {}, cols: {}, merges: [], isVisible: true };
  const model = new engine.Model({ version: '19.3.2', sheets: [sheet], styles: {}, formats: {}, namedRanges });
  return PROOF_CHECKS.map((_, i) => {
    const { value } = model.getters.getEvaluatedCell({ sheetId: 's', col: left, row: i });
    if (typeof value !== 'number') throw new Error(`${PROOF_CHECKS[i].fault}: ${value}`);
    return value;
  });
}

function proofOf(ranges: readonly (Range | null)[]): Table {
  const answer = invoke(PROOF, ranges, 'A!A1', new Journal());
  if (answer.kind !== 'spill') throw new Error(JSON.stringify(answer));
  return answer.spill.map((row) => [...row]);
}

function failing(tables: readonly Table[], proof: Table): string[] {
  const faults = faultsOf(tables, proof);
  return PROOF_CHECKS.filter((_, i) => faults[i] !== 0).map(({ fault }) => fault);
}

/** Without the Order rule, and without Fixed rules, which may pass limits and are then found for good reason. */
function plain(spec: Spec): Table[] {
  const ranges = rangesOf({ ...spec, rules: spec.rules.filter(({ rule }) => rule !== 'Fixed') });
  return ranges.slice(0, 4).map((range) => range!.filter((row) => row[0] !== 'Order').map((row) => [...row])) as Table[];
}

describe('the bounds of a proof', () => {
  it('add up to the seats covered, and every pair falls under one of them or is closed', () => {
    fc.assert(
      fc.property(specs({ aims: true }), (spec) => {
        const { case: kase } = readCase(rangesOf(spec));
        const solution = solve(kase!);
        if ('crossing' in solution) throw new Error('limits cross');
        const { bounds, charges } = coverBounds(kase!, solution);
        expect(bounds.reduce((sum, { most }) => sum + most, 0)).toBe(solution.plan.covered);
        for (const { bound, duty, person } of charges) {
          if (bound === null) continue;
          expect(bounds).toContain(bound);
          if (bound.person !== null) expect(bound.person).toBe(person);
          if (bound.duty !== null) expect(bound.duty).toBe(duty);
        }
      }),
      { numRuns: 2000 },
    );
  });
});

describe('the native formulas', () => {
  it('find no fault in what PROOF spilled', () => {
    fc.assert(
      fc.property(specs({ aims: true }), (spec) => {
        const tables = plain(spec);
        expect(failing(tables, proofOf(tables))).toEqual([]);
      }),
      { numRuns: 150 },
    );
  });

  it('are not deceived by signs of a condition or pattern in the place of a name', () => {
    let tried = 0;
    fc.assert(
      fc.property(specs(), fc.constantFrom('*', '?*', '<>', '>A', '=', '~', 'own*'), fc.constantFrom(1, 2), fc.nat(), (spec, sign, column, which) => {
        const own = plain(spec);
        const copy = proofOf(own);
        const seats = copy.filter(([part]) => part === 'Seat');
        if (seats.length === 0) return;
        const row = seats[which % seats.length];
        row[column] = sign.replace('own', String(row[column]).slice(0, -1));
        tried++;
        expect(failing(own, copy)).not.toEqual([]);
      }),
      { numRuns: 150 },
    );
    expect(tried).toBeGreaterThan(80);
  });

  it('find faults that are none where a name of the tables is such a sign, as the document says', () => {
    const odd: Table[] = [
      [['Duty', 'Person'], ['Choir', '>5']],
      [['Person', 'Maximum'], ['>5', 1]],
      [['Duty', 'Need', 'Slot', 'Group'], ['Choir', 1, '', '']],
      [['Rule', 'Duty', 'Person', 'Value']],
    ];
    expect(failing(odd, proofOf(odd))).not.toEqual([]);
  });

  const tables: Table[] = [
    [['Duty', 'Person'], ['Choir', 'Ann'], ['Choir', 'Bob'], ['Organ', 'Ann'], ['Bells', 'Ann'], ['Bells', 'Cat'], ['Door', 'Cat'], ['Tea', 'Dan'], ['Tea', 'Ann']],
    [['Person', 'Maximum'], ['Ann', 2], ['Bob', 1], ['Cat', 1], ['Dan', 1]],
    [['Duty', 'Need', 'Slot', 'Group'], ['Choir', 2, 'am', 'Sun'], ['Organ', 1, 'am', 'Sun'], ['Bells', 1, 'pm', 'Sun'], ['Door', 1, 'pm', ''], ['Tea', 1, '', '']],
    [['Rule', 'Duty', 'Person', 'Value'], ['Limit', 'Sun', '', 2], ['Barred', 'Tea', 'Ann', '']],
  ];
  const proof = proofOf(tables);
  const at = (test: (row: Table[number]) => boolean): number => proof.findIndex(test);
  const tamper = (change: (copy: Table) => void): string[] => {
    const copy = proof.map((row) => [...row]);
    change(copy);
    return failing(tables, copy);
  };
  const seat = (duty: string): number => at((row) => row[0] === 'Seat' && row[1] === duty);

  it('hold on a plan with uncovered seats', () => {
    expect(failing(tables, proof)).toEqual([]);
    expect(proof.at(-1)!.slice(4)).toEqual([5, 5]);
  });

  it.each<[string, (copy: Table) => void]>([
    ['a seat given to someone else who may take it', (copy) => (copy[seat('Choir')][2] = 'Dan')],
    ['a seat given to someone who may not', (copy) => (copy[seat('Tea')][2] = 'Bob')],
    ['a barred seat', (copy) => (copy[seat('Tea')][2] = 'Ann')],
    ['a seat struck out', (copy) => copy.splice(seat('Tea'), 1)],
    ['a seat added', (copy) => copy.push(['Seat', 'Organ', 'Ann', '', 1, 1])],
    ['a seat twice', (copy) => copy.push([...copy[seat('Tea')]])],
    ['a duty’s count', (copy) => (copy[at((row) => row[0] === 'Duty' && row[1] === 'Organ')][4] = 1)],
    ['a need made smaller', (copy) => (copy[at((row) => row[0] === 'Duty' && row[1] === 'Organ')][5] = 0)],
    ['a duty left out', (copy) => copy.splice(at((row) => row[0] === 'Duty' && row[1] === 'Door'), 1)],
    ['a maximum made larger', (copy) => (copy[at((row) => row[0] === 'Person' && row[2] === 'Cat')][5] = 2)],
    ['a person left out', (copy) => copy.splice(at((row) => row[0] === 'Person' && row[2] === 'Ann'), 1)],
    ['a slot’s row left out', (copy) => copy.splice(at((row) => row[0] === 'Limit' && row[3] === 'am'), 1)],
    ['a slot made wider', (copy) => (copy[at((row) => row[0] === 'Limit' && row[3] === 'am')][5] = 2)],
    ['a seat taken out of its slot', (copy) => copy.splice(at((row) => row[0] === 'In' && row[3] === 'am'), 1)],
    ['the total made larger', (copy) => (copy.at(-1)![4] = 6)],
    ['a bound made smaller', (copy) => (copy[at((row) => row[0] === 'Bound' && Number(row[5]) > 0)][5] = 0)],
    ['a bound left out', (copy) => copy.splice(at((row) => row[0] === 'Bound' && Number(row[5]) > 0), 1)],
    ['a pair left out of the argument', (copy) => copy.splice(at((row) => row[0] === 'Charge'), 1)],
    ['a pair put under a bound that is not there', (copy) => (copy[at((row) => row[0] === 'Charge')][3] = 'evening')],
    ['a pair said to be barred', (copy) => (copy[at((row) => row[0] === 'Charge' && row[3] !== 'barred')][3] = 'barred')],
    ['a pair said to be away', (copy) => (copy[at((row) => row[0] === 'Charge')][3] = 'away')],
  ])('notice %s', (_, change) => {
    expect(tamper(change)).not.toEqual([]);
  });
});
