import type { Case } from '../../src/cover/case';

/** A case in names, short enough to read in a golden file. */
export function summarise(kase: Case) {
  const duty = (d: number): string => kase.duties[d].name;
  const person = (p: number): string => kase.people[p].name;
  const { pairs } = kase;
  return {
    duties: kase.duties.map(({ name, need, priority, slots, groups, times, load }) =>
      [name, need, priority, slots.join('+'), groups.join('+'), times.map(({ start, end }) => `${start}-${end}`).join('+'), load].join(' | '),
    ),
    people: kase.people.map(({ name, maximum, minimum, stretch, carried, listed }) =>
      [name, maximum, minimum, stretch, carried, listed ? 'listed' : 'unlisted'].join(' | '),
    ),
    pairs: Array.from({ length: pairs.count }, (_, i) => `${duty(pairs.duty[i])} | ${person(pairs.person[i])} | ${pairs.rank[i]}`),
    rules: [
      ...kase.fixed.map((seat) => `Fixed ${duty(seat.duty)} | ${person(seat.person)}`),
      ...kase.barred.map((seat) => `Barred ${duty(seat.duty)} | ${person(seat.person)}`),
      ...kase.away.map((row) => `Away ${person(row.person)} | ${row.label.name}`),
      ...kase.limits.map((row) => `Limit ${row.label.name} | ${row.person === null ? 'everyone' : person(row.person)} | ${row.most}`),
      ...kase.clashes.map(([a, b]) => `Clash ${duty(a)} | ${duty(b)}`),
      ...kase.together.map(([a, b]) => `Together ${duty(a)} | ${duty(b)}`),
      `Rest ${kase.rest}`,
      `Order ${kase.order.join(', ')}`,
      `Price place ${kase.prices.place}, eligibility ${kase.prices.eligibility}`,
      `Seconds ${kase.seconds}`,
    ],
    current: kase.current === null ? null : kase.current.map((seat) => `${duty(seat.duty)} | ${person(seat.person)}`),
  };
}
