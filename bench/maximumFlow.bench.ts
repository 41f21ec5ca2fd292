import { bench, describe } from 'vitest';
import { augment } from '../src/flow/maximumFlow';
import { buildNetwork, zeroFlow } from '../src/flow/network';
import { dinic } from './dinic';
import { instances } from './families';

const PAIRS = 30_000;

for (const { family, pairs, nodeCount, arcs } of instances(PAIRS)) {
  const network = buildNetwork(nodeCount, arcs);
  describe(`maximum flow, ${family}, ${pairs} pairs`, () => {
    bench('depth first with lookahead and fairness', () => {
      augment(network, zeroFlow(network), 0, 1);
    });
    bench('layers (Dinic)', () => {
      dinic(network, zeroFlow(network), 0, 1);
    });
  });
}
