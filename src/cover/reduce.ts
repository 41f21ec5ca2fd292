import type { Case } from './case';
import { mostOf } from './limits';
import { nest, type Crossing, type Nesting } from './nesting';
import { openPairs, PairState, roomInSet, type OpenPairs } from './openPairs';
import type { ArcList, Network } from '../flow/network';
import { layOut } from './layOut';

/**
 * The case as a network, and the way back from arcs to pairs.
 *
 *     source -> priority classes -> duties -> pairs -> limits of a person, innermost first -> person -> sink
 *
 * Fixed seats are taken out beforehand: they lower the need of their duty and the room of their
 * person. Nodes and arcs are numbered by name order, never by row order, so that equal cases give
 * equal networks.
 */
export interface Reduction {
  readonly open: OpenPairs;
  readonly network: Network;
  readonly arcs: ArcList;
  readonly source: number;
  readonly sink: number;
  /** The priorities that occur, most urgent first. */
  readonly classes: readonly PriorityClass[];
  /** The class of each duty, by duty number. */
  readonly classOfDuty: Int32Array;
  /** The node of each duty, by duty number. */
  readonly dutyNode: Int32Array;
  /** The arc from each duty's class, by duty number. */
  readonly dutyArc: Int32Array;
  /** The root of each person's limits, by person number. */
  readonly personNode: Int32Array;
  /** The arc from each person's root to the sink, by person number. */
  readonly personArc: Int32Array;
  /** The first node of each person's limits, by person number; the others follow it. */
  readonly firstLimit: Int32Array;
  readonly nestings: Nestings;
  /** The first pair arc; pair arcs follow each other in the order of `openPair`. */
  readonly firstPairArc: number;
  /** The pair of the case behind each pair arc. */
  readonly openPair: Int32Array;
}

/** The duties of one priority. */
export interface PriorityClass {
  readonly priority: number;
  readonly node: number;
  /** The arc from the source. */
  readonly arc: number;
}

/** Why a case is not a flow. */
export interface NotFlow {
  /** The first person (by name) whose limits cross; null where Together rules or loads are the reason. */
  readonly person: number | null;
  /** Two of their limits that cross. */
  readonly crossing: Crossing | null;
}

/** @returns the network, or why there is none */
export function reduce(kase: Case): Reduction | NotFlow {
  if (kase.together.length > 0 || usesLoads(kase)) return { person: null, crossing: null };
  const open = openPairs(kase);
  const openPair = Int32Array.from(openIndices(open.state));
  const nestings = nestAll(kase, open, openPair);
  return 'crossing' in nestings ? nestings : layOut(kase, open, openPair, nestings);
}

/** True where a duty that someone may hold counts other than 1. */
function usesLoads({ duties, pairs, fixed }: Case): boolean {
  if (duties.every(({ load }) => load === 1)) return false;
  const counts = (d: number): boolean => duties[d].load !== 1 && duties[d].need > 0;
  return pairs.duty.some(counts) || fixed.some(({ duty }) => duties[duty].load !== 1);
}

function* openIndices(state: Uint8Array): Generator<number> {
  for (let i = 0; i < state.length; i++) if (state[i] === PairState.Open) yield i;
}

/** The open pairs of each person, as places in `openPair`, row by row: person p has first[p] .. first[p + 1] - 1. */
function groupByPerson(kase: Case, openPair: Int32Array): { first: Int32Array; place: Int32Array } {
  const first = new Int32Array(kase.people.length + 1);
  for (const i of openPair) first[kase.pairs.person[i] + 1]++;
  for (let p = 0; p < kase.people.length; p++) first[p + 1] += first[p];
  const next = first.slice();
  const place = new Int32Array(openPair.length);
  openPair.forEach((i, k) => (place[next[kase.pairs.person[i]]++] = k));
  return { first, place };
}

/** The limits of everyone, nested. */
export interface Nestings {
  /** By person number. */
  readonly ofPerson: readonly Nesting[];
  /** For each open pair, the innermost limit node of its person that it passes, or -1. */
  readonly innermost: Int32Array;
}

function nestAll(kase: Case, open: OpenPairs, openPair: Int32Array): Nestings | NotFlow {
  const { first, place } = groupByPerson(kase, openPair);
  const innermost = new Int32Array(openPair.length).fill(-1);
  const ofPerson: Nesting[] = new Array<Nesting>(kase.people.length);
  for (const person of kase.personOrder) {
    const own = place.subarray(first[person], first[person + 1]);
    const duties = Array.from(own, (k) => kase.pairs.duty[openPair[k]]);
    const nesting = nest(limitsOf(kase, open, person, duties), duties.length);
    if ('one' in nesting) return { person, crossing: nesting };
    ofPerson[person] = nesting;
    own.forEach((k, i) => (innermost[k] = nesting.innermost[i]));
  }
  return { ofPerson, innermost };
}

/** The sets that limit this person, with the positions of their members in the list of duties. */
function limitsOf(kase: Case, open: OpenPairs, person: number, duties: readonly number[]): Parameters<typeof nest>[0] {
  const members = new Map<number, number[]>();
  duties.forEach((duty, i) => {
    for (const s of open.setsOf[duty]) {
      if (mostOf(open.sets[s], person) === Infinity) continue;
      const list = members.get(s);
      if (list === undefined) members.set(s, [i]);
      else list.push(i);
    }
  });
  // A set that even a stretched maximum cannot fill limits nothing.
  const { maximum, stretch } = kase.people[person];
  const reach = maximum + Math.max(1, stretch) - open.fixedByPerson[person];
  return [...members.keys()]
    .sort((a, b) => a - b)
    .map((s) => ({ set: open.sets[s], most: roomInSet(open, s, person), members: members.get(s)! }))
    .filter(({ most }) => most < reach);
}
