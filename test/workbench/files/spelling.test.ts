import { describe, expect, it } from 'vitest';
import { isArrayFormula, toStored, toTyped, usesOurs } from '../../../src/workbench/files/spelling';

describe('formulas in files', () => {
  it.each([
    ['=DUTY.ASSIGN(Pairs, People)', '_xldudf_DUTY_ASSIGN(Pairs, People)'],
    ['=ROWS(DUTY.UNCOVERED(A1:B9,3))', 'ROWS(_xldudf_DUTY_UNCOVERED(A1:B9,3))'],
    ["=COUNTA(G2#)+ROWS('My sheet'!$B$4#)", "COUNTA(_xlfn.ANCHORARRAY(G2))+ROWS(_xlfn.ANCHORARRAY('My sheet'!$B$4))"],
    ['=SORT(UNIQUE(A1:A9))', '_xlfn._xlws.SORT(_xlfn.UNIQUE(A1:A9))'],
    ['=STDEV.S(A1:A9)+IFNA(B1,0)', '_xlfn.STDEV.S(A1:A9)+_xlfn.IFNA(B1,0)'],
    ['="DUTY.ASSIGN( is text, SORT( and A1# too"&A1', '"DUTY.ASSIGN( is text, SORT( and A1# too"&A1'],
    ['="say ""SORT(""!"&SORT(A1:A2)', '"say ""SORT(""!"&_xlfn._xlws.SORT(A1:A2)'],
    ["='SORT(x)'!A1", "'SORT(x)'!A1"],
    ['=RESORT(A1)', 'RESORT(A1)'],
    ['=_xlfn.FORECAST.ETS(A1,B1:B9,C1:C9)', '_xlfn.FORECAST.ETS(A1,B1:B9,C1:C9)'],
    ['=_xldudf_OTHER_THING(A1)', '_xldudf_OTHER_THING(A1)'],
  ])('%s is stored as %s and read back', (typed, stored) => {
    expect(toStored(typed)).toBe(stored);
    expect(toTyped(stored)).toBe(typed);
  });

  it('are read in capitals where another program has written small letters', () => {
    expect(toTyped('_xldudf_DUTY_assign(Pairs, People)')).toBe('=DUTY.ASSIGN(Pairs, People)');
  });

  it('are ours where a function of ours is called, not where it is quoted', () => {
    expect(usesOurs('=ROWS(duty.grid(A1:B2,1))')).toBe(true);
    expect(usesOurs('=SUM(A1:A2)')).toBe(false);
    expect(usesOurs('="DUTY.GRID("')).toBe(false);
    expect(usesOurs('=ON.DUTY.GRID(A1)')).toBe(false);
  });

  it.each([
    ['=DUTY.GRID(A1:B2,1)', true],
    ['=ROWS(Results!A2#)', true],
    ['=FILTER(A1:A9,B1:B9>1)', true],
    ['=SUM((A1:A9="x")*1)', true],
    ['=A1:A9', true],
    ['=SUM(A1:A9)/2', false],
    ['=VLOOKUP(A1,Sheet2!B1:C9,2,FALSE)', false],
    ['=A1*B1', false],
    ['="A1:A9"', false],
  ])('%s: looking at ranges as a whole is %s', (typed, expected) => {
    expect(isArrayFormula(typed)).toBe(expected);
  });
});
