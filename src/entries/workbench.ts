import { Journal } from '../functions/journal';
import { FUNCTIONS } from '../functions/registry';
import { provideSearcher } from '../functions/searches';
import { WorkerSearcher } from '../host/workerSearcher';
import type { Engine, EngineModel } from '../host/workbench/engine';
import { registerInEngine } from '../host/workbench/register';
import { WorkbenchWorkbook } from '../host/workbench/workbook';
import { mountPane } from '../pane/mount';
import { Desk } from '../workbench/desk';
import { makeDivider } from '../workbench/divider';
import { listenForKeys } from '../workbench/keys';
import { Menu } from '../workbench/menu';
import { Notice } from '../workbench/notice';
import { listenForMenus } from '../workbench/sheetMenus';

/** The engine and its component library: separate files, loaded before this one. */
declare const o_spreadsheet: Engine;
declare const owl: {
  readonly App: new (component: unknown, config: object) => { mount(target: HTMLElement): Promise<unknown>; destroy(): void };
};

/** For whoever tries things out in the console, and for the tests. */
declare global {
  interface Window {
    dutyproof?: { readonly workbook: WorkbenchWorkbook; readonly journal: Journal };
  }
}

void start();

async function start(): Promise<void> {
  // The engine tells the console about every step it takes.
  console.debug = () => undefined;
  const journal = new Journal();
  provideSearcher(new WorkerSearcher('search.js'));
  registerInEngine(o_spreadsheet, FUNCTIONS, journal, () => workbook.recalculateSoon());
  leaveOutMenus(o_spreadsheet);
  const workbook = new WorkbenchWorkbook(new o_spreadsheet.Model({}), o_spreadsheet);
  const notice = new Notice(element('notice'));
  const grid = element('grid');
  const templates = await (await fetch('vendor/o_spreadsheet.xml')).text();
  const draw = drawer(grid, templates, notice);
  const desk = new Desk({ engine: o_spreadsheet, workbook, draw, notice, fileName: element('file-name') });
  listen(desk, () => draw(workbook.model));
  listenForMenus(grid, new Menu(element('menu'), () => focusGrid(grid)), () => workbook.model);

  const paneRoot = document.createElement('div');
  paneRoot.style.height = '100%';
  element('pane').attachShadow({ mode: 'open' }).append(paneRoot);
  mountPane(paneRoot, workbook, journal);
  makeDivider(element('divider'), element('pane'));
  window.dutyproof = { workbook, journal };
  await desk.openDemo();
}

/** The menus of the sheet are ours. */
function leaveOutMenus({ registries }: Engine): void {
  for (const registry of [registries.cellMenuRegistry, registries.rowMenuRegistry, registries.colMenuRegistry]) {
    for (const name of [...registry.getKeys()]) registry.remove(name);
  }
}

/** Draws a model in place of the one before. */
function drawer(grid: HTMLElement, templates: string, notice: Notice): (model: EngineModel) => void {
  let app: { destroy(): void } | null = null;
  return (model) => {
    app?.destroy();
    grid.replaceChildren();
    const props = {
      model,
      colorScheme: prefersDark().matches ? 'dark' : 'light',
      notifyUser: ({ text }: { text: string }) => notice.show(text),
      raiseError: (text: string, next?: () => void) => {
        notice.show(text);
        next?.();
      },
      askConfirmation: (text: string, confirm: () => void) => notice.show(text, [{ label: 'Go ahead', run: confirm }]),
    };
    const next = new owl.App(o_spreadsheet.Spreadsheet, { props, templates });
    app = next;
    void next.mount(grid);
  };
}

function listen(desk: Desk, redraw: () => void): void {
  const files = element('files') as HTMLInputElement;
  const open = (): void => files.click();
  const save = (): void => desk.save();
  element('open').addEventListener('click', open);
  files.addEventListener('change', () => {
    void desk.open([...(files.files ?? [])]);
    files.value = '';
  });
  element('save').addEventListener('click', save);
  element('demo').addEventListener('click', () => void desk.openDemo());
  element('licences').addEventListener('click', () => (element('licence-dialog') as HTMLDialogElement).showModal());
  listenForKeys({ open, save, nextPart });
  prefersDark().addEventListener('change', redraw);
  window.addEventListener('beforeunload', (event) => {
    if (desk.isChanged) event.preventDefault();
  });
  listenForDrops(desk);
}

function listenForDrops(desk: Desk): void {
  document.addEventListener('dragover', (event) => {
    if (event.dataTransfer?.types.includes('Files') !== true) return;
    event.preventDefault();
    document.body.classList.add('wb-dropping');
  });
  document.addEventListener('dragleave', (event) => {
    if (event.relatedTarget === null) document.body.classList.remove('wb-dropping');
  });
  document.addEventListener('drop', (event) => {
    document.body.classList.remove('wb-dropping');
    if (event.dataTransfer?.types.includes('Files') !== true) return;
    event.preventDefault();
    void desk.open([...event.dataTransfer.files]);
  });
}

/** From the sheet to the pane, to the bar, and back to the sheet. */
function nextPart(): void {
  const grid = element('grid');
  const pane = element('pane');
  if (grid.contains(document.activeElement)) pane.shadowRoot?.querySelector<HTMLElement>('button')?.focus();
  else if (document.activeElement === pane) element('open').focus();
  else focusGrid(grid);
}

function focusGrid(grid: HTMLElement): void {
  grid.querySelector<HTMLElement>('.o-grid .o-composer')?.focus();
}

function prefersDark(): MediaQueryList {
  return matchMedia('(prefers-color-scheme: dark)');
}

function element(id: string): HTMLElement {
  const found = document.getElementById(id);
  if (found === null) throw new Error(`The page has no element "${id}".`);
  return found;
}
