// Writes assets/demo.xlsx: the scenario as input sheets, and our functions' answers with the values they have today.
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { scenario } from './demo-scenario.mjs';
import { loadTypeScript, ROOT } from './load.mjs';

const WIDTHS = { Pairs: [190, 170], People: [170, 90], Duties: [190, 60, 70, 100, 70], Rules: [80, 190, 170, 110] };
const HEADING = { bold: true, fill: '#e3efe9' };

/** @returns {Promise<any>} the demo as a book */
export async function demoBook() {
  const [{ answerSheets }, { invoke }, { Journal }, { FUNCTIONS }] = await Promise.all(
    ['src/workbench/answerSheets.ts', 'src/functions/invoke.ts', 'src/functions/journal.ts', 'src/functions/registry.ts'].map(
      loadTypeScript,
    ),
  );
  const tables = scenario();
  const inputs = { name: 'x', sheets: Object.entries(tables).map(([name, rows]) => inputSheet(name, rows)), names: [], lost: [] };
  const book = answerSheets(inputs);
  const ranges = [tables.Pairs, tables.People, tables.Duties, tables.Rules];
  const journal = new Journal();
  const answer = (formula) => {
    const fn = FUNCTIONS.find(({ id }) => formula.startsWith(`=DUTY.${id}(`));
    const result = invoke(fn, ranges, '', journal);
    if (result.kind === 'fault') throw new Error(result.message);
    return result.spill;
  };
  return { ...book, sheets: book.sheets.map((sheet) => ({ ...sheet, cells: sheet.cells.flatMap((cell) => withValues(cell, answer)) })) };
}

function inputSheet(name, rows) {
  const cells = rows.flatMap((values, row) =>
    values.flatMap((value, column) =>
      value === '' ? [] : [{ row, column, formula: null, value, style: row === 0 ? HEADING : null, format: null }],
    ),
  );
  return {
    name,
    hidden: false,
    cells,
    widths: new Map(WIDTHS[name].map((width, column) => [column, width])),
    merges: [],
    frozen: { rows: 1, columns: 0 },
  };
}

/** A formula's cell with its value, and the cells it fills with theirs. */
function withValues(cell, answer) {
  if (cell.formula === null) return cell.value === null ? [] : [cell];
  const spill = answer(cell.formula);
  return spill.flatMap((row, r) =>
    row.map((value, c) => {
      const here = { row: cell.row + r, column: cell.column + c, value, style: r === 0 ? HEADING : null, format: null };
      if (r > 0 || c > 0) return { ...here, formula: null };
      return { ...here, formula: cell.formula, spill: { rows: spill.length, columns: spill[0].length } };
    }),
  );
}

if (process.argv[1] === join(ROOT, 'scripts/demo.mjs')) {
  const { saveXlsx } = await loadTypeScript('src/workbench/files/saveXlsx.ts');
  const book = await demoBook();
  const file = join(ROOT, 'assets/demo.xlsx');
  writeFileSync(file, await saveXlsx(book));
  const summary = book.sheets.find(({ name }) => name === 'Results').cells.filter(({ column }) => column < 2).map(({ value }) => value);
  console.log(`Wrote ${file}: ${summary.slice(1, 9).join(' ')}`);
}
