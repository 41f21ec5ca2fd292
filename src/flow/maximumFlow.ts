import type { Network } from './network';

/**
 * Maximum flow by depth-first augmenting paths with lookahead and fairness.
 *
 * This is the algorithm of Pothen and Fan (ACM Transactions on Mathematical Software 16, 1990) with
 * the fairness of Duff, Kaya and Uçar (the same journal, 38, 2011), carried over from bipartite matching to
 * networks with capacities:
 * - the search proceeds in phases; within one, a node left without a path is not entered again, and
 *   each node goes on scanning where it last stopped, so that a phase reads every half arc once;
 * - lookahead: before it searches deeper, a node looks for a half arc from which single-outlet nodes
 *   lead straight to the sink;
 * - fairness: every other phase scans in the opposite direction, which breaks the instances on which
 *   a fixed direction needs a phase for every path.
 * A phase without a path has entered every node that residual arcs reach from the root, so the flow
 * from the root is then at its maximum.
 */

/** Arrays the search works in, allocated once a network and reused from root to root. */
export interface Workspace {
  /** The phase a node was last entered in, doubled; plus one while it must not be entered. */
  readonly state: Int32Array;
  /** The half arc at which a node goes on scanning in this phase. */
  readonly next: Int32Array;
  /**
   * The half arc at which a node goes on looking ahead, over all phases. Where every node beyond
   * the pairs has one outlet (limits inside limits), a way that is once blocked stays blocked: a
   * path that turns round below a full arc leaves that arc full. Elsewhere skipping costs time at most.
   */
  readonly look: Int32Array;
  /** The half arcs of the path, root first. */
  readonly path: Int32Array;
  /** Phases begun so far. */
  phase: number;
}

/** Outlets followed at most in one look ahead: more than limits are ever nested, and an end to loops. */
const LONGEST_LOOK = 16;

/** @returns arrays for searches in this network; O(n) memory */
export function createWorkspace(network: Network): Workspace {
  return {
    state: new Int32Array(network.nodeCount),
    next: new Int32Array(network.nodeCount),
    look: network.first.slice(0, network.nodeCount),
    path: new Int32Array(network.nodeCount + 1),
    phase: 0,
  };
}

/**
 * Sends as much more flow as possible from root to sink, changing `residual` in place.
 *
 * @param barrier nodes that no path may enter
 * @returns the amount added: units of flow
 */
export function augment(
  network: Network,
  residual: Int32Array,
  root: number,
  sink: number,
  workspace: Workspace = createWorkspace(network),
  barrier: readonly number[] = [],
): number {
  let total = 0;
  for (;;) {
    const found = runPhase(network, residual, root, sink, workspace, barrier);
    if (found === 0) return total;
    total += found;
  }
}

function runPhase(
  network: Network,
  residual: Int32Array,
  root: number,
  sink: number,
  workspace: Workspace,
  barrier: readonly number[],
): number {
  workspace.phase++;
  const { state, path, phase } = workspace;
  const open = 2 * phase;
  const closed = open + 1;
  for (const v of barrier) state[v] = closed;
  let found = 0;
  for (;;) {
    const length = findPath(network, residual, root, sink, workspace);
    if (length === 0) return found;
    found += sendAlong(network, residual, workspace, length);
    // The nodes of the path may be entered again; those it only looked through were never entered.
    state[root] = open;
    for (let i = 0; i < length; i++) {
      const v = network.endpoint[path[i]];
      if (state[v] === closed) state[v] = open;
    }
  }
}

/** Sends what the narrowest half arc of the path can carry. */
function sendAlong({ mate }: Network, residual: Int32Array, { path }: Workspace, length: number): number {
  let amount = residual[path[0]];
  for (let i = 1; i < length; i++) amount = Math.min(amount, residual[path[i]]);
  for (let i = 0; i < length; i++) {
    residual[path[i]] -= amount;
    residual[mate[path[i]]] += amount;
  }
  return amount;
}

/**
 * Searches one path in this phase, depth first with an explicit stack.
 *
 * @returns the number of half arcs written to `workspace.path`; 0 where no path is left
 */
function findPath(
  network: Network,
  residual: Int32Array,
  root: number,
  sink: number,
  workspace: Workspace,
): number {
  const { first, endpoint } = network;
  const { state, next, path, phase } = workspace;
  const open = 2 * phase;
  const closed = open + 1;
  const step = phase % 2 === 1 ? 1 : -1;

  let depth = 0;
  let v = root;
  enter(v);
  for (;;) {
    const length = lookAhead(network, residual, sink, workspace, v, depth);
    if (length > 0) return length;

    const end = step === 1 ? first[v + 1] : first[v] - 1;
    let half = next[v];
    while (half !== end && (residual[half] === 0 || state[endpoint[half]] === closed)) half += step;
    next[v] = half;
    if (half !== end) {
      path[depth++] = half;
      v = endpoint[half];
      if (v === sink) return depth;
      enter(v);
    } else {
      if (depth === 0) return 0;
      depth--;
      v = depth === 0 ? root : endpoint[path[depth - 1]];
    }
  }

  function enter(node: number): void {
    if (state[node] !== open) next[node] = step === 1 ? first[node] : first[node + 1] - 1;
    state[node] = closed;
  }
}

/**
 * Looks for a forward half arc of v from which outlets with capacity left lead to the sink, and
 * completes the path along it.
 *
 * @returns the length of the completed path; 0 where there is none
 */
function lookAhead(
  { middle, endpoint, outlet }: Network,
  residual: Int32Array,
  sink: number,
  { state, look, path, phase }: Workspace,
  v: number,
  depth: number,
): number {
  const closed = 2 * phase + 1;
  const end = middle[v];
  let half = look[v];
  for (; half < end; half++) {
    if (residual[half] === 0) continue;
    let length = depth;
    let step = half;
    for (;;) {
      path[length++] = step;
      const node = endpoint[step];
      if (node === sink) {
        look[v] = half;
        return length;
      }
      step = outlet[node];
      if (step < 0 || residual[step] === 0 || state[node] === closed || length - depth > LONGEST_LOOK) break;
    }
  }
  look[v] = half;
  return 0;
}
