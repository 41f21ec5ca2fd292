import type { Reduction } from './reduce';
import { maximumFlowFaults } from '../flow/certificate';
import { flowOn } from '../flow/network';
import { reachable } from '../flow/residual';

/**
 * Faults in the claim that a flow covers the most seats of the most urgent class, then of the next,
 * and so on, and the most in total. An empty list is the proof.
 */
export function coverFaults(reduction: Reduction, residual: Int32Array): string[] {
  const { network, arcs, source, sink } = reduction;
  const flow = new Int32Array(network.arcCount);
  for (let a = 0; a < flow.length; a++) flow[a] = flowOn(network, residual, a);
  const side = reachable(network, residual, [source]);
  return [
    ...maximumFlowFaults(network.nodeCount, arcs, flow, source, sink, side),
    ...priorityFaults(reduction, residual),
  ];
}

/**
 * The classes up to k have as much as they can get, if residual arcs lead from their short duties
 * neither to the sink nor to a duty of a later class: what is reached is then the source side of a
 * full cut of the network that has those classes only. Each node is visited once for all classes.
 */
function priorityFaults({ network, source, sink, classes, classOfDuty, dutyNode }: Reduction, residual: Int32Array): string[] {
  const { first, endpoint, position, nodeCount } = network;
  const NOT_A_DUTY = -1;
  const classOfNode = new Int32Array(nodeCount).fill(NOT_A_DUTY);
  dutyNode.forEach((node, d) => (classOfNode[node] = classOfDuty[d]));
  const reached = new Uint8Array(nodeCount);
  reached[source] = 1;
  const queue = new Int32Array(nodeCount);
  let queued = 0;
  let done = 0;
  const faults: string[] = [];
  classes.forEach(({ priority, node, arc }, c) => {
    if (residual[position[arc]] > 0 && reached[node] === 0) {
      reached[node] = 1;
      queue[queued++] = node;
    }
    for (; done < queued; done++) {
      const v = queue[done];
      for (let half = first[v]; half < first[v + 1]; half++) {
        const w = endpoint[half];
        if (residual[half] === 0 || reached[w] === 1) continue;
        reached[w] = 1;
        queue[queued++] = w;
        if (w === sink) faults.push(`Priority ${priority} could have a seat more from a free place.`);
        if (classOfNode[w] > c) faults.push(`Priority ${priority} could have a seat of priority ${classes[classOfNode[w]].priority}.`);
      }
    }
  });
  return faults;
}
