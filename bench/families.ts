import type { ArcList } from '../src/flow/network';

/** Seeded families of matching problems with capacities: easy ones, and those that defeat one algorithm or another. */
export interface Instance {
  readonly family: string;
  readonly pairs: number;
  readonly nodeCount: number;
  readonly arcs: ArcList;
}

interface Sizes {
  readonly needs: readonly number[];
  readonly maximums: readonly number[];
  /** Duty and person of each pair. */
  readonly pairs: readonly (readonly [number, number])[];
}

/** A small generator of pseudo-random numbers in [0, 1): mulberry32, public domain. */
function random(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

function filled(length: number, value: number): number[] {
  return new Array<number>(length).fill(value);
}

/** Each duty may be taken by three to seven people drawn evenly; there is just enough room. */
function even(pairs: number): Sizes {
  const draw = random(pairs);
  const duties = Math.round(pairs / 5);
  const people = Math.round(duties / 3);
  const list: [number, number][] = [];
  for (let d = 0; d < duties; d++) {
    const chosen = new Set<number>();
    for (let i = 3 + Math.floor(draw() * 5); i > 0; i--) chosen.add(Math.floor(draw() * people));
    for (const p of chosen) list.push([d, p]);
  }
  return { needs: filled(duties, 1), maximums: filled(people, 3), pairs: list };
}

/** A few people may take almost everything, most people very little. */
function skewed(pairs: number): Sizes {
  const draw = random(pairs + 1);
  const duties = Math.round(pairs / 5);
  const people = Math.round(duties / 3);
  const list: [number, number][] = [];
  for (let d = 0; d < duties; d++) {
    const chosen = new Set<number>();
    for (let i = 1 + Math.floor(2 * (1 - draw()) ** -0.65); i > 0 && chosen.size < 40; i--) {
      chosen.add(Math.floor(people * draw() ** 2.2));
    }
    for (const p of chosen) list.push([d, p]);
  }
  return { needs: filled(duties, 1), maximums: Array.from({ length: people }, () => 1 + Math.floor(draw() * 8)), pairs: list };
}

/** One chain in which the last duty moves everyone. */
function chain(pairs: number): Sizes {
  const length = Math.round(pairs / 2);
  const list: [number, number][] = [];
  for (let d = 0; d < length; d++) list.push([d, d], [d, d + 1]);
  list.push([length, 0]);
  return { needs: filled(length + 1, 1), maximums: filled(length + 1, 1), pairs: list };
}

/** Chains of every length, so that there is an augmenting path of every length. */
function staircase(pairs: number): Sizes {
  const list: [number, number][] = [];
  let at = 0;
  for (let length = 1; list.length + 2 * length < pairs; length++) {
    for (let i = 0; i < length; i++) list.push([at + i, at + i], [at + i, at + i + 1]);
    list.push([at + length, at]);
    at += length + 1;
  }
  return { needs: filled(at, 1), maximums: filled(at, 1), pairs: list };
}

/** Groups in triangles with a single perfect matching, duties and people shuffled. */
function triangles(pairs: number): Sizes {
  const draw = random(pairs + 2);
  const groups = 10;
  const size = Math.max(2, Math.floor(pairs / 160));
  const list: [number, number][] = [];
  for (let g = 0; g < groups; g++) {
    for (let j = 0; j < size; j++) {
      for (let q = Math.max(0, j - 9); q <= j; q++) {
        list.push([g * size + j, g * size + q]);
        if (g + 1 < groups && draw() < 0.7) list.push([g * size + j, (g + 1) * size + q]);
      }
    }
  }
  const count = groups * size;
  const order = (): number[] => {
    const numbers = Array.from({ length: count }, (_, i) => i);
    for (let i = count - 1; i > 0; i--) {
      const j = Math.floor(draw() * (i + 1));
      [numbers[i], numbers[j]] = [numbers[j], numbers[i]];
    }
    return numbers;
  };
  const dutyName = order();
  const personName = order();
  const renamed = list.map(([d, p]): [number, number] => [dutyName[d], personName[p]]);
  return { needs: filled(count, 1), maximums: filled(count, 1), pairs: renamed.sort((a, b) => a[0] - b[0] || a[1] - b[1]) };
}

const FAMILIES = { even, skewed, chain, staircase, triangles };

/** One instance of every family with about so many pairs. */
export function instances(pairs: number): Instance[] {
  return Object.entries(FAMILIES).map(([family, make]) => toInstance(family, make(pairs)));
}

function toInstance(family: string, { needs, maximums, pairs }: Sizes): Instance {
  const duty = (d: number): number => 2 + d;
  const person = (p: number): number => 2 + needs.length + p;
  const list = [
    ...needs.map((need, d) => [0, duty(d), need] as const),
    ...pairs.map(([d, p]) => [duty(d), person(p), 1] as const),
    ...maximums.map((maximum, p) => [person(p), 1, maximum] as const),
  ];
  const arcs = {
    tail: Int32Array.from(list, (arc) => arc[0]),
    head: Int32Array.from(list, (arc) => arc[1]),
    capacity: Int32Array.from(list, (arc) => arc[2]),
  };
  return { family, pairs: pairs.length, nodeCount: 2 + needs.length + maximums.length, arcs };
}
