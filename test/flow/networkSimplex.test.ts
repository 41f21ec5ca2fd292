import fc from 'fast-check';
import loadHighs from 'highs';
import { describe, expect, it } from 'vitest';
import { flowFaults, leastCostFaults } from '../../src/flow/certificate';
import type { ArcList } from '../../src/flow/network';
import { NetworkSimplex } from '../../src/flow/networkSimplex';
import { arcList, type Arc } from './helpers';
import assignments from './published/assignment.json';
import leastCosts from './published/leastCost.json';

/** An arc as [tail, head, least, most, cost]; most null for none. */
type BoundedArc = readonly [string | number, string | number, number, number | null, number];

/** More than any flow of these examples. */
const MANY = 1000;

/**
 * Solves supplies and bounds as a circulation from the empty flow: least amounts are sent beforehand,
 * a source and a sink stand for what is then left over or missing, and an arc back from sink to
 * source earns more than any way through can cost.
 *
 * @returns the least cost, or null where the supplies cannot be met
 */
function solveSupplies(arcs: readonly BoundedArc[], supply: Readonly<Record<string, number>>): number | null {
  const names = [...new Set([...arcs.flatMap(([u, v]) => [String(u), String(v)]), ...Object.keys(supply)])];
  const balance = names.map((name) => supply[name] ?? 0);
  const at = (name: string | number): number => names.indexOf(String(name));
  let fixedCost = 0;
  const list: Arc[] = arcs.map(([u, v, least, most, cost]) => {
    balance[at(u)] -= least;
    balance[at(v)] += least;
    fixedCost += least * cost;
    return [at(u), at(v), (most ?? MANY) - least];
  });
  const costs = arcs.map(([, , , , cost]) => cost);
  const [source, sink] = [names.length, names.length + 1];
  let wanted = 0;
  balance.forEach((amount, v) => {
    if (amount > 0) list.push([source, v, amount]);
    if (amount < 0) list.push([v, sink, -amount]);
    if (amount !== 0) costs.push(0);
    wanted += Math.max(0, amount);
  });
  list.push([sink, source, wanted]);
  costs.push(-1_000_000);
  const simplex = solve(names.length + 2, arcList(list), Float64Array.from(costs));
  if (simplex.flow.at(-1) !== wanted) return null;
  return fixedCost + arcs.reduce((sum, [, , , , cost], a) => sum + cost * simplex.flow[a], 0);
}

/** Solves a circulation from the empty flow and has the result proven. */
function solve(nodeCount: number, list: ArcList, cost: Float64Array): NetworkSimplex {
  const simplex = new NetworkSimplex(nodeCount, list, new Int32Array(list.tail.length));
  simplex.minimise(cost);
  expect(flowFaults(nodeCount, list, simplex.flow, -1, -1)).toEqual([]);
  expect(leastCostFaults(list, simplex.flow, cost, simplex.potential, () => true)).toEqual([]);
  return simplex;
}

describe('least cost on published examples', () => {
  it.each(leastCosts)('$id has the printed cost', ({ arcs, supply, cost }) => {
    const answer = solveSupplies(arcs as unknown as BoundedArc[], supply);
    expect(answer ?? 'infeasible').toBe(cost);
  });

  it.each(assignments)('$id has the printed cost', ({ costs, cost }) => {
    const rows = costs.map((_, i) => `row ${i}`);
    const columns = costs[0].map((_, j) => `column ${j}`);
    const fewer = Math.min(rows.length, columns.length);
    const arcs: BoundedArc[] = [
      ...rows.map((row): BoundedArc => ['start', row, 0, 1, 0]),
      ...costs.flatMap((line, i) => line.map((entry, j): BoundedArc => [rows[i], columns[j], 0, 1, entry])),
      ...columns.map((column): BoundedArc => [column, 'end', 0, 1, 0]),
    ];
    expect(solveSupplies(arcs, { start: fewer, end: -fewer })).toBe(cost);
  });
});

const circulation = fc.integer({ min: 1, max: 8 }).chain((nodes) => {
  const node = fc.integer({ min: 0, max: nodes - 1 });
  const arc = fc.record({ arc: fc.tuple(node, node, fc.integer({ min: 0, max: 4 })), costs: fc.tuple(cost(), cost(), cost()) });
  return fc.record({ nodes: fc.constant(nodes), arcs: fc.array(arc, { minLength: 1, maxLength: 24 }) });
});

function cost() {
  return fc.oneof(fc.integer({ min: -3, max: 3 }), fc.integer({ min: -(2 ** 30), max: 2 ** 30 }));
}

const highs = await loadHighs();

/** The least of the last cost among the circulations that are least in each of the earlier ones, by HiGHS. */
function oracle(nodes: number, arcs: readonly Arc[], costs: readonly (readonly number[])[]): number[] {
  const rows: string[] = [];
  const sum = (terms: readonly number[]): string => terms.map((c, a) => `${c < 0 ? '-' : '+'} ${Math.abs(c)} x${a}`).join(' ');
  for (let v = 0; v < nodes; v++) {
    rows.push(`${sum(arcs.map(([tail, head]) => Number(head === v) - Number(tail === v)))} = 0`);
  }
  const bounds = arcs.map(([, , most], a) => ` 0 <= x${a} <= ${most}`);
  return costs.map((aim) => {
    const text = ['Minimize', ` obj: ${sum(aim)}`, 'Subject To', ...rows.map((row, i) => ` r${i}: ${row}`), 'Bounds', ...bounds, 'General',
      ` ${arcs.map((_, a) => `x${a}`).join(' ')}`, 'End'].join('\n');
    const result = highs.solve(text);
    if (result.Status !== 'Optimal') throw new Error(`HiGHS answers ${result.Status}`);
    const value = Math.round(result.ObjectiveValue);
    rows.push(`${sum(aim)} = ${value}`);
    return value;
  });
}

describe('least cost on random circulations', () => {
  it('is proven by its potentials, whatever the size and sign of the costs', () => {
    fc.assert(
      fc.property(circulation, ({ nodes, arcs }) => {
        solve(nodes, arcList(arcs.map(({ arc }) => arc)), Float64Array.from(arcs, ({ costs }) => costs[0]));
      }),
      { numRuns: 4000 },
    );
  });

  it('keeps each aim while it goes on to the next, as HiGHS does', () => {
    const small = fc.integer({ min: -3, max: 3 });
    const tame = circulation.chain(({ nodes, arcs }) =>
      fc.record({
        nodes: fc.constant(nodes),
        arcs: fc.tuple(...arcs.map(({ arc }) => fc.record({ arc: fc.constant(arc), costs: fc.tuple(small, small, small) }))),
      }),
    );
    fc.assert(
      fc.property(tame, ({ nodes, arcs }) => {
        const list = arcList(arcs.map(({ arc }) => arc));
        const aims = [0, 1, 2].map((i) => Float64Array.from(arcs, ({ costs }) => costs[i]));
        const simplex = new NetworkSimplex(nodes, list, new Int32Array(arcs.length));
        for (const aim of aims) {
          simplex.minimise(aim);
          simplex.narrow();
        }
        const values = aims.map((aim) => aim.reduce((sum, c, a) => sum + c * simplex.flow[a], 0));
        expect(values).toEqual(oracle(nodes, arcs.map(({ arc }) => arc), aims.map((aim) => [...aim])));
      }),
      { numRuns: 700 },
    );
  });

  it('makes no pivot where the flow is already one of least cost', () => {
    fc.assert(
      fc.property(circulation, ({ nodes, arcs }) => {
        const costs = Float64Array.from(arcs, ({ costs: [first] }) => first);
        const simplex = solve(nodes, arcList(arcs.map(({ arc }) => arc)), costs);
        expect(simplex.minimise(costs)).toBe(0);
      }),
    );
  });
});

describe('the certificate of least cost', () => {
  const list = arcList([[0, 1, 2], [1, 0, 2]]);
  const cost = Float64Array.of(1, -3);

  it.each([
    ['an arc that carries too little', [0, 0], [0, 0], 'Arc 1 saves 3 a unit and carries only 0 of 2.'],
    ['an arc that carries too much', [2, 2], [0, 0], 'Arc 0 costs 1 a unit too much and carries 2.'],
  ])('finds %s', (_, flow, potential, fault) => {
    expect(leastCostFaults(list, Int32Array.from(flow), cost, Float64Array.from(potential), () => true)).toContain(fault);
  });

  it('is silent about arcs that are fixed', () => {
    expect(leastCostFaults(list, Int32Array.of(0, 0), cost, Float64Array.of(0, 0), () => false)).toEqual([]);
  });
});

describe('the network simplex method', () => {
  it('refuses a start with a cycle of arcs between their bounds', () => {
    const list = arcList([[0, 1, 2], [1, 0, 2]]);
    expect(() => new NetworkSimplex(2, list, Int32Array.of(1, 1))).toThrow('form a cycle through arc 1');
  });

  it('goes along a chain of 20,000 nodes without running out of stack', () => {
    const length = 20_000;
    const arcs: Arc[] = Array.from({ length }, (_, i): Arc => [i, (i + 1) % length, 1]);
    const simplex = new NetworkSimplex(length, arcList(arcs), new Int32Array(length));
    simplex.minimise(Float64Array.from(arcs, (_, a) => (a === 0 ? -length : 1)));
    expect(simplex.flow.every((amount) => amount === 1)).toBe(true);
  });
});
