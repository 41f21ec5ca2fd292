// Recomputes the native formulas of the demo's proof in another spreadsheet program: LibreOffice, headless.
// The plan and the proof are plain values there, as in a workbook handed to someone without the add-in.
//   npm run libreoffice      needs the program soffice
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { readXlsx } from 'hucre';
import { demoBook } from './demo.mjs';
import { loadTypeScript } from './load.mjs';

const { saveXlsx } = await loadTypeScript('src/workbench/files/saveXlsx.ts');
const folder = mkdtempSync(join(tmpdir(), 'dutyproof-'));
const VERDICT = { row: 1, column: 8 };

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

/** Opens a book in LibreOffice and returns the verdict it computes. */
async function verdictOf(book, name) {
  const file = join(folder, `${name}.xlsx`);
  writeFileSync(file, await saveXlsx(book));
  const out = join(folder, name);
  execFileSync('soffice', [`-env:UserInstallation=file://${join(folder, 'profile')}`, '--headless', '--convert-to', 'xlsx', '--outdir', out, file], {
    stdio: 'ignore',
  });
  const { sheets } = await readXlsx(new Uint8Array(readFileSync(join(out, `${name}.xlsx`))));
  return sheets.find((sheet) => sheet.name === 'Proof').rows[VERDICT.row][VERDICT.column];
}

/** Changes a cell of the proof: the first row of a part, in a column. */
function tampered(book, part, column, value) {
  const proof = book.sheets.find(({ name }) => name === 'Proof');
  const row = proof.cells.filter((cell) => cell.column === 0 && cell.value === part).sort((a, b) => a.row - b.row)[0].row;
  const change = (cell) => (cell.row === row && cell.column === column ? { ...cell, value } : cell);
  return { ...book, sheets: book.sheets.map((sheet) => (sheet === proof ? { ...sheet, cells: sheet.cells.map(change) } : sheet)) };
}

const book = handedOver(await demoBook());
const CASES = [
  ['as it is', book, 'holds'],
  ['with a seat given to someone else', tampered(book, 'Seat', 2, 'Nesta Quill'), 'does not hold'],
  ['with a maximum changed', tampered(book, 'Person', 5, 9), 'does not hold'],
  ['with a bound changed', tampered(book, 'Bound', 5, 7), 'does not hold'],
  ['with a total changed', tampered(book, 'Total', 4, 52), 'does not hold'],
];

let failed = 0;
for (const [i, [name, one, expected]] of CASES.entries()) {
  const verdict = await verdictOf(one, `case${i}`);
  if (verdict !== expected) failed++;
  console.log(`The proof ${name}: LibreOffice says that it ${verdict}${verdict === expected ? '.' : `; expected: ${expected}.`}`);
}
rmSync(folder, { recursive: true });
console.log(`${CASES.length - failed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
