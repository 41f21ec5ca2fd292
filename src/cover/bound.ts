import { reachable } from '../flow/residual';
import type { Case } from './case';
import { mostOf } from './limits';
import { PairState } from './openPairs';
import type { Solution } from './solve';

/** Something no plan can pass: at most so many seats are counted under it. */
export interface Bound {
  readonly kind: 'need' | 'maximum' | 'limit' | 'pair' | 'fixed';
  readonly duty: number | null;
  readonly person: number | null;
  /** The slot or group of a limit; '' for others. */
  readonly label: string;
  /** What the tables allow. */
  readonly allowed: number;
  /** What is left of that beside Fixed seats. */
  readonly most: number;
}

/** The bound that a pair of a duty without a bound of its own falls under; null: the pair holds in no plan. */
export interface Charge {
  readonly duty: number;
  readonly person: number;
  readonly bound: Bound | null;
  readonly state: number;
}

/**
 * The least cut as bounds that add up to the seats covered: a proof that no plan covers more, for
 * whoever adds it up.
 *
 * A duty outside the cut's source side is bounded by its need. Every pair of a duty inside falls
 * under a limit of its person that the cut crosses, the maximum included, or under itself. A seat
 * that any plan holds is therefore counted under one of the bounds.
 */
export function coverBounds(kase: Case, solution: Solution): { readonly bounds: readonly Bound[]; readonly charges: readonly Charge[] } {
  const { reduction, residual } = solution;
  const side = reachable(reduction.network, residual, [reduction.source]);
  const inside = Uint8Array.from(reduction.dutyNode, (node) => side[node]);
  const bounds = new Map<string, Bound>();
  const note = (bound: Bound): Bound => {
    const key = [bound.kind, bound.duty, bound.person, bound.label].join('|');
    const known = bounds.get(key) ?? bound;
    bounds.set(key, known);
    return known;
  };
  kase.duties.forEach(({ need }, duty) => {
    if (inside[duty] === 0) note({ kind: 'need', duty, person: null, label: '', allowed: need, most: need });
  });
  for (const { duty, person } of kase.fixed) {
    if (inside[duty] === 1) note({ kind: 'fixed', duty, person, label: '', allowed: 1, most: 1 });
  }
  const arcOfPair = new Map(Array.from(reduction.openPair, (i, k) => [i, k]));
  const charges: Charge[] = [];
  for (let i = 0; i < kase.pairs.count; i++) {
    const [duty, person] = [kase.pairs.duty[i], kase.pairs.person[i]];
    if (inside[duty] === 0) continue;
    const state = reduction.open.state[i];
    const k = arcOfPair.get(i);
    const bound = k === undefined ? null : note(boundOfPair(kase, solution, side, i, k));
    charges.push({ duty, person, state, bound: state === PairState.Fixed ? note({ kind: 'fixed', duty, person, label: '', allowed: 1, most: 1 }) : bound });
  }
  return { bounds: [...bounds.values()], charges };
}

/** The first limit on the pair's way to the sink that leads out of the cut's source side. */
function boundOfPair(kase: Case, { reduction }: Solution, side: Uint8Array, i: number, k: number): Bound {
  const [duty, person] = [kase.pairs.duty[i], kase.pairs.person[i]];
  const { open, nestings, firstLimit, personNode } = reduction;
  const { nodes } = nestings.ofPerson[person];
  const nodeOf = (limit: number): number => (limit === -1 ? personNode[person] : firstLimit[person] + limit);
  let limit = nestings.innermost[k];
  if (side[nodeOf(limit)] === 0) return { kind: 'pair', duty, person, label: '', allowed: 1, most: 1 };
  while (limit !== -1 && side[nodeOf(nodes[limit].parent)] === 1) limit = nodes[limit].parent;
  if (limit === -1) {
    const { maximum } = kase.people[person];
    return { kind: 'maximum', duty: null, person, label: '', allowed: maximum, most: Math.max(0, maximum - open.fixedByPerson[person]) };
  }
  const { set, most } = nodes[limit];
  return { kind: 'limit', duty: null, person, label: set.name, allowed: mostOf(set, person), most };
}
