import type { Case } from './case';
import { readPlan } from './coverBest';
import type { Plan } from './plan';
import type { Solution } from './solve';
import { STAY, waysAtNode, waysAtTerminal, type Way, type Ways } from './ways';

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
  /** The half arcs along which one unit of flow moves, that of the pair first. */
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
  readonly #dutyOfNode: ReadonlyMap<number, number>;
  readonly #exit: Ways;
  readonly #entry: Ways;

  constructor(kase: Case, solution: Solution) {
    [this.#kase, this.#solution] = [kase, solution];
    const { network, firstPairArc, openPair, dutyNode } = solution.reduction;
    this.#heavy = new Uint8Array(2 * network.arcCount);
    openPair.forEach((_, k) => {
      const half = network.position[firstPairArc + k];
      this.#heavy[half] = this.#heavy[network.mate[half]] = 1;
    });
    this.#dutyOfNode = new Map(Array.from(dutyNode, (node, d) => [node, d]));
    this.#exit = waysAtTerminal(kase, solution, this.#heavy, true);
    this.#entry = waysAtTerminal(kase, solution, this.#heavy, false);
  }

  /** A trial for every open pair of the duty that is not held, in name order of the people. */
  ofDuty(duty: number): Trial[] {
    const direct = waysAtNode(this.#solution, this.#heavy, this.#solution.reduction.dutyNode[duty], true);
    return this.#trialsWhere((i) => this.#kase.pairs.duty[i] === duty, (_, end) => direct(end));
  }

  /** A trial for every open pair of the person that is not held, in name order of the duties. */
  ofPerson(person: number): Trial[] {
    const waysFrom = new Map<number, Ways>();
    return this.#trialsWhere(
      (i) => this.#kase.pairs.person[i] === person,
      (start, end) => {
        const direct = waysFrom.get(end) ?? waysAtNode(this.#solution, this.#heavy, end, false);
        waysFrom.set(end, direct);
        return direct(start);
      },
    );
  }

  /** The plan that follows from a trial. */
  planWith({ halves }: Trial): Plan {
    const { residual, reduction } = this.#solution;
    const after = residual.slice();
    for (const half of halves) {
      after[half]--;
      after[reduction.network.mate[half]]++;
    }
    return readPlan(this.#kase, reduction, after);
  }

  /**
   * Trials of the pairs that pass a test, are not held and count like any other seat.
   *
   * @param direct the cheapest way from the end of a pair's arc back to its start that avoids the terminal
   */
  #trialsWhere(test: (pair: number) => boolean, direct: (start: number, end: number) => Way | null): Trial[] {
    const { pairs, duties } = this.#kase;
    const { residual, reduction } = this.#solution;
    const { network, arcs, openPair, firstPairArc } = reduction;
    return Array.from(openPair).flatMap((pair, k) => {
      const half = network.position[firstPairArc + k];
      if (residual[half] === 0 || !test(pair) || duties[pairs.duty[pair]].load !== 1) return [];
      const [start, end] = [arcs.tail[firstPairArc + k], arcs.head[firstPairArc + k]];
      return [this.#trial(pair, half, this.#exit(end), this.#entry(start), direct(start, end))];
    });
  }

  #trial(pair: number, half: number, exit: Way | null, entry: Way | null, direct: Way | null): Trial {
    const { plan, reduction } = this.#solution;
    const { arcs, personArc, dutyArc, classes } = reduction;
    const [duty, person] = [this.#kase.pairs.duty[pair], this.#kase.pairs.person[pair]];
    const passesNeed = arcs.capacity[dutyArc[duty]] === 0;
    const passesMaximum = arcs.capacity[personArc[person]] === 0;
    const way = passesNeed || passesMaximum ? null : direct;
    const [to, from] = isBest(way, exit, entry) ? [way!, STAY] : [passesMaximum ? STAY : exit!, passesNeed ? STAY : entry!];
    // A seat outside of the network counts towards the minimum all the same.
    const outside = passesMaximum && plan.heldByPerson[person] < this.#kase.people[person].minimum ? 1 : 0;
    const priority = (c: number): number | null => (to.class === from.class ? null : (classes[c]?.priority ?? null));
    const halves = [half, ...to.halves, ...from.halves];
    return {
      pair,
      ...this.#dutyChanges(halves),
      worse: priority(to.class),
      better: priority(from.class),
      missed: to.missed + from.missed - outside,
      passesNeed,
      passesMaximum,
      halves,
    };
  }

  /** Which duties the half arcs take a seat from, and which they give one: arcs of duties but those of pairs. */
  #dutyChanges(halves: readonly number[]): { loses: number[]; gains: number[] } {
    const { endpoint, mate } = this.#solution.reduction.network;
    const dutiesAt = (end: (half: number) => number): number[] =>
      halves.flatMap((half) => (this.#heavy[half] === 1 ? [] : (this.#dutyOfNode.get(end(half)) ?? [])));
    return { loses: dutiesAt((half) => endpoint[mate[half]]), gains: dutiesAt((half) => endpoint[half]) };
  }
}

/** True where the way that avoids the terminal is no dearer than the two that meet there, which never gain: the plan at hand is best. */
function isBest(direct: Way | null, exit: Way | null, entry: Way | null): boolean {
  if (direct === null || exit === null || entry === null) return direct !== null;
  const missed = exit.missed + entry.missed;
  return exit.class !== entry.class || missed > 0 || (missed === 0 && direct.weight <= exit.weight + entry.weight);
}
