import { PairState } from '../../cover/openPairs';
import type { Knot } from '../../cover/shortage';
import { knotsOf } from '../../functions/bottlenecks';
import type { Solved } from '../../functions/solved';

/** Rows of a drawing before the rest is only counted. */
const DRAWN = 9;
/** People drawn one by one; more are drawn in groups. */
const ONE_BY_ONE = 40;

/** A bottleneck to be drawn: its duties, its people, and who may take what. */
export interface KnotPicture {
  readonly number: number;
  readonly needed: number;
  readonly places: number;
  /** The first ones; `more` are only counted. */
  readonly duties: readonly string[];
  readonly moreDuties: number;
  /** With the seats each holds outside of the bottleneck. */
  readonly people: readonly { readonly name: string; readonly elsewhere: number }[];
  readonly morePeople: number;
  /** Pairs of drawn duties and people, by their places. */
  readonly lines: readonly (readonly [duty: number, person: number])[];
}

/** What someone holds against what they may and should. */
export interface LoadBar {
  readonly name: string;
  readonly load: number;
  readonly minimum: number;
  readonly maximum: number;
}

/** Loads person by person, or where there are many in groups of how full they are. */
export type LoadPicture =
  | { readonly kind: 'people'; readonly bars: readonly LoadBar[]; readonly most: number }
  | { readonly kind: 'groups'; readonly groups: readonly { readonly label: string; readonly count: number }[]; readonly most: number };

/** The bottlenecks of a case, where they are at hand. */
export function knotPictures(solved: Solved): KnotPicture[] {
  return solved.isAtHand('bottlenecks') ? knotsOf(solved).map((knot) => knotPicture(solved, knot)) : [];
}

function knotPicture(solved: Solved, { number, needed, places, duties, people }: Knot): KnotPicture {
  const kase = solved.case;
  const { plan, open } = solved.outcome;
  const inside = new Set(duties);
  const dutyPlace = new Map(duties.slice(0, DRAWN).map((d, i) => [d, i]));
  const personPlace = new Map(people.slice(0, DRAWN).map((p, i) => [p, i]));
  const lines: (readonly [number, number])[] = [];
  for (let i = 0; i < kase.pairs.count; i++) {
    const [d, p] = [dutyPlace.get(kase.pairs.duty[i]), personPlace.get(kase.pairs.person[i])];
    if (d !== undefined && p !== undefined && (open.state[i] === PairState.Open || open.state[i] === PairState.Fixed)) lines.push([d, p]);
  }
  const elsewhere = (person: number): number => plan.seats.filter((seat) => seat.person === person && !inside.has(seat.duty)).length;
  return {
    number,
    needed,
    places,
    duties: duties.slice(0, DRAWN).map((d) => kase.duties[d].name),
    moreDuties: Math.max(0, duties.length - DRAWN),
    people: people.slice(0, DRAWN).map((p) => ({ name: kase.people[p].name, elsewhere: elsewhere(p) })),
    morePeople: Math.max(0, people.length - DRAWN),
    lines,
  };
}

/** What everyone holds, those first who are over, then the fullest. */
export function loadPicture({ case: { people }, outcome: { plan } }: Solved): LoadPicture {
  const bars = people.map(({ name, minimum, maximum }, p): LoadBar => ({ name, minimum, maximum, load: plan.loadByPerson[p] }));
  if (bars.length <= ONE_BY_ONE) {
    const spare = ({ maximum, load }: LoadBar): number => maximum - load;
    const most = Math.max(1, ...bars.map(({ load, maximum }) => Math.max(load, maximum)));
    return { kind: 'people', bars: bars.sort((a, b) => spare(a) - spare(b) || b.load - a.load), most };
  }
  const labels = ['over the maximum', 'full', 'more than half full', 'half full or less', 'nothing held', 'below the minimum'];
  const counts = labels.map(() => 0);
  for (const bar of bars) counts[groupOf(bar)]++;
  return { kind: 'groups', groups: labels.map((label, i) => ({ label, count: counts[i] })).filter(({ count }) => count > 0), most: Math.max(...counts) };
}

function groupOf({ load, minimum, maximum }: LoadBar): number {
  if (load > maximum) return 0;
  if (load < minimum) return 5;
  if (load === maximum && maximum > 0) return 1;
  if (load === 0) return 4;
  return load * 2 > maximum ? 2 : 3;
}
