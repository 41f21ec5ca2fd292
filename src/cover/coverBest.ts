import type { Case } from './case';
import { planOf, type Plan } from './plan';
import type { Reduction } from './reduce';
import { augment, createWorkspace } from '../flow/maximumFlow';
import { push, zeroFlow } from '../flow/network';

/**
 * A flow that covers as many seats as possible of the most urgent class, then of the next, and so
 * on. What is still open is settled by the name order the network is numbered in.
 *
 * An augmenting path never takes back what a class already has, and the sets of seats that can be
 * covered together are the independent sets of a transversal matroid; so the classes are filled one
 * after the other, and putting the urgent ones first never costs a seat in total.
 *
 * @returns residual capacities over the half arcs of the network
 */
export function coverBest({ network, source, sink, classes }: Reduction): Int32Array {
  const residual = zeroFlow(network);
  const workspace = createWorkspace(network);
  const barrier = [source, ...classes.map(({ node }) => node)];
  for (const { node, arc } of classes) {
    push(network, residual, arc, augment(network, residual, node, sink, workspace, barrier));
  }
  return residual;
}

/** Reads who holds which seat off a flow. */
export function readPlan(kase: Case, reduction: Reduction, residual: Int32Array): Plan {
  const { network, firstPairArc, openPair } = reduction;
  return planOf(kase, [...openPair].filter((_, k) => residual[network.position[firstPairArc + k]] === 0));
}
