import type { ArcList } from './network';
import { SpanningTree } from './spanningTree';

/** Where an arc stands: priced at its lower or upper bound, or not priced (in the tree, or fixed). */
const AT_LOWER = 1;
const NOT_PRICED = 0;
const AT_UPPER = -1;

/** Arcs priced at a time are at least so many. */
const SMALLEST_BLOCK = 32;

/**
 * Flows of least cost, one aim after the other, by the network simplex method with strongly feasible
 * trees (Cunningham, Mathematical Programming 11, 1976; Ahuja, Magnanti and Orlin, Network Flows,
 * 1993, chapter 11).
 *
 * It starts from a flow at hand and keeps what every node receives and passes on. After `minimise`,
 * the flow is one of least cost; `narrow` then fixes every arc whose reduced cost is not zero, which
 * by complementary slackness leaves exactly the flows of least cost; and the next aim goes on from
 * the same tree. Everything is whole numbers: costs up to 2^30 and a tree of n nodes give potentials
 * below n * 2^30, exact in 53 bits for every network that fits into memory.
 */
export class NetworkSimplex {
  readonly #nodeCount: number;
  readonly #tail: Int32Array;
  readonly #head: Int32Array;
  readonly #capacity: Int32Array;
  readonly #tree: SpanningTree;
  readonly #state: Int8Array;
  /** 1 where no later aim may change the flow of an arc. */
  readonly #fixed: Uint8Array;
  /** Arcs that may be priced; those that `narrow` fixed are left out. */
  #open: Int32Array;
  #cost: Float64Array;

  /** The flow on each arc, changed in place. */
  readonly flow: Int32Array;
  /** For each node; a reduced cost is cost + potential[tail] - potential[head]. */
  readonly potential: Float64Array;

  /**
   * @param flow keeps 0 <= flow <= capacity; the arcs strictly between their bounds form no cycle
   * @param fixed arcs whose flow stays as it is
   * @throws RangeError where arcs strictly between their bounds form a cycle
   */
  constructor(nodeCount: number, arcs: ArcList, flow: Int32Array, fixed: Iterable<number> = []) {
    this.#nodeCount = nodeCount;
    this.#tail = arcs.tail;
    this.#head = arcs.head;
    this.#capacity = arcs.capacity;
    this.flow = flow;
    this.potential = new Float64Array(nodeCount + 1);
    this.#tree = new SpanningTree(nodeCount);
    this.#state = new Int8Array(flow.length);
    this.#fixed = new Uint8Array(flow.length);
    this.#cost = new Float64Array(flow.length);
    for (const a of fixed) this.#fixed[a] = 1;
    for (let a = 0; a < flow.length; a++) {
      if (this.#fixed[a] === 1) continue;
      if (flow[a] === 0) this.#state[a] = AT_LOWER;
      else if (flow[a] === arcs.capacity[a]) this.#state[a] = AT_UPPER;
      else this.#addToTree(a);
    }
    this.#open = Int32Array.from(this.#fixed.keys()).filter((a) => this.#fixed[a] === 0);
  }

  /**
   * Changes the flow, within what earlier aims left open, to one of least cost.
   *
   * @param cost of each arc: whole numbers up to 2^30 in size
   * @returns pivots made
   */
  minimise(cost: Float64Array): number {
    this.#cost = cost;
    this.#setPotentials();
    let pivots = 0;
    let from = 0;
    for (;;) {
      const at = this.#price(from);
      if (at === -1) return pivots;
      this.#pivot(this.#open[at]);
      pivots++;
      from = at + 1 === this.#open.length ? 0 : at + 1;
    }
  }

  /** Fixes every arc that a flow of least cost cannot carry otherwise. */
  narrow(): void {
    this.#open = this.#open.filter((a) => {
      const reduced = this.#cost[a] + this.potential[this.#tail[a]] - this.potential[this.#head[a]];
      if (reduced === 0) return true;
      this.#fixed[a] = 1;
      this.#state[a] = NOT_PRICED;
      return false;
    });
  }

  /** True for an arc whose flow may still change without loss to any aim so far. */
  isOpen(a: number): boolean {
    return this.#fixed[a] === 0;
  }

  /** Takes an arc between its bounds into the tree. */
  #addToTree(a: number): void {
    const tree = this.#tree;
    const tail = this.#tail[a];
    const head = this.#head[a];
    let top = tail;
    while (tree.arc[top] !== -1) top = tree.parent[top];
    if (tree.isAbove(top, head)) throw new RangeError(`Arcs between their bounds form a cycle through arc ${a}.`);
    tree.graft(top, tail, head, a, 1);
    tree.refresh(tail, this.potential, 0);
  }

  #setPotentials(): void {
    const { potential } = this;
    const { parent, arc, isUp } = this.#tree;
    potential[this.#nodeCount] = 0;
    this.#tree.forEach((v) => {
      const cost = arc[v] === -1 ? 0 : this.#cost[arc[v]];
      potential[v] = potential[parent[v]] + (isUp[v] === 1 ? -cost : cost);
    });
  }

  /**
   * Prices the open arcs block by block, going round from a place, up to the first block with an arc
   * that lowers the cost.
   *
   * @returns the place in `#open` of the arc of that block that lowers it most, or -1
   */
  #price(from: number): number {
    const open = this.#open;
    const state = this.#state;
    const cost = this.#cost;
    const tail = this.#tail;
    const head = this.#head;
    const { potential } = this;
    const block = Math.max(SMALLEST_BLOCK, Math.ceil(Math.sqrt(open.length)));
    let best = 0;
    let bestAt = -1;
    let left = block;
    let at = from;
    for (let priced = 0; priced < open.length; priced++) {
      const a = open[at];
      const reduced = state[a] * (cost[a] + potential[tail[a]] - potential[head[a]]);
      if (reduced < best) {
        best = reduced;
        bestAt = at;
      }
      if (--left === 0) {
        if (bestAt !== -1) return bestAt;
        left = block;
      }
      if (++at === open.length) at = 0;
    }
    return bestAt;
  }

  /** Brings an arc into the tree: sends flow round the cycle it closes and takes a blocked arc out. */
  #pivot(entering: number): void {
    const forward = this.#state[entering] === AT_LOWER;
    const from = forward ? this.#tail[entering] : this.#head[entering];
    const to = forward ? this.#head[entering] : this.#tail[entering];
    const apex = this.#tree.apex(from, to);
    const { amount, top, onFromSide } = this.#findBlocked(entering, from, to, apex);
    if (amount > 0) this.#sendRound(entering, from, to, apex, forward ? amount : -amount);
    if (top === -1) {
      this.#state[entering] = forward ? AT_UPPER : AT_LOWER;
      return;
    }

    const leaving = this.#tree.arc[top];
    if (leaving !== -1) this.#state[leaving] = this.flow[leaving] === 0 ? AT_LOWER : AT_UPPER;
    this.#state[entering] = NOT_PRICED;
    const node = onFromSide ? from : to;
    const isUp = node === this.#tail[entering];
    const reduced = this.#cost[entering] + this.potential[this.#tail[entering]] - this.potential[this.#head[entering]];
    this.#tree.graft(top, node, onFromSide ? to : from, entering, isUp ? 1 : 0);
    this.#tree.refresh(node, this.potential, isUp ? -reduced : reduced);
  }

  /**
   * How much the cycle can carry, and the node below the arc that blocks it: the last such arc on the
   * way round from the apex, which keeps the tree strongly feasible, so that no tree comes back.
   */
  #findBlocked(
    entering: number,
    from: number,
    to: number,
    apex: number,
  ): { amount: number; top: number; onFromSide: boolean } {
    const { parent, isUp } = this.#tree;
    let amount = this.#capacity[entering];
    let top = -1;
    let onFromSide = false;
    for (let v = from; v !== apex; v = parent[v]) {
      const room = this.#room(v, isUp[v] === 0);
      if (room < amount) {
        amount = room;
        top = v;
        onFromSide = true;
      }
    }
    for (let v = to; v !== apex; v = parent[v]) {
      const room = this.#room(v, isUp[v] === 1);
      if (room <= amount) {
        amount = room;
        top = v;
        onFromSide = false;
      }
    }
    return { amount, top, onFromSide };
  }

  /** What the tree arc above a node can carry more, along its direction or against it. */
  #room(v: number, along: boolean): number {
    const a = this.#tree.arc[v];
    if (a === -1) return along ? Infinity : 0;
    return along ? this.#capacity[a] - this.flow[a] : this.flow[a];
  }

  #sendRound(entering: number, from: number, to: number, apex: number, signed: number): void {
    const { parent, arc, isUp } = this.#tree;
    const amount = Math.abs(signed);
    this.flow[entering] += signed;
    for (let v = from; v !== apex; v = parent[v]) this.flow[arc[v]] += isUp[v] === 1 ? -amount : amount;
    for (let v = to; v !== apex; v = parent[v]) this.flow[arc[v]] += isUp[v] === 1 ? amount : -amount;
  }
}
