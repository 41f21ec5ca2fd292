import type { Case } from '../cover/case';
import { openPairs } from '../cover/openPairs';
import { planOf } from '../cover/plan';
import type { Knot } from '../cover/shortage';
import { splitColumns } from './blocks';
import { CoverModel } from './coverModel';
import type { Question } from './explain';
import { programmeOf, type Programme } from './programme';

/**
 * Bottlenecks of a case that is no flow: from the duties of a part that is short, duties are left out
 * one group after the other as long as the rest, asked by itself, is short of as many seats (a deletion
 * filter). What remains is irreducible: without any one of its duties fewer seats would lack.
 */
export function bottlenecksBySearch(question: Question): Knot[] {
  const { highs, kase, found, seconds } = question;
  const open = openPairs(kase);
  const programme = programmeOf(kase, open);
  const plan = planOf(kase, found.held);
  const sets: KnotSet[] = [];
  const inSome = new Set<number>();
  for (const columns of splitColumns(programme)) {
    const duties = [...new Set(Array.from(columns, (column) => programme.duty[column]))];
    for (const d of duties) inSome.add(d);
    const short = duties.reduce((sum, d) => sum + Math.max(0, kase.duties[d].need - plan.heldOfDuty[d]), 0);
    if (short === 0) continue;
    const model = new CoverModel(highs, kase, programme, columns);
    try {
      const filter = new Filter(model, programme, short, seconds);
      const left = filter.run(unitsOf(programme, duties));
      const isByPriority = filter.isByPriority(left);
      const held = filter.heldAlone(left);
      for (const part of connected(programme, columns, left)) {
        const isMixed = new Set(part.map((d) => kase.duties[d].priority)).size > 1;
        const short = part.reduce((sum, d) => sum + programme.need[d] - (held.get(d) ?? 0), 0);
        sets.push({ duties: part, short, isSmallest: filter.isComplete, isByPriority: isByPriority && isMixed });
      }
    } finally {
      model.dispose();
    }
  }
  // A short duty that nobody is left to take is a bottleneck by itself.
  kase.duties.forEach(({ need }, d) => {
    if (!inSome.has(d) && plan.heldOfDuty[d] < need) {
      sets.push({ duties: [d], short: need - plan.heldOfDuty[d], isSmallest: true, isByPriority: false });
    }
  });
  return describe(kase, programme, sets);
}

interface KnotSet {
  readonly duties: readonly number[];
  /** Seats that these duties lack where they are asked by themselves. */
  readonly short: number;
  readonly isSmallest: boolean;
  readonly isByPriority: boolean;
}

/** Duties that go together can only be left out together. */
function unitsOf({ ties, duty }: Programme, duties: readonly number[]): number[][] {
  const unitOf = new Map(duties.map((d) => [d, [d]]));
  for (const [a, b] of ties) {
    const [one, other] = [unitOf.get(duty[a]), unitOf.get(duty[b])];
    if (one === undefined || other === undefined || one === other) continue;
    one.push(...other);
    for (const d of other) unitOf.set(d, one);
  }
  return [...new Set(unitOf.values())];
}

/** Leaves out what can be left out. */
class Filter {
  readonly #model: CoverModel;
  readonly #programme: Programme;
  readonly #short: number;
  readonly #seconds: () => number;
  /** False where the time was over before every duty was tried. */
  isComplete = true;

  constructor(model: CoverModel, programme: Programme, short: number, seconds: () => number) {
    this.#model = model;
    this.#programme = programme;
    this.#short = short;
    this.#seconds = seconds;
  }

  /** Tries groups first and halves those that cannot be left out whole. */
  run(units: readonly (readonly number[])[]): number[] {
    const kept = new Set(units);
    const tryWithout = (group: readonly (readonly number[])[]): void => {
      if (!group.every((unit) => kept.has(unit))) return;
      const isAll = group.length === kept.size;
      if (!isAll) {
        for (const unit of group) kept.delete(unit);
        if (this.#isAsShort(new Set([...kept].flat()))) return;
        for (const unit of group) kept.add(unit);
      }
      if (group.length > 1) halves(group).forEach(tryWithout);
    };
    // Where urgent duties come first, leaving one out may make another one spare: so until none is.
    for (let before = -1; before !== kept.size && this.#seconds() > 0; ) {
      before = kept.size;
      tryWithout([...kept]);
    }
    return [...kept].flat().sort((a, b) => a - b);
  }

  /** True unless it is plain that as few seats lack where the urgent duties do not come first. */
  isByPriority(duties: readonly number[]): boolean {
    const needed = this.#only(new Set(duties));
    const most = this.#model.bound(this.#seconds());
    return most === null || needed - most < this.#short;
  }

  /** Seats of each duty, beside Fixed ones, where these duties are asked by themselves. */
  heldAlone(duties: readonly number[]): Map<number, number> {
    this.#only(new Set(duties));
    const { x } = this.#model.cover(() => Math.max(1, this.#seconds()));
    const held = new Map<number, number>();
    for (const i of this.#model.columns.keys()) {
      const duty = this.#programme.duty[this.#model.columns[i]];
      if (x[i] > 0.5) held.set(duty, (held.get(duty) ?? 0) + 1);
    }
    return held;
  }

  /** True where these duties by themselves lack as many seats; false also where that is not known in time. */
  #isAsShort(duties: ReadonlySet<number>): boolean {
    if (this.#needOf(duties) < this.#short) return false;
    if (this.#seconds() <= 0) {
      this.isComplete = false;
      return false;
    }
    const needed = this.#only(duties);
    const cover = this.#model.cover(this.#seconds);
    if (!cover.proven) this.isComplete = false;
    return cover.proven && needed - cover.total === this.#short;
  }

  /** Shuts all other duties. @returns seats needed by those left */
  #only(duties: ReadonlySet<number>): number {
    for (const column of this.#model.columns.keys()) {
      this.#model.shut(column, !duties.has(this.#programme.duty[this.#model.columns[column]]));
    }
    return this.#needOf(duties);
  }

  #needOf(duties: ReadonlySet<number>): number {
    return [...duties].reduce((sum, d) => sum + this.#programme.need[d], 0);
  }
}

function halves<T>(group: readonly T[]): T[][] {
  const middle = group.length >> 1;
  return [group.slice(0, middle), group.slice(middle)];
}

/** Duties that share people, directly or by way of others. */
function connected(programme: Programme, columns: Int32Array, duties: readonly number[]): number[][] {
  const isIn = new Set(duties);
  const kept = columns.filter((column) => isIn.has(programme.duty[column]));
  const pick = (of: Int32Array): Int32Array => kept.map((column) => of[column]);
  const ties = tiesAmong(programme, kept);
  const parts = splitColumns({ ...programme, duty: pick(programme.duty), person: pick(programme.person), ties });
  return parts.map((part) => [...new Set(Array.from(part, (i) => programme.duty[kept[i]]))].sort((a, b) => a - b));
}

function tiesAmong({ ties }: Programme, kept: Int32Array): [number, number][] {
  const place = new Map([...kept].map((column, i) => [column, i]));
  return ties.flatMap(([a, b]): [number, number][] => {
    const [i, j] = [place.get(a), place.get(b)];
    return i === undefined || j === undefined ? [] : [[i, j]];
  });
}

function describe(
  kase: Case,
  programme: Programme,
  sets: readonly KnotSet[],
): Knot[] {
  const ordered = [...sets].sort((a, b) => a.duties[0] - b.duties[0]);
  return ordered.map(({ duties, short, isSmallest, isByPriority }, i) => {
    const isIn = new Set(duties);
    const people = new Set<number>();
    programme.duty.forEach((d, column) => {
      if (isIn.has(d)) people.add(programme.person[column]);
    });
    for (const { duty, person } of kase.fixed) if (isIn.has(duty)) people.add(person);
    const needed = duties.reduce((sum, d) => sum + kase.duties[d].need, 0);
    return { number: i + 1, duties, people: [...people].sort((a, b) => a - b), needed, places: needed - short, isSmallest, isByPriority };
  });
}
