import type { Network } from './network';

/**
 * The connected parts of the subgraph that the member nodes induce, whatever the direction of the
 * arcs and the flow on them; O(n + m).
 *
 * @param member a mask over nodes
 * @returns for each node the number of its part, parts numbered from 0 by their lowest node; -1 for
 *   nodes that are no members
 */
export function components({ nodeCount, first, endpoint }: Network, member: Uint8Array): Int32Array {
  const part = new Int32Array(nodeCount).fill(-1);
  const queue = new Int32Array(nodeCount);
  let parts = 0;
  for (let seed = 0; seed < nodeCount; seed++) {
    if (member[seed] === 0 || part[seed] !== -1) continue;
    let queued = 0;
    queue[queued++] = seed;
    part[seed] = parts;
    for (let i = 0; i < queued; i++) {
      const v = queue[i];
      for (let half = first[v]; half < first[v + 1]; half++) {
        const w = endpoint[half];
        if (member[w] === 0 || part[w] !== -1) continue;
        part[w] = parts;
        queue[queued++] = w;
      }
    }
    parts++;
  }
  return part;
}
