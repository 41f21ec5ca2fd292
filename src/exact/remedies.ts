import type { Case } from '../cover/case';
import { keyHash, lot } from '../cover/lots';
import { openPairs } from '../cover/openPairs';
import { sortChanges, widen, type Remedies, type Remedy } from '../cover/remedies';
import { rowsOf } from './block';
import type { InTime } from './answers';
import { fixedCover, type Question } from './explain';
import { programmeOf, type Programme } from './programme';
import { Solver, type BoundedRow } from './solver';

/** More than any load. */
const UNLIMITED = 2 ** 30;

/**
 * A cheapest set of changes by search: every change is a column with a price. The most seats first,
 * then the least price, then the fewest changes, then lots drawn from the names.
 *
 * @returns null where the time was over before the price was proven least
 */
export function remediesBySearch({ highs, kase, seconds }: Question): InTime<Remedies> {
  const { place, eligibility } = kase.prices;
  const wide = widen(kase);
  // The places beyond the maximum are columns of their own here.
  const asked = { ...wide.kase, people: kase.people };
  const open = openPairs(asked);
  const programme = programmeOf(asked, open);
  const columns = Int32Array.from(programme.duty.keys());
  const isNew = Array.from(programme.pair, (i) => wide.isNew[i] === 1);
  const places = placesOf(kase, programme, open.fixedLoad);
  const solver = new Solver(
    highs,
    [...Array.from(columns, () => ({ lower: 0, upper: 1, whole: true })), ...places.columns],
    [...rowsOf({ ...programme, room: places.room }, columns), ...places.rows],
  );
  try {
    const count = columns.length + places.columns.length;
    const cost = (pair: (column: number) => number, more: (person: number) => number): Float64Array => {
      const costs = Float64Array.from({ length: count }, (_, column) => (column < columns.length ? pair(column) : 0));
      for (const { person, column, times } of places.counts) costs[column] = times * more(person);
      return costs;
    };
    const onlyNew = (column: number, price: number): number => (isNew[column] ? price : 0);
    const stages = [
      cost(() => -1, () => 0),
      cost((column) => onlyNew(column, eligibility ?? 0), () => place ?? 0),
      cost((column) => onlyNew(column, 1), () => 1),
      cost((column) => onlyNew(column, drawn(kase, programme.duty[column], programme.person[column])), (p) => drawn(kase, null, p)),
    ];
    let x: Float64Array | null = null;
    for (const [s, stage] of stages.entries()) {
      const optimum = solver.minimise(stage, seconds(), x);
      // Which of several cheapest sets it is may stay open; that it is a cheapest one may not.
      if (optimum.values === null || (!optimum.proven && s < 3)) return null;
      x = optimum.values.map(Math.round);
      const reached = stage.reduce((sum, one, column) => sum + one * x![column], 0);
      const used = Array.from(stage.keys()).filter((column) => stage[column] !== 0);
      const weights = used.map((column) => stage[column]);
      if (used.length > 0) solver.addRows([{ columns: used, weights, lower: -Infinity, upper: reached + 1e-6 }]);
    }
    return read(kase, programme, isNew, places, x!, fixedCover(kase, open));
  } finally {
    solver.dispose();
  }
}

function drawn({ duties, people }: Case, duty: number | null, person: number): number {
  return lot(duty === null ? 0 : keyHash(duties[duty].key), keyHash(people[person].key)) / 2 ** 10;
}

/** Places beyond the maximums, as columns and rows after those of the programme. */
interface Places {
  readonly columns: readonly { lower: number; upper: number; whole: boolean }[];
  readonly rows: readonly BoundedRow[];
  /** What a column stands for: so many places for a person, each time. */
  readonly counts: readonly { readonly person: number; readonly column: number; readonly times: number }[];
  /** Rooms, with those left open that rows here limit. */
  readonly room: Int32Array;
}

function placesOf({ people, prices }: Case, programme: Programme, fixedLoad: Int32Array): Places {
  const columns: { lower: number; upper: number; whole: boolean }[] = [];
  const rows: BoundedRow[] = [];
  const counts: { person: number; column: number; times: number }[] = [];
  const room = programme.room.slice();
  const first = programme.duty.length;
  people.forEach(({ listed, stretch, maximum }, person) => {
    // Where Fixed seats pass the maximum, so many places are asked before one helps.
    const excess = Math.max(0, fixedLoad[person] - maximum);
    if (prices.place === null || !listed || stretch <= excess) return;
    const own = Array.from(programme.person.keys()).filter((column) => programme.person[column] === person);
    const more = first + columns.length;
    columns.push({ lower: 0, upper: stretch - excess, whole: true });
    counts.push({ person, column: more, times: 1 });
    const weights = [...own.map((column) => programme.load[column]), -1];
    rows.push({ columns: [...own, more], weights, lower: -Infinity, upper: room[person] });
    room[person] = UNLIMITED;
    if (excess === 0) return;
    const opening = first + columns.length;
    columns.push({ lower: 0, upper: 1, whole: true });
    counts.push({ person, column: opening, times: excess });
    rows.push({ columns: [more, opening], weights: [1, excess - stretch], lower: -Infinity, upper: 0 });
  });
  return { columns, rows, counts, room };
}

function read(
  kase: Case,
  programme: Programme,
  isNew: readonly boolean[],
  places: Places,
  x: Float64Array,
  fixedSeats: number,
): Remedies {
  const changes: Remedy[] = [];
  programme.duty.forEach((duty, column) => {
    if (isNew[column] && x[column] === 1) changes.push({ person: programme.person[column], duty, price: kase.prices.eligibility ?? 0 });
  });
  for (const { person, column, times } of places.counts) {
    for (let n = 0; n < times * x[column]; n++) changes.push({ person, duty: null, price: kase.prices.place ?? 0 });
  }
  const seats = programme.duty.reduce((sum, _, column) => sum + x[column], 0);
  return { changes: sortChanges(kase, changes), covered: seats + fixedSeats, faults: [] };
}
