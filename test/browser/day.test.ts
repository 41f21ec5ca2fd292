import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openXlsx } from '../../src/workbench/files/openXlsx';
import { DeskPage } from './desk';
import { openSite, watch, type Site } from './harness';

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

/** Puts a table into the sheet in view as pasting does. */
async function paste(desk: DeskPage, cell: string, rows: readonly (readonly (string | number)[])[]): Promise<void> {
  await desk.select(cell);
  await desk.page.evaluate((text) => {
    const { model } = window.dutyproof!.workbook;
    model.dispatch('PASTE_FROM_OS_CLIPBOARD', { clipboardContent: { text }, target: model.getters.getSelectedZones() });
  }, rows.map((row) => row.join('\t')).join('\n'));
}

const PAIRS = [
  ['Front desk', 'Ada Lund'],
  ['Front desk', 'Bo Vinter'],
  ['Reading room', 'Bo Vinter'],
  ['Archive', 'Bo Vinter'],
  ['Archive', 'Cleo Marsh'],
  ['Late shift', 'Bo Vinter'],
];
const PEOPLE = [['Ada Lund', 1], ['Bo Vinter', 2], ['Cleo Marsh', 1]];
const DUTIES = [['Front desk', 1], ['Reading room', 1], ['Archive', 1], ['Late shift', 1]];

describe('a day at the desk', () => {
  it('from an empty workbook to a plan handed over, saved and opened again', { timeout: 180_000 }, async () => {
    const desk = await DeskPage.open(site);
    const { foreign, errors } = watch(desk.page, site.origin);

    // An empty workbook: the pane lays out the tables and has the answers ready.
    await desk.give({ 'week.csv': '\n' });
    await desk.pane.getByRole('button', { name: 'Lay out empty tables' }).click();
    await desk.pane.getByText('Fill the tables on Inputs').waitFor();
    await paste(desk, 'Inputs!A4', PAIRS);
    await paste(desk, 'Inputs!E4', PEOPLE);
    await paste(desk, 'Inputs!I4', DUTIES);
    await desk.pane.getByText('of 4 seats covered').waitFor();
    await desk.pane.getByText('all covered').waitFor();

    // Someone falls ill: what cannot be covered, why, and what would mend it.
    await desk.type('Inputs!F5', '1');
    await desk.pane.getByText('1 uncovered').first().waitFor();
    await desk.pane.getByText('Only Bo Vinter can take these 2 duties').first().waitFor();
    await desk.pane.getByText('One more place for Bo Vinter').waitFor();
    await desk.type('Inputs!F5', '2');
    await desk.pane.getByText('all covered').waitFor();

    // What if Bo takes the archive? Then it is decided, and taken away again.
    const field = desk.pane.getByLabel('A duty or a person');
    await field.fill('Archive');
    await field.press('Enter');
    const bo = desk.pane.locator('.dp-item', { hasText: 'Bo Vinter' }).filter({ has: desk.page.getByRole('button', { name: 'What follows' }) });
    await bo.getByRole('button', { name: 'What follows' }).click();
    await bo.getByText('Costs 1 seat').waitFor();
    await bo.getByRole('button', { name: 'Never this' }).click();
    await desk.pane.getByText('Barred: Bo Vinter, Archive. It stands in').waitFor();
    expect(await desk.valueAt('Inputs!O4')).toBe('Barred');
    await desk.pane.getByText('Decisions in the rules (1)').click();
    await desk.pane.getByRole('button', { name: 'Take away' }).click();
    await desk.pane.getByText('Taken away: Barred').waitFor();
    expect(await desk.valueAt('Inputs!O4')).toBeNull();

    // Handed over: plain sheets, whose check notices a change into an error.
    await desk.pane.getByRole('button', { name: 'Make the sheets to hand over' }).click();
    await desk.pane.getByText('Made 5 sheets').waitFor();
    expect(await desk.valueAt('Handed over!B9')).toMatch(/^All is well/u);
    const { bytes } = await desk.save();
    const book = await openXlsx(bytes);
    expect(book.sheets.map(({ name }) => name)).toContain('Plan by duty');

    await desk.give({ 'handed.xlsx': bytes });
    await desk.page.locator('#file-name', { hasText: 'handed.xlsx' }).waitFor();
    expect(await desk.valueAt('Handed over!B9')).toMatch(/^All is well/u);
    await desk.type("'Plan by duty'!B2", 'Cleo Marsh');
    expect(await desk.valueAt('Handed over!B9')).toMatch(/^Wrong/u);
    expect({ foreign, errors }).toEqual({ foreign: [], errors: [] });
    await desk.page.close();
  });

  it('takes sheets that were laid out back with one press of the undo key, and brings them again with one', async () => {
    const desk = await DeskPage.open(site);
    const names = () => desk.page.evaluate(() => window.dutyproof!.workbook.model.getters.getNamedRanges().map(({ name }) => name));
    await desk.give({ 'week.csv': '\n' });
    await desk.pane.getByRole('button', { name: 'Lay out empty tables' }).click();
    await desk.pane.getByText('Fill the tables on Inputs').waitFor();
    const [sheets, named] = [await desk.sheets(), await names()];
    expect(named).toEqual(expect.arrayContaining(['Pairs', 'People', 'Duties', 'Rules']));
    await desk.page.locator('.o-grid .o-composer').focus();
    await desk.page.keyboard.press('Control+z');
    await expect.poll(() => desk.sheets()).toEqual(['week']);
    expect(await names()).toEqual([]);
    await desk.pane.getByText('This workbook holds no formulas').waitFor();
    await desk.page.keyboard.press('Control+y');
    await expect.poll(() => desk.sheets()).toEqual(sheets);
    expect(await names()).toEqual(named);
    await paste(desk, 'Inputs!A4', PAIRS);
    await paste(desk, 'Inputs!E4', PEOPLE);
    await paste(desk, 'Inputs!I4', DUTIES);
    await desk.pane.getByText('all covered').waitFor();
    await desk.page.close();
  });

  it('finds tables that are there, and says what it understood before it writes', async () => {
    const desk = await DeskPage.open(site);
    await desk.give({
      'who.csv': ['Shift,Name', ...PAIRS.map((row) => row.join(','))].join('\n'),
      'staff.csv': ['Name,Max', ...PEOPLE.map((row) => row.join(','))].join('\n'),
      'current plan.csv': 'Duty,Person\nFront desk,Ada Lund\nReading room,Bo Vinter\nArchive,Cleo Marsh\nLate shift,Bo Vinter\n',
    });
    await desk.pane.getByText('These look like your tables').waitFor();
    await desk.pane.getByText('Understood: 6 pairs, 3 people, 4 duties with 4 seats.').waitFor();
    await desk.pane.getByRole('button', { name: 'Put the answers on new sheets' }).click();
    await desk.pane.getByText('of 4 seats covered').waitFor();
    await desk.pane.getByText('The answers are on Results, Grid and Why').waitFor();
    expect(await desk.sheets()).toEqual(['who', 'staff', 'current plan', 'Results', 'Grid', 'Why', 'Rules']);

    // A colleague drops out: the moves to the new plan.
    expect(await desk.valueAt('Why!A3')).toBe('No moves: the current plan is the best plan');
    await desk.type('staff!B4', '0');
    await desk.pane.getByText('1 uncovered').first().waitFor();
    expect(await desk.valueAt('Why!B3')).toBe('Archive');
    expect(await desk.valueAt('Why!C3')).toBe('Cleo Marsh');

    // A promise is made where there was no table for it.
    await desk.type('staff!B4', '1');
    const field = desk.pane.getByLabel('A duty or a person');
    await field.fill('Archive');
    await field.press('Enter');
    const bo = desk.pane.locator('.dp-item', { hasText: 'Bo Vinter' });
    await bo.getByRole('button', { name: 'What follows' }).click();
    await bo.getByRole('button', { name: 'Fix this' }).click();
    await desk.pane.getByText('Fixed: Bo Vinter, Archive. It stands in Rules!A4').waitFor();
    expect(await desk.valueAt('Rules!A4')).toBe('Fixed');

    // What was said of one workbook is not said of the next.
    await desk.pane.getByText('The answers are on').waitFor();
    await desk.give({ 'other.csv': 'Item,Pieces\nChairs,12\n' });
    await desk.page.getByText('Open without saving').click();
    await desk.pane.getByText('No tables were found yet').waitFor();
    await desk.pane.getByText('The answers are on').waitFor({ state: 'detached' });
    await desk.page.close();
  });
});
