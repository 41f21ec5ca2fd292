import type { Network } from './network';

/** Shortest residual paths between all nodes and the first group of half arcs that they can end with. */
export interface Paths {
  /** For each node the number of that group, from 0; -1 where there is none. */
  readonly group: Int32Array;
  /** For each node the weight of its path. */
  readonly weight: Int32Array;
  /** For each node the half arc of its path that is next to it; -1 where there is none. */
  readonly step: Int32Array;
}

const NO_STEP = -1;
const NOT_REACHED = -1;

/**
 * Paths from some nodes, the barrier, to all others, or the other way. Any path with an earlier group
 * of half arcs at the barrier is better than one with a later group, and a lighter one better than a
 * heavier one within a group. Nodes reached from an earlier group need not be entered again: whatever
 * lies beyond them is reached from that group as well.
 *
 * Half arcs weigh 0 or 1, so that two piles do for a queue: half arcs of the weight at hand, and those
 * of one more (Dial, Communications of the ACM 12, 1969). O(n + m).
 *
 * @param heavy 1 where a half arc weighs 1
 * @param groups half arcs that lead out of the barrier (back: into it), best group first
 * @param barrier nodes that no path enters
 * @param isBack true for paths to the barrier
 */
export function shortestPaths(
  network: Network,
  residual: Int32Array,
  heavy: Uint8Array,
  groups: readonly (readonly number[])[],
  barrier: readonly number[],
  isBack: boolean,
): Paths {
  const { nodeCount, first, endpoint, mate } = network;
  const group = new Int32Array(nodeCount).fill(NOT_REACHED);
  const weight = new Int32Array(nodeCount);
  const step = new Int32Array(nodeCount).fill(NO_STEP);
  let now: number[] = [];
  let later: number[] = [];
  const note = (half: number): void => {
    if (residual[half] > 0) (heavy[half] === 1 ? later : now).push(half);
  };
  const isBarred = new Set(barrier);
  groups.forEach((halves, number) => {
    halves.forEach(note);
    for (let w = 0; now.length + later.length > 0; w++, [now, later] = [later, now]) {
      for (let half = now.pop(); half !== undefined; half = now.pop()) {
        const v = endpoint[isBack ? mate[half] : half];
        if (group[v] !== NOT_REACHED || isBarred.has(v)) continue;
        group[v] = number;
        weight[v] = w;
        step[v] = half;
        for (let h = first[v]; h < first[v + 1]; h++) note(isBack ? mate[h] : h);
      }
    }
  });
  return { group, weight, step };
}

/** The half arcs of the path between a node that was reached and the barrier, in the order they are walked. */
export function pathOf({ endpoint, mate }: Network, { step }: Paths, node: number, isBack: boolean): number[] {
  const halves: number[] = [];
  for (let v = node; step[v] !== NO_STEP; v = endpoint[isBack ? halves.at(-1)! : mate[halves.at(-1)!]]) halves.push(step[v]);
  return isBack ? halves : halves.reverse();
}
