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

  /** A way is missing only where Fixed seats leave nothing of the maximum or of the need, or where none avoids the terminal. */
  #trial(pair: number, half: number, exit: Way | null, entry: Way | null, direct: Way | null): Trial {
    const { plan, reduction } = this.#solution;
    const { arcs, personArc, dutyArc, classes } = reduction;
    const [duty, person] = [this.#kase.pairs.duty[pair], this.#kase.pairs.person[pair]];
    const passesNeed = arcs.capacity[dutyArc[duty]] === 0;
    const passesMaximum = arcs.capacity[personArc[person]] === 0;
    // A seat outside of the network counts towards the minimum all the same.
    const outside = { ...STAY, missed: plan.heldByPerson[person] < this.#kase.people[person].minimum ? -1 : 0 };
    const through = [passesMaximum ? outside : exit!, passesNeed ? STAY : entry!];
    const [to, from] = passesNeed || passesMaximum || direct === null ? through : cheaper(direct, through);
    const priority = (c: number): number | null => (to.class === from.class || c === -1 ? null : classes[c].priority);
    const halves = [half, ...to.halves, ...from.halves];
    return {
      pair,
      loses: this.#dutiesAt(halves.map((one) => reduction.network.mate[one])),
      gains: this.#dutiesAt(halves),
      worse: priority(to.class),
      better: priority(from.class),
      missed: to.missed + from.missed,
      passesNeed,
      passesMaximum,
      halves,
    };
  }

  /** The duties that half arcs lead to, those of pairs left out: these carry seats to people. */
  #dutiesAt(halves: readonly number[]): number[] {
    const { endpoint } = this.#solution.reduction.network;
    return halves.flatMap((half) => (this.#heavy[half] === 1 ? [] : (this.#dutyOfNode.get(endpoint[half]) ?? [])));
  }
}

/** The way that avoids the terminal, or two that meet there if they change less. These never gain: the plan at hand is best. */
function cheaper(direct: Way, [exit, entry]: readonly Way[]): readonly Way[] {
  const isDearer = exit.class !== entry.class || exit.missed + entry.missed > 0;
  return isDearer || direct.weight <= exit.weight + entry.weight ? [direct, STAY] : [exit, entry];
}
