// Writes assets/demo.xlsx: the scenario on an input sheet, and our functions' answers with the values they have today.
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { scenario } from './demo-scenario.mjs';
import { loadTypeScript, ROOT } from './load.mjs';

/** The same file each time: it says it was written on this day. */
const WRITTEN = new Date('2026-01-05T09:00:00Z');

/** The input tables beside each other, as they are given to the functions, and how wide their columns are in pixels. */
const TABLES = [
  { name: 'Duties', title: 'Duties to cover', widths: [200, 60, 75, 100, 70] },
  { name: 'People', title: 'People and maximums', widths: [170, 90] },
  { name: 'Pairs', title: 'Pairs: who may take what', widths: [200, 170] },
  { name: 'Rules', title: 'Rules: exceptions', widths: [80, 190, 170, 110] },
];
const PARAMETERS = ['Pairs', 'People', 'Duties', 'Rules'];
/** Blank rows below each table that its name takes in, so that rows can be added. */
const ROOM = 20;
/** Rows below the proof that its names take in, since it grows with the case. */
const PROOF_ROOM = 300;
const TITLE_ROW = 0;
const HEADING_ROW = 1;

/** @returns {Promise<any>} the demo as a book */
export async function demoBook() {
  const [sheets, { PROOF_NAMES }, { invoke }, { Journal }, { FUNCTIONS }, { columnLetters }] = await Promise.all(
    [
      'src/workbench/demoSheets.ts',
      'src/functions/proofChecks.ts',
      'src/functions/invoke.ts',
      'src/functions/journal.ts',
      'src/functions/registry.ts',
      'src/host/address.ts',
    ].map(loadTypeScript),
  );
  const tables = scenario();
  const { sheet, names } = inputSheet(tables, sheets, columnLetters);
  const ranges = PARAMETERS.map((name) => tables[name]);
  const journal = new Journal();
  const answer = (formula) => {
    const fn = FUNCTIONS.find(({ id }) => formula.startsWith(`=DUTY.${id}(`));
    const result = invoke(fn, ranges, '', journal);
    if (result.kind === 'fault') throw new Error(result.message);
    return result.spill;
  };
  const empty = [
    sheets.resultsSheet('Results', PARAMETERS),
    sheets.gridSheet('Grid', PARAMETERS, tables.People.length - 1),
    sheets.reasonsSheet('Why', PARAMETERS),
    sheets.proofSheet('Proof', PARAMETERS),
  ];
  const answered = empty.map((one) => withAnswers(one, answer));
  const columns = columnNames(tables, names, answered.at(-1), PROOF_NAMES, columnLetters);
  // The answers are what people want to see first.
  return { sheets: [sheet, ...answered], names: [...names, ...columns], lost: [], active: 1 };
}

/** Names of the columns that the native formulas of the proof use: of the input tables, and of the proof itself. */
function columnNames(tables, names, proof, wanted, columnLetters) {
  const rowsOfProof = Math.max(...proof.cells.map(({ row }) => row)) + 1 + PROOF_ROOM;
  const columns = [];
  for (const { name, reference } of names) {
    const [, first, top, bottom] = /!([A-Z]+)(\d+):[A-Z]+(\d+)$/u.exec(reference);
    const left = Array.from(first).reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0) - 1;
    for (const [column, heading] of Object.entries(wanted[name.toLowerCase()])) {
      const letters = columnLetters(left + tables[name][0].indexOf(heading));
      columns.push({ name: column, reference: `Inputs!${letters}${Number(top) + 1}:${letters}${bottom}` });
    }
  }
  Object.keys(wanted.proof).forEach((column, i) => {
    columns.push({ name: column, reference: `Proof!${columnLetters(i)}3:${columnLetters(i)}${rowsOfProof}` });
  });
  return columns;
}

/** The input sheet, and the names of its tables. */
function inputSheet(tables, { HEADING, TITLE }, columnLetters) {
  const cells = [];
  const names = [];
  const widths = new Map();
  let left = 0;
  for (const { name, title, widths: own } of TABLES) {
    const rows = tables[name];
    cells.push({ row: TITLE_ROW, column: left, formula: null, value: title, style: TITLE, format: null });
    rows.forEach((values, i) => {
      values.forEach((value, j) => {
        if (value === '') return;
        cells.push({ row: HEADING_ROW + i, column: left + j, formula: null, value, style: i === 0 ? HEADING : null, format: null });
      });
    });
    own.forEach((width, j) => widths.set(left + j, width));
    widths.set(left + own.length, 30);
    const last = `${columnLetters(left + own.length - 1)}${HEADING_ROW + rows.length + ROOM}`;
    names.push({ name, reference: `Inputs!${columnLetters(left)}${HEADING_ROW + 1}:${last}` });
    left += own.length + 1;
  }
  return { sheet: { name: 'Inputs', hidden: false, cells, widths, merges: [], frozen: { rows: 2, columns: 0 } }, names };
}

/** A sheet with the values of its formulas, and the cells they fill with theirs. */
function withAnswers(sheet, answer) {
  const cells = new Map(sheet.cells.map((cell) => [`${cell.row},${cell.column}`, cell]));
  for (const { row, column, formula } of sheet.cells) {
    if (formula === null || !formula.startsWith('=DUTY.')) continue;
    const spill = answer(formula);
    spill.forEach((values, i) => {
      values.forEach((value, j) => {
        const key = `${row + i},${column + j}`;
        const blank = { row: row + i, column: column + j, formula: null, style: null, format: null };
        cells.set(key, { ...(cells.get(key) ?? blank), value });
      });
    });
    const first = `${row},${column}`;
    cells.set(first, { ...cells.get(first), spill: { rows: spill.length, columns: spill[0].length } });
  }
  return { ...sheet, cells: [...cells.values()] };
}

/** @returns {Promise<Uint8Array>} the demo as a file */
export async function demoFile() {
  const { saveXlsx } = await loadTypeScript('src/workbench/files/saveXlsx.ts');
  return saveXlsx(await demoBook(), WRITTEN);
}

if (process.argv[1] === join(ROOT, 'scripts/demo.mjs')) {
  const file = join(ROOT, 'assets/demo.xlsx');
  writeFileSync(file, await demoFile());
  const [, results] = (await demoBook()).sheets;
  const summary = results.cells.filter(({ row, column }) => row > 1 && row < 5 && column < 2).sort((a, b) => a.row - b.row || a.column - b.column);
  console.log(`Wrote ${file}: ${summary.map(({ value }) => value).join(' ')}`);
}
