import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildNetwork, zeroFlow } from '../../src/flow/network';
import { augment } from '../../src/flow/maximumFlow';
import { pathOf, shortestPaths, type Direction } from '../../src/flow/paths';
import { arcList } from './helpers';

const NODES = 8;
const node = fc.integer({ min: 0, max: NODES - 1 });
const drawn = fc.record({
  arcs: fc.array(fc.tuple(node, node, fc.integer({ min: 0, max: 2 })), { minLength: 4, maxLength: 24 }),
  heavy: fc.array(fc.constantFrom(0, 1), { minLength: 48, maxLength: 48 }),
  groups: fc.array(fc.uniqueArray(node, { maxLength: 3 }), { minLength: 1, maxLength: 3 }),
  barrier: fc.uniqueArray(node, { maxLength: 2 }),
  direction: fc.constantFrom<Direction>('from roots', 'to roots'),
});

describe('shortest residual paths', () => {
  it('reach each node from the first group that can, by the least weight, as repeated relaxation finds', () => {
    fc.assert(
      fc.property(drawn, ({ arcs, heavy, groups, barrier, direction }) => {
        const network = buildNetwork(NODES, arcList(arcs.filter(([tail, head]) => tail !== head)));
        const residual = zeroFlow(network);
        augment(network, residual, 0, NODES - 1);
        const weights = Uint8Array.from(heavy.slice(0, residual.length));
        const paths = shortestPaths(network, residual, weights, groups, direction, barrier);

        const best = Array.from({ length: NODES }, () => ({ group: -1, weight: Infinity }));
        groups.forEach((roots, group) => {
          const weight = Array.from({ length: NODES }, (_, v) => (roots.includes(v) && !barrier.includes(v) ? 0 : Infinity));
          for (let round = 0; round < NODES; round++) {
            for (let half = 0; half < residual.length; half++) {
              const [tail, head] = [network.endpoint[network.mate[half]], network.endpoint[half]];
              if (residual[half] === 0 || barrier.includes(tail) || barrier.includes(head)) continue;
              const [near, far] = direction === 'from roots' ? [tail, head] : [head, tail];
              weight[far] = Math.min(weight[far], weight[near] + weights[half]);
            }
          }
          weight.forEach((value, v) => {
            if (best[v].group === -1 && value < Infinity) best[v] = { group, weight: value };
          });
        });

        best.forEach(({ group, weight }, v) => {
          expect(paths.group[v]).toBe(group);
          if (group === -1) return;
          expect(paths.weight[v]).toBe(weight);
          const halves = pathOf(network, paths, v, direction);
          expect(halves.reduce((sum, half) => sum + weights[half], 0)).toBe(weight);
          expect(halves.every((half) => residual[half] > 0)).toBe(true);
          // The half arcs follow each other, and lead between the node and a root of its group.
          const ends = halves.map((half) => [network.endpoint[network.mate[half]], network.endpoint[half]]);
          ends.slice(1).forEach(([tail], i) => expect(tail).toBe(ends[i][1]));
          const [start, end] = halves.length === 0 ? [v, v] : [ends[0][0], ends.at(-1)![1]];
          expect(direction === 'from roots' ? end : start).toBe(v);
          expect(groups[group]).toContain(direction === 'from roots' ? start : end);
        });
      }),
      { numRuns: 3000 },
    );
  });
});
