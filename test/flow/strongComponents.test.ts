import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { augment } from '../../src/flow/maximumFlow';
import { buildNetwork, zeroFlow, type Network } from '../../src/flow/network';
import { reachable } from '../../src/flow/residual';
import { strongComponents } from '../../src/flow/strongComponents';
import { arcList, matchingArcs, type Arc } from './helpers';
import matrices from './published/structure.json';

/** The nodes from which residual arcs lead to a node: each node asked by itself. */
function leadTo(network: Network, residual: Int32Array, node: number): Uint8Array {
  return Uint8Array.from({ length: network.nodeCount }, (_, v) => reachable(network, residual, [v])[node]);
}

/**
 * The Dulmage-Mendelsohn decomposition of a matrix: its structural rank, and the number of blocks of
 * the fine decomposition: what unmatched rows reach is one, what reaches unmatched columns is one,
 * and of the square rest every strong component.
 */
function decompose(rows: number, columns: number, pairs: readonly (readonly [number, number])[]) {
  const { nodeCount, list } = matchingArcs(rows, columns, pairs);
  const network = buildNetwork(nodeCount, list);
  const residual = zeroFlow(network);
  const rank = augment(network, residual, 0, 1);
  const fromSource = reachable(network, residual, [0]);
  const toSink = leadTo(network, residual, 1);
  const component = strongComponents(network, residual, [0, 1]);
  const rowNodes = Array.from({ length: rows }, (_, r) => 2 + r);
  const columnNodes = Array.from({ length: columns }, (_, c) => 2 + rows + c);
  const square = new Set(rowNodes.filter((v) => fromSource[v] === 0 && toSink[v] === 0).map((v) => component[v]));
  const tall = rowNodes.some((v) => fromSource[v] === 1) ? 1 : 0;
  const wide = columnNodes.some((v) => toSink[v] === 1) ? 1 : 0;
  return { rank, blocks: square.size + tall + wide };
}

describe('the Dulmage-Mendelsohn decomposition of published matrices', () => {
  it.each(matrices)('$id has the structural rank and the number of blocks given', ({ rows, columns, pairs, rank, blocks }) => {
    expect(decompose(rows, columns, pairs as [number, number][])).toEqual({ rank, blocks });
  });
});

describe('strong components', () => {
  it('hold two nodes together exactly where each reaches the other', () => {
    const graph = fc.integer({ min: 1, max: 8 }).chain((nodes) => {
      const node = fc.integer({ min: 0, max: nodes - 1 });
      return fc.record({ nodes: fc.constant(nodes), arcs: fc.array(fc.tuple(node, node, fc.constantFrom(0, 1)), { maxLength: 20 }) });
    });
    fc.assert(
      fc.property(graph, ({ nodes, arcs }) => {
        const network = buildNetwork(nodes, arcList(arcs));
        const residual = zeroFlow(network);
        const component = strongComponents(network, residual);
        const reach = Array.from({ length: nodes }, (_, v) => reachable(network, residual, [v]));
        for (let v = 0; v < nodes; v++) {
          for (let w = 0; w < nodes; w++) expect(component[v] === component[w]).toBe(reach[v][w] === 1 && reach[w][v] === 1);
        }
      }),
      { numRuns: 2000 },
    );
  });

  it('leave barriers out and go along a ring of 200,000 nodes', () => {
    const length = 200_000;
    const network = buildNetwork(length, arcList(Array.from({ length }, (_, v): Arc => [v, (v + 1) % length, 1])));
    const residual = zeroFlow(network);
    expect(new Set(strongComponents(network, residual)).size).toBe(1);
    const broken = strongComponents(network, residual, [5]);
    expect(broken[5]).toBe(-1);
    expect(new Set(broken).size).toBe(length);
  });
});
