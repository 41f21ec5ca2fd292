import type { Solver } from './solver';

/** A person as the squares see them: columns with their loads, load held before, and load that may come. */
interface Holder {
  readonly columns: readonly number[];
  readonly loads: readonly number[];
  readonly before: number;
  readonly room: number;
}

/** Lines a person's square is bounded by from the start; where more are needed they are added as solutions ask for them. */
const FIRST_LINES = 24;

/**
 * The squares of what people hold, as one column a person that lies above lines touching the parabola:
 * at every load that can occur the lines next to it give the square itself. Loads that can occur are
 * apart by a multiple of the greatest common divisor of the person's loads.
 */
export class Squares {
  readonly columns: readonly number[];
  readonly #solver: Solver;
  readonly #holders: readonly Holder[];

  constructor(solver: Solver, holders: readonly Holder[]) {
    this.#solver = solver;
    this.#holders = holders;
    const first = solver.columnCount;
    this.columns = holders.map((_, i) => first + i);
    solver.addColumns(holders.map(() => ({ lower: 0, upper: Infinity, whole: false })));
    holders.forEach((holder, i) => {
      const step = stepOf(holder.loads);
      const most = Math.min(holder.room, holder.loads.reduce((sum, load) => sum + load, 0));
      const stride = Math.max(1, Math.ceil(most / step / FIRST_LINES));
      for (let k = 0; k === 0 || k * step < most; k += stride) this.#addLine(i, holder.before + k * step, holder.before + (k + 1) * step);
    });
  }

  /** True where every square column is at least the true square. */
  isExact(values: Float64Array): boolean {
    return this.#holders.every((holder, i) => values[this.columns[i]] > this.#held(holder, values) ** 2 - 0.5);
  }

  /**
   * Adds lines where a column lies below the true square.
   * @returns true where there were any, so that the answer must be sought again
   */
  refine(values: Float64Array): boolean {
    let added = false;
    this.#holders.forEach((holder, i) => {
      const held = this.#held(holder, values);
      if (values[this.columns[i]] > held ** 2 - 0.5) return;
      const step = stepOf(holder.loads);
      this.#addLine(i, held - step, held);
      this.#addLine(i, held, held + step);
      added = true;
    });
    return added;
  }

  /** Writes the true squares into a vector of values. */
  complete(values: Float64Array): void {
    this.#holders.forEach((holder, i) => (values[this.columns[i]] = this.#held(holder, values) ** 2));
  }

  #held({ columns, loads, before }: Holder, values: Float64Array): number {
    return columns.reduce((sum, column, i) => sum + loads[i] * Math.round(values[column]), before);
  }

  /** The line through the parabola at two loads: no load that can occur lies between them. */
  #addLine(i: number, from: number, to: number): void {
    const { columns, loads, before } = this.#holders[i];
    const slope = from + to;
    // square >= slope * held - from * to, where held = before + sum of loads
    this.#solver.addRows([
      {
        columns: [...columns, this.columns[i]],
        weights: [...loads.map((load) => -slope * load), 1],
        lower: slope * before - from * to,
        upper: Infinity,
      },
    ]);
  }
}

function stepOf(loads: readonly number[]): number {
  const divisor = (a: number, b: number): number => (b === 0 ? a : divisor(b, a % b));
  return Math.max(1, loads.reduce(divisor, 0));
}
