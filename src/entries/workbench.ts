import { Journal } from '../functions/journal';
import { FUNCTIONS } from '../functions/registry';
import type { Engine, EngineModel } from '../host/workbench/engine';
import { registerInEngine } from '../host/workbench/register';
import { WorkbenchWorkbook } from '../host/workbench/workbook';
import { mountPane } from '../pane/mount';
import { Desk } from '../workbench/desk';
import { Notice } from '../workbench/notice';

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
  const journal = new Journal();
  registerInEngine(o_spreadsheet, FUNCTIONS, journal);
  const workbook = new WorkbenchWorkbook(new o_spreadsheet.Model({}));
  const templates = await (await fetch('vendor/o_spreadsheet.xml')).text();
  const notice = new Notice(element('notice'));
  const desk = new Desk(o_spreadsheet, workbook, drawer(element('grid'), templates), notice, element('file-name'));

  const paneRoot = document.createElement('div');
  paneRoot.style.height = '100%';
  element('pane').attachShadow({ mode: 'open' }).append(paneRoot);
  mountPane(paneRoot, workbook, journal);
  listen(desk);
  window.dutyproof = { workbook, journal };
  await desk.openDemo();
}

/** Draws a model in place of the one before. */
function drawer(grid: HTMLElement, templates: string): (model: EngineModel) => void {
  let app: { destroy(): void } | null = null;
  return (model) => {
    app?.destroy();
    grid.replaceChildren();
    const next = new owl.App(o_spreadsheet.Spreadsheet, { props: { model }, templates });
    app = next;
    void next.mount(grid);
  };
}

function listen(desk: Desk): void {
  const files = element('files') as HTMLInputElement;
  element('open').addEventListener('click', () => files.click());
  files.addEventListener('change', () => {
    void desk.open([...(files.files ?? [])]);
    files.value = '';
  });
  element('save').addEventListener('click', () => desk.save());
  element('demo').addEventListener('click', () => void desk.openDemo());
  element('licences').addEventListener('click', () => (element('licence-dialog') as HTMLDialogElement).showModal());

  const desktop = document.querySelector<HTMLElement>('.wb-desk')!;
  document.addEventListener('dragover', (event) => {
    event.preventDefault();
    desktop.classList.add('wb-dropping');
  });
  document.addEventListener('dragleave', (event) => {
    if (event.relatedTarget === null) desktop.classList.remove('wb-dropping');
  });
  document.addEventListener('drop', (event) => {
    event.preventDefault();
    desktop.classList.remove('wb-dropping');
    void desk.open([...(event.dataTransfer?.files ?? [])]);
  });
}

function element(id: string): HTMLElement {
  const found = document.getElementById(id);
  if (found === null) throw new Error(`The page has no element "${id}".`);
  return found;
}
