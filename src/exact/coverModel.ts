import type { Highs } from 'highs';
import type { Case } from '../cover/case';
import { rowsOf } from './block';
import type { Programme } from './programme';
import { Solver } from './solver';

/** Seats covered by priority, the most urgent first. */
export interface Cover {
  readonly byPriority: readonly number[];
  readonly total: number;
  /** The values of the columns it was found with. */
  readonly x: Float64Array;
  /** False where the time was over before it was proven best. */
  readonly proven: boolean;
}

/**
 * One part of a programme to ask "what can be covered if ..." again and again: columns are shut and
 * opened, and the cover of the most urgent priority, then of the next, is found each time.
 */
export class CoverModel {
  /** Columns of the programme, by local number. */
  readonly columns: Int32Array;
  readonly #programme: Programme;
  readonly #solver: Solver;
  /** The local columns of each priority, most urgent first, each with the row that keeps its cover. */
  readonly #classes: readonly { readonly columns: readonly number[]; readonly row: number }[];

  constructor(highs: Highs, kase: Case, programme: Programme, columns: Int32Array) {
    this.#programme = programme;
    this.columns = columns;
    const byPriority = new Map<number, number[]>();
    columns.forEach((column, i) => {
      const { priority } = kase.duties[programme.duty[column]];
      byPriority.set(priority, [...(byPriority.get(priority) ?? []), i]);
    });
    const rows = rowsOf(programme, columns);
    const classes = [...byPriority].sort((a, b) => a[0] - b[0]);
    this.#classes = classes.map(([, list], c) => ({ columns: list, row: rows.length + c }));
    this.#solver = new Solver(highs, Array.from(columns, () => ({ lower: 0, upper: 1, whole: true })), [
      ...rows,
      ...classes.map(([, list]) => ({ columns: list, weights: null, lower: -Infinity, upper: Infinity })),
    ]);
  }

  /** Shuts a column or opens it again. */
  shut(column: number, isShut: boolean): void {
    this.#solver.setBounds(column, 0, isShut ? 0 : 1);
  }

  /** Local columns that a test accepts, given their duty and person. */
  columnsWhere(test: (duty: number, person: number) => boolean): number[] {
    const { duty, person } = this.#programme;
    return Array.from(this.columns.keys()).filter((i) => test(duty[this.columns[i]], person[this.columns[i]]));
  }

  /** The best cover as things are shut now. */
  cover(seconds: () => number): Cover {
    const byPriority: number[] = [];
    let x: Float64Array = new Float64Array(this.columns.length);
    let proven = true;
    for (const { columns, row } of this.#classes) {
      const cost = new Float64Array(this.columns.length);
      for (const i of columns) cost[i] = -1;
      const optimum = this.#solver.minimise(cost, seconds(), byPriority.length === 0 ? null : x);
      proven &&= optimum.proven;
      x = optimum.values ?? x;
      byPriority.push(columns.reduce((sum, i) => sum + Math.round(x[i]), 0));
      this.#solver.setRowBounds(row, byPriority.at(-1)!, Infinity);
    }
    this.release();
    return { byPriority, total: byPriority.reduce((sum, seats) => sum + seats, 0), x, proven };
  }

  /** Keeps a cover by priority as it is, for what is asked of the plans that reach it. */
  hold({ byPriority }: Pick<Cover, 'byPriority'>): void {
    this.#classes.forEach(({ row }, c) => this.#solver.setRowBounds(row, byPriority[c], Infinity));
  }

  /** Undoes `hold`. */
  release(): void {
    for (const { row } of this.#classes) this.#solver.setRowBounds(row, -Infinity, Infinity);
  }

  /** The least sum of cost times column among the plans held to, and whether it is proven. */
  minimise(cost: Float64Array, seconds: number): { x: Float64Array | null; proven: boolean } {
    const { values, proven } = this.#solver.minimise(cost, seconds, null);
    return { x: values, proven };
  }

  /** The most seats with fractions allowed and everything as it is shut now: no plan covers more. Null: took too long. */
  bound(seconds: number): number | null {
    const relaxed = this.#solver.relax(new Float64Array(this.columns.length).fill(-1), seconds);
    return relaxed === null ? null : Math.floor(-relaxed.bound + 1e-6);
  }

  dispose(): void {
    this.#solver.dispose();
  }
}
