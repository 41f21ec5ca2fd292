/**
 * A spanning tree of a network, for the network simplex method. Node `nodeCount` is the root, which
 * the network does not have; what hangs on it hangs by no arc.
 */
export class SpanningTree {
  readonly root: number;
  /** The next node towards the root. */
  readonly parent: Int32Array;
  /** The arc to the parent, or -1 where a node hangs on the root by none. */
  readonly arc: Int32Array;
  /** 1 where that arc leads from the node to its parent, 0 where it leads down to the node. */
  readonly isUp: Uint8Array;
  /** Steps to the root. */
  readonly depth: Int32Array;
  /** Children of a node as a list linked both ways, -1 at its ends. */
  readonly #firstChild: Int32Array;
  readonly #nextSibling: Int32Array;
  readonly #previousSibling: Int32Array;

  /** Every node hangs on the root by no arc. */
  constructor(nodeCount: number) {
    this.root = nodeCount;
    this.parent = new Int32Array(nodeCount + 1).fill(-1);
    this.arc = new Int32Array(nodeCount + 1).fill(-1);
    this.isUp = new Uint8Array(nodeCount + 1).fill(1);
    this.depth = new Int32Array(nodeCount + 1);
    this.#firstChild = new Int32Array(nodeCount + 1).fill(-1);
    this.#nextSibling = new Int32Array(nodeCount + 1).fill(-1);
    this.#previousSibling = new Int32Array(nodeCount + 1).fill(-1);
    for (let v = nodeCount - 1; v >= 0; v--) this.#hang(v, this.root, -1, 1);
  }

  /** The last node that the ways from u and from v to the root have in common. */
  apex(u: number, v: number): number {
    const { depth, parent } = this;
    while (u !== v) {
      if (depth[u] >= depth[v]) u = parent[u];
      else v = parent[v];
    }
    return u;
  }

  /** True where u lies on the way from v to the root, or is v. */
  isAbove(u: number, v: number): boolean {
    while (this.depth[v] > this.depth[u]) v = this.parent[v];
    return u === v;
  }

  /**
   * Cuts the arc above `top`, turns what hung on it over so that `node`, which lies in it, is its
   * highest, and hangs that below `below` by `arc`.
   */
  graft(top: number, node: number, below: number, arc: number, isUp: number): void {
    const { parent } = this;
    let child = node;
    let newParent = below;
    let newArc = arc;
    let newIsUp = isUp;
    for (;;) {
      const oldParent = parent[child];
      const oldArc = this.arc[child];
      const oldIsUp = this.isUp[child];
      this.#cut(child);
      this.#hang(child, newParent, newArc, newIsUp);
      if (child === top) return;
      newParent = child;
      newArc = oldArc;
      newIsUp = 1 - oldIsUp;
      child = oldParent;
    }
  }

  /** Gives every node from `top` downwards its depth again, and adds `shift` to its potential. */
  refresh(top: number, potential: Float64Array, shift: number): void {
    const { parent, depth } = this;
    let v = top;
    for (;;) {
      depth[v] = depth[parent[v]] + 1;
      potential[v] += shift;
      if (this.#firstChild[v] !== -1) {
        v = this.#firstChild[v];
        continue;
      }
      while (v !== top && this.#nextSibling[v] === -1) v = parent[v];
      if (v === top) return;
      v = this.#nextSibling[v];
    }
  }

  /** Visits every node but the root, parents before children. */
  forEach(visit: (node: number) => void): void {
    let v = this.#firstChild[this.root];
    while (v !== -1) {
      visit(v);
      if (this.#firstChild[v] !== -1) {
        v = this.#firstChild[v];
        continue;
      }
      while (v !== this.root && this.#nextSibling[v] === -1) v = this.parent[v];
      if (v === this.root) return;
      v = this.#nextSibling[v];
    }
  }

  #hang(child: number, below: number, arc: number, isUp: number): void {
    this.parent[child] = below;
    this.arc[child] = arc;
    this.isUp[child] = isUp;
    this.depth[child] = this.depth[below] + 1;
    const sibling = this.#firstChild[below];
    this.#nextSibling[child] = sibling;
    this.#previousSibling[child] = -1;
    if (sibling !== -1) this.#previousSibling[sibling] = child;
    this.#firstChild[below] = child;
  }

  #cut(child: number): void {
    const previous = this.#previousSibling[child];
    const next = this.#nextSibling[child];
    if (previous === -1) this.#firstChild[this.parent[child]] = next;
    else this.#nextSibling[previous] = next;
    if (next !== -1) this.#previousSibling[next] = previous;
  }
}
