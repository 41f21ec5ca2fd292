import { strongComponents } from '../flow/strongComponents';
import { PairState } from './openPairs';
import type { Solution } from './solve';

/** How plans use a pair: all of them, some, or none. */
export type Use = 'Always' | 'Sometimes' | 'Never';

/**
 * For every pair of the case, how the plans use it that keep Fixed and Barred and cover as well by
 * priority. Such plans differ by residual cycles that leave the seats of each class alone, that is,
 * avoid the source; so a pair is open where its ends are in one strong component, and otherwise
 * as it is in the plan at hand (in the plain case: the decomposition of Dulmage and Mendelsohn).
 * One search answers for all pairs.
 */
export function choices({ reduction, residual }: Solution): Use[] {
  const { network, source, openPair, firstPairArc, open } = reduction;
  const component = strongComponents(network, residual, [source]);
  const use = Array.from(open.state, (state): Use => (state === PairState.Fixed ? 'Always' : 'Never'));
  openPair.forEach((i, k) => {
    const forward = network.position[firstPairArc + k];
    const [tail, head] = [network.endpoint[network.mate[forward]], network.endpoint[forward]];
    if (component[tail] === component[head]) use[i] = 'Sometimes';
    else if (residual[forward] === 0) use[i] = 'Always';
  });
  return use;
}
