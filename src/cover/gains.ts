import type { Reduction } from './reduce';
import { reachable } from '../flow/residual';

/**
 * For each person, how many seats more could be covered if this person alone took one more: 0 or 1.
 *
 * One place more raises the capacity of one arc, from the person's root to the sink, by one. The
 * maximum then grows by one exactly where residual arcs lead from the source to that root: such a
 * way and the new place make an augmenting path, and without such a way the cut around all that the
 * source reaches is full as before. So one search from the source answers for everyone. (A root that
 * is reached has no place left in a maximum flow, so it never counts a place that is free anyway.)
 */
export function gains({ network, source, personNode }: Reduction, residual: Int32Array): Uint8Array {
  const reached = reachable(network, residual, [source]);
  return Uint8Array.from(personNode, (node) => reached[node]);
}
