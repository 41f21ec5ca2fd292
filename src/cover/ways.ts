import { pathOf, shortestPaths } from '../flow/paths';
import type { Case } from './case';
import type { Solution } from './solve';

/** What moving one unit of flow along some residual half arcs comes to. */
export interface Way {
  /** The class, from 0, that has a seat less (to the terminal) or more (from it); -1: none. */
  readonly class: number;
  /** By how many seats more minimums are missed. */
  readonly missed: number;
  /** Seats changed: pairs given up and pairs taken. */
  readonly weight: number;
  /** In the order they are walked. */
  readonly halves: readonly number[];
}

/** A way that changes nothing. */
export const STAY: Way = { class: -1, missed: 0, weight: 0, halves: [] };

/** The cheapest way between a node and a root; null where there is none. */
export type Ways = (node: number) => Way | null;

/** Half arcs at the root that come to the same. */
interface Gate {
  readonly outcome: Partial<Way>;
  readonly halves: readonly number[];
}

/**
 * The cheapest ways between all nodes and the terminal, which is source and sink taken as one. To it
 * they lead best through a free place of someone below the minimum, then through any free place, and
 * else they cost a seat, of the least urgent class that can be had. From it, the other way round: best
 * from a short duty of the most urgent class, and worst from someone who then misses the minimum.
 *
 * @param isBack true for ways to the terminal
 */
export function waysAtTerminal(kase: Case, solution: Solution, heavy: Uint8Array, isBack: boolean): Ways {
  const { network, classes, personArc } = solution.reduction;
  const { heldByPerson } = solution.plan;
  const halfOf = (arc: number, isForward: boolean): number => (isForward ? network.position[arc] : network.mate[network.position[arc]]);
  const counts = (p: number): boolean => heldByPerson[p] < kase.people[p].minimum + (isBack ? 0 : 1);
  const places = (isCounted: boolean): number[] =>
    [...kase.people.keys()].filter((p) => counts(p) === isCounted).map((p) => halfOf(personArc[p], isBack));
  const gates: Gate[] = [
    { outcome: { missed: isBack ? -1 : 1 }, halves: places(true) },
    { outcome: {}, halves: places(false) },
    ...classes.map(({ arc }, c) => ({ outcome: { class: c }, halves: [halfOf(arc, !isBack)] })).reverse(),
  ];
  return waysBetween(solution, heavy, isBack ? gates : gates.reverse(), [], isBack);
}

/** The cheapest ways between all nodes and one of them that avoid the terminal. */
export function waysAtNode(solution: Solution, heavy: Uint8Array, node: number, isBack: boolean): Ways {
  const { first, mate } = solution.reduction.network;
  const halves = Array.from({ length: first[node + 1] - first[node] }, (_, i) => (isBack ? mate[first[node] + i] : first[node] + i));
  return waysBetween(solution, heavy, [{ outcome: {}, halves }], [node], isBack);
}

/** @param gates best first */
function waysBetween(solution: Solution, heavy: Uint8Array, gates: readonly Gate[], root: readonly number[], isBack: boolean): Ways {
  const { residual, reduction } = solution;
  const { network, source, sink } = reduction;
  const paths = shortestPaths(network, residual, heavy, gates.map(({ halves }) => halves), [source, sink, ...root], isBack);
  return (node) => {
    const gate = gates[paths.group[node]];
    if (gate === undefined) return null;
    return { ...STAY, ...gate.outcome, weight: paths.weight[node], halves: pathOf(network, paths, node, isBack) };
  };
}
