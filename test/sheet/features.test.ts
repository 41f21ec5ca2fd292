import { describe, expect, it } from 'vitest';
import { usedFeatures } from '../../src/sheet/features';
import { readCase } from '../../src/sheet/readCase';
import type { Range } from '../../src/sheet/range';

const PAIRS: Range = [['Duty', 'Person', 'Rank'], ['Choir', 'Ann', ''], ['Organ', 'Ann', '']];
const PEOPLE: Range = [['Person', 'Maximum'], ['Ann', 1]];

/** The features a case uses, as `table row: feature`. */
function used(ranges: Partial<Record<'pairs' | 'people' | 'duties' | 'rules' | 'current', Range>>): string[] {
  const { pairs = PAIRS, people = PEOPLE, duties = null, rules = null, current = null } = ranges;
  const { case: kase, featureRows, faults } = readCase([pairs, people, duties, rules, current]);
  if (kase === null) throw new Error(faults[0].message);
  return usedFeatures(kase, featureRows).map(({ table, row, feature }) => `${table} ${row}: ${feature}`);
}

describe('the features a case uses', () => {
  it('are none where their columns say nothing, and for what is answered', () => {
    expect(
      used({
        people: [['Person', 'Maximum', 'Minimum', 'Stretch', 'Carried'], ['Ann', 1, 0, 5, 0]],
        duties: [['Duty', 'Need', 'Start', 'End', 'Load'], ['Choir', 1, '', '', 1], ['Organ', 1, '', '', '']],
        rules: [['Rule', 'Duty', 'Person', 'Value'], ['Rest', '', '', 0], ['Order', '', '', 'changes'], ['Price', 'place', '', 3], ['Seconds', '', '', 5]],
        current: [['Duty', 'Person']],
      }),
    ).toEqual([]);
  });

  it.each([
    ['Duties 2: Start and End', { duties: [['Duty', 'Start', 'End'], ['Choir', 0.5, 0.6]] }],
    ['Duties 3: a Load other than 1', { duties: [['Duty', 'Load'], ['Choir', 1], ['Organ', 0]] }],
    ['Rules 2: the rule Clash', { rules: [['Rule', 'Duty', 'Person', 'Value'], ['Clash', 'Choir', '', 'Organ']] }],
    ['Rules 1: the rule Together', { rules: [['Together', 'Choir', '', 'Organ']] }],
    ['Rules 2: the rule Rest', { rules: [['Rest', '', '', 0], ['Rest', '', '', 30]] }],
  ] as [string, Parameters<typeof used>[0]][])('%s', (feature, ranges) => {
    expect(used(ranges)).toEqual([feature]);
  });
});
