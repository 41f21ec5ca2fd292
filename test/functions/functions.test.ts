import { describe, expect, it } from 'vitest';
import { invoke } from '../../src/functions/invoke';
import { Journal, type Answer } from '../../src/functions/journal';
import { recall } from '../../src/functions/memory';
import { FUNCTIONS } from '../../src/functions/registry';
import type { Range } from '../../src/sheet/range';

/** A small museum: three tours on one morning, and more people than can be used. */
const PAIRS: Range = [
  ['Duty', 'Person'],
  ['Old masters', 'Ada'],
  ['Old masters', 'Bo'],
  ['Sculpture', 'Ada'],
  ['Coins', 'Ada'],
  ['Coins', 'Cy'],
];
const PEOPLE: Range = [
  ['Person', 'Maximum'],
  ['Cy', 1],
  ['Bo', 1],
  ['Ada', 2],
];
const DUTIES: Range = [
  ['Duty', 'Need', 'Priority', 'Slot'],
  ['Sculpture', 1, 2, 'Mon am'],
  ['Old masters', 2, 1, 'Mon am'],
  ['Coins', 1, 1, 'Mon pm'],
];

function ask(id: string, ...ranges: (Range | null)[]): Answer {
  const fn = FUNCTIONS.find((entry) => entry.id === id);
  if (fn === undefined) throw new Error(`no function ${id}`);
  return invoke(fn, ranges, 'Sheet1!B2', new Journal());
}

function rows(id: string, ...ranges: (Range | null)[]): unknown {
  const answer = ask(id, ...ranges);
  if (answer.kind === 'busy') throw new Error('a search');
  return answer.kind === 'spill' ? answer.spill : answer.message;
}

describe('the functions on a small museum', () => {
  it('ASSIGN lists a row a seat, duties in table order, people by name', () => {
    expect(rows('ASSIGN', PAIRS, PEOPLE, DUTIES)).toEqual([
      ['Duty', 'Person', 'Rank', 'Note'],
      ['Sculpture', '', '', 'Uncovered'],
      ['Old masters', 'Ada', '', ''],
      ['Old masters', 'Bo', '', ''],
      ['Coins', 'Cy', '', ''],
    ]);
  });

  it('UNCOVERED says how short, how many may take it, and why', () => {
    expect(rows('UNCOVERED', PAIRS, PEOPLE, DUTIES)).toEqual([
      ['Duty', 'Short', 'Need', 'Eligible', 'Bottleneck', 'Reason'],
      [
        'Sculpture',
        1,
        1,
        1,
        1,
        'Part of bottleneck 1: only Bo and Ada can take these 2 duties (Sculpture; Old masters), and they have room for at most 2 of the 3 seats needed.',
      ],
    ]);
  });

  it('LOADS counts what each person holds and would gain', () => {
    expect(rows('LOADS', PAIRS, PEOPLE, DUTIES)).toEqual([
      ['Person', 'Assigned', 'Minimum', 'Maximum', 'Spare', 'Gain', 'Duties', 'Note'],
      ['Cy', 1, 0, 1, 0, 0, 'Coins', ''],
      ['Bo', 1, 0, 1, 0, 0, 'Old masters', ''],
      ['Ada', 1, 0, 2, 1, 0, 'Old masters', ''],
    ]);
  });

  it('GRID marks the seats and adds up both edges', () => {
    expect(rows('GRID', PAIRS, PEOPLE, DUTIES)).toEqual([
      ['Duty', 'Cy', 'Bo', 'Ada', 'Total'],
      ['Sculpture', '', '', '', 0],
      ['Old masters', '', 'x', 'x', 2],
      ['Coins', 'x', '', '', 1],
      ['Total', 1, 1, 1, 3],
    ]);
  });

  it('SUMMARY counts the seats and says how the plan was found', () => {
    const table = rows('SUMMARY', PAIRS, PEOPLE, DUTIES) as string[][];
    expect(table.slice(0, 5)).toEqual([
      ['Item', 'Value'],
      ['Seats needed', 4],
      ['Seats covered', 3],
      ['Seats uncovered', 1],
      ['People used', 3],
    ]);
    expect(table.slice(8, 10)).toEqual([
      ['Method', 'flow'],
      ['Proven', 'proven best'],
    ]);
    expect(table[11][1]).toMatch(/^[0-9A-HJKMNP-TV-Z]{4}(-[0-9A-HJKMNP-TV-Z]{4}){3}$/);
  });

  it('says so where there is nothing to list', () => {
    expect(rows('UNCOVERED', PAIRS, [[9]], null)).toEqual([
      ['Duty', 'Short', 'Need', 'Eligible', 'Bottleneck', 'Reason'],
      ['Every seat is covered', '', '', '', '', ''],
    ]);
    expect(rows('ASSIGN', [['Duty', 'Person']], PEOPLE)).toEqual([
      ['Duty', 'Person', 'Rank', 'Note'],
      ['No seats to assign', '', '', ''],
    ]);
  });

  it('PAIRS reads a cross table', () => {
    expect(rows('PAIRS', [['', 'Ada', 'Bo'], ['Coins', 2, 'no'], ['Sculpture', 'x', 0]])).toEqual([
      ['Duty', 'Person', 'Rank'],
      ['Coins', 'Ada', 2],
      ['Sculpture', 'Ada', ''],
    ]);
  });
});

describe('a page without a search', () => {
  it('refuses a case that is no flow, and says why', () => {
    const rules: Range = [['Rule', 'Duty', 'Person', 'Value'], ['Limit', 'paintings', '', 1]];
    const duties: Range = [['Duty', 'Slot', 'Group'], ['Old masters', 'Mon', 'paintings'], ['Sculpture', 'Mon', 'stone'], ['Coins', 'Tue', 'paintings']];
    expect(rows('ASSIGN', PAIRS, [['Person', 'Maximum'], ['Ada', 3], ['Bo', 1], ['Cy', 1]], duties, rules)).toMatch(/no search that could answer it/);
    expect(rows('PROOF', PAIRS, [['Person', 'Maximum'], ['Ada', 3], ['Bo', 1], ['Cy', 1]], duties, rules)).toMatch(
      /^This is answered only where the limits of every person lie inside one another. For Ada, the limit on "(Mon|paintings)" and the limit on "(Mon|paintings)" overlap/,
    );
  });
});

describe('the memory of cases', () => {
  it('shares one solve between equal inputs and keeps different ones apart', () => {
    const copy = (range: Range): Range => range.map((row) => [...row]);
    const first = recall([PAIRS, PEOPLE, DUTIES, null, null]);
    expect(recall([copy(PAIRS), copy(PEOPLE), copy(DUTIES)])).toBe(first);
    const changed = copy(PEOPLE).map((row, r) => (r === 3 ? ['Ada', 1] : row));
    expect(recall([PAIRS, changed, DUTIES])).not.toBe(first);
  });

  it('forgets the case used longest ago', () => {
    const oldest = recall([PAIRS, PEOPLE, DUTIES]);
    for (let maximum = 10; maximum < 18; maximum++) recall([PAIRS, [[maximum]]]);
    expect(recall([PAIRS, PEOPLE, DUTIES])).not.toBe(oldest);
  });

  it('tells error cells apart', () => {
    const error = (code: string): Range => [...PAIRS, ['Coins', { type: 'Error', basicValue: code }]];
    expect(recall([error('#N/A'), PEOPLE])).toBe(recall([error('#N/A'), PEOPLE]));
    expect(recall([error('#N/A'), PEOPLE])).not.toBe(recall([error('#REF!'), PEOPLE]));
  });
});

describe('every declaration', () => {
  it.each(FUNCTIONS)('of $id keeps the limits of the platform', (fn) => {
    expect(fn.id).toMatch(/^[A-Z][A-Z0-9._]{2,63}$/);
    expect(fn.summary.length).toBeLessThanOrEqual(128);
    for (const { description } of fn.parameters) expect(description.length).toBeLessThanOrEqual(128);
    expect(fn.example).toContain(`=DUTY.${fn.id}(`);
  });
});
