import { flowOn, push, type ArcList } from '../flow/network';
import type { Case } from './case';
import type { Reduction } from './reduce';

/**
 * The network of a reduction with the arc from each person to the sink split into one arc a seat, so
 * that the first seat can count otherwise than the second. Nodes and all other arcs keep their
 * numbers; the arcs that were split carry nothing any more.
 */
export interface Tally {
  readonly arcs: ArcList;
  readonly arcCount: number;
  /** The seats of person p, first to last, are the arcs first[p] .. first[p + 1] - 1. */
  readonly first: Int32Array;
  /** The flow, changed in place by whoever improves it. */
  readonly flow: Int32Array;
}

/** Splits the last arc of each person and carries the flow over. A person gets no more seats than open pairs. */
export function makeTally(kase: Case, reduction: Reduction, residual: Int32Array): Tally {
  const { network, arcs, sink, personNode, personArc } = reduction;
  const degree = new Int32Array(personArc.length);
  for (const i of reduction.openPair) degree[kase.pairs.person[i]]++;
  const people = personArc.length;
  const first = new Int32Array(people + 1);
  first[0] = network.arcCount;
  for (let p = 0; p < people; p++) {
    first[p + 1] = first[p] + Math.min(arcs.capacity[personArc[p]], degree[p]);
  }
  const arcCount = first[people];
  const grow = (array: Int32Array): Int32Array => {
    const grown = new Int32Array(arcCount);
    grown.set(array);
    return grown;
  };
  const tail = grow(arcs.tail);
  const head = grow(arcs.head);
  const capacity = grow(arcs.capacity);
  const flow = new Int32Array(arcCount);
  for (let a = 0; a < network.arcCount; a++) flow[a] = flowOn(network, residual, a);
  for (let p = 0; p < people; p++) {
    const held = flow[personArc[p]];
    capacity[personArc[p]] = 0;
    flow[personArc[p]] = 0;
    for (let a = first[p]; a < first[p + 1]; a++) {
      tail[a] = personNode[p];
      head[a] = sink;
      capacity[a] = 1;
      flow[a] = a - first[p] < held ? 1 : 0;
    }
  }
  return { arcs: { tail, head, capacity }, arcCount, first, flow };
}

/** Writes an improved flow back over the one it came from. */
export function writeBack({ flow, first }: Tally, { network, personArc }: Reduction, residual: Int32Array): void {
  personArc.forEach((arc, p) => {
    let held = 0;
    for (let a = first[p]; a < first[p + 1]; a++) held += flow[a];
    push(network, residual, arc, held - flowOn(network, residual, arc));
  });
  const split = new Set(personArc);
  for (let a = 0; a < network.arcCount; a++) {
    if (!split.has(a)) push(network, residual, a, flow[a] - flowOn(network, residual, a));
  }
}
