import type { Network } from './network';

/** Shortest residual paths between every node and the first group of roots that it can have one with. */
export interface Paths {
  /** For each node the number of that group, from 0; -1 where there is none. */
  readonly group: Int32Array;
  /** For each node the weight of its path. */
  readonly weight: Int32Array;
  /** For each node the half arc of its path that is next to it; -1 at a root. */
  readonly step: Int32Array;
}

/** Whether paths lead from the roots to the nodes, or from the nodes to the roots. */
export type Direction = 'from roots' | 'to roots';

const NO_STEP = -1;
const NOT_REACHED = -1;

/**
 * Paths between roots and all nodes, where any path with an earlier group of roots is better than one
 * with a later group, and a lighter path better than a heavier one within a group. Nodes reached by an
 * earlier group need not be entered again: whatever leads to them is reached by that group as well.
 *
 * Half arcs weigh 0 or 1, so that two piles do for a queue: half arcs of the weight at hand, and those
 * of one more (Dial, Communications of the ACM 12, 1969). O(n + m).
 *
 * @param heavy 1 where a half arc weighs 1
 * @param groups roots, best group first
 * @param barrier nodes that no path enters
 */
export function shortestPaths(
  network: Network,
  residual: Int32Array,
  heavy: Uint8Array,
  groups: readonly (readonly number[])[],
  direction: Direction,
  barrier: readonly number[],
): Paths {
  const { nodeCount } = network;
  const paths = {
    group: new Int32Array(nodeCount).fill(NOT_REACHED),
    weight: new Int32Array(nodeCount),
    step: new Int32Array(nodeCount).fill(NO_STEP),
  };
  const isBarred = new Uint8Array(nodeCount);
  for (const v of barrier) isBarred[v] = 1;
  groups.forEach((roots, number) => {
    let now: Entry[] = roots.filter((v) => isBarred[v] === 0).map((node) => ({ node, half: NO_STEP }));
    for (let weight = 0; now.length > 0; weight++) {
      now = settle(network, residual, heavy, direction, paths, { number, weight, isBarred }, now);
    }
  });
  return paths;
}

/** A node and the half arc it would be reached by. */
interface Entry {
  readonly node: number;
  readonly half: number;
}

/**
 * Settles every node that has a path of the weight at hand.
 * @returns what is reached by one weight more
 */
function settle(
  { first, endpoint, mate }: Network,
  residual: Int32Array,
  heavy: Uint8Array,
  direction: Direction,
  { group, weight, step }: Paths,
  at: { readonly number: number; readonly weight: number; readonly isBarred: Uint8Array },
  now: Entry[],
): Entry[] {
  const later: Entry[] = [];
  for (;;) {
    const entry = now.pop();
    if (entry === undefined) return later;
    const v = entry.node;
    if (group[v] !== NOT_REACHED) continue;
    group[v] = at.number;
    weight[v] = at.weight;
    step[v] = entry.half;
    for (let h = first[v]; h < first[v + 1]; h++) {
      const half = direction === 'from roots' ? h : mate[h];
      const node = endpoint[h];
      if (residual[half] === 0 || group[node] !== NOT_REACHED || at.isBarred[node] === 1) continue;
      (heavy[half] === 1 ? later : now).push({ node, half });
    }
  }
}

/**
 * The half arcs of the path between a node and its root, in the order they are walked; the node must
 * have been reached.
 */
export function pathOf({ endpoint, mate }: Network, { step }: Paths, node: number, direction: Direction): number[] {
  const halves: number[] = [];
  for (let v = node; step[v] !== NO_STEP; v = direction === 'from roots' ? endpoint[mate[step[v]]] : endpoint[step[v]]) halves.push(step[v]);
  return direction === 'from roots' ? halves.reverse() : halves;
}
