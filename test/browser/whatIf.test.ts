import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { DeskPage } from './desk';
import { openSite, watch, type Site } from './harness';

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

const FILES = {
  'pairs.csv': `Duty,Person\n${['Ann', 'Bo', 'Cy', 'Di', 'Eve', 'Flo', 'Gus', 'Hal', 'Ida', 'Jon', 'Kim', 'Lea'].map((name) => `Choir,${name}`).join('\n')}\nOrgan,Ann\nBells,Ann\n`,
  'people.csv': 'Person,Maximum\nAnn,1\nBo,1\nCy,0\nDi,1\nEve,1\nFlo,1\nGus,1\nHal,1\nIda,1\nJon,1\nKim,1\nLea,1\n',
  'duties.csv': 'Duty,Need,Priority\nChoir,1,2\nOrgan,1,1\nBells,1,1\n',
  'rules.csv': 'Rule,Duty,Person,Value\nLimit,Choir,,5\n,,,\n,,,\n',
};

/** The workbench with a case of its own, answered. */
async function openCase(): Promise<DeskPage> {
  const desk = await DeskPage.open(site);
  await desk.give(FILES);
  await desk.pane.getByText('These look like your tables').waitFor();
  await desk.pane.getByRole('button', { name: 'Put the answers on new sheets' }).click();
  await desk.pane.getByText('of 3 seats covered').waitFor();
  return desk;
}

/** What has the focus in the pane: the words on it. */
function inFocus(desk: DeskPage): Promise<string | undefined> {
  return desk.page.evaluate(() => document.querySelector('#pane')!.shadowRoot!.activeElement?.textContent?.trim());
}

describe('what if', () => {
  it('says every cost straight away, what costs nothing first, and the moves on request', async () => {
    const desk = await openCase();
    const { errors } = watch(desk.page, site.origin);
    const panel = desk.pane.locator('section[aria-label="What if"]');
    await panel.getByLabel('A duty or a person').fill('Choir');
    await panel.getByLabel('A duty or a person').press('Enter');
    await panel.getByText('Could be held by (11)').waitFor();
    // The button goes away when it is pressed: the focus stays with the list.
    await panel.getByRole('button', { name: 'Show all 11' }).focus();
    await desk.page.keyboard.press('Enter');
    expect(await inFocus(desk)).toBe('What follows');
    const words = await panel.locator('.dp-item .dp-soft').allTextContents();
    expect(words).toHaveLength(12);
    expect(words.slice(1, 10)).toEqual(Array.from({ length: 9 }, () => 'costs no seat'));
    // What passes a limit comes last.
    expect(words[10]).toMatch(/^costs 1 seat: (?:Organ|Bells) \(priority 1\)$/u);
    expect(words[11]).toBe('costs no seat; passes the maximum (1 of 0)');

    const ann = panel.locator('.dp-item', { hasText: 'Ann' });
    await ann.getByRole('button', { name: 'What follows' }).click();
    const moves = await ann.locator('.dp-moves li').allTextContents();
    expect(moves).toHaveLength(2);
    expect(moves[0]).toMatch(/^Ann puts (?:Organ|Bells) down$/u);
    expect(moves[1]).toMatch(/ gives Choir to Ann$/u);

    await panel.getByLabel('A duty or a person').fill('ann');
    await panel.getByLabel('A duty or a person').press('Enter');
    await panel.getByText(/If they were away, 1 seat is lost; short then: (?:Organ|Bells)/u).waitFor();
    expect(errors).toEqual([]);
    await desk.page.close();
  });

  it('keeps the focus where it is, or next to it, whatever goes away', async () => {
    const desk = await DeskPage.open(site);
    const panel = desk.pane.locator('section[aria-label="What if"]');
    const field = panel.getByLabel('A duty or a person');
    await field.fill('Alma Thornbury');
    await field.press('Enter');
    // An option is opened and written into the rules: its own buttons go away.
    const item = panel.locator('.dp-item').filter({ has: desk.page.getByRole('button', { name: 'What follows' }) }).nth(1);
    await item.getByRole('button').focus();
    await desk.page.keyboard.press('Enter');
    expect(await inFocus(desk)).toBe('What follows');
    await panel.getByRole('button', { name: 'Fix this' }).focus();
    await desk.page.keyboard.press('Enter');
    await panel.getByText('It stands in').waitFor();
    await panel.getByText('Decisions in the rules (3)').waitFor();
    expect(await inFocus(desk)).toMatch(/^(?:What follows|Decide)$/u);

    // So does the button that takes the decision away again.
    await panel.getByText('Decisions in the rules (3)').click();
    await panel.getByRole('button', { name: 'Take away' }).last().focus();
    await desk.page.keyboard.press('Enter');
    await panel.getByText('Taken away: Fixed').waitFor();
    await panel.getByText('Decisions in the rules (2)').waitFor();
    expect(await inFocus(desk)).toBe('Take away');
    await desk.page.close();
  });

  it('asks which case is meant where there are several, in both panels, and follows it', async () => {
    const desk = await openCase();
    const whatIf = desk.pane.locator('section[aria-label="What if"]');
    const pictures = desk.pane.locator('section[aria-label="Pictures"]');
    await pictures.locator('summary', { hasText: 'Pictures' }).click();
    await pictures.getByText('Bottleneck 1: 2 needed, room for 1').waitFor();
    expect(await desk.pane.locator('section[aria-label="What if"] select, section[aria-label=Pictures] select').count()).toBe(0);

    // The same people with two places each, as a case of its own on another sheet.
    await desk.page.evaluate(() => {
      const { model } = window.dutyproof!.workbook;
      model.dispatch('CREATE_SHEET', { sheetId: 'second', position: 0, name: 'Second' });
      model.dispatch('UPDATE_CELL', { sheetId: 'second', col: 0, row: 0, content: '=DUTY.ASSIGN(pairs!A1:B15, 2, duties!A1:C4)' });
    });
    await whatIf.locator('select').waitFor();
    const options = await whatIf.locator('select').locator('option').allTextContents();
    expect(options).toEqual([expect.stringMatching(/!A2: 2 of 3 seats covered$/u), 'Second!A1: 3 of 3 seats covered']);
    const field = whatIf.getByLabel('A duty or a person');
    await field.fill('Ann');
    await field.press('Enter');
    await whatIf.getByText('Holds 1 of at most 1.').waitFor();
    await whatIf.locator('select').selectOption('Second!A1');
    await whatIf.getByText('Holds 2 of at most 2.').waitFor();
    expect(await pictures.getByText('Bottleneck 1').count()).toBe(1);
    await pictures.locator('select').selectOption('Second!A1');
    await pictures.getByText('Bottleneck 1').waitFor({ state: 'detached' });
    await desk.page.close();
  });
});
