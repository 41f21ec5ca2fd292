import { formatAddress, formatZone, parseAddress, parseZone } from '../../src/host/address';
import { regionAt, regionsOf, type Zone } from '../../src/host/regions';

/**
 * A stand-in for Excel's request context, as far as the adapter uses it: what is read must have been
 * loaded and synchronised before, or reading it throws, as in Excel. It keeps values and formulas and
 * calculates nothing.
 */
export class FakeExcel {
  readonly sheets = new Map<string, Map<string, string | number>>();
  /** By name in small letters; null where the cells are gone. */
  readonly names = new Map<string, { sheet: string; zone: Zone } | null>();
  /** Tables by name, headings included. */
  readonly tables = new Map<string, { sheet: string; zone: Zone }>();
  /** Names of sheets that are protected. */
  readonly protected = new Set<string>();
  calculation = { calculationMode: 'Automatic', calculationState: 'Done' };
  selected = { sheet: 'Sheet1', zone: parseZone('A1')! };
  readonly changed = new Set<() => unknown>();
  readonly selectionChanged = new Set<() => unknown>();

  constructor() {
    this.sheets.set('Sheet1', new Map());
  }

  /** Puts `Excel` and `Office` where the adapter looks for them. */
  install(): void {
    Object.assign(globalThis, {
      Excel: {
        run: async (batch: (context: FakeContext) => Promise<unknown>) => {
          const context = new FakeContext(this);
          const result = await batch(context);
          await context.sync();
          return result;
        },
        CalculationType: { full: 'Full' },
        CalculationMode: { manual: 'Manual' },
        CalculationState: { pending: 'Pending' },
        SpecialCellType: { formulas: 'Formulas' },
        ConditionalFormatType: { containsText: 'ContainsText' },
        ConditionalTextOperator: { beginsWith: 'BeginsWith' },
      },
      Office: { context: { requirements: { isSetSupported: () => true } } },
    });
  }

  put(sheet: string, row: number, column: number, content: unknown): void {
    const cells = this.sheets.get(sheet)!;
    const key = `${row} ${column}`;
    if (content === '' || content === null) cells.delete(key);
    else cells.set(key, content as string | number);
    queueMicrotask(() => this.changed.forEach((listener) => void listener()));
  }

  at(sheet: string, row: number, column: number): string | number {
    return this.sheets.get(sheet)?.get(`${row} ${column}`) ?? '';
  }

  used(sheet: string): Zone | null {
    const places = [...(this.sheets.get(sheet)?.keys() ?? [])].map((key) => key.split(' ').map(Number));
    if (places.length === 0) return null;
    const [rows, columns] = [places.map(([row]) => row), places.map(([, column]) => column)];
    return { top: Math.min(...rows), bottom: Math.max(...rows), left: Math.min(...columns), right: Math.max(...columns) };
  }

  select(sheet: string, zone: Zone): void {
    this.selected = { sheet, zone };
    queueMicrotask(() => this.selectionChanged.forEach((listener) => void listener()));
  }
}

/** Something whose properties are there only after load and sync. */
class Loadable {
  protected readonly context: FakeContext;
  /** Whether an object is missing is known after every sync. */
  readonly #wanted = new Set(['isNullObject']);
  #loaded: Readonly<Record<string, unknown>> = {};
  readonly #source: () => Record<string, unknown>;

  constructor(context: FakeContext, source: () => Record<string, unknown>) {
    this.context = context;
    this.#source = source;
    context.known.push(this);
    for (const name of Object.keys(source())) {
      Object.defineProperty(this, name, {
        get: () => {
          if (!(name in this.#loaded)) throw new Error(`PropertyNotLoaded: ${name}`);
          return this.#loaded[name];
        },
        configurable: true,
      });
    }
  }

  load(names: string): this {
    for (const name of names.split(',')) this.#wanted.add(name.trim().replace(/\/.*$/u, ''));
    return this;
  }

  settle(): void {
    const all = this.#source();
    this.#loaded = { ...this.#loaded, ...Object.fromEntries([...this.#wanted].map((name) => [name, all[name]])) };
  }
}

/** Objects that may be missing know so after every sync. */
function nullable(isNull: boolean): { isNullObject: boolean } {
  return { isNullObject: isNull };
}

class FakeContext {
  readonly excel: FakeExcel;
  readonly known: Loadable[] = [];
  readonly workbook: FakeWorkbook;

  constructor(excel: FakeExcel) {
    this.excel = excel;
    this.workbook = new FakeWorkbook(this);
  }

  sync(): Promise<void> {
    for (const one of this.known) one.settle();
    return Promise.resolve();
  }
}

class FakeWorkbook {
  readonly worksheets: FakeSheets;
  readonly names: Loadable;
  readonly tables: Loadable;
  readonly application;
  readonly onSelectionChanged;
  readonly #context: FakeContext;
  readonly #excel: FakeExcel;

  constructor(context: FakeContext) {
    this.#context = context;
    this.#excel = context.excel;
    const { names } = context.excel;
    this.worksheets = new FakeSheets(context);
    this.application = Object.assign(new Loadable(context, () => ({ ...context.excel.calculation })), {
      calculate: () => this.#excel.changed.forEach((listener) => void listener()),
    });
    const item = (name: string): object => {
      const found = names.get(name.toLowerCase());
      const range = found === undefined || found === null ? null : new FakeRange(context, found.sheet, found.zone);
      const loadable = new Loadable(context, () => ({ name, type: found === null ? 'Error' : 'Range', ...nullable(found === undefined) }));
      return Object.assign(loadable.load('name, type, isNullObject'), {
        getRange: () => range!,
        getRangeOrNullObject: () => range!,
        delete: () => names.delete(name.toLowerCase()),
      });
    };
    this.names = Object.assign(new Loadable(context, () => ({ items: [...names.keys()].map((name) => ready(item(name))) })), {
      getItemOrNullObject: item,
      add: (name: string, range: FakeRange) => {
        if (names.has(name.toLowerCase())) throw new Error(`ItemAlreadyExists: ${name}`);
        names.set(name.toLowerCase(), { sheet: range.sheet, zone: range.zone });
      },
    });
    const table = (name: string): FakeTable => new FakeTable(context, name);
    this.tables = Object.assign(new Loadable(context, () => ({ items: [...context.excel.tables.keys()].map((name) => ready(table(name).load('name'))) })), {
      getItemOrNullObject: table,
    });
    this.onSelectionChanged = event(context, this.#excel.selectionChanged);
  }

  getSelectedRange(): FakeRange {
    return new FakeRange(this.#context, this.#excel.selected.sheet, this.#excel.selected.zone);
  }

  getActiveCell(): FakeRange {
    const { sheet, zone } = this.#excel.selected;
    return new FakeRange(this.#context, sheet, { ...zone, bottom: zone.top, right: zone.left });
  }
}

class FakeTable extends Loadable {
  readonly rows = { add: () => this.#grow() };
  readonly #name: string;

  constructor(context: FakeContext, name: string) {
    super(context, () => ({ name, ...nullable(!context.excel.tables.has(name)) }));
    this.#name = name;
  }

  getRange(): FakeRange {
    const { sheet, zone } = this.context.excel.tables.get(this.#name)!;
    return new FakeRange(this.context, sheet, zone);
  }

  getDataBodyRange(): FakeRange {
    const { sheet, zone } = this.context.excel.tables.get(this.#name)!;
    return new FakeRange(this.context, sheet, { ...zone, top: zone.top + 1 });
  }

  #grow(): void {
    const { sheet, zone } = this.context.excel.tables.get(this.#name)!;
    this.context.excel.tables.set(this.#name, { sheet, zone: { ...zone, bottom: zone.bottom + 1 } });
  }
}

/** Objects in a loaded list are loaded with it. */
function ready(one: object): object {
  (one as Loadable).settle();
  return one;
}

function event(context: FakeContext, listeners: Set<() => unknown>) {
  return {
    add: (listener: () => unknown) => {
      listeners.add(listener);
      return { remove: () => listeners.delete(listener), context };
    },
  };
}

class FakeSheets extends Loadable {
  readonly onChanged;
  readonly onCalculated;
  readonly onDeleted;

  constructor(context: FakeContext) {
    const { excel } = context;
    super(context, () => ({ items: [...excel.sheets.keys()].map((name) => ready(new FakeSheet(context, name).load('name'))) }));
    this.onChanged = event(context, excel.changed);
    this.onCalculated = event(context, new Set());
    this.onDeleted = event(context, new Set());
  }

  getItem(name: string): FakeSheet {
    return new FakeSheet(this.context, name);
  }

  getItemOrNullObject(name: string): FakeSheet {
    return new FakeSheet(this.context, name);
  }

  add(name: string): FakeSheet {
    this.context.excel.sheets.set(name, new Map());
    return new FakeSheet(this.context, name);
  }
}

class FakeSheet extends Loadable {
  readonly #name: string;

  constructor(context: FakeContext, name: string) {
    super(context, () => ({ name, ...nullable(!context.excel.sheets.has(name)) }));
    this.#name = name;
  }

  getRange(cells: string): FakeRange {
    return new FakeRange(this.context, this.#name, parseZone(cells)!);
  }

  getRangeByIndexes(row: number, column: number, rows: number, columns: number): FakeRange {
    return new FakeRange(this.context, this.#name, { top: row, left: column, bottom: row + rows - 1, right: column + columns - 1 });
  }

  getUsedRangeOrNullObject(): FakeRange {
    const zone = this.context.excel.used(this.#name);
    return new FakeRange(this.context, this.#name, zone ?? parseZone('A1')!, zone === null);
  }

  activate(): void {
    this.context.excel.selected = { ...this.context.excel.selected, sheet: this.#name };
  }
}

class FakeRange extends Loadable {
  readonly sheet: string;
  readonly zone: Zone;
  readonly format = { font: {}, fill: {}, columnWidth: 0 };
  readonly dataValidation = {};
  readonly conditionalFormats = { add: () => ({ textComparison: { format: { font: {}, fill: {} }, rule: {} } }) };

  constructor(context: FakeContext, sheet: string, zone: Zone, isNull = false) {
    const { excel } = context;
    const grid = (read: (content: string | number) => unknown): unknown[][] =>
      Array.from({ length: zone.bottom - zone.top + 1 }, (_, r) =>
        Array.from({ length: zone.right - zone.left + 1 }, (__, c) => read(excel.at(sheet, zone.top + r, zone.left + c))),
      );
    super(context, () => ({
      address: formatAddress({ sheet, cell: formatZone(zone) }),
      rowIndex: zone.top,
      rowCount: zone.bottom - zone.top + 1,
      cellCount: (zone.bottom - zone.top + 1) * (zone.right - zone.left + 1),
      // A formula is calculated by nobody here; an apostrophe before a text is not part of it.
      values: grid((content) => (typeof content !== 'string' ? content : content.startsWith('=') ? '' : content.replace(/^'/u, ''))),
      ...nullable(isNull),
    }));
    [this.sheet, this.zone] = [sheet, zone];
    const formulas = (): unknown[][] => grid((content) => (typeof content === 'string' ? content.replace(/^'/u, '') : content));
    let loaded: unknown[][] | null = null;
    const load = this.load.bind(this);
    this.load = (names) => {
      if (names.includes('formulas')) loaded = formulas();
      return load(names);
    };
    Object.defineProperty(this, 'formulas', {
      get: () => {
        if (loaded === null) throw new Error('PropertyNotLoaded: formulas');
        return loaded;
      },
      set: (rows: unknown[][]) => rows.forEach((row, r) => row.forEach((cell, c) => excel.put(sheet, zone.top + r, zone.left + c, cell))),
    });
  }

  getCell(row: number, column: number): FakeRange {
    const [top, left] = [this.zone.top + row, this.zone.left + column];
    return new FakeRange(this.context, this.sheet, { top, left, bottom: top, right: left });
  }

  getSpecialCellsOrNullObject(kind: string): Loadable {
    if (kind !== 'Formulas') throw new Error(`InvalidArgument: ${kind}`);
    const { excel } = this.context;
    if (excel.protected.has(this.sheet)) throw new Error('AccessDenied');
    const cells: FakeRange[] = [];
    for (let row = this.zone.top; row <= this.zone.bottom; row++) {
      for (let column = this.zone.left; column <= this.zone.right; column++) {
        if (String(excel.at(this.sheet, row, column)).startsWith('=')) cells.push(this.getCell(row - this.zone.top, column - this.zone.left));
      }
    }
    const areas = new Loadable(this.context, () => ({ items: cells }));
    return Object.assign(new Loadable(this.context, () => nullable(cells.length === 0)), { areas });
  }

  getLastRow(): FakeRange {
    return new FakeRange(this.context, this.sheet, { ...this.zone, top: this.zone.bottom });
  }

  getResizedRange(rows: number, columns: number): FakeRange {
    return new FakeRange(this.context, this.sheet, { ...this.zone, bottom: this.zone.bottom + rows, right: this.zone.right + columns });
  }

  getSurroundingRegion(): FakeRange {
    const { excel } = this.context;
    const used = excel.used(this.sheet) ?? this.zone;
    const regions = regionsOf(used.bottom + 1, used.right + 1, (row, column) => excel.at(this.sheet, row, column) !== '');
    return new FakeRange(this.context, this.sheet, regionAt(regions, this.zone.top, this.zone.left) ?? this.zone);
  }

  getSpillingToRangeOrNullObject(): Loadable {
    return new Loadable(this.context, () => nullable(true)).load('isNullObject');
  }

  select(): void {
    this.context.excel.select(this.sheet, this.zone);
  }
}

/** Writes as a person does. */
export function typeInto(excel: FakeExcel, address: string, formula: string | null): void {
  const { sheet, cell } = parseAddress(address)!;
  const { top, left } = parseZone(cell)!;
  excel.put(sheet, top, left, formula);
}
