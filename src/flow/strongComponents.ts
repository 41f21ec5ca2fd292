import type { Network } from './network';

/** Nodes in the order the search first reached them have numbers from 1; 0 is not reached yet. */
const NOT_REACHED = 0;
const OPEN = -2;
const LEFT_OUT = -1;

/**
 * The strongly connected components of the residual network: two nodes are in one component where
 * residual arcs lead from each to the other. An arc lies on a residual cycle, so that its flow can be
 * changed while every node keeps its balance, exactly where its ends are in one component.
 *
 * Tarjan's algorithm (SIAM Journal on Computing 1, 1972) with a stack of its own; O(n + m).
 *
 * @param barrier nodes that are left out; their component is -1
 * @returns the component of each node
 */
export function strongComponents(network: Network, residual: Int32Array, barrier: readonly number[] = []): Int32Array {
  const search = new Search(network, residual);
  for (const v of barrier) search.component[v] = LEFT_OUT;
  for (let v = 0; v < network.nodeCount; v++) search.from(v);
  return search.component;
}

class Search {
  readonly component: Int32Array;
  readonly #network: Network;
  readonly #residual: Int32Array;
  readonly #order: Int32Array;
  /** The earliest node known to be reached from below a node. */
  readonly #low: Int32Array;
  readonly #next: Int32Array;
  readonly #path: Int32Array;
  /** Nodes whose component is not complete. */
  readonly #waiting: Int32Array;
  #waits = 0;
  #reached = 0;
  #components = 0;

  constructor(network: Network, residual: Int32Array) {
    const { nodeCount, first } = network;
    this.#network = network;
    this.#residual = residual;
    this.component = new Int32Array(nodeCount).fill(OPEN);
    this.#order = new Int32Array(nodeCount);
    this.#low = new Int32Array(nodeCount);
    this.#next = first.slice(0, nodeCount);
    this.#path = new Int32Array(nodeCount);
    this.#waiting = new Int32Array(nodeCount);
  }

  /** Completes the components of everything that a node reaches. */
  from(start: number): void {
    if (this.component[start] !== OPEN || this.#order[start] !== NOT_REACHED) return;
    const path = this.#path;
    const low = this.#low;
    let depth = 0;
    path[0] = start;
    this.#enter(start);
    while (depth >= 0) {
      const v = path[depth];
      const w = this.#advance(v);
      if (w !== -1) {
        path[++depth] = w;
        this.#enter(w);
        continue;
      }
      if (low[v] === this.#order[v]) this.#close(v);
      depth--;
      if (depth >= 0) low[path[depth]] = Math.min(low[path[depth]], low[v]);
    }
  }

  #enter(v: number): void {
    this.#order[v] = this.#low[v] = ++this.#reached;
    this.#waiting[this.#waits++] = v;
  }

  /** The next node below v that is not reached yet, or -1; notes what v itself reaches. */
  #advance(v: number): number {
    const { first, endpoint } = this.#network;
    const next = this.#next;
    for (; next[v] < first[v + 1]; next[v]++) {
      const w = endpoint[next[v]];
      if (this.#residual[next[v]] === 0 || this.component[w] !== OPEN) continue;
      if (this.#order[w] === NOT_REACHED) return w;
      this.#low[v] = Math.min(this.#low[v], this.#order[w]);
    }
    return -1;
  }

  /** Everything that waits since v, v included, is one component. */
  #close(v: number): void {
    let w: number;
    do {
      w = this.#waiting[--this.#waits];
      this.component[w] = this.#components;
    } while (w !== v);
    this.#components++;
  }
}
