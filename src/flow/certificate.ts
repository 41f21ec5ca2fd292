import type { ArcList } from './network';

/**
 * Proofs of optimality that share no code with the algorithms: they are given the arcs as a list and
 * the flow on each, and return every fault they see. An empty list is the proof.
 */

/** Faults listed before the rest is only counted. */
const LISTED = 20;

/** Faults of a flow as such: 0 <= flow <= capacity, and as much leaves every inner node as enters it. */
export function flowFaults(
  nodeCount: number,
  { tail, head, capacity }: ArcList,
  flow: Int32Array,
  source: number,
  sink: number,
): string[] {
  const faults: string[] = [];
  const excess = new Float64Array(nodeCount);
  for (let a = 0; a < tail.length; a++) {
    if (flow[a] < 0 || flow[a] > capacity[a]) {
      faults.push(`Arc ${a} carries ${flow[a]}; it may carry 0 to ${capacity[a]}.`);
    }
    excess[tail[a]] -= flow[a];
    excess[head[a]] += flow[a];
  }
  for (let v = 0; v < nodeCount; v++) {
    if (v !== source && v !== sink && excess[v] !== 0) {
      faults.push(`Node ${v} receives ${excess[v]} more than it passes on.`);
    }
  }
  return shorten(faults);
}

/**
 * Faults in the claim that no flow from source to sink is larger than this one.
 *
 * @param side a mask over nodes: the source side of a cut that is said to be full
 *
 * The cut proves the claim: every flow crosses it, at most by the capacity of the arcs leading out
 * of it, and this flow uses all of that and sends nothing back (Ford and Fulkerson, Canadian
 * Journal of Mathematics 8, 1956).
 */
export function maximumFlowFaults(
  nodeCount: number,
  arcs: ArcList,
  flow: Int32Array,
  source: number,
  sink: number,
  side: Uint8Array,
): string[] {
  const faults = flowFaults(nodeCount, arcs, flow, source, sink);
  if (side[source] !== 1) faults.push('The source is not on the source side of the cut.');
  if (side[sink] === 1) faults.push('The sink is on the source side of the cut.');
  for (let a = 0; a < flow.length; a++) {
    const from = side[arcs.tail[a]];
    const to = side[arcs.head[a]];
    if (from === 1 && to !== 1 && flow[a] !== arcs.capacity[a]) {
      faults.push(`Arc ${a} leads out of the cut and carries ${flow[a]} of ${arcs.capacity[a]}.`);
    }
    if (from !== 1 && to === 1 && flow[a] !== 0) {
      faults.push(`Arc ${a} leads back over the cut and carries ${flow[a]}.`);
    }
  }
  return shorten(faults);
}

function shorten(faults: string[]): string[] {
  if (faults.length <= LISTED) return faults;
  return [...faults.slice(0, LISTED), `And ${faults.length - LISTED} faults more.`];
}

/**
 * Faults in the claim that a flow is one of least cost among those that differ from it on open arcs
 * only: by complementary slackness, an open arc with positive reduced cost must be empty and one with
 * negative reduced cost full.
 *
 * @param potential for each node; a reduced cost is cost + potential[tail] - potential[head]
 */
export function leastCostFaults(
  { tail, head, capacity }: ArcList,
  flow: Int32Array,
  cost: Float64Array,
  potential: Float64Array,
  isOpen: (arc: number) => boolean,
): string[] {
  const faults: string[] = [];
  for (let a = 0; a < flow.length; a++) {
    const reduced = cost[a] + potential[tail[a]] - potential[head[a]];
    if (reduced > 0 && flow[a] !== 0 && isOpen(a)) faults.push(`Arc ${a} costs ${reduced} a unit too much and carries ${flow[a]}.`);
    if (reduced < 0 && flow[a] !== capacity[a] && isOpen(a)) {
      faults.push(`Arc ${a} saves ${-reduced} a unit and carries only ${flow[a]} of ${capacity[a]}.`);
    }
  }
  return shorten(faults);
}
