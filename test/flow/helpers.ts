import { maximumFlowFaults } from '../../src/flow/certificate';
import { augment } from '../../src/flow/maximumFlow';
import { buildNetwork, flowOn, zeroFlow, type ArcList } from '../../src/flow/network';
import { reachable } from '../../src/flow/residual';

/** An arc as [tail, head, capacity]. */
export type Arc = readonly [number, number, number];

export function arcList(arcs: readonly Arc[]): ArcList {
  return {
    tail: Int32Array.from(arcs, (arc) => arc[0]),
    head: Int32Array.from(arcs, (arc) => arc[1]),
    capacity: Int32Array.from(arcs, (arc) => arc[2]),
  };
}

/** Solves from source to sink; `faults` is empty exactly where flow and cut prove the value. */
export function solveMaximum(nodeCount: number, list: ArcList, source: number, sink: number) {
  const network = buildNetwork(nodeCount, list);
  const residual = zeroFlow(network);
  const value = augment(network, residual, source, sink);
  const flow = Int32Array.from({ length: network.arcCount }, (_, a) => flowOn(network, residual, a));
  const side = reachable(network, residual, [source]);
  return { value, flow, faults: maximumFlowFaults(nodeCount, list, flow, source, sink, side) };
}

/** One seat a row, unit capacities: the matching problem of these pairs, as nodes and arcs. */
export function matchingArcs(left: number, right: number, pairs: readonly (readonly [number, number])[]) {
  const arcs: Arc[] = [
    ...Array.from({ length: left }, (_, i): Arc => [0, 2 + i, 1]),
    ...pairs.map(([l, r]): Arc => [2 + l, 2 + left + r, 1]),
    ...Array.from({ length: right }, (_, i): Arc => [2 + left + i, 1, 1]),
  ];
  return { nodeCount: 2 + left + right, list: arcList(arcs) };
}
