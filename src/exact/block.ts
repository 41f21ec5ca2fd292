import type { Highs } from 'highs';
import { atMost, Solver, type BoundedRow, type Column } from './solver';
import type { Programme } from './programme';
import { Squares } from './squares';

/** An aim as the search minimises it. */
export interface Stage {
  /** Cost of each column of the programme. */
  readonly cost: Float64Array;
  /** What people add beyond their columns: shortfall of a minimum, or the square of what they hold. */
  readonly extra: 'none' | 'minimums' | 'squares';
  /** True where every value is a whole number, so that bounds can be rounded up. */
  readonly whole: boolean;
}

/** What is known of a stage: the value reached, and what none can be below. */
export interface Reached {
  readonly value: number;
  readonly bound: number;
}

/** What each person brings along: load to come up to the minimum, and load held before this question. */
export interface Staff {
  readonly wanted: Int32Array;
  readonly before: Int32Array;
}

const EPSILON = 1e-6;

/** Reduced costs are trusted no further than this. */
const MARGIN = 1e-4;

/**
 * A part of a programme that shares no person and no duty with the rest, with the best values found so
 * far. Stage by stage it is optimised; what a stage has reached is kept as a row, and every column that
 * cannot leave its value without losing it is fixed (by the reduced costs of the relaxed programme).
 */
export class Block {
  readonly columns: Int32Array;
  readonly #programme: Programme;
  readonly #staff: Staff;
  readonly #people: readonly number[];
  readonly #solver: Solver;
  readonly #of = new Map<number, number[]>();
  #shortfall: ReadonlyMap<number, number> = new Map();
  #squares: Squares | null = null;
  /** The best values found, one a column of this block. */
  x: Uint8Array;

  constructor(highs: Highs, programme: Programme, columns: Int32Array, staff: Staff) {
    this.#programme = programme;
    this.#staff = staff;
    this.columns = columns;
    this.x = new Uint8Array(columns.length);
    columns.forEach((column, i) => {
      const person = programme.person[column];
      this.#of.set(person, [...(this.#of.get(person) ?? []), i]);
    });
    this.#people = [...this.#of.keys()];
    const binary: Column = { lower: 0, upper: 1, whole: true };
    this.#solver = new Solver(highs, Array.from(columns, () => binary), rowsOf(programme, columns));
  }

  /** The best value of a stage in this block with fractions allowed; null where even that took too long. */
  relaxed(stage: Stage, seconds: number): number | null {
    return this.#solver.relax(this.#local(stage), seconds)?.bound ?? null;
  }

  /**
   * Optimises a stage and keeps what it reached.
   *
   * @param seconds time allowed, as a function since loading and other blocks take time too
   */
  reach(stage: Stage, seconds: () => number, onBetter: () => void): Reached {
    if (stage.extra === 'minimums') this.#addShortfall();
    if (stage.extra === 'squares') this.#squares ??= new Squares(this.#solver, this.#people.map((person) => this.#personOf(person)));
    const cost = this.#local(stage);
    const up = (bound: number): number => (stage.whole ? Math.ceil(bound - EPSILON) : bound);
    const relaxed = this.#solver.relax(cost, seconds());
    if (relaxed !== null) this.#take(relaxed.values, stage);
    let bound = relaxed === null ? -Infinity : up(relaxed.bound);
    while (this.value(stage) > bound + EPSILON && seconds() > 0) {
      const optimum = this.#solver.minimise(cost, seconds(), this.#complete(), (values, dual) => {
        bound = Math.max(bound, up(dual));
        if (this.#take(values, stage)) onBetter();
      });
      if (optimum.values !== null) this.#take(optimum.values, stage);
      bound = Math.max(bound, up(optimum.bound));
      const isRefined = optimum.values !== null && this.#squares?.refine(optimum.values) === true;
      if (!isRefined) {
        if (optimum.proven) bound = this.value(stage);
        break;
      }
    }
    const value = this.value(stage);
    this.#keep(cost, value, stage.whole);
    if (relaxed !== null) this.#fix(relaxed, value - relaxed.bound);
    return { value, bound: Math.min(bound, value) };
  }

  /** The value of the best values found. */
  value(stage: Stage): number {
    return this.#valueOf(this.x, stage);
  }

  dispose(): void {
    this.#solver.dispose();
  }

  #valueOf(x: Uint8Array, { cost, extra }: Stage): number {
    let value = 0;
    this.columns.forEach((column, i) => (value += cost[column] * x[i]));
    if (extra === 'none') return value;
    const load = this.#loads(x);
    for (const person of this.#people) {
      const held = load.get(person)!;
      value += extra === 'minimums' ? Math.max(0, this.#staff.wanted[person] - held) : (this.#staff.before[person] + held) ** 2;
    }
    return value;
  }

  #loads(x: Uint8Array): Map<number, number> {
    const load = new Map(this.#people.map((person) => [person, 0]));
    this.columns.forEach((column, i) => {
      const person = this.#programme.person[column];
      if (x[i] === 1) load.set(person, load.get(person)! + this.#programme.load[column]);
    });
    return load;
  }

  /** Takes whole values in place of the ones at hand where they are better; what earlier stages have is a row, so they keep it. */
  #take(values: Float64Array, stage: Stage): boolean {
    const x = new Uint8Array(this.x.length);
    for (let i = 0; i < x.length; i++) {
      const rounded = Math.round(values[i]);
      if (Math.abs(values[i] - rounded) > EPSILON) return false;
      x[i] = rounded;
    }
    if (this.#squares?.isExact(values) === false && stage.extra !== 'squares') return false;
    if (this.#valueOf(x, stage) >= this.value(stage) - EPSILON) return false;
    this.x = x;
    return true;
  }

  #local({ cost, extra }: Stage): Float64Array {
    const local = new Float64Array(this.#solver.columnCount);
    this.columns.forEach((column, i) => (local[i] = cost[column]));
    if (extra === 'minimums') for (const column of this.#shortfall.values()) local[column] = 1;
    if (extra === 'squares') for (const column of this.#squares!.columns) local[column] = 1;
    return local;
  }

  /** All columns' values for the best values found. */
  #complete(): Float64Array {
    const values = new Float64Array(this.#solver.columnCount);
    values.set(this.x);
    const load = this.#loads(this.x);
    for (const [person, column] of this.#shortfall) values[column] = Math.max(0, this.#staff.wanted[person] - load.get(person)!);
    this.#squares?.complete(values);
    return values;
  }

  #keep(cost: Float64Array, value: number, whole: boolean): void {
    const columns = Array.from(cost.keys()).filter((column) => cost[column] !== 0);
    if (columns.length === 0) return;
    const weights = columns.map((column) => cost[column]);
    this.#solver.addRows([{ columns, weights, lower: -Infinity, upper: whole ? value : value + EPSILON }]);
  }

  /** A column whose reduced cost is more than what may be lost stays as the relaxed programme has it. */
  #fix({ rise, values }: { rise: Float64Array; values: Float64Array }, slack: number): void {
    for (let i = 0; i < this.columns.length; i++) {
      if (rise[i] > slack + MARGIN && values[i] < EPSILON) this.#solver.setBounds(i, 0, 0);
      else if (-rise[i] > slack + MARGIN && values[i] > 1 - EPSILON) this.#solver.setBounds(i, 1, 1);
    }
  }

  #addShortfall(): void {
    const short = this.#people.filter((person) => this.#staff.wanted[person] > 0);
    const first = this.#solver.columnCount;
    this.#shortfall = new Map(short.map((person, i) => [person, first + i]));
    this.#solver.addColumns(short.map((person) => ({ lower: 0, upper: this.#staff.wanted[person], whole: false })));
    this.#solver.addRows(
      short.map((person, i) => {
        const own = this.#of.get(person)!;
        const weights = own.map((column) => this.#programme.load[this.columns[column]]);
        return { columns: [...own, first + i], weights: [...weights, 1], lower: this.#staff.wanted[person], upper: Infinity };
      }),
    );
  }

  #personOf(person: number): { columns: readonly number[]; loads: readonly number[]; before: number; room: number } {
    const columns = this.#of.get(person)!;
    const loads = columns.map((column) => this.#programme.load[this.columns[column]]);
    return { columns, loads, before: this.#staff.before[person], room: this.#programme.room[person] };
  }
}

/** The rows of the programme that lie in a block, with columns renumbered: people's limits, needs, maximums, ties. */
export function rowsOf(programme: Programme, columns: Int32Array): BoundedRow[] {
  const place = new Map<number, number>();
  columns.forEach((column, i) => place.set(column, i));
  const limits = programme.rows
    .filter((row) => place.has(row.columns[0]))
    .map((row) => ({ ...row, columns: row.columns.map((c) => place.get(c)!) }));
  const byDuty = new Map<number, number[]>();
  const byPerson = new Map<number, number[]>();
  columns.forEach((column, i) => {
    const [d, p] = [programme.duty[column], programme.person[column]];
    byDuty.set(d, [...(byDuty.get(d) ?? []), i]);
    byPerson.set(p, [...(byPerson.get(p) ?? []), i]);
  });
  const load = (list: readonly number[]): number[] => list.map((i) => programme.load[columns[i]]);
  const sum = (weights: readonly number[]): number => weights.reduce((total, weight) => total + weight, 0);
  const needs = [...byDuty]
    .filter(([d, list]) => list.length > programme.need[d])
    .map(([d, list]) => ({ columns: list, weights: null, most: programme.need[d] }));
  const maximums = [...byPerson]
    .map(([p, list]) => ({ columns: list, weights: load(list), most: programme.room[p] }))
    .filter(({ weights, most }) => sum(weights) > most);
  const ties = programme.ties
    .filter(([a]) => place.has(a))
    .map(([a, b]) => ({ columns: [place.get(a)!, place.get(b)!], weights: [1, -1], lower: 0, upper: 0 }));
  return [...[...limits, ...needs, ...maximums].map(atMost), ...ties];
}
