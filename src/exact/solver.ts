import type { Highs, Model } from 'highs';
import type { Row } from './programme';

/** Columns of an integer programme that come on top of those for pairs. */
export interface Column {
  readonly lower: number;
  readonly upper: number;
  readonly whole: boolean;
}

/** A row with both bounds. */
export interface BoundedRow {
  readonly columns: readonly number[];
  readonly weights: readonly number[] | null;
  readonly lower: number;
  readonly upper: number;
}

/** What an optimisation came to. */
export interface Optimum {
  /** The best values found, one a column; null where none was found in time. */
  readonly values: Float64Array | null;
  /** No values can be below this. */
  readonly bound: number;
  /** True where the values found are proven best. */
  readonly proven: boolean;
}

/** At most this: the row that says it. */
export function atMost({ columns, weights, most }: Row): BoundedRow {
  return { columns, weights, lower: -Infinity, upper: most };
}

/** Objectives and rows hold whole numbers only; HiGHS computes with floating point. */
const TOLERANCE = 1e-6;

/** Told of every better solution as it is found: its values and what none can be below. */
export type OnBetter = (values: Float64Array, bound: number) => void;

/** An integer programme in HiGHS, which must be disposed of. */
export class Solver {
  readonly #highs: Highs;
  readonly #model: Model;
  readonly #columns: Column[];

  constructor(highs: Highs, columns: readonly Column[], rows: readonly BoundedRow[]) {
    this.#highs = highs;
    this.#columns = [...columns];
    this.#model = highs.createModel(modelData(highs, columns, rows));
    // The gap that is tolerated by default would not be exact.
    this.#model.options.set({ output_flag: false, mip_rel_gap: 0, mip_abs_gap: TOLERANCE });
  }

  get columnCount(): number {
    return this.#columns.length;
  }

  addColumns(columns: readonly Column[]): void {
    for (const { lower, upper, whole } of columns) {
      this.#model.addVar(this.#finite(lower), this.#finite(upper));
      if (whole) this.#model.changeColIntegrality(this.#columns.length, this.#highs.constants.variableType.integer);
      this.#columns.push({ lower, upper, whole });
    }
  }

  addRows(rows: readonly BoundedRow[]): void {
    for (const { columns, weights, lower, upper } of rows) {
      const values = weights ?? columns.map(() => 1);
      const row = { indices: Int32Array.from(columns), values: Float64Array.from(values) };
      this.#model.addRow(this.#finite(lower), this.#finite(upper), row);
    }
  }

  setBounds(column: number, lower: number, upper: number): void {
    this.#columns[column] = { ...this.#columns[column], lower, upper };
    this.#model.changeColBounds(column, this.#finite(lower), this.#finite(upper));
  }

  setRowBounds(row: number, lower: number, upper: number): void {
    this.#model.changeRowBounds(row, this.#finite(lower), this.#finite(upper));
  }

  /**
   * The least sum of cost times column.
   *
   * @param seconds time allowed
   * @param start values to begin with, if some are known
   */
  minimise(cost: Float64Array, seconds: number, start: Float64Array | null, onBetter?: OnBetter): Optimum {
    if (this.#columns.length === 0) return { values: new Float64Array(), bound: 0, proven: true };
    this.#setCost(cost);
    this.#setIntegrality(true);
    if (start !== null) this.#model.setSolution({ colValue: start });
    const { callbackType, modelStatus } = this.#highs.constants;
    const callbacks = onBetter === undefined ? {} : {
      [callbackType.mipImprovingSolution]: (event: { data: { mip_solution?: Float64Array; mip_dual_bound?: number } }) => {
        if (event.data.mip_solution !== undefined) onBetter(event.data.mip_solution, event.data.mip_dual_bound ?? -Infinity);
      },
    };
    this.#run(seconds, callbacks);
    // What is asked always has an answer: where presolve says otherwise, it is tried again without.
    if (this.#model.getModelStatus() === modelStatus.infeasible) {
      this.#model.options.set({ presolve: 'off' });
      this.#run(seconds, callbacks);
      this.#model.options.set({ presolve: 'choose' });
    }
    const status = this.#model.getModelStatus();
    const proven = status === modelStatus.optimal;
    const found = this.#model.info.get('primal_solution_status') === this.#highs.constants.solutionStatus.feasible;
    const values = found ? this.#model.getSolution().colValue : null;
    const dual = proven ? this.#model.getObjectiveValue() : Number(this.#model.info.get('mip_dual_bound'));
    const bound = status === modelStatus.infeasible || !Number.isFinite(dual) ? -Infinity : dual;
    return { values, bound, proven };
  }

  /** The same with fractions allowed: a bound, and by how much it rises at least where a column leaves its value. */
  relax(cost: Float64Array, seconds: number): { bound: number; values: Float64Array; rise: Float64Array } | null {
    if (this.#columns.length === 0) return { bound: 0, values: new Float64Array(), rise: new Float64Array() };
    this.#setCost(cost);
    this.#setIntegrality(false);
    this.#run(seconds, {});
    if (this.#model.getModelStatus() !== this.#highs.constants.modelStatus.optimal) return null;
    const { colValue, colDual } = this.#model.getSolution();
    return { bound: this.#model.getObjectiveValue(), values: colValue, rise: colDual };
  }

  dispose(): void {
    this.#model.dispose();
  }

  #run(seconds: number, callbacks: object): void {
    this.#model.zeroAllClocks();
    this.#model.options.set({ time_limit: Math.max(0.01, seconds) });
    this.#model.run(callbacks);
  }

  #setCost(cost: Float64Array): void {
    const costs = new Float64Array(this.#columns.length);
    costs.set(cost);
    this.#model.changeColsCost({ kind: 'range', from: 0, to: costs.length - 1 }, costs);
  }

  #setIntegrality(whole: boolean): void {
    const { integer, continuous } = this.#highs.constants.variableType;
    const types = Int32Array.from(this.#columns, (column) => (whole && column.whole ? integer : continuous));
    this.#model.changeColsIntegrality({ kind: 'range', from: 0, to: types.length - 1 }, types);
  }

  #finite(bound: number): number {
    return Number.isFinite(bound) ? bound : Math.sign(bound) * this.#highs.infinity;
  }
}

function modelData(highs: Highs, columns: readonly Column[], rows: readonly BoundedRow[]): Parameters<Highs['createModel']>[0] {
  const { infinity } = highs;
  const { integer, continuous } = highs.constants.variableType;
  const finite = (bound: number): number => Math.max(-infinity, Math.min(infinity, bound));
  const count = rows.reduce((sum, row) => sum + row.columns.length, 0);
  const starts = new Int32Array(rows.length + 1);
  const indices = new Int32Array(count);
  const values = new Float64Array(count).fill(1);
  rows.forEach((row, r) => {
    indices.set(row.columns, starts[r]);
    if (row.weights !== null) values.set(row.weights, starts[r]);
    starts[r + 1] = starts[r] + row.columns.length;
  });
  return {
    numCols: columns.length,
    numRows: rows.length,
    colCost: new Float64Array(columns.length),
    colLower: Float64Array.from(columns, ({ lower }) => finite(lower)),
    colUpper: Float64Array.from(columns, ({ upper }) => finite(upper)),
    rowLower: Float64Array.from(rows, ({ lower }) => finite(lower)),
    rowUpper: Float64Array.from(rows, ({ upper }) => finite(upper)),
    matrix: { format: 'csr', numRows: rows.length, numCols: columns.length, starts, indices, values },
    integrality: Int32Array.from(columns, ({ whole }) => (whole ? integer : continuous)),
  };
}
