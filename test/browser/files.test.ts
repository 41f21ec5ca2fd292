import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { openXlsx } from '../../src/workbench/files/openXlsx';
import { xlsx } from '../helpers/zip';
import { DeskPage } from './desk';
import { openSite, watch, type Site, type Watch } from './harness';

const SCARCE = 'Inputs!H19';
const PAIRS = 'Duty,Person\nChoir,Ann\nOrgan,Ann\n';
const PEOPLE = 'Person,Maximum\nAnn,1\n';

let site: Site;
let desk: DeskPage;
let seen: Watch;

beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

beforeEach(async () => {
  desk = await DeskPage.open(site);
  seen = watch(desk.page, site.origin);
});

afterEach(async () => {
  expect(seen.foreign).toEqual([]);
  expect(seen.errors).toEqual([]);
  await desk.page.close();
});

describe('saving', () => {
  it('keeps formulas and values, which come back when the file is opened again', async () => {
    await desk.type(SCARCE, '2');
    await desk.pane.getByText('2 uncovered').waitFor();
    const { name, bytes } = await desk.save();
    expect(name).toBe('demo.xlsx');
    await desk.page.click('#demo');
    await desk.pane.getByText('3 uncovered').waitFor();
    await desk.give({ 'mine.xlsx': bytes });
    await desk.pane.getByText('2 uncovered').waitFor();
    expect(await desk.valueAt('Results!B5')).toBe(2);
    const book = await openXlsx(bytes);
    const formulas = book.sheets.flatMap(({ cells }) => cells.flatMap(({ formula }) => (formula === null ? [] : [formula])));
    expect(formulas).toContain('=DUTY.ASSIGN(Pairs,People,Duties,Rules)');
    expect(formulas.filter((formula) => formula.startsWith('=DUTY.'))).toHaveLength(11);
    expect(book.names.map(({ name: own }) => own)).toEqual(expect.arrayContaining(['Duties', 'Pairs', 'People', 'Rules', 'ProofCount']));
  });

  it('says first what of the opened file cannot be kept, and then asks no more', async () => {
    const file = xlsx({ sheets: { S: '<row r="1"><c r="A1"><v>1</v></c></row>' }, parts: { 'xl/vbaProject.bin': 'x', 'xl/charts/chart1.xml': '<x/>' } });
    await desk.give({ 'old.xlsm': file });
    await desk.page.click('#save');
    await desk.notice.getByText('The saved file will not have these parts of old.xlsm: macros, charts.').waitFor();
    const [download] = await Promise.all([desk.page.waitForEvent('download'), desk.page.getByText('Save without them').click()]);
    expect(download.suggestedFilename()).toBe('old.xlsx');
    await desk.save();
  });

  it('keeps the input checks of a file, which hold on the page, and the sheet in view', async () => {
    const check =
      '<dataValidations count="1"><dataValidation type="whole" operator="greaterThanOrEqual" sqref="A1:A9" showErrorMessage="1">' +
      '<formula1>0</formula1></dataValidation></dataValidations>';
    const cell = '<row r="1"><c r="A1"><v>1</v></c></row>';
    await desk.give({ 'checked.xlsx': xlsx({ sheets: { S: cell, T: cell }, after: check }) });
    await desk.page.locator('#file-name', { hasText: 'checked.xlsx' }).waitFor();
    await desk.type('S!A2', '-1');
    await desk.notice.getByText('The value must be greater or equal to 0').waitFor();
    await desk.page.keyboard.press('Escape');
    expect(await desk.valueAt('S!A2')).toBeNull();
    await desk.type('S!A2', '4');
    expect(await desk.valueAt('S!A2')).toBe(4);
    await desk.page.locator('.o-sheet', { hasText: 'T' }).click();
    const { bytes } = await desk.save();
    const { sheets, active } = await openXlsx(bytes);
    expect(active).toBe(1);
    expect(sheets[0].checks).toEqual([
      { ranges: ['A1:A9'], rule: { type: 'whole', operator: 'greaterThanOrEqual', formula1: '0', showErrorMessage: true } },
    ]);
    await desk.give({ 'again.xlsx': bytes });
    await desk.page.locator('#file-name', { hasText: 'again.xlsx' }).waitFor();
    await desk.page.locator('.o-sheet.active', { hasText: 'T' }).waitFor();
  });

  it('shortens a sheet name that a file cannot hold, and says so', async () => {
    await desk.page.evaluate(() => {
      const { model } = window.dutyproof!.workbook;
      const sheetId = model.getters.getSheetIdByName('Grid')!;
      model.dispatch('RENAME_SHEET', { sheetId, oldName: 'Grid', newName: 'Who takes what in the week of the examinations' });
    });
    const { bytes } = await desk.save();
    expect((await openXlsx(bytes)).sheets.map(({ name }) => name)).toContain('Who takes what in the week of t');
    await desk.notice.getByText('is now "Who takes what in the week of t"').waitFor();
  });

  it('is asked about before something typed is thrown away', async () => {
    await desk.type(SCARCE, '2');
    await desk.page.click('#demo');
    await desk.notice.getByText('What was changed in demo.xlsx is not saved.').waitFor();
    await desk.pane.getByText('2 uncovered').waitFor();
    await desk.page.getByText('Start over without saving').click();
    await desk.pane.getByText('3 uncovered').waitFor();
    await desk.page.click('#demo');
    await desk.notice.waitFor({ state: 'hidden' });
  });
});

describe('opening', () => {
  it('takes text files together as sheets, and answers them when asked', async () => {
    await desk.give({
      'pairs.csv': '\uFEFFDuty;Person\r\nChoir;Ann\r\n"Organ; large";Bob\r\nOrgan, small;Ann\r\n',
      'people.csv': 'Person,Maximum\nAnn,1\nBob,1\n',
    });
    await desk.pane.getByRole('button', { name: 'Put the answers on new sheets' }).click();
    await desk.pane.getByText('of 3 seats covered').waitFor();
    expect(await desk.sheets()).toEqual(['pairs', 'people', 'Results', 'Grid', 'Why', 'Rules']);
    expect(await desk.page.locator('#file-name').textContent()).toBe('tables.xlsx');
    expect(await desk.valueAt('pairs!A3')).toBe('Organ; large');
    expect(await desk.valueAt('Results!B5')).toBe(1);
    await desk.type('people!B2', '2');
    await desk.pane.getByText('all covered').waitFor();
  });

  it('offers no answers for tables it does not know', async () => {
    await desk.give({ 'stock.csv': 'Item,Pieces\nChairs,12\n' });
    await desk.page.getByText('stock.xlsx').waitFor();
    await desk.pane.getByText('No tables were found yet').waitFor();
    expect(await desk.notice.isVisible()).toBe(false);
    expect(await desk.valueAt('stock!B2')).toBe(12);
  });

  it('takes files that are dropped on the page', async () => {
    await desk.page.evaluate(
      ({ pairs, people }) => {
        const dataTransfer = new DataTransfer();
        dataTransfer.items.add(new File([pairs], 'pairs.csv'));
        dataTransfer.items.add(new File([people], 'people.csv'));
        const target = document.querySelector('.o-grid-overlay')!;
        target.dispatchEvent(new DragEvent('dragover', { dataTransfer, bubbles: true, cancelable: true }));
        target.dispatchEvent(new DragEvent('drop', { dataTransfer, bubbles: true, cancelable: true }));
      },
      { pairs: PAIRS, people: PEOPLE },
    );
    await desk.pane.getByRole('button', { name: 'Put the answers on new sheets' }).click();
    await desk.pane.getByText('of 2 seats covered').waitFor();
  });

  it('says what is wrong with a file it cannot open, and leaves the workbook as it is', async () => {
    await desk.give({ 'broken.xlsx': 'no workbook' });
    await desk.notice.getByText('This file cannot be read as an .xlsx workbook').waitFor();
    await desk.give({ 'letter.docx': 'x', 'pairs.csv': PAIRS });
    await desk.notice.getByText('letter.docx is neither an .xlsx workbook nor a .csv, .tsv or .txt table.').waitFor();
    expect((await desk.sheets()).slice(0, 3)).toEqual(['Inputs', 'Results', 'Grid']);
  });

  it('says which formulas it cannot calculate', async () => {
    const formula = (place: string, code: string) => `<c r="${place}"><f>${code}</f><v>2</v></c>`;
    await desk.give({ 'a.xlsx': xlsx({ sheets: { S: `<row r="1">${formula('A1', '_xlfn.LET(x,1,x+1)')}${formula('B1', 'Rate*2')}${formula('C1', '1+1')}</row>` } }) });
    await desk.notice.getByText('2 formulas (the first in S!A1) use something this page cannot calculate').waitFor();
    expect(await desk.valueAt('S!C1')).toBe(2);
  });
});

describe('what files say', () => {
  it('is text, never markup, a formula or a number', async () => {
    const hostile = ['<img src=x onerror="window.hacked=1">', '=1+1', '001', '+44', '\u202Ename', '🙂'.repeat(200), 'x'.repeat(10_000)];
    const cell = (text: string): string => `"${text.replaceAll('"', '""')}"`;
    const markup = '<img src=x onerror="window.hacked=1">';
    await desk.give({
      [`${markup}.csv`]: ['Duty,Person', ...hostile.map((name) => `${cell(name)},${cell(name)}`)].join('\n'),
      'people.csv': 'Person,Maximum\nNobody,1\n',
    });
    await desk.pane.getByRole('button', { name: 'Put the answers on new sheets' }).click();
    await desk.pane.getByText('of 7 seats covered').waitFor();
    await desk.pane.getByText('Findings (').click();
    const [sheet] = await desk.sheets();
    expect(await desk.valueAt(`${sheet}!A3`)).toBe('=1+1');
    expect(await desk.valueAt(`${sheet}!A4`)).toBe('001');
    await desk.select(`'${sheet.replaceAll("'", "''")}'!A2`);
    await desk.page.locator('.o-sheet.active').click({ button: 'right' });
    await desk.page.keyboard.press('Escape');
    await desk.pane.getByRole('button', { name: 'Make the sheets to hand over' }).click();
    await desk.pane.getByText('Made 5 sheets').waitFor();
    expect(await desk.valueAt('Handed over!B9')).toMatch(/^All is well/u);
    const handed = await openXlsx((await desk.save()).bytes);
    const plan = handed.sheets.find(({ name }) => name === 'Plan by duty')!.cells.filter(({ row, column }) => row > 0 && column === 0);
    expect(plan.map(({ value }) => value).sort()).toEqual([...hostile].sort());
    expect(plan.filter(({ formula }) => formula !== null)).toEqual([]);
    const field = desk.pane.getByLabel('A duty or a person');
    await field.fill(hostile[0]);
    await field.press('Enter');
    await desk.pane.getByText('Needs 1, held by 0').waitFor();
    expect(await desk.page.evaluate(() => 'hacked' in window)).toBe(false);
    expect(await desk.page.locator('img[src="x"]').count()).toBe(0);
    const width = await desk.pane.evaluate((element) => element.scrollWidth - element.clientWidth);
    expect(width).toBeLessThanOrEqual(0);
  });
});
