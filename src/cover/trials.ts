import { pathOf, shortestPaths, type Direction } from '../flow/paths';
import type { Case } from './case';
import { entries, exits, STAY, type Gates, type Way } from './gates';
import { planOf, type Plan } from './plan';
import type { Solution } from './solve';

/**
 * What follows where a person is made to hold a pair that is open and that the plan at hand does not
 * hold: the best plan that holds it, judged by cover of the most urgent priority, of the next and so
 * on, then by minimums, then by how many seats of the plan at hand it keeps.
 */
export interface Trial {
  /** The number of the pair. */
  readonly pair: number;
  /** Duties with fewer seats covered than in the plan at hand, each once a seat. */
  readonly loses: readonly number[];
  /** Duties with more seats covered, likewise. */
  readonly gains: readonly number[];
  /** The priority that has a seat less in all; null: none. */
  readonly worse: number | null;
  /** The priority that has a seat more in all; null: none. */
  readonly better: number | null;
  /** By how many seats more minimums are missed; negative where fewer are. */
  readonly missed: number;
  /** True where Fixed seats fill the need of the duty, so that it would have more than it needs. */
  readonly passesNeed: boolean;
  /** True where Fixed seats leave no place of the person's maximum. */
  readonly passesMaximum: boolean;
  /** The half arcs along which one unit of flow moves. */
  readonly halves: readonly number[];
}

/**
 * Works out trials from the residual network of the plan at hand, never solving again.
 *
 * A plan that holds the pair of the arc u -> w differs from the plan at hand by residual cycles, one
 * of which leads through that arc. Every other cycle costs nothing or more, because the plan at hand
 * is best; so a cheapest residual path from w back to u makes a best such plan (compare Ahuja,
 * Magnanti and Orlin, Network Flows, 1993, section 9.3). Source and sink are taken as one node, the
 * terminal. Whatever is not a change of seats costs on arcs of the terminal alone: a seat more or less
 * of a class, a minimum reached or missed. So a cheapest path either avoids the terminal, or is a
 * cheapest way from w to it followed by a cheapest way from it to u. The latter two are worked out
 * once for all nodes, the former once a duty or a person.
 *
 * Where Fixed seats leave no place of the maximum, or no seat of the need, the new seat stands outside
 * of the network at that end, and the path begins or ends at the terminal.
 */
export class Trials {
  readonly #kase: Case;
  readonly #solution: Solution;
  /** 1 for the half arcs of pairs: each of them changes a seat. */
  readonly #heavy: Uint8Array;
  /** The duty of a node, or -1. */
  readonly #dutyOfNode: Int32Array;
  readonly #exits: Gates;
  readonly #entries: Gates;

  constructor(kase: Case, solution: Solution) {
    [this.#kase, this.#solution] = [kase, solution];
    const { network, firstPairArc, openPair, dutyNode } = solution.reduction;
    this.#heavy = new Uint8Array(2 * network.arcCount);
    openPair.forEach((_, k) => {
      const half = network.position[firstPairArc + k];
      this.#heavy[half] = this.#heavy[network.mate[half]] = 1;
    });
    this.#dutyOfNode = new Int32Array(network.nodeCount).fill(-1);
    dutyNode.forEach((node, d) => (this.#dutyOfNode[node] = d));
    this.#exits = exits(kase, solution, this.#heavy);
    this.#entries = entries(kase, solution, this.#heavy);
  }

  /** A trial for every open pair of the duty that is not held, in name order of the people. */
  ofDuty(duty: number): Trial[] {
    const root = this.#solution.reduction.dutyNode[duty];
    const direct = this.#waysWithin(root, 'to roots');
    return this.#pairsWhere((i) => this.#kase.pairs.duty[i] === duty).map((k) => this.#trial(k, direct(this.#endsOf(k).to)));
  }

  /** A trial for every open pair of the person that is not held, in name order of the duties. */
  ofPerson(person: number): Trial[] {
    const waysFrom = new Map<number, (node: number) => Way | null>();
    return this.#pairsWhere((i) => this.#kase.pairs.person[i] === person).map((k) => {
      const { from, to } = this.#endsOf(k);
      const direct = waysFrom.get(to) ?? this.#waysWithin(to, 'from roots');
      waysFrom.set(to, direct);
      return this.#trial(k, direct(from));
    });
  }

  /** The plan that follows from a trial. */
  planWith({ pair, halves }: Trial): Plan {
    const { residual, reduction } = this.#solution;
    const { network, openPair, firstPairArc } = reduction;
    const after = residual.slice();
    for (const half of halves) {
      after[half]--;
      after[network.mate[half]]++;
    }
    const held = [...openPair].filter((_, k) => after[network.position[firstPairArc + k]] === 0);
    return planOf(this.#kase, [...held, pair]);
  }

  /** The pairs, as places in `openPair`, that pass a test, are not held and count like any other seat. */
  #pairsWhere(test: (pair: number) => boolean): number[] {
    const { residual, reduction } = this.#solution;
    const { network, openPair, firstPairArc } = reduction;
    const counts = (i: number): boolean => this.#kase.duties[this.#kase.pairs.duty[i]].load === 1;
    const isHeld = (k: number): boolean => residual[network.position[firstPairArc + k]] === 0;
    return [...openPair.keys()].filter((k) => !isHeld(k) && test(openPair[k]) && counts(openPair[k]));
  }

  #endsOf(k: number): { from: number; to: number } {
    const { arcs, firstPairArc } = this.#solution.reduction;
    return { from: arcs.tail[firstPairArc + k], to: arcs.head[firstPairArc + k] };
  }

  /** Cheapest ways between one node and all others that avoid the terminal. */
  #waysWithin(root: number, direction: Direction): (node: number) => Way | null {
    const { residual, reduction } = this.#solution;
    const { network, source, sink } = reduction;
    const paths = shortestPaths(network, residual, this.#heavy, [[root]], direction, [source, sink]);
    return (node) => {
      if (paths.group[node] === -1) return null;
      return { ...STAY, weight: paths.weight[node], halves: pathOf(network, paths, node, direction) };
    };
  }

  /** @param direct the cheapest way from the person back to the duty that avoids the terminal */
  #trial(k: number, direct: Way | null): Trial {
    const { plan, reduction } = this.#solution;
    const { arcs, openPair, personArc, dutyArc, classes } = reduction;
    const pair = openPair[k];
    const [duty, person] = [this.#kase.pairs.duty[pair], this.#kase.pairs.person[pair]];
    const passesNeed = arcs.capacity[dutyArc[duty]] === 0;
    const passesMaximum = arcs.capacity[personArc[person]] === 0;
    const { from, to } = this.#endsOf(k);
    const exit = passesMaximum ? STAY : this.#exits.way(to);
    const entry = passesNeed ? STAY : this.#entries.way(from);
    const { worse, better, missed, halves } = best(passesNeed || passesMaximum ? null : direct, exit, entry);
    // A seat outside of the network counts towards the minimum all the same.
    const outside = passesMaximum && plan.heldByPerson[person] < this.#kase.people[person].minimum ? 1 : 0;
    const priority = (c: number): number | null => (c === -1 || worse === better ? null : classes[c].priority);
    const changes = this.#dutyChanges(halves);
    const passes = { passesNeed, passesMaximum };
    return { pair, ...changes, worse: priority(worse), better: priority(better), missed: missed - outside, ...passes, halves };
  }

  /** Which duties the half arcs take a seat from, and which they give one. */
  #dutyChanges(halves: readonly number[]): { loses: number[]; gains: number[] } {
    const { endpoint, mate } = this.#solution.reduction.network;
    const [loses, gains]: number[][] = [[], []];
    for (const half of halves) {
      if (this.#heavy[half] === 1) continue;
      const [tail, head] = [this.#dutyOfNode[endpoint[mate[half]]], this.#dutyOfNode[endpoint[half]]];
      if (tail !== -1) loses.push(tail);
      if (head !== -1) gains.push(head);
    }
    return { loses, gains };
  }
}

/** The cheaper of a way that avoids the terminal and one through it. */
function best(direct: Way | null, exit: Way | null, entry: Way | null): Way {
  if (exit === null || entry === null) return direct!;
  const through: Way = {
    worse: exit.worse,
    better: entry.better,
    missed: exit.missed + entry.missed,
    weight: exit.weight + entry.weight,
    halves: [...exit.halves, ...entry.halves],
  };
  if (direct === null) return through;
  // A direct way costs nothing. One through the terminal never gains: the plan at hand is best.
  if (through.worse !== through.better) return direct;
  return through.missed < 0 || (through.missed === 0 && through.weight < direct.weight) ? through : direct;
}
