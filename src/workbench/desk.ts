import { columnLetters, formatAddress } from '../host/address';
import type { Engine, EngineModel } from '../host/workbench/engine';
import type { WorkbenchWorkbook } from '../host/workbench/workbook';
import type { Book } from './files/book';
import { formatTable } from './files/formats';
import { fromEngine } from './files/fromEngine';
import { decodeText, openCsv } from './files/openCsv';
import { openXlsx } from './files/openXlsx';
import { makeModel } from './files/room';
import { saveXlsx } from './files/saveXlsx';
import { freeSheetName, isSheetName } from '../host/sheetNames';
import type { Notice } from './notice';

/** What a desk works with. */
export interface DeskParts {
  readonly engine: Engine;
  readonly workbook: WorkbenchWorkbook;
  /** Draws a model on the page, in place of the one before. */
  readonly draw: (model: EngineModel) => void;
  readonly notice: Notice;
  /** Where the name of the file is shown. */
  readonly fileName: HTMLElement;
}

const EMPTY: Book = { sheets: [], names: [], lost: [] };
const WORKBOOK = /\.xls[xm]$/iu;
const TEXT = /\.(?:csv|tsv|txt)$/iu;

/** Opens and saves workbooks, and keeps the page in step with the one at hand. */
export class Desk {
  readonly #parts: DeskParts;
  /** The book as it was opened, for what the engine cannot hold. */
  #opened = EMPTY;
  #name = 'workbook.xlsx';
  #isChanged = false;
  /** True once the person has agreed to save without what cannot be kept. */
  #mayLose = false;

  constructor(parts: DeskParts) {
    this.#parts = parts;
  }

  /** True where something was typed since the workbook was opened or saved. */
  get isChanged(): boolean {
    return this.#isChanged;
  }

  async openDemo(): Promise<void> {
    await this.#unlessChanged('Start over', async () => {
      const response = await fetch('demo.xlsx');
      if (!response.ok) throw new Error(`The demo cannot be opened: demo.xlsx answers ${response.status}.`);
      this.#show('demo.xlsx', await openXlsx(new Uint8Array(await response.arrayBuffer())));
    });
  }

  /** Opens one workbook, or any number of text files as sheets of one workbook. */
  async open(files: readonly File[]): Promise<void> {
    if (files.length === 0) return;
    await this.#unlessChanged('Open', async () => {
      const workbook = files.find(({ name }) => WORKBOOK.test(name));
      if (workbook === undefined) {
        await this.#openTexts(files);
        return;
      }
      const others = files.length > 1 ? [`Only ${workbook.name} was opened: one workbook at a time.`] : [];
      this.#show(workbook.name, await openXlsx(new Uint8Array(await workbook.arrayBuffer())), others);
    });
  }

  /** Saves what is on the page; says first what of the opened file will not be in it. */
  save(): void {
    const { lost } = this.#opened;
    if (lost.length === 0 || this.#mayLose) {
      void this.#download();
      return;
    }
    this.#parts.notice.show(`The saved file will not have these parts of ${this.#name}: ${lost.join(', ')}. The opened file itself stays as it is.`, [
      {
        label: 'Save without them',
        run: () => {
          this.#mayLose = true;
          void this.#download();
        },
      },
    ]);
  }

  /** Runs the step at once, or asks first where something would be lost. Errors are shown in words. */
  async #unlessChanged(label: string, step: () => Promise<void>): Promise<void> {
    const { notice } = this.#parts;
    const run = async (): Promise<void> => {
      try {
        await step();
      } catch (error) {
        notice.show(sentence(error));
      }
    };
    if (!this.#isChanged) return run();
    notice.show(`What was changed in ${this.#name} is not saved.`, [
      { label: `${label} without saving`, run: () => void run() },
      { label: 'Save first', run: () => this.save() },
    ]);
  }

  async #openTexts(files: readonly File[]): Promise<void> {
    const strange = files.find(({ name }) => !TEXT.test(name));
    if (strange !== undefined) throw new Error(`${strange.name} is neither an .xlsx workbook nor a .csv, .tsv or .txt table.`);
    const taken = new Set<string>();
    const sheets = [];
    for (const file of files) sheets.push(openCsv(file.name, decodeText(new Uint8Array(await file.arrayBuffer())), taken));
    this.#show(`${sheets.length === 1 ? sheets[0].name : 'tables'}.xlsx`, { ...EMPTY, sheets });
  }

  async #download(): Promise<void> {
    const { workbook, engine, notice } = this.#parts;
    try {
      const renamed = shortenSheetNames(workbook.model);
      const { toFile } = formatTable(this.#opened, engine);
      const bytes = await saveXlsx(fromEngine(workbook.model, toFile, this.#opened));
      const address = URL.createObjectURL(new Blob([bytes as BlobPart]));
      const link = document.createElement('a');
      link.href = address;
      link.download = this.#name.replace(WORKBOOK, '.xlsx');
      link.click();
      setTimeout(() => URL.revokeObjectURL(address), 10_000);
      this.#isChanged = false;
      if (renamed.length > 0) notice.show(['Files allow sheet names of 31 characters at most:', ...renamed]);
    } catch (error) {
      notice.show(`The workbook cannot be saved: ${sentence(error)}`);
    }
  }

  #show(name: string, book: Book, sentences: readonly string[] = []): void {
    const { engine, workbook, draw, fileName } = this.#parts;
    const model = makeModel(book, engine);
    this.#opened = book;
    this.#name = name;
    this.#mayLose = false;
    fileName.textContent = name;
    document.title = `${name} · Dutyproof workbench`;
    workbook.model.off('command-dispatched', this);
    workbook.replace(model);
    draw(model);
    activate(model, book.active ?? 0);
    this.#isChanged = false;
    model.on('command-dispatched', this, (command) => {
      if (engine.isCoreCommand(command)) this.#isChanged = true;
    });
    const remarks = [...sentences, ...unknownFormulas(book, model)];
    if (remarks.length > 0) this.#parts.notice.show(remarks);
    else this.#parts.notice.hide();
  }
}

/** Brings the sheet into view that was in view when the file was saved. */
function activate(model: EngineModel, sheet: number): void {
  const { getters } = model;
  const sheetIdTo = getters.getSheetIds().at(sheet);
  const sheetIdFrom = getters.getActiveSheetId();
  if (sheetIdTo !== undefined && getters.isSheetVisible(sheetIdTo) && sheetIdTo !== sheetIdFrom) {
    model.dispatch('ACTIVATE_SHEET', { sheetIdFrom, sheetIdTo });
  }
}

/** Says which formulas of a file the engine cannot calculate; they are kept as they are. */
function unknownFormulas(book: Book, { getters }: EngineModel): string[] {
  const unknown: string[] = [];
  for (const { name, cells } of book.sheets) {
    const sheetId = getters.getSheetIdByName(name);
    for (const { formula, row, column } of cells) {
      if (formula === null || sheetId === undefined) continue;
      const { value } = getters.getEvaluatedCell({ sheetId, col: column, row });
      if (value === '#BAD_EXPR' || value === '#NAME?') unknown.push(formatAddress({ sheet: name, cell: `${columnLetters(column)}${row + 1}` }));
    }
  }
  if (unknown.length === 0) return [];
  const where = unknown.length === 1 ? `The formula in ${unknown[0]} uses` : `${unknown.length} formulas (the first in ${unknown[0]}) use`;
  return [`${where} something this page cannot calculate: an error is shown in its place, and the saved file will hold the formula as it was.`];
}

/** Renames sheets whose names a file cannot hold; formulas follow. Says what was renamed. */
function shortenSheetNames(model: EngineModel): string[] {
  const { getters } = model;
  const ids = getters.getSheetIds();
  const taken = new Set(ids.map((id) => getters.getSheetName(id).toLowerCase()));
  return ids.flatMap((sheetId) => {
    const oldName = getters.getSheetName(sheetId);
    if (isSheetName(oldName)) return [];
    const newName = freeSheetName(oldName, taken);
    model.dispatch('RENAME_SHEET', { sheetId, oldName, newName });
    return [`"${oldName}" is now "${newName}".`];
  });
}

function sentence(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}
