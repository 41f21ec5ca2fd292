import { flowOn } from '../flow/network';
import { pathOf, shortestPaths, type Direction, type Paths } from '../flow/paths';
import type { Case } from './case';
import type { Solution } from './solve';

/** What moving one unit of flow along some residual half arcs changes. */
export interface Way {
  /** The class, from 0, that has a seat less; -1: none. */
  readonly worse: number;
  /** The class that has a seat more; -1: none. */
  readonly better: number;
  /** By how many seats more minimums are missed. */
  readonly missed: number;
  /** Seats changed: pairs given up and pairs taken. */
  readonly weight: number;
  /** In the order they are walked. */
  readonly halves: readonly number[];
}

/** A way that changes nothing. */
export const STAY: Way = { worse: -1, better: -1, missed: 0, weight: 0, halves: [] };

/** Half arcs between the terminal and other nodes that come to the same. */
interface Gate {
  readonly outcome: Partial<Way>;
  readonly halves: readonly number[];
}

/** Cheapest ways between every node and the terminal, which is source and sink taken as one. */
export class Gates {
  readonly #solution: Solution;
  readonly #direction: Direction;
  readonly #gates: readonly Gate[];
  /** The half arc between the terminal and the node next to it, by that node; gates of one node: the best. */
  readonly #gateHalf = new Map<number, number>();
  readonly #paths: Paths;

  /** @param gates best first */
  constructor(solution: Solution, heavy: Uint8Array, direction: Direction, gates: readonly Gate[]) {
    [this.#solution, this.#direction, this.#gates] = [solution, direction, gates];
    const { network, source, sink } = solution.reduction;
    const inner = (half: number): number => network.endpoint[direction === 'from roots' ? half : network.mate[half]];
    const groups = gates.map(({ halves }) => halves.map(inner));
    for (const half of gates.flatMap(({ halves }) => halves)) if (!this.#gateHalf.has(inner(half))) this.#gateHalf.set(inner(half), half);
    this.#paths = shortestPaths(network, solution.residual, heavy, groups, direction, [source, sink]);
  }

  /** The cheapest way between a node and the terminal; null: there is none. */
  way(node: number): Way | null {
    const group = this.#paths.group[node];
    if (group === -1) return null;
    const { network } = this.#solution.reduction;
    const path = pathOf(network, this.#paths, node, this.#direction);
    const isExit = this.#direction === 'to roots';
    const end = isExit ? path.at(-1) : path[0];
    const root = end === undefined ? node : network.endpoint[isExit ? end : network.mate[end]];
    const gate = this.#gateHalf.get(root)!;
    const halves = isExit ? [...path, gate] : [gate, ...path];
    return { ...STAY, ...this.#gates[group].outcome, weight: this.#paths.weight[node], halves };
  }
}

/** Ways from every node to the terminal: best to a free place, else at the cost of the least urgent class. */
export function exits(kase: Case, solution: Solution, heavy: Uint8Array): Gates {
  const { plan, residual, reduction } = solution;
  const { network, classes, personArc } = reduction;
  const halves = Array.from(personArc, (arc) => network.position[arc]);
  const free = [...kase.people.keys()].filter((p) => residual[halves[p]] > 0);
  const isBelow = (p: number): boolean => plan.heldByPerson[p] < kase.people[p].minimum;
  const gates: Gate[] = [
    { outcome: { missed: -1 }, halves: free.filter(isBelow).map((p) => halves[p]) },
    { outcome: {}, halves: free.filter((p) => !isBelow(p)).map((p) => halves[p]) },
  ];
  for (let c = classes.length - 1; c >= 0; c--) {
    const { arc } = classes[c];
    if (flowOn(network, residual, arc) > 0) gates.push({ outcome: { worse: c }, halves: [network.mate[network.position[arc]]] });
  }
  return new Gates(solution, heavy, 'to roots', gates);
}

/** Ways from the terminal to every node: best from a short duty of the most urgent class, else from whoever gives a seat up. */
export function entries(kase: Case, solution: Solution, heavy: Uint8Array): Gates {
  const { plan, residual, reduction } = solution;
  const { network, classes, personArc } = reduction;
  const short = [...classes.keys()].filter((c) => residual[network.position[classes[c].arc]] > 0);
  const gates: Gate[] = short.map((c) => ({ outcome: { better: c }, halves: [network.position[classes[c].arc]] }));
  const halves = Array.from(personArc, (arc) => network.mate[network.position[arc]]);
  const busy = [...kase.people.keys()].filter((p) => residual[halves[p]] > 0);
  const isAbove = (p: number): boolean => plan.heldByPerson[p] > kase.people[p].minimum;
  gates.push({ outcome: {}, halves: busy.filter(isAbove).map((p) => halves[p]) });
  gates.push({ outcome: { missed: 1 }, halves: busy.filter((p) => !isAbove(p)).map((p) => halves[p]) });
  return new Gates(solution, heavy, 'from roots', gates);
}
