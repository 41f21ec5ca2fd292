import type { Case, Seat } from './case';
import { mostOf } from './limits';
import type { OpenPairs } from './openPairs';
import type { Plan } from './plan';

/** A seat of a duty that passes from one person to another; null: nobody. */
export interface Move {
  readonly duty: number;
  readonly from: number | null;
  readonly to: number | null;
}

/**
 * The moves that lead from the plan in force to the best one, chain by chain, the shortest chains
 * first. Moves hang together where a person must give something away before taking another thing.
 * Within a chain they are ordered so that nobody is over a limit at any time, as far as that is
 * possible; where people only exchange duties, one of these is put down first and taken up later.
 */
export function steps(kase: Case, open: OpenPairs, plan: Plan): readonly (readonly Move[])[] {
  const moves = findMoves(kase, plan);
  const chains = linkMoves(kase, open, moves);
  const state = new Holdings(kase, open);
  for (const seat of kase.current ?? []) state.take(seat);
  const place = placeIn(kase.dutyOrder);
  chains.sort((a, b) => a.length - b.length || place[a[0].duty] - place[b[0].duty]);
  return chains.map((chain) => orderChain(chain, state));
}

function placeIn(order: Int32Array): Int32Array {
  const place = new Int32Array(order.length);
  order.forEach((number, i) => (place[number] = i));
  return place;
}

/** For each duty in name order: who gives it up and who takes it, matched by name. */
function findMoves(kase: Case, plan: Plan): Move[] {
  const count = kase.people.length;
  const key = ({ duty, person }: Seat): number => duty * count + person;
  const before = new Set((kase.current ?? []).map(key));
  const after = new Set(plan.seats.map(key));
  const from = new Map<number, number[]>();
  const to = new Map<number, number[]>();
  const add = (map: Map<number, number[]>, { duty, person }: Seat): void => {
    map.set(duty, [...(map.get(duty) ?? []), person]);
  };
  for (const seat of kase.current ?? []) if (!after.has(key(seat))) add(from, seat);
  for (const seat of plan.seats) if (!before.has(key(seat))) add(to, seat);
  const moves: Move[] = [];
  for (const duty of kase.dutyOrder) {
    const givers = from.get(duty) ?? [];
    const takers = to.get(duty) ?? [];
    for (let i = 0; i < Math.max(givers.length, takers.length); i++) {
      moves.push({ duty, from: givers[i] ?? null, to: takers[i] ?? null });
    }
  }
  return moves;
}

/** How many duties people hold, in all and of each limited set. */
class Holdings {
  readonly #kase: Case;
  readonly #open: OpenPairs;
  readonly #held = new Map<string, number>();

  constructor(kase: Case, open: OpenPairs) {
    this.#kase = kase;
    this.#open = open;
  }

  take({ duty, person }: Seat): void {
    for (const limit of this.#limits(duty)) this.#add(limit, person, this.#weight(limit, duty));
  }

  give({ duty, person }: Seat): void {
    for (const limit of this.#limits(duty)) this.#add(limit, person, -this.#weight(limit, duty));
  }

  /** True where taking the duty keeps every limit of the person it falls under. */
  hasRoom({ duty, person }: Seat): boolean {
    return this.#limits(duty).every((limit) => {
      const weight = this.#weight(limit, duty);
      return weight === 0 || this.#count(limit, person) + weight <= this.#most(limit, person);
    });
  }

  /** The limits of a person that would be passed if all these duties were taken before any is given. */
  tight(person: number, taken: readonly number[]): Set<number> {
    const more = new Map<number, number>();
    for (const duty of taken) for (const limit of this.#limits(duty)) more.set(limit, (more.get(limit) ?? 0) + this.#weight(limit, duty));
    return new Set(
      [...more].filter(([limit, count]) => this.#count(limit, person) + count > this.#most(limit, person)).map(([limit]) => limit),
    );
  }

  isUnder(duty: number, limits: ReadonlySet<number>): boolean {
    return this.#limits(duty).some((limit) => limits.has(limit));
  }

  /** The sets a duty is in, and -1 for all duties. */
  #limits(duty: number): number[] {
    return [-1, ...this.#open.setsOf[duty]];
  }

  /** What the duty counts against a limit: its load against the maximum, one against all others. */
  #weight(limit: number, duty: number): number {
    return limit === -1 ? this.#kase.duties[duty].load : 1;
  }

  #most(limit: number, person: number): number {
    return limit === -1 ? this.#kase.people[person].maximum : mostOf(this.#open.sets[limit], person);
  }

  #count(limit: number, person: number): number {
    return this.#held.get(`${limit} ${person}`) ?? 0;
  }

  #add(limit: number, person: number, change: number): void {
    this.#held.set(`${limit} ${person}`, this.#count(limit, person) + change);
  }
}

/** Moves that touch the same tight limit of a person, or duties that go together, belong to one chain. */
function linkMoves(kase: Case, open: OpenPairs, moves: readonly Move[]): Move[][] {
  const state = new Holdings(kase, open);
  for (const seat of kase.current ?? []) state.take(seat);
  const link = moves.map((_, i) => i);
  const find = (i: number): number => {
    while (link[i] !== i) i = link[i];
    return i;
  };
  const byPerson = new Map<number, number[]>();
  moves.forEach(({ from, to }, i) => {
    for (const person of [from, to]) if (person !== null) byPerson.set(person, [...(byPerson.get(person) ?? []), i]);
  });
  for (const [person, own] of byPerson) {
    const tight = state.tight(person, own.filter((i) => moves[i].to === person).map((i) => moves[i].duty));
    const tied = own.filter((i) => state.isUnder(moves[i].duty, tight));
    for (const i of tied) link[Math.max(find(i), find(tied[0]))] = Math.min(find(i), find(tied[0]));
  }
  for (const [one, other] of kase.together) {
    const pair = moves.flatMap(({ duty }, i) => (duty === one || duty === other ? [i] : []));
    for (const i of pair) link[Math.max(find(i), find(pair[0]))] = Math.min(find(i), find(pair[0]));
  }
  const chains = new Map<number, Move[]>();
  moves.forEach((move, i) => {
    const root = find(i);
    chains.set(root, [...(chains.get(root) ?? []), move]);
  });
  return [...chains.values()];
}

/** Carries the moves of a chain out one by one, each when its turn can come. */
function orderChain(chain: readonly Move[], state: Holdings): Move[] {
  const left = [...chain];
  const done: Move[] = [];
  const carryOut = (move: Move): void => {
    if (move.from !== null) state.give({ duty: move.duty, person: move.from });
    if (move.to !== null) state.take({ duty: move.duty, person: move.to });
    done.push(move);
  };
  while (left.length > 0) {
    const next = left.findIndex(({ duty, to }) => to === null || state.hasRoom({ duty, person: to }));
    if (next !== -1) {
      carryOut(left.splice(next, 1)[0]);
      continue;
    }
    const putDown = left.findIndex(({ from }) => from !== null);
    if (putDown === -1) {
      // Fixed seats pass a limit: there is no order that keeps it.
      carryOut(left.shift()!);
    } else {
      const { duty, from, to } = left[putDown];
      carryOut({ duty, from, to: null });
      left[putDown] = { duty, from: null, to };
    }
  }
  return done;
}
