import type { Network } from './network';

/**
 * The nodes that residual half arcs reach from the roots: breadth first, O(n + m).
 *
 * @param barrier nodes that are never entered (a root is entered all the same)
 * @returns a mask over nodes: 1 where reached
 */
export function reachable(
  network: Network,
  residual: Int32Array,
  roots: Iterable<number>,
  barrier: readonly number[] = [],
): Uint8Array {
  const { nodeCount, first, endpoint } = network;
  const BARRED = 2;
  const reached = new Uint8Array(nodeCount);
  const queue = new Int32Array(nodeCount);
  let queued = 0;
  for (const v of barrier) reached[v] = BARRED;
  for (const root of roots) {
    if (reached[root] !== 1) queue[queued++] = root;
    reached[root] = 1;
  }
  for (let i = 0; i < queued; i++) {
    const v = queue[i];
    for (let half = first[v]; half < first[v + 1]; half++) {
      const w = endpoint[half];
      if (residual[half] > 0 && reached[w] === 0) {
        reached[w] = 1;
        queue[queued++] = w;
      }
    }
  }
  for (const v of barrier) if (reached[v] === BARRED) reached[v] = 0;
  return reached;
}
