import type { Engine, EngineModel } from '../host/workbench/engine';
import type { WorkbenchWorkbook } from '../host/workbench/workbook';
import { answerSheets } from './answerSheets';
import type { Book } from './files/book';
import { fromEngine, toEngineData } from './files/engineData';
import { openCsv } from './files/openCsv';
import { openXlsx } from './files/openXlsx';
import { saveXlsx } from './files/saveXlsx';
import type { Notice } from './notice';

/** What draws a model on the page. */
export type Draw = (model: EngineModel) => void;

/** Opens and saves workbooks, and keeps the page in step with the one at hand. */
export class Desk {
  readonly #engine: Engine;
  readonly #workbook: WorkbenchWorkbook;
  readonly #draw: Draw;
  readonly #notice: Notice;
  readonly #fileName: HTMLElement;
  /** What the opened file held that cannot be kept. */
  #lost: readonly string[] = [];
  #name = 'workbook.xlsx';

  constructor(engine: Engine, workbook: WorkbenchWorkbook, draw: Draw, notice: Notice, fileName: HTMLElement) {
    this.#engine = engine;
    this.#workbook = workbook;
    this.#draw = draw;
    this.#notice = notice;
    this.#fileName = fileName;
  }

  async openDemo(): Promise<void> {
    try {
      const response = await fetch('demo.xlsx');
      if (!response.ok) throw new Error(`demo.xlsx answers ${response.status}.`);
      this.#show('demo.xlsx', await openXlsx(new Uint8Array(await response.arrayBuffer())));
    } catch (error) {
      this.#notice.show(`The demo cannot be opened: ${sentence(error)}`);
    }
  }

  /** Opens one .xlsx file, or any number of text files as sheets of one workbook. */
  async open(files: readonly File[]): Promise<void> {
    if (files.length === 0) return;
    try {
      const workbook = files.find(({ name }) => /\.xlsx$/iu.test(name));
      if (workbook !== undefined) {
        this.#show(workbook.name, await openXlsx(new Uint8Array(await workbook.arrayBuffer())));
        if (files.length > 1) this.#notice.show(`Only ${workbook.name} was opened: one workbook at a time.`);
      } else {
        await this.#openTexts(files);
      }
    } catch (error) {
      this.#notice.show(sentence(error));
    }
  }

  async #openTexts(files: readonly File[]): Promise<void> {
    const strange = files.find(({ name }) => !/\.(csv|tsv|txt)$/iu.test(name));
    if (strange !== undefined) throw new Error(`${strange.name} is neither an .xlsx workbook nor a .csv, .tsv or .txt table.`);
    const taken = new Set<string>();
    const sheets = [];
    for (const file of files) sheets.push(openCsv(file.name, await file.text(), taken));
    const book: Book = { sheets, names: [], lost: [] };
    const name = `${sheets[0].name}.xlsx`;
    this.#show(name, book);
    const answered = answerSheets(book);
    if (answered === null) return;
    this.#notice.show('These look like tables of pairs and people.', [
      { label: 'Answer them on new sheets', run: () => this.#show(name, answered) },
    ]);
  }

  /** Saves what is on the page; says first what of the opened file is not in it. */
  save(): void {
    if (this.#lost.length === 0) {
      void this.#download();
      return;
    }
    this.#notice.show(`The saved file will not have these parts of the opened one: ${this.#lost.join(', ')}.`, [
      { label: 'Save without them', run: () => void this.#download() },
    ]);
  }

  async #download(): Promise<void> {
    try {
      const bytes = await saveXlsx(fromEngine(this.#workbook.model));
      const address = URL.createObjectURL(new Blob([bytes as BlobPart]));
      const link = document.createElement('a');
      link.href = address;
      link.download = this.#name;
      link.click();
      setTimeout(() => URL.revokeObjectURL(address), 10_000);
    } catch (error) {
      this.#notice.show(`The workbook cannot be saved: ${sentence(error)}`);
    }
  }

  #show(name: string, book: Book): void {
    this.#notice.hide();
    this.#lost = book.lost;
    this.#name = name;
    this.#fileName.textContent = name;
    document.title = `${name} · Dutyproof workbench`;
    const model = new this.#engine.Model(toEngineData(book, this.#engine));
    this.#workbook.replace(model);
    this.#draw(model);
    const lastSheet = model.getters.getSheetIds().at(-1);
    const results = model.getters.getSheetIdByName('Results') ?? lastSheet;
    if (results !== undefined && book.names.length > 0) {
      model.dispatch('ACTIVATE_SHEET', { sheetIdFrom: model.getters.getActiveSheetId(), sheetIdTo: results });
    }
  }
}

function sentence(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}
