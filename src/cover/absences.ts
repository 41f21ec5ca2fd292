import { augment, createWorkspace } from '../flow/maximumFlow';
import { flowOn, push } from '../flow/network';
import type { Case } from './case';
import type { Reduction } from './reduce';
import type { Solution } from './solve';

/** What happens if one person alone is away, Fixed seats and all. */
export interface Absence {
  readonly person: number;
  /** Duties they hold, in table order. */
  readonly holds: readonly number[];
  /** Seats fewer that can be covered. */
  readonly lost: number;
  /** Duties that then are short, or shorter than before, in table order. */
  readonly dutiesLost: readonly number[];
  /** Their duties that others take, with who does. */
  readonly takenOver: readonly { readonly duty: number; readonly by: readonly number[] }[];
}

/**
 * The absence of every person, each worked out from the plan at hand: their seats are taken back and
 * what can be covered is covered again by augmenting paths, never from scratch.
 */
export function absences(kase: Case, solution: Solution): Absence[] {
  const holds: number[][] = kase.people.map(() => []);
  for (const { duty, person } of solution.plan.seats) holds[person].push(duty);
  const work = new Int32Array(solution.residual.length);
  return holds.map((own, person) => absence(kase, solution, work, person, own.sort((a, b) => a - b)));
}

/** The absence of one person. */
export function absenceOf(kase: Case, solution: Solution, person: number): Absence {
  const own = solution.plan.seats.flatMap((seat) => (seat.person === person ? [seat.duty] : []));
  return absence(kase, solution, new Int32Array(solution.residual.length), person, own.sort((a, b) => a - b));
}

/** @param work an array of the length of the residual capacities, to be written over */
function absence(kase: Case, { reduction, plan, residual }: Solution, work: Int32Array, person: number, holds: number[]): Absence {
  if (holds.length === 0) return { person, holds, lost: 0, dutiesLost: [], takenOver: [] };
  work.set(residual);
  const fixedHere = takeBack(kase, reduction, work, person);
  cover(reduction, work);
  const before = dutyFlow(reduction, residual);
  const after = dutyFlow(reduction, work);
  const held = (d: number): number => plan.heldOfDuty[d] + after[d] - before[d] - (fixedHere.has(d) ? 1 : 0);
  const shortOf = (d: number, count: number): number => Math.max(0, kase.duties[d].need - count);
  const dutiesLost: number[] = [];
  let lost = 0;
  kase.duties.forEach((_, d) => {
    const more = shortOf(d, held(d)) - shortOf(d, plan.heldOfDuty[d]);
    lost += more;
    if (more > 0) dutiesLost.push(d);
  });
  const gone = new Set(dutiesLost);
  const takers = newTakers(kase, reduction, residual, work);
  const takenOver = holds.filter((d) => !gone.has(d)).map((duty) => ({ duty, by: takers.get(duty) ?? [] }));
  return { person, holds, lost, dutiesLost, takenOver };
}

/**
 * Takes back everything the person holds and closes their place.
 * @returns the duties they held by Fixed rows, whose seats are open again
 */
function takeBack(kase: Case, reduction: Reduction, work: Int32Array, person: number): Set<number> {
  const { network, arcs, openPair, firstPairArc, classOfDuty, classes, dutyArc } = reduction;
  openPair.forEach((i, k) => {
    if (kase.pairs.person[i] !== person) return;
    const a = firstPairArc + k;
    if (flowOn(network, work, a) === 1) {
      let node = arcs.head[a];
      push(network, work, a, -1);
      while (node !== reduction.sink) {
        const half = network.outlet[node];
        work[half]++;
        work[network.mate[half]]--;
        node = network.endpoint[half];
      }
      push(network, work, dutyArc[kase.pairs.duty[i]], -1);
      push(network, work, classes[classOfDuty[kase.pairs.duty[i]]].arc, -1);
    }
    work[network.position[a]] = 0;
  });
  const fixedHere = new Set(kase.fixed.filter((seat) => seat.person === person).map(({ duty }) => duty));
  for (const d of fixedHere) {
    // Beyond the need, a Fixed seat leaves nothing open.
    if (reduction.open.fixedOfDuty[d] > kase.duties[d].need) continue;
    work[network.position[dutyArc[d]]]++;
    work[network.position[classes[classOfDuty[d]].arc]]++;
  }
  return fixedHere;
}

/** Covers again, class by class; an urgent seat may be had for a less urgent one. */
function cover({ network, source, sink, classes }: Reduction, work: Int32Array): void {
  const nodes = classes.map(({ node }) => node);
  classes.forEach(({ node, arc }, c) => {
    const gained = augment(network, work, node, sink, createWorkspace(network), [source, ...nodes]);
    push(network, work, arc, gained);
    for (let later = classes.length - 1; later > c; later--) {
      const barrier = [source, sink, ...nodes.filter((_, i) => i !== later)];
      const moved = augment(network, work, node, nodes[later], createWorkspace(network), barrier);
      push(network, work, arc, moved);
      push(network, work, classes[later].arc, -moved);
    }
  });
}

function dutyFlow({ network, dutyArc }: Reduction, residual: Int32Array): Int32Array {
  return Int32Array.from(dutyArc, (a) => flowOn(network, residual, a));
}

/** Who holds a pair afterwards that was not held before, by duty. */
function newTakers(
  { pairs }: Case,
  { network, openPair, firstPairArc }: Reduction,
  before: Int32Array,
  after: Int32Array,
): Map<number, number[]> {
  const takers = new Map<number, number[]>();
  openPair.forEach((i, k) => {
    const half = network.mate[network.position[firstPairArc + k]];
    if (after[half] <= before[half]) return;
    takers.set(pairs.duty[i], [...(takers.get(pairs.duty[i]) ?? []), pairs.person[i]]);
  });
  return takers;
}
