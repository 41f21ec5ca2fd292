import type { Case, Seat } from '../cover/case';
import type { Plan } from '../cover/plan';

/** The seats held of each duty, by duty number, its people by name. */
export function seatsByDuty(kase: Case, plan: Plan): Plan['seats'][number][][] {
  return groupSeats(plan, kase.duties.length, ({ duty }) => duty);
}

/** The duty numbers each person holds, by person number, in the order of the duties table. */
export function dutiesByPerson(kase: Case, plan: Plan): number[][] {
  return groupSeats(plan, kase.people.length, ({ person }) => person).map((seats) =>
    seats.map(({ duty }) => duty).sort((a, b) => a - b),
  );
}

function groupSeats(plan: Plan, count: number, groupOf: (seat: Seat) => number): Plan['seats'][number][][] {
  const groups: Plan['seats'][number][][] = Array.from({ length: count }, () => []);
  for (const seat of plan.seats) groups[groupOf(seat)].push(seat);
  return groups;
}

/** The rank of a seat: that of its pair; '' where the pairs have no ranks or do not list it. */
export function rankLookUp({ pairs, people, ranked }: Case): (seat: Seat) => number | '' {
  if (!ranked) return () => '';
  const ranks = new Map<number, number>();
  for (let i = 0; i < pairs.count; i++) ranks.set(pairs.duty[i] * people.length + pairs.person[i], pairs.rank[i]);
  return ({ duty, person }) => ranks.get(duty * people.length + person) ?? '';
}
