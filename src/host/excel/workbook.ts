import { parseAddress } from '../address';
import type { Range } from '../../sheet/range';
import type { Block, Calculation, DraftCell, OurCell, SheetDraft, WorkbookPort } from '../port';
import { formulaIn, ourCells, shownBy } from './ours';
import { ExcelTables } from './tables';

/** The pane's view of a workbook in Excel. Asks only for what the Excel at hand supports. */
export class ExcelWorkbook implements WorkbookPort {
  readonly kind = 'excel';
  readonly #tables = new ExcelTables();

  onRecalculated(listener: () => void): () => void {
    let ended = false;
    const ends: (() => Promise<void>)[] = [];
    void Excel.run(async (context) => {
      const { worksheets } = context.workbook;
      const tell = (): Promise<void> => {
        if (!ended) listener();
        return Promise.resolve();
      };
      const handlers: { remove(): void; context: OfficeExtension.ClientRequestContext }[] = [];
      if (supports('1.9')) handlers.push(worksheets.onChanged.add(tell));
      if (supports('1.8')) handlers.push(worksheets.onCalculated.add(tell));
      if (supports('1.7')) handlers.push(worksheets.onDeleted.add(tell));
      await context.sync();
      for (const handler of handlers) {
        ends.push(async () => {
          handler.remove();
          await handler.context.sync();
        });
      }
    }).catch(() => undefined);
    return () => {
      ended = true;
      for (const end of ends) void end().catch(() => undefined);
    };
  }

  /** Sheets that are gone answer null for their cells. */
  async formulasAt(addresses: readonly string[]): Promise<readonly (string | null)[]> {
    if (addresses.length === 0) return [];
    return Excel.run(async (context) => {
      const parsed = addresses.map(parseAddress);
      const names = [...new Set(parsed.flatMap((address) => (address === null ? [] : [address.sheet])))];
      const sheets = new Map(names.map((name) => [name, context.workbook.worksheets.getItemOrNullObject(name)]));
      for (const sheet of sheets.values()) sheet.load('isNullObject');
      await context.sync();
      const ranges = parsed.map((address) => {
        const sheet = address === null ? undefined : sheets.get(address.sheet);
        if (address === null || sheet === undefined || sheet.isNullObject) return null;
        return sheet.getRange(address.cell).load('formulas, values');
      });
      await context.sync();
      return ranges.map((range) => {
        return range === null ? null : formulaIn(range.formulas[0][0], range.values[0][0]);
      });
    });
  }

  async select(address: string): Promise<void> {
    const parsed = parseAddress(address);
    if (parsed === null) return;
    await Excel.run(async (context) => {
      const sheet = context.workbook.worksheets.getItemOrNullObject(parsed.sheet);
      sheet.load('isNullObject');
      await context.sync();
      if (sheet.isNullObject) return;
      sheet.activate();
      sheet.getRange(parsed.cell).select();
      await context.sync();
    }).catch(() => undefined);
  }

  async recalculate(): Promise<void> {
    await Excel.run(async (context) => {
      context.workbook.application.calculate(Excel.CalculationType.full);
      await context.sync();
    }).catch(() => undefined);
  }

  sheetNames(): Promise<readonly string[]> {
    return this.#tables.sheetNames();
  }

  selection(): Promise<Block | null> {
    return this.#tables.selection();
  }

  onSelected(listener: (address: string) => void): () => void {
    let isEnded = false;
    let end: (() => Promise<void>) | null = null;
    void Excel.run(async (context) => {
      if (!supports('1.7')) return;
      const handler = context.workbook.onSelectionChanged.add(async () => {
        if (isEnded) return;
        await Excel.run(async (inner) => {
          const cell = inner.workbook.getActiveCell().load('address');
          await inner.sync();
          if (!isEnded) listener(cell.address);
        }).catch(() => undefined);
      });
      await context.sync();
      end = async () => {
        handler.remove();
        await handler.context.sync();
      };
      if (isEnded) await end();
    }).catch(() => undefined);
    return () => {
      isEnded = true;
      void end?.().catch(() => undefined);
    };
  }

  blocks(): Promise<readonly Block[]> {
    return this.#tables.blocks();
  }

  read(reference: string): Promise<Block | null> {
    return this.#tables.read(reference);
  }

  write(address: string, cells: readonly (readonly DraftCell[])[]): Promise<void> {
    return this.#tables.write(address, cells);
  }

  appendRow(reference: string, cells: readonly DraftCell[]): Promise<string | null> {
    return this.#tables.appendRow(reference, cells);
  }

  addSheets(drafts: readonly SheetDraft[]): Promise<readonly string[]> {
    return this.#tables.addSheets(drafts);
  }

  ourCells(): Promise<readonly OurCell[]> {
    return ourCells();
  }

  shownBy(addresses: readonly string[]): Promise<readonly Range[]> {
    return shownBy(addresses);
  }

  async calculation(): Promise<Calculation> {
    return Excel.run(async (context) => {
      const knowsState = supports('1.9');
      const application = context.workbook.application.load(knowsState ? 'calculationMode, calculationState' : 'calculationMode');
      await context.sync();
      const isManual = application.calculationMode === Excel.CalculationMode.manual;
      return { isManual, isPending: knowsState ? application.calculationState === Excel.CalculationState.pending : null };
    });
  }
}

function supports(version: string): boolean {
  return Office.context.requirements.isSetSupported('ExcelApi', version);
}
