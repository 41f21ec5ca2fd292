// Recomputes native formulas in another spreadsheet program, LibreOffice, headless: those of the demo's proof, its
// plan and proof as plain values, and those of the sheets made to be handed over.
//   npm run libreoffice      needs the program soffice
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { readXlsx } from 'hucre';
import { scenario } from './demo-scenario.mjs';
import { demoBook } from './demo.mjs';
import { loadTypeScript } from './load.mjs';

const { saveXlsx } = await loadTypeScript('src/workbench/files/saveXlsx.ts');
const { handOverSheets } = await loadTypeScript('src/desk/handOver.ts');
const { Solved } = await loadTypeScript('src/functions/solved.ts');
const folder = mkdtempSync(join(tmpdir(), 'dutyproof-'));
const PROOF_VERDICT = { sheet: 'Proof', row: 1, column: 8 };
const HANDED_VERDICT = { sheet: 'Handed over', row: 8, column: 1 };

/** The demo with our formulas as plain values, and native formulas without values, so that they must be computed. */
function handedOver(book) {
  const sheets = book.sheets.map((sheet) => ({
    ...sheet,
    cells: sheet.cells.map(({ row, column, formula, value, style, format }) => {
      const isOurs = formula === null || formula.startsWith('=DUTY.');
      return { row, column, style, format, ...(isOurs ? { formula: null, value } : { formula, value: null }) };
    }),
  }));
  return { ...book, sheets };
}

/** The drafts of a handing over as a book; formulas have no values, so that they must be computed. */
function bookOf(drafts) {
  const sheets = drafts.map(({ name, rows }) => ({
    name,
    hidden: false,
    widths: new Map(),
    merges: [],
    frozen: { rows: 0, columns: 0 },
    cells: rows.flatMap((row, r) =>
      row.flatMap((cell, column) => {
        if (cell === null) return [];
        const content = typeof cell === 'object' ? { formula: cell.formula, value: null } : { formula: null, value: cell };
        return [{ row: r, column, style: null, format: null, ...content }];
      }),
    ),
  }));
  const names = drafts.flatMap(({ name, names: own = [] }) => own.map((one) => ({ name: one.name, reference: `'${name}'!${one.cells}` })));
  return { sheets, names, lost: [] };
}

/** Opens a book in LibreOffice and returns what it computes for a cell. */
async function verdictOf(book, name, { sheet, row, column }) {
  const file = join(folder, `${name}.xlsx`);
  writeFileSync(file, await saveXlsx(book));
  const out = join(folder, name);
  execFileSync('soffice', [`-env:UserInstallation=file://${join(folder, 'profile')}`, '--headless', '--convert-to', 'xlsx', '--outdir', out, file], {
    stdio: 'ignore',
  });
  const { sheets } = await readXlsx(new Uint8Array(readFileSync(join(out, `${name}.xlsx`))));
  return sheets.find((one) => one.name === sheet).rows[row][column];
}

/** Changes a cell of the proof: the first row of a part, in a column. */
function tampered(book, part, column, value) {
  const proof = book.sheets.find(({ name }) => name === 'Proof');
  const row = proof.cells.filter((cell) => cell.column === 0 && cell.value === part).sort((a, b) => a.row - b.row)[0].row;
  const change = (cell) => (cell.row === row && cell.column === column ? { ...cell, value } : cell);
  return { ...book, sheets: book.sheets.map((sheet) => (sheet === proof ? { ...sheet, cells: sheet.cells.map(change) } : sheet)) };
}

const book = handedOver(await demoBook());
const tables = scenario();
const drafts = handOverSheets(new Solved([...['Pairs', 'People', 'Duties', 'Rules'].map((name) => tables[name]), null]), '1 December 2026', 'Handed');
const handed = bookOf(drafts);

/** Puts something else into a cell of the plan's first row, by column from 0; text that begins with = is a formula. */
function altered(column, content) {
  const other = typeof content === 'string' && content.startsWith('=') ? { formula: content, value: null } : { value: content };
  const change = (cell) => (cell.row === 1 && cell.column === column ? { ...cell, ...other } : cell);
  const sheets = handed.sheets.map((sheet) => (sheet.name === 'Plan by duty' ? { ...sheet, cells: sheet.cells.map(change) } : sheet));
  return { ...handed, sheets };
}

const NAMES = ['=Ann', '>5', '*', '?', 'TRUE', '5', '<b>', 'x'.repeat(1_000)];
const odd = handOverSheets(
  new Solved([
    [['Duty', 'Person'], ...NAMES.map((name, i) => [`${name} ${i}`, name])],
    [['Person', 'Maximum'], ...NAMES.map((name) => [name, 1])],
    [['Duty', 'Need', 'Slot', 'Group'], ...NAMES.map((name, i) => [`${name} ${i}`, 1, name, NAMES.at(-1 - i)])],
    [['Rule', 'Duty', 'Person', 'Value'], ['Limit', '*', '', 1], ['Limit', '>5', '>5', 1]],
    null,
  ]),
  '1 December 2026',
  'Odd',
);
const timed = handOverSheets(
  new Solved([
    [['Duty', 'Person'], ['Dawn', 'Ada'], ['Noon', 'Bo'], ['Dusk', 'Ada'], ['Dusk', 'Bo']],
    [['Person', 'Maximum'], ['Ada', 2], ['Bo', 2]],
    [['Duty', 'Need', 'Start', 'End'], ['Dawn', 1, 46000.25, 46000.5], ['Noon', 1, 46000.45, 46000.6], ['Dusk', 1, 46000.75, 46000.9]],
    [['Rule', 'Duty', 'Person', 'Value'], ['Rest', '', '', 60], ['Clash', 'Dawn', '', 'Noon']],
    null,
  ]),
  '1 December 2026',
  'Timed',
);

const CASES = [
  ['The proof as it is', book, PROOF_VERDICT, /^holds$/u],
  ['The proof with a seat given to someone else', tampered(book, 'Seat', 2, 'Nesta Quill'), PROOF_VERDICT, /^does not hold$/u],
  ['The proof with a maximum changed', tampered(book, 'Person', 5, 9), PROOF_VERDICT, /^does not hold$/u],
  ['The proof with a bound changed', tampered(book, 'Bound', 5, 7), PROOF_VERDICT, /^does not hold$/u],
  ['The proof with a total changed', tampered(book, 'Total', 4, 52), PROOF_VERDICT, /^does not hold$/u],
  ['The plan handed over', handed, HANDED_VERDICT, /^All is well/u],
  ['The plan handed over with a seat given to a stranger', altered(1, 'Nobody at all'), HANDED_VERDICT, /^Wrong/u],
  ['The same with a pattern for a person', altered(1, '*'), HANDED_VERDICT, /^Wrong/u],
  ['The same with an error for a person', altered(1, '=1/0'), HANDED_VERDICT, /^Wrong/u],
  ['The same with a pattern for a slot', altered(2, '*'), HANDED_VERDICT, /^Wrong/u],
  ['The same with a number for a person', altered(1, 5), HANDED_VERDICT, /^Wrong/u],
  ['A plan with names that are signs of a condition', bookOf(odd), HANDED_VERDICT, /^All is well/u],
  ['A plan with times and rest', bookOf(timed), HANDED_VERDICT, /^All is well/u],
];

let failed = 0;
for (const [i, [name, one, cell, expected]] of CASES.entries()) {
  const verdict = await verdictOf(one, `case${i}`, cell);
  const isRight = expected.test(String(verdict));
  if (!isRight) failed++;
  console.log(`${name}: LibreOffice says "${verdict}"${isRight ? '.' : `; expected: ${expected}.`}`);
}
rmSync(folder, { recursive: true });
console.log(`${CASES.length - failed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
