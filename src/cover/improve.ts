import { leastCostFaults } from '../flow/certificate';
import { NetworkSimplex } from '../flow/networkSimplex';
import { aimCosts } from './aims';
import type { Case } from './case';
import type { Reduction } from './reduce';
import { makeTally, writeBack } from './tally';

/**
 * Improves a flow that covers best, aim after aim, never losing what an earlier aim has: each aim is
 * a flow of least cost, and before the next one every arc that the least cost does not leave open is
 * fixed. The seats of each priority class are fixed first of all, so that no aim costs cover; that
 * minimums never do is a theorem where limits are nested (Mendelsohn and Dulmage, Canadian Journal of
 * Mathematics 10, 1958: some best cover also uses every set of people that can be used at once).
 *
 * @param residual changed in place
 * @returns faults in the proofs of the aims; empty: each is proven best
 */
export function improve(kase: Case, reduction: Reduction, residual: Int32Array): string[] {
  const { network, classes, personArc } = reduction;
  const tally = makeTally(kase, reduction, residual);
  const fixed = [...classes.map(({ arc }) => arc), ...personArc];
  const simplex = new NetworkSimplex(network.nodeCount, tally.arcs, tally.flow, fixed);
  const faults: string[] = [];
  for (const { aim, cost } of aimCosts(kase, reduction, tally)) {
    simplex.minimise(cost);
    const found = leastCostFaults(tally.arcs, tally.flow, cost, simplex.potential, (a) => simplex.isOpen(a));
    faults.push(...found.map((fault) => `Aim ${aim}: ${fault}`));
    simplex.narrow();
  }
  writeBack(tally, reduction, residual);
  return faults;
}
