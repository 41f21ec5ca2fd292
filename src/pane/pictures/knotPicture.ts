import { coverBounds } from '../../cover/bound';
import { PairState } from '../../cover/openPairs';
import type { Knot } from '../../cover/shortage';
import { trialCost } from '../../desk/trialWords';
import { knotsOf } from '../../functions/bottlenecks';
import type { Solved } from '../../functions/solved';

/** Boxes on one side before those that are alike are put together, and then before the rest is only counted. */
const DRAWN = 8;

/** Seats held elsewhere that are looked at. */
const LOOKED_AT = 12;

/** A bottleneck to be drawn: its duties, its people, their places, and what else these people hold. */
export interface KnotPicture {
  readonly knot: Knot;
  /** Duties, or groups of duties that the same people may take. */
  readonly duties: Side;
  /** People, or groups of people who may take the same of these duties. */
  readonly people: Side;
  /** Which boxes hold a pair of these duties and people. */
  readonly lines: readonly Line[];
  /** For each person what keeps them from holding more of it, in words; empty where a search would have to tell. */
  readonly stops: ReadonlyMap<number, ReadonlySet<string>>;
  /** Seats that these people hold elsewhere; the first ones. */
  readonly elsewhere: readonly Elsewhere[];
  readonly moreElsewhere: number;
}

/** One side of a drawing. */
export interface Side {
  /** The members of each box, by number. */
  readonly boxes: readonly (readonly number[])[];
  /** Members that no box shows. */
  readonly more: number;
}

/** Boxes that belong together, by their places; held where someone of the one holds a duty of the other. */
interface Line {
  readonly duty: number;
  readonly person: number;
  readonly isHeld: boolean;
}

/** A seat that someone of a bottleneck holds elsewhere. */
export interface Elsewhere {
  readonly duty: number;
  readonly person: number;
  /** Others who could take it at no cost; null: not known without a search. */
  readonly others: readonly number[] | null;
}

/** The bottlenecks of a case, where they are at hand. */
export function knotPictures(solved: Solved): KnotPicture[] {
  return solved.isAtHand('bottlenecks') ? knotsOf(solved).map((knot) => knotPicture(solved, knot)) : [];
}

function knotPicture(solved: Solved, knot: Knot): KnotPicture {
  const { pairs } = solved.case;
  const { plan, open } = solved.outcome;
  const isInside = new Set(knot.duties);
  // What is short comes first, so that it is drawn however many there are.
  const isCovered = (duty: number): number => (plan.heldOfDuty[duty] < solved.case.duties[duty].need ? 0 : 1);
  const sorted = [...knot.duties].sort((a, b) => isCovered(a) - isCovered(b));
  const takers = new Map(sorted.map((duty) => [duty, [] as number[]]));
  const tasks = new Map(knot.people.map((person) => [person, [] as number[]]));
  const isHolder = new Set(plan.seats.map(({ duty, person }) => `${duty} ${person}`));
  for (let i = 0; i < pairs.count; i++) {
    if (open.state[i] !== PairState.Open && open.state[i] !== PairState.Fixed) continue;
    if (!isInside.has(pairs.duty[i])) continue;
    takers.get(pairs.duty[i])?.push(pairs.person[i]);
    tasks.get(pairs.person[i])?.push(pairs.duty[i]);
  }
  const [duties, people] = [sideOf(takers), sideOf(tasks)];
  const lines = duties.boxes.flatMap((dutyBox, duty) =>
    people.boxes.flatMap((personBox, person): Line[] => {
      const isHeld = dutyBox.some((d) => personBox.some((p) => isHolder.has(`${d} ${p}`)));
      const isListed = dutyBox.some((d) => personBox.some((p) => takers.get(d)!.includes(p)));
      return isListed || isHeld ? [{ duty, person, isHeld }] : [];
    }),
  );
  const elsewhere = plan.seats.filter(({ duty, person }) => tasks.has(person) && !isInside.has(duty));
  const looked = elsewhere.slice(0, LOOKED_AT).map(({ duty, person }) => ({ duty, person, others: othersFor(solved, duty) }));
  const moreElsewhere = elsewhere.length - looked.length;
  return { knot, duties, people, lines, stops: stopsOf(solved, isInside), elsewhere: looked, moreElsewhere };
}

/** The bounds that the proof counts the pairs of these duties under. */
function stopsOf(solved: Solved, isInside: ReadonlySet<number>): Map<number, Set<string>> {
  const stops = new Map<number, Set<string>>();
  const { charges } = solved.isFlow ? coverBounds(solved.case, solved.solution) : { charges: [] };
  for (const { duty, person, bound } of charges) {
    if (!isInside.has(duty) || (bound?.kind !== 'maximum' && bound?.kind !== 'limit')) continue;
    const words = bound.kind === 'maximum' ? `${bound.allowed} in all` : `${bound.allowed} in ${bound.label}`;
    stops.set(person, (stops.get(person) ?? new Set()).add(words));
  }
  return stops;
}

/** Everyone who could take a duty and does not, at no cost. */
function othersFor(solved: Solved, duty: number): number[] | null {
  if (!solved.isFlow) return null;
  const free = solved.trials.ofDuty(duty).filter((trial) => trialCost(trial) === 0);
  return free.map(({ pair }) => solved.case.pairs.person[pair]);
}

/** Each by itself while they are few, else those together that belong with the same ones of the other side. */
function sideOf(partners: ReadonlyMap<number, readonly number[]>): Side {
  const groups = new Map<string, number[]>();
  for (const [number, others] of partners) {
    const key = partners.size > DRAWN ? [...others].sort((a, b) => a - b).join(' ') : String(number);
    groups.set(key, [...(groups.get(key) ?? []), number]);
  }
  const boxes = [...groups.values()];
  return { boxes: boxes.slice(0, DRAWN), more: boxes.slice(DRAWN).flat().length };
}
