import type { Case, Seat } from './case';

/** Who holds which seat. */
export interface Plan {
  /** Every seat held, sorted like the pairs of the case (name order of duty, then of person). */
  readonly seats: readonly (Seat & { readonly fixed: boolean })[];
  /** Seats held of each duty, by duty number; more than its need only where Fixed rows say so. */
  readonly heldOfDuty: Int32Array;
  /** Seats held by each person, by person number. */
  readonly heldByPerson: Int32Array;
  /** Load of the seats held by each person, by person number: what counts against maximums, minimums and evenness. */
  readonly loadByPerson: Int32Array;
  /** Sum of needs. */
  readonly needed: number;
  /** Sum over duties of the smaller of need and seats held. */
  readonly covered: number;
}

/**
 * The plan that holds the Fixed seats and some pairs more.
 *
 * @param held numbers of pairs that no Fixed row gives
 */
export function planOf(kase: Case, held: Iterable<number>): Plan {
  const { pairs, duties } = kase;
  const seats = kase.fixed.map(({ duty, person }) => ({ duty, person, fixed: true }));
  for (const i of held) seats.push({ duty: pairs.duty[i], person: pairs.person[i], fixed: false });
  const dutyPlace = placeIn(kase.dutyOrder);
  const personPlace = placeIn(kase.personOrder);
  seats.sort((a, b) => dutyPlace[a.duty] - dutyPlace[b.duty] || personPlace[a.person] - personPlace[b.person]);

  const heldOfDuty = new Int32Array(duties.length);
  const heldByPerson = new Int32Array(kase.people.length);
  const loadByPerson = new Int32Array(kase.people.length);
  for (const { duty, person } of seats) {
    heldOfDuty[duty]++;
    heldByPerson[person]++;
    loadByPerson[person] += duties[duty].load;
  }
  let needed = 0;
  let covered = 0;
  duties.forEach(({ need }, d) => {
    needed += need;
    covered += Math.min(need, heldOfDuty[d]);
  });
  return { seats, heldOfDuty, heldByPerson, loadByPerson, needed, covered };
}

function placeIn(order: Int32Array): Int32Array {
  const place = new Int32Array(order.length);
  order.forEach((number, i) => (place[number] = i));
  return place;
}
