import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildNetwork, zeroFlow } from '../../src/flow/network';
import { augment, createWorkspace } from '../../src/flow/maximumFlow';
import { arcList, matchingArcs, solveMaximum, type Arc } from './helpers';
import matchings from './published/matching.json';
import maximumFlows from './published/maximumFlow.json';

describe('maximum flow on published examples', () => {
  it.each(maximumFlows)('$id has the printed value and a full cut', (example) => {
    const names = [...new Set(example.arcs.flatMap(([u, v]) => [String(u), String(v)]))];
    const node = (name: string | number): number => names.indexOf(String(name));
    const arcs = example.arcs.map(([u, v, capacity]): Arc => [node(u), node(v), Number(capacity)]);
    const source = node(example.source_node);
    const { value, faults } = solveMaximum(names.length, arcList(arcs), source, node(example.sink_node));
    expect(value).toBe(example.maximum);
    expect(faults).toEqual([]);
  });

  it.each(matchings)('$id has a matching of the size given', (example) => {
    const left = example.left.map(String);
    const right = example.right.map(String);
    const pairs = example.pairs.map(([l, r]) => [left.indexOf(String(l)), right.indexOf(String(r))] as const);
    const { nodeCount, list } = matchingArcs(left.length, right.length, pairs);
    const { value, faults } = solveMaximum(nodeCount, list, 0, 1);
    expect(faults).toEqual([]);
    if (example.matching === null) expect(value).toBeLessThan(Math.min(left.length, right.length));
    else expect(value).toBe(example.matching);
  });
});

const network = fc.integer({ min: 2, max: 9 }).chain((nodes) => {
  const node = fc.integer({ min: 0, max: nodes - 1 });
  const arc = fc.tuple(node, node, fc.integer({ min: 0, max: 5 }));
  return fc.record({ nodes: fc.constant(nodes), arcs: fc.array(arc, { maxLength: 30 }) });
});

describe('maximum flow on random networks', () => {
  it('is proven by its cut, loops, parallel arcs and empty arcs included', () => {
    fc.assert(
      fc.property(network, ({ nodes, arcs }) => {
        expect(solveMaximum(nodes, arcList(arcs), 0, 1).faults).toEqual([]);
      }),
      { numRuns: 3000 },
    );
  });

  it('has the value of the smallest of all cuts', () => {
    fc.assert(
      fc.property(network, ({ nodes, arcs }) => {
        let smallest = Infinity;
        for (let mask = 0; mask < 1 << nodes; mask++) {
          const inside = (v: number): boolean => ((mask >> v) & 1) === 1;
          if (!inside(0) || inside(1)) continue;
          const cut = arcs.filter(([u, v]) => inside(u) && !inside(v)).reduce((sum, arc) => sum + arc[2], 0);
          smallest = Math.min(smallest, cut);
        }
        expect(solveMaximum(nodes, arcList(arcs), 0, 1).value).toBe(smallest);
      }),
      { numRuns: 500 },
    );
  });

  it('is the same flow each time', () => {
    fc.assert(
      fc.property(network, ({ nodes, arcs }) => {
        const list = arcList(arcs);
        expect(solveMaximum(nodes, list, 0, 1).flow).toEqual(solveMaximum(nodes, list, 0, 1).flow);
      }),
    );
  });

  it('never enters a barrier', () => {
    const list = arcList([[0, 2, 1], [2, 1, 1], [0, 3, 1], [3, 1, 1]]);
    const net = buildNetwork(4, list);
    expect(augment(net, zeroFlow(net), 0, 1, createWorkspace(net), [2])).toBe(1);
  });
});

describe('maximum flow on the shapes that defeat simpler searches', () => {
  it('solves a chain of 1,000,000 pairs that must be reassigned from end to end', () => {
    const length = 500_000;
    const pairs: (readonly [number, number])[] = [];
    for (let d = 0; d < length; d++) pairs.push([d, d], [d, d + 1]);
    pairs.push([length, 0]);
    const { nodeCount, list } = matchingArcs(length + 1, length + 1, pairs);
    const { value, faults } = solveMaximum(nodeCount, list, 0, 1);
    expect(value).toBe(length + 1);
    expect(faults).toEqual([]);
  });

  it('needs few phases where every length of augmenting path occurs', () => {
    const pairs: [number, number][] = [];
    let duties = 0;
    let people = 0;
    for (let length = 1; length <= 140; length++) {
      for (let i = 0; i < length; i++) pairs.push([duties + i, people + i], [duties + i, people + i + 1]);
      pairs.push([duties + length, people]);
      duties += length + 1;
      people += length + 1;
    }
    const { nodeCount, list } = matchingArcs(duties, people, pairs);
    const net = buildNetwork(nodeCount, list);
    const workspace = createWorkspace(net);
    expect(augment(net, zeroFlow(net), 0, 1, workspace)).toBe(duties);
    expect(workspace.phase).toBeLessThan(10);
  });

  it('refuses arcs it cannot mean', () => {
    expect(() => buildNetwork(2, arcList([[0, 2, 1]]))).toThrow('Arc 0 leads from 0 to 2; nodes are 0 to 1.');
    expect(() => buildNetwork(2, arcList([[0, 1, -1]]))).toThrow('Arc 0 has capacity -1; it must be 0 or more.');
  });
});
