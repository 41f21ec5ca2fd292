import { describe, expect, it } from 'vitest';
import { flowFaults, maximumFlowFaults } from '../../src/flow/certificate';
import { arcList } from './helpers';

/** A path 0 -> 2 -> 1 that carries two units, and an arc beside it that carries nothing. */
const list = arcList([[0, 2, 2], [2, 1, 3], [0, 1, 0]]);
const good = { flow: Int32Array.of(2, 2, 0), side: Uint8Array.of(1, 0, 0) };

describe('the certificate of a maximum flow', () => {
  it('finds no fault in a maximum flow with its cut', () => {
    expect(maximumFlowFaults(3, list, good.flow, 0, 1, good.side)).toEqual([]);
  });

  it.each([
    ['a flow over capacity', [3, 3, 0], [1, 0, 0], 'Arc 0 carries 3; it may carry 0 to 2.'],
    ['a negative flow', [-1, -1, 0], [1, 0, 0], 'Arc 0 carries -1; it may carry 0 to 2.'],
    ['a node that keeps flow', [2, 1, 0], [1, 0, 0], 'Node 2 receives 1 more than it passes on.'],
    ['a flow that could be larger', [1, 1, 0], [1, 0, 0], 'Arc 0 leads out of the cut and carries 1 of 2.'],
    ['a cut in the wrong place', [2, 2, 0], [1, 0, 1], 'Arc 1 leads out of the cut and carries 2 of 3.'],
    ['a cut without the source', [2, 2, 0], [0, 0, 0], 'The source is not on the source side of the cut.'],
    ['a cut with the sink', [2, 2, 0], [1, 1, 1], 'The sink is on the source side of the cut.'],
  ])('finds %s', (_, flow, side, fault) => {
    expect(maximumFlowFaults(3, list, Int32Array.from(flow), 0, 1, Uint8Array.from(side))).toContain(fault);
  });

  it('finds flow that comes back over the cut', () => {
    const back = arcList([[0, 2, 1], [2, 0, 1]]);
    expect(maximumFlowFaults(3, back, Int32Array.of(1, 1), 0, 1, Uint8Array.of(1, 0, 0))).toEqual([
      'Arc 1 leads back over the cut and carries 1.',
    ]);
  });

  it('counts faults beyond the first twenty', () => {
    const many = arcList(Array.from({ length: 25 }, () => [0, 1, 0] as const));
    const faults = flowFaults(2, many, new Int32Array(25).fill(1), 0, 1);
    expect(faults).toHaveLength(21);
    expect(faults[20]).toBe('And 5 faults more.');
  });
});
