import type { Network } from '../src/flow/network';

/**
 * Maximum flow by blocking flows in layers (Dinic 1970; on matchings, Hopcroft and Karp 1973): the
 * textbook method the product's search is measured against.
 */
export function dinic({ nodeCount, first, endpoint, mate }: Network, residual: Int32Array, source: number, sink: number): number {
  const level = new Int32Array(nodeCount);
  const next = new Int32Array(nodeCount);
  const queue = new Int32Array(nodeCount);
  const path = new Int32Array(nodeCount);
  let total = 0;
  while (layers()) {
    next.set(first.subarray(0, nodeCount));
    while (step()) total++;
  }
  return total;

  function layers(): boolean {
    level.fill(-1);
    level[source] = 0;
    queue[0] = source;
    for (let i = 0, queued = 1; i < queued; i++) {
      const v = queue[i];
      for (let half = first[v]; half < first[v + 1]; half++) {
        const w = endpoint[half];
        if (residual[half] === 0 || level[w] !== -1) continue;
        level[w] = level[v] + 1;
        queue[queued++] = w;
      }
    }
    return level[sink] !== -1;
  }

  /** Sends one unit along a shortest path. */
  function step(): boolean {
    let depth = 0;
    let v = source;
    while (v !== sink) {
      while (next[v] < first[v + 1] && !(residual[next[v]] > 0 && level[endpoint[next[v]]] === level[v] + 1)) next[v]++;
      if (next[v] < first[v + 1]) {
        path[depth++] = next[v];
        v = endpoint[next[v]];
      } else {
        if (depth === 0) return false;
        v = endpoint[mate[path[--depth]]];
        next[v]++;
      }
    }
    for (let i = 0; i < depth; i++) {
      residual[path[i]]--;
      residual[mate[path[i]]]++;
    }
    return true;
  }
}
