import { describe, expect, it } from 'vitest';
import { answerSheets } from '../../src/workbench/answerSheets';
import type { Book } from '../../src/workbench/files/book';
import { openCsv } from '../../src/workbench/files/openCsv';

/** A book of text files by their names. */
function bookOf(files: Readonly<Record<string, string>>): Book {
  const taken = new Set<string>();
  return { sheets: Object.entries(files).map(([name, text]) => openCsv(name, text, taken)), names: [], lost: [] };
}

const formulas = (book: Book, sheet: number) => book.sheets[sheet].cells.flatMap(({ formula }) => (formula === null ? [] : [formula]));

describe('sheets of answers', () => {
  it('are added after the tables, whose ranges are named with room below', () => {
    const files = {
      'rules.csv': 'Rule,Duty,Person,Value\nLimit,Sat,,2\n',
      'who may.csv': '\n Duty ,PERSON\nChoir,Ann\n',
      'people.csv': 'Person,E-mail,Maximum\nAnn,a@b.example,1\n',
      'duties.csv': 'Duty,Need\nChoir,1\n',
    };
    const before = bookOf(files);
    const book = answerSheets(before)!.book;
    expect(book.sheets.slice(0, 4)).toEqual(before.sheets);
    expect(book.sheets.slice(4).map(({ name }) => name)).toEqual(['Results', 'Grid']);
    expect(book.names.map(({ name, reference }) => `${name} ${reference}`)).toEqual([
      "Pairs 'who may'!A1:B103",
      'People people!A1:C102',
      'Duties duties!A1:B102',
      'Rules rules!A1:D102',
    ]);
    expect(formulas(book, 4)).toEqual(
      ['SUMMARY', 'ASSIGN', 'UNCOVERED', 'LOADS', 'FINDINGS'].map((id) => `=DUTY.${id}(Pairs, People, Duties, Rules)`),
    );
    expect(formulas(book, 5)).toEqual(['=DUTY.GRID(Pairs, People, Duties, Rules)']);
  });

  it('leave out the tables that are not there, also in the middle', () => {
    const pairs = 'Duty,Person\nChoir,Ann\n';
    const people = 'Person,Maximum\nAnn,1\n';
    expect(formulas(answerSheets(bookOf({ 'a.csv': pairs, 'b.csv': people }))!.book, 3)).toEqual(['=DUTY.GRID(Pairs, People)']);
    const withRules = answerSheets(bookOf({ 'a.csv': pairs, 'b.csv': people, 'c.csv': 'Rule,Duty\n' }))!.book;
    expect(formulas(withRules, 4)).toEqual(['=DUTY.GRID(Pairs, People, , Rules)']);
  });

  it('get names that are free', () => {
    const book = bookOf({ 'who.csv': 'Person,Duty\nAnn,Choir\n', 'Results.csv': 'Person,Maximum\nAnn,1\n' });
    const answered = answerSheets({ ...book, names: [{ name: 'People', reference: 'who!A1' }], otherNames: [{ name: 'PAIRS', content: '1' }] })!.book;
    expect(answered.sheets.map(({ name }) => name)).toEqual(['who', 'Results', 'Results2', 'Grid']);
    expect(answered.names.map(({ name }) => name)).toEqual(['People', 'Pairs2', 'People2']);
    expect(formulas(answered, 3)).toEqual(['=DUTY.GRID(Pairs2, People2)']);
  });

  it('leave out a grid that would be too large, and say so', () => {
    const many = (count: number, row: (i: number) => string) => Array.from({ length: count }, (_, i) => row(i)).join('\n');
    const files = {
      'pairs.csv': `Duty,Person\n${many(3000, (i) => `Duty ${i % 1000},Person ${i % 200}`)}`,
      'people.csv': `Person,Maximum\n${many(200, (i) => `Person ${i},9`)}`,
    };
    const { book, remarks } = answerSheets(bookOf(files))!;
    expect(book.sheets.map(({ name }) => name)).toEqual(['pairs', 'people', 'Results']);
    expect(remarks.join()).toContain('No grid was made');
    expect(remarks.join()).toContain('=DUTY.GRID(Pairs, People)');
  });

  it('take no plan in force for pairs', () => {
    const book = answerSheets(bookOf({ 'current plan.csv': 'Duty,Person\n', 'may.csv': 'Duty,Person\n', 'people.csv': 'Person,Maximum\n' }))!.book;
    expect(book.names[0]).toEqual({ name: 'Pairs', reference: 'may!A1:B101' });
  });

  it('are not offered without pairs, without people, or where formulas of ours are there', () => {
    expect(answerSheets(bookOf({ 'a.csv': 'Duty,Person\n' }))).toBeNull();
    expect(answerSheets(bookOf({ 'a.csv': 'Person,Maximum\n' }))).toBeNull();
    expect(answerSheets(bookOf({}))).toBeNull();
    const answered = answerSheets(bookOf({ 'a.csv': 'Duty,Person\n', 'b.csv': 'Person,Maximum\n' }))!.book;
    expect(answerSheets(answered)).toBeNull();
  });
});
