import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compareKeys, nameKey } from '../../src/sheet/name';
import { essence, NearMisses, slips } from '../../src/sheet/nearMiss';
import { readCase } from '../../src/sheet/readCase';

describe('reading never throws', () => {
  const cell = fc.oneof(
    fc.constantFrom('Duty', 'Person', 'Rule', 'Maximum', 'Need', 'Fixed', 'Limit', 'Away', 'Order', 'a', 'b', '1', 'no'),
    fc.integer({ min: -2, max: 5 }),
    fc.double(),
    fc.boolean(),
    fc.constantFrom(null, undefined, '', ' ', { type: 'Error', basicValue: '#N/A' }, { type: 'Error' }, new Date(0), [1]),
    fc.string({ unit: 'binary', maxLength: 12 }),
  );
  const range = fc.option(fc.array(fc.array(cell, { maxLength: 6 }), { maxLength: 8 }));

  it('on any cells whatever, and says either a case or why there is none', () => {
    fc.assert(
      fc.property(fc.array(range, { maxLength: 5 }), (ranges) => {
        const { case: kase, faults } = readCase(ranges);
        expect(kase === null).toBe(faults.length > 0);
      }),
      { numRuns: 5000 },
    );
  });
});

describe('names', () => {
  it('are one name whatever their case, spacing and composition', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 20 }), (text) => {
        const key = nameKey(text);
        expect(nameKey(key)).toBe(key);
        expect(nameKey(` ${text.normalize('NFD')}\u00A0`)).toBe(nameKey(text.normalize('NFD')));
        expect(nameKey(text.normalize('NFD'))).toBe(nameKey(text.normalize('NFC')));
      }),
    );
  });

  it.each([
    ['STRASSE', 'straße'],
    ['ΟΔΟΣ', 'οδος'],
    ['Ann\u200BLee', 'AnnLee'],
    ['\u202Eabc', 'abc'],
  ])('%s and %s are one', (one, other) => {
    expect(nameKey(one)).toBe(nameKey(other));
  });

  it('sort by their letters first, then by their marks, the same in every locale', () => {
    expect(['zoe', 'éva', 'eva', 'ebba', 'evb'].sort(compareKeys)).toEqual(['ebba', 'eva', 'éva', 'evb', 'zoe']);
  });

  it('have a total order', () => {
    fc.assert(
      fc.property(fc.string(), fc.string(), fc.string(), (a, b, c) => {
        expect(compareKeys(a, b) + compareKeys(b, a)).toBe(0);
        if (compareKeys(a, b) <= 0 && compareKeys(b, c) <= 0) expect(compareKeys(a, c)).toBeLessThanOrEqual(0);
      }),
    );
  });
});

describe('near misses', () => {
  const near = new NearMisses(() => ['Ann Lee', 'Race rules 108', 'Race rules 109', 'Mon 09:00', 'Bob']);

  it.each([
    ['Lee Ann', 'Ann Lee'],
    ['Anne Lee', 'Ann Lee'],
    ['Race ruels 108', 'Race rules 108'],
    ['Mon 9:00', 'Mon 09:00'],
    ['Bbo', 'Bob'],
  ])('%s was meant as %s', (typed, meant) => {
    expect(near.nearest(typed)).toEqual([meant]);
  });

  it.each(['Race rules 110', 'Rob', 'Tue 09:00', 'Someone else', ''])('%s is nobody in particular', (typed) => {
    expect(near.nearest(typed)).toEqual([]);
  });

  it('count letters left out, put in, mistaken and swapped', () => {
    expect([slips('abc', 'abc'), slips('abc', 'acb'), slips('abc', 'ac'), slips('', 'xy'), slips('elek', 'elke')]).toEqual([0, 1, 1, 2, 1]);
  });

  it('stop counting where there are more slips than asked about', () => {
    fc.assert(
      fc.property(fc.string({ unit: fc.constantFrom('a', 'b', 'c'), maxLength: 9 }), fc.string({ unit: fc.constantFrom('a', 'b', 'c'), maxLength: 9 }), fc.nat(4), (one, other, most) => {
        const all = slips(one, other);
        const counted = slips(one, other, most);
        expect(all <= most ? counted === all : counted > most).toBe(true);
      }),
    );
  });

  it('are looked for no longer where there are too many strays to be slips', () => {
    const strays = Array.from({ length: 400 }, () => near.question('Anne Lee'));
    expect(strays.filter((question) => question !== '').length).toBeLessThan(400);
    expect(strays[0]).toBe(' Did you mean "Ann Lee"?');
  });

  it('have one essence where only spacing, punctuation, accents and leading zeros differ', () => {
    expect(essence('mary-jo')).toBe(essence('mary jo'));
    expect(essence('lab 1 2')).not.toBe(essence('lab 12'));
  });
});

describe('large ranges', () => {
  it('that cannot be read are listed up to 10,000 cells of a column, and then counted', () => {
    const rows = [['Duty', 'Person', 'Rank'], ...Array.from({ length: 10_500 }, () => ['Choir', 'Ann', 'x'])];
    const { faults } = readCase([rows, [['Person', 'Maximum'], ['Ann', 'y']]]);
    expect(faults.length).toBe(10_002);
    expect(faults[10_000].message).toBe('Pairs table, column Rank: found 500 more cells like these; expected a whole number from 0 to 1,000,000.');
    expect(faults[10_001].place.table).toBe('People');
  });

  it('end where their last filled row is, however far down they go', () => {
    const rows: unknown[][] = [['Duty', 'Person'], ['Choir', 'Ann']];
    for (let i = 0; i < 1_048_574; i++) rows.push([null, null]);
    const { case: kase } = readCase([rows, [['Person', 'Maximum'], ['Ann', 1]]]);
    expect(kase?.pairs.count).toBe(1);
  });
});
