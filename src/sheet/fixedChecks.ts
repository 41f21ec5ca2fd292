import type { Case } from '../cover/case';
import { limitSets, mostOf, setsOfDuty } from '../cover/limits';
import type { Report } from './report';

/** Fixed seats are held all the same: whatever each of them passes is found. */
export function findFixedOddities(kase: Case, report: Report): void {
  if (kase.fixed.length === 0) return;
  const find = (detail: string): void => report.find('Rules', null, 'Fixed passes a limit', detail);
  findUnlistedPairs(kase, report);
  findAway(kase, find);
  const heldOfDuty = new Int32Array(kase.duties.length);
  const heldByPerson = new Int32Array(kase.people.length);
  for (const { duty, person } of kase.fixed) {
    heldOfDuty[duty]++;
    heldByPerson[person]++;
  }
  kase.duties.forEach(({ name, need }, d) => {
    if (heldOfDuty[d] > need) find(`Fixed rows give "${name}" ${people(heldOfDuty[d])}; it needs ${need}.`);
  });
  kase.people.forEach(({ name, maximum }, p) => {
    if (heldByPerson[p] > maximum) find(`Fixed rows give ${name} ${duties(heldByPerson[p])}; the maximum is ${maximum}.`);
  });
  findFullSets(kase, find);
}

function findUnlistedPairs({ pairs, people, duties, fixed }: Case, report: Report): void {
  const listed = new Set<number>();
  for (let i = 0; i < pairs.count; i++) listed.add(pairs.duty[i] * people.length + pairs.person[i]);
  for (const { duty, person } of fixed) {
    if (listed.has(duty * people.length + person)) continue;
    report.find('Rules', null, 'Fixed without a pair', `No pair lists ${people[person].name} for "${duties[duty].name}"; the seat is held all the same.`);
  }
}

function findAway({ fixed, away, people, duties }: Case, find: (detail: string) => void): void {
  for (const { duty, person } of fixed) {
    const { slots, groups, name } = duties[duty];
    const against = away.find((row) => row.person === person && [...slots, ...groups].includes(row.label.key));
    if (against !== undefined) find(`${people[person].name} is Away in "${against.label.name}" and Fixed to "${name}".`);
  }
}

/** More Fixed seats of one person in a slot or group than the person may hold of it. */
function findFullSets(kase: Case, find: (detail: string) => void): void {
  const sets = limitSets(kase);
  const setsOf = setsOfDuty(sets, kase.duties.length);
  const held = new Map<string, { set: number; person: number; count: number }>();
  for (const { duty, person } of kase.fixed) {
    for (const set of setsOf[duty]) {
      const entry = held.get(`${set} ${person}`) ?? { set, person, count: 0 };
      held.set(`${set} ${person}`, entry);
      entry.count++;
    }
  }
  for (const { set, person, count } of held.values()) {
    const most = mostOf(sets[set], person);
    if (count > most) find(`Fixed rows give ${kase.people[person].name} ${duties(count)} in "${sets[set].name}"; at most ${most} ${most === 1 ? 'is' : 'are'} allowed.`);
  }
}

function people(count: number): string {
  return `${count} ${count === 1 ? 'person' : 'people'}`;
}

function duties(count: number): string {
  return `${count} ${count === 1 ? 'duty' : 'duties'}`;
}
