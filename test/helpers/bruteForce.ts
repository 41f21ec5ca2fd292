import type { HardSpec } from './hardSpec';

/**
 * The best plan by trying every set of pairs, written from the words of the functions' contract; it
 * shares nothing with the product.
 */

export type Seats = readonly (readonly [duty: number, person: number])[];

/** Every plan that keeps Fixed, Barred and all limits, as seats beside the Fixed ones. */
export function* allPlans(spec: HardSpec, pairs: Seats = spec.pairs.map(([d, p]) => [d, p] as const)): Generator<Seats> {
  const isIn = (list: Seats, d: number, p: number): boolean => list.some(([e, q]) => d === e && p === q);
  const free = pairs.filter(([d, p]) => !isIn(spec.fixed, d, p) && !isIn(spec.barred, d, p));
  function* go(i: number, chosen: Seats): Generator<Seats> {
    if (i === free.length) {
      if (keepsTogether(spec, chosen)) yield chosen;
      return;
    }
    yield* go(i + 1, chosen);
    const more = [...chosen, free[i]];
    if (mayTake(spec, chosen, free[i])) yield* go(i + 1, more);
  }
  yield* go(0, []);
}

/** Whether a person may take a duty beside others, where Fixed seats may have passed limits already. */
function mayTake(spec: HardSpec, chosen: Seats, [duty, person]: Seats[number]): boolean {
  const all = [...spec.fixed, ...chosen];
  if (all.filter(([d]) => d === duty).length >= spec.duties[duty].need) return false;
  const own = all.filter(([, p]) => p === person).map(([d]) => d);
  const load = own.reduce((sum, d) => sum + spec.duties[d].load, 0);
  // Whoever is over the maximum by Fixed rows may still take what counts nothing.
  if (spec.duties[duty].load > 0 && load + spec.duties[duty].load > spec.people[person].maximum) return false;
  if (own.some((other) => conflict(spec, duty, other))) return false;
  return spec.limits.every(({ label, person: limited, most }) => {
    if ((limited !== null && limited !== person) || !hasLabel(spec, duty, label)) return true;
    return own.filter((d) => hasLabel(spec, d, label)).length < most;
  });
}

function hasLabel(spec: HardSpec, d: number, label: string): boolean {
  return spec.duties[d].slot === label || spec.duties[d].group === label;
}

function conflict(spec: HardSpec, a: number, b: number): boolean {
  const [one, other] = [spec.duties[a], spec.duties[b]];
  if (one.slot !== '' && one.slot === other.slot) return true;
  if (spec.clash.some(([x, y]) => (x === a && y === b) || (x === b && y === a))) return true;
  if (one.time === null || other.time === null) return false;
  const [first, second] = one.time[0] <= other.time[0] ? [one.time, other.time] : [other.time, one.time];
  const gap = second[0] - (first[0] + first[1]);
  return gap < 0 || gap < spec.rest;
}

/** The same person or nobody; a Fixed seat stands alone where its partner is not held. */
function keepsTogether({ together, fixed, people }: HardSpec, chosen: Seats): boolean {
  const holds = (list: Seats, d: number, p: number): boolean => list.some(([e, q]) => d === e && p === q);
  return together.every(([a, b]) =>
    people.every((_, p) => {
      if (holds(fixed, a, p) || holds(fixed, b, p)) return true;
      return holds(chosen, a, p) === holds(chosen, b, p);
    }),
  );
}

const LAST = 1_000_001;

/** Cover by priority, most urgent first, then the later aims in order, all to be least: covers count negative. */
export function valueOf(spec: HardSpec, chosen: Seats): number[] {
  const all = [...spec.fixed, ...chosen];
  const ranks = spec.pairs.flatMap(([, , rank]) => (rank === null ? [] : [rank]));
  const blank = Math.max(0, ...ranks) + 1;
  const load = spec.people.map((_, p) => all.filter(([, q]) => q === p).reduce((sum, [d]) => sum + spec.duties[d].load, 0));
  const later = {
    changes: () => -all.filter(([d, p]) => (spec.current ?? []).some(([e, q]) => d === e && p === q)).length,
    ranks: () => {
      const rankOf = ([d, p]: Seats[number]): number => {
        const pair = spec.pairs.find(([e, q]) => d === e && p === q);
        return pair === undefined ? 0 : (pair[2] ?? blank);
      };
      return ranks.length === 0 ? 0 : all.reduce((sum, seat) => sum + rankOf(seat), 0);
    },
    evenness: () => spec.people.reduce((sum, { carried }, p) => sum + (load[p] + carried) ** 2, 0),
  };
  return [
    ...coverOf(spec, chosen).map((seats) => -seats),
    spec.people.reduce((sum, { minimum }, p) => sum + Math.max(0, minimum - load[p]), 0),
    ...spec.order.map((aim) => later[aim]()),
  ];
}

/** Covered seats of each priority, most urgent first. */
export function coverOf(spec: HardSpec, chosen: Seats): number[] {
  const all = [...spec.fixed, ...chosen];
  const priorities = [...new Set(spec.duties.map(({ priority }) => priority ?? LAST))].sort((a, b) => a - b);
  return priorities.map((priority) =>
    spec.duties.reduce((sum, duty, d) => {
      if ((duty.priority ?? LAST) !== priority) return sum;
      return sum + Math.min(duty.need, all.filter(([e]) => e === d).length);
    }, 0),
  );
}

export function compareValues(a: readonly number[], b: readonly number[]): number {
  const i = a.findIndex((value, at) => value !== b[at]);
  return i === -1 ? 0 : a[i] - b[i];
}
