/**
 * A directed network with whole capacities, in the compressed rows that every algorithm here walks.
 *
 * Every arc is stored as two half arcs: a forward half at its tail and a backward half at its head.
 * The halves of one node lie side by side, forward halves first, each kind in the order of the arcs,
 * so that scanning a node reads memory in one sweep. With m arcs and n nodes:
 *
 * | array    | length | meaning |
 * | -------- | ------ | ------- |
 * | first    | n + 1  | the halves of node v are first[v] .. first[v + 1] - 1 |
 * | middle   | n      | those before middle[v] are forward, the others backward |
 * | endpoint | 2m     | the node a half leads to |
 * | mate     | 2m     | the other half of the same arc |
 * | position | m      | the forward half of arc a |
 * | capacity | m      | the capacity of arc a: whole, 0 .. 2^31 - 1 |
 * | outlet   | n      | the forward half of a node that has exactly one, else -1 |
 *
 * A flow is an Int32Array `residual` over halves: what a forward half can still carry and what a
 * backward half can still give back. The two halves of an arc always add up to its capacity.
 */
export interface Network {
  readonly nodeCount: number;
  readonly arcCount: number;
  readonly first: Int32Array;
  readonly middle: Int32Array;
  readonly endpoint: Int32Array;
  readonly mate: Int32Array;
  readonly position: Int32Array;
  readonly capacity: Int32Array;
  readonly outlet: Int32Array;
}

/** Arcs as a list: arc a leads from tail[a] to head[a] and carries at most capacity[a]. */
export interface ArcList {
  readonly tail: Int32Array;
  readonly head: Int32Array;
  readonly capacity: Int32Array;
}

/**
 * Lays the arcs out as halves by two counting sorts; O(n + m).
 *
 * @param nodeCount nodes are 0 .. nodeCount - 1
 * @throws RangeError where an arc names a node outside that range or has a negative capacity
 */
export function buildNetwork(nodeCount: number, { tail, head, capacity }: ArcList): Network {
  const arcCount = tail.length;
  checkArcs(nodeCount, { tail, head, capacity });
  const first = new Int32Array(nodeCount + 1);
  const middle = new Int32Array(nodeCount);
  for (let a = 0; a < arcCount; a++) {
    first[tail[a] + 1]++;
    first[head[a] + 1]++;
    middle[tail[a]]++;
  }
  for (let v = 0; v < nodeCount; v++) {
    first[v + 1] += first[v];
    middle[v] += first[v];
  }

  const endpoint = new Int32Array(2 * arcCount);
  const mate = new Int32Array(2 * arcCount);
  const position = new Int32Array(arcCount);
  const nextForward = first.slice(0, nodeCount);
  const nextBackward = middle.slice();
  for (let a = 0; a < arcCount; a++) {
    const forward = nextForward[tail[a]]++;
    const backward = nextBackward[head[a]]++;
    endpoint[forward] = head[a];
    endpoint[backward] = tail[a];
    mate[forward] = backward;
    mate[backward] = forward;
    position[a] = forward;
  }

  const outlet = new Int32Array(nodeCount);
  for (let v = 0; v < nodeCount; v++) outlet[v] = middle[v] - first[v] === 1 ? first[v] : -1;
  return { nodeCount, arcCount, first, middle, endpoint, mate, position, capacity, outlet };
}

/** The residual capacities of the zero flow. */
export function zeroFlow(network: Network): Int32Array {
  const residual = new Int32Array(2 * network.arcCount);
  for (let a = 0; a < network.arcCount; a++) residual[network.position[a]] = network.capacity[a];
  return residual;
}

/** The flow on arc a. */
export function flowOn(network: Network, residual: Int32Array, a: number): number {
  return residual[network.mate[network.position[a]]];
}

/** Adds an amount (negative: takes it back) to the flow on arc a; the caller keeps it within 0 .. capacity. */
export function push(network: Network, residual: Int32Array, a: number, amount: number): void {
  const half = network.position[a];
  residual[half] -= amount;
  residual[network.mate[half]] += amount;
}

function checkArcs(nodeCount: number, { tail, head, capacity }: ArcList): void {
  for (let a = 0; a < tail.length; a++) {
    if (tail[a] < 0 || tail[a] >= nodeCount || head[a] < 0 || head[a] >= nodeCount) {
      throw new RangeError(`Arc ${a} leads from ${tail[a]} to ${head[a]}; nodes are 0 to ${nodeCount - 1}.`);
    }
    if (capacity[a] < 0) throw new RangeError(`Arc ${a} has capacity ${capacity[a]}; it must be 0 or more.`);
  }
}

/** Collects arcs, then hands them over as typed arrays. */
export class ArcWriter {
  #count = 0;
  readonly #tail: Int32Array;
  readonly #head: Int32Array;
  readonly #capacity: Int32Array;

  /** @param most arcs that will be added at most */
  constructor(most: number) {
    this.#tail = new Int32Array(most);
    this.#head = new Int32Array(most);
    this.#capacity = new Int32Array(most);
  }

  /** The number the next arc will get. */
  get count(): number {
    return this.#count;
  }

  /** @returns the number of the arc; arcs are numbered in the order they are added */
  add(tail: number, head: number, capacity: number): number {
    this.#tail[this.#count] = tail;
    this.#head[this.#count] = head;
    this.#capacity[this.#count] = capacity;
    return this.#count++;
  }

  /** The arcs added so far. */
  finish(): ArcList {
    return {
      tail: this.#tail.subarray(0, this.#count),
      head: this.#head.subarray(0, this.#count),
      capacity: this.#capacity.subarray(0, this.#count),
    };
  }
}
