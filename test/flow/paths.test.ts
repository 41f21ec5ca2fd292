import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildNetwork, zeroFlow } from '../../src/flow/network';
import { augment } from '../../src/flow/maximumFlow';
import { pathOf, shortestPaths } from '../../src/flow/paths';
import { arcList } from './helpers';

const NODES = 8;
const node = fc.integer({ min: 0, max: NODES - 1 });
const drawn = fc.record({
  arcs: fc.array(fc.tuple(node, node, fc.integer({ min: 0, max: 2 })), { minLength: 4, maxLength: 24 }),
  heavy: fc.array(fc.constantFrom(0, 1), { minLength: 48, maxLength: 48 }),
  /** The group of each half arc at the barrier; 3: none. */
  groupOf: fc.array(fc.integer({ min: 0, max: 3 }), { minLength: 48, maxLength: 48 }),
  barrier: fc.uniqueArray(node, { minLength: 1, maxLength: 2 }),
  isBack: fc.boolean(),
});

describe('shortest residual paths', () => {
  it('reach each node from the first group that can, by the least weight, as repeated relaxation finds', () => {
    let reached = 0;
    fc.assert(
      fc.property(drawn, ({ arcs, heavy, groupOf, barrier, isBack }) => {
        const network = buildNetwork(NODES, arcList(arcs.filter(([tail, head]) => tail !== head)));
        const residual = zeroFlow(network);
        augment(network, residual, 0, NODES - 1);
        const weights = Uint8Array.from(heavy.slice(0, residual.length));
        /** The ends of a half arc, that nearer to the barrier first. */
        const ends = (half: number): [number, number] => {
          const [tail, head] = [network.endpoint[network.mate[half]], network.endpoint[half]];
          return isBack ? [head, tail] : [tail, head];
        };
        const all = Array.from(residual.keys());
        const groups = [0, 1, 2].map((group) => all.filter((half) => groupOf[half] === group && barrier.includes(ends(half)[0])));
        const paths = shortestPaths(network, residual, weights, groups, barrier, isBack);

        const best = Array.from({ length: NODES }, () => ({ group: -1, weight: 0 }));
        groups.forEach((first, group) => {
          const weight = new Array<number>(NODES).fill(Infinity);
          for (let round = 0; round <= NODES; round++) {
            for (const half of all) {
              const [near, far] = ends(half);
              const before = first.includes(half) ? 0 : barrier.includes(near) ? Infinity : weight[near];
              if (residual[half] > 0 && !barrier.includes(far)) weight[far] = Math.min(weight[far], before + weights[half]);
            }
          }
          weight.forEach((value, v) => {
            if (best[v].group === -1 && value < Infinity) best[v] = { group, weight: value };
          });
        });

        best.forEach(({ group, weight }, v) => {
          expect(paths.group[v]).toBe(group);
          if (group === -1) return;
          reached++;
          expect(paths.weight[v]).toBe(weight);
          const halves = pathOf(network, paths, v, isBack);
          expect(halves.reduce((sum, half) => sum + weights[half], 0)).toBe(weight);
          expect(halves.every((half) => residual[half] > 0)).toBe(true);
          // From the node towards the barrier, the half arcs follow each other and end with one of the group.
          const walk = isBack ? halves : [...halves].reverse();
          expect(ends(walk[0])[1]).toBe(v);
          walk.slice(1).forEach((half, i) => expect(ends(half)[1]).toBe(ends(walk[i])[0]));
          expect(groups[group]).toContain(walk.at(-1));
        });
      }),
      { numRuns: 4000 },
    );
    expect(reached).toBeGreaterThan(4000);
  });
});
