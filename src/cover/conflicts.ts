import type { Case, Duty } from './case';
import type { LimitSet } from './limits';

/**
 * Duties that one person cannot hold together because of when they take place or because a Clash
 * rule says so, as sets of which a person holds at most one duty.
 */
export function conflictSets(kase: Case): LimitSet[] {
  return [
    ...crowds(kase.duties, kase.rest).map((duties) => conflict(kase, 'the same time', duties)),
    ...kase.clashes.map((pair) => conflict(kase, 'a Clash rule', [...pair].sort((a, b) => a - b))),
  ];
}

function conflict(kase: Case, why: string, duties: readonly number[]): LimitSet {
  const names = duties.slice(0, 2).map((d) => kase.duties[d].name).join(' and ');
  return { kind: 'conflict', name: `${why}: ${names}${duties.length > 2 ? ' and others' : ''}`, everyone: 1, single: new Map(), duties };
}

/**
 * The largest sets of duties that are all under way at one moment, each duty taken to last until the
 * rest after it is over. Two duties are too close exactly where they share such a set: a family of
 * intervals any two of which overlap has a moment in common (Helly's theorem in one dimension).
 *
 * @param rest minutes between two duties of one person
 * @returns sets of at least two duty numbers, ascending, none inside another; in order of time
 */
export function crowds(duties: readonly Pick<Duty, 'times'>[], rest: number): number[][] {
  // At one moment what ends comes before what starts: duties that only touch do not overlap.
  const events = duties.flatMap(({ times }, duty) =>
    times.flatMap(({ start, end }) => [
      { at: start, duty, change: 1 },
      { at: end + rest, duty, change: -1 },
    ]),
  );
  events.sort((a, b) => a.at - b.at || a.change - b.change || a.duty - b.duty);
  // A duty with two times may be under way twice over.
  const underWay = new Map<number, number>();
  const sets: number[][] = [];
  let grew = false;
  for (const { duty, change } of events) {
    const count = (underWay.get(duty) ?? 0) + change;
    if (change < 0 && grew && underWay.size > 1) sets.push([...underWay.keys()].sort((a, b) => a - b));
    grew = change > 0;
    if (count === 0) underWay.delete(duty);
    else underWay.set(duty, count);
  }
  return withoutSubsets(sets);
}

/** With two times a duty may make one set lie inside another, or come twice. */
function withoutSubsets(sets: readonly number[][]): number[][] {
  const of = new Map<number, number[]>();
  sets.forEach((set, s) => {
    for (const duty of set) of.set(duty, [...(of.get(duty) ?? []), s]);
  });
  return sets.filter((set, s) => {
    const others = of.get(set[0])!.filter((t) => t !== s && (sets[t].length > set.length || (sets[t].length === set.length && t < s)));
    return !others.some((t) => {
      const larger = new Set(sets[t]);
      return set.every((duty) => larger.has(duty));
    });
  });
}

/** True where one person cannot hold both because of when they take place. */
export function tooClose(one: Pick<Duty, 'times'>, other: Pick<Duty, 'times'>, rest: number): boolean {
  return one.times.some((a) => other.times.some((b) => a.start < b.end + rest && b.start < a.end + rest));
}
