import type { Case } from '../cover/case';
import { limitSets, mostOf, setsOfDuty } from '../cover/limits';
import type { SeatOfRow } from './caseRules';
import type { Report } from './report';

/** Says what a Fixed row passes. */
type Find = (row: number, detail: string) => void;

/** Fixed seats are held all the same: whatever each of them passes is found, at the row that gives it. */
export function findFixedOddities(kase: Case, fixed: readonly SeatOfRow[], report: Report): void {
  if (fixed.length === 0) return;
  const find: Find = (row, detail) => report.find('Rules', row, 'Fixed passes a limit', detail);
  findUnlistedPairs(kase, fixed, report);
  findAway(kase, fixed, find);
  const ofDuty = tally(fixed, ({ duty }) => duty);
  const ofPerson = tally(fixed, ({ person }) => person);
  for (const [d, { count, lastRow }] of ofDuty) {
    const { name, need } = kase.duties[d];
    if (count > need) find(lastRow, `Fixed rows give "${name}" ${people(count)}; it needs ${need}.`);
  }
  for (const [p, { count, lastRow }] of ofPerson) {
    const { name, maximum, listed } = kase.people[p];
    // Of a person who is not listed the missing row is found already.
    if (listed && count > maximum) find(lastRow, `Fixed rows give ${name} ${duties(count)}; the maximum is ${maximum}.`);
  }
  findFullSets(kase, fixed, find);
}

/** How many Fixed seats share something, and the last row of theirs: the one that goes beyond. */
interface Tally {
  count: number;
  lastRow: number;
}

function tally(fixed: readonly SeatOfRow[], of: (seat: SeatOfRow) => number): Map<number, Tally> {
  const tallies = new Map<number, Tally>();
  for (const seat of fixed) addTo(tallies, of(seat), seat.row);
  return tallies;
}

function addTo<K>(tallies: Map<K, Tally>, key: K, row: number): void {
  const entry = tallies.get(key);
  if (entry === undefined) {
    tallies.set(key, { count: 1, lastRow: row });
  } else {
    entry.count++;
    entry.lastRow = Math.max(entry.lastRow, row);
  }
}

function findUnlistedPairs({ pairs, people, duties }: Case, fixed: readonly SeatOfRow[], report: Report): void {
  const unlisted = new Map(fixed.map((seat) => [seat.duty * people.length + seat.person, seat]));
  for (let i = 0; i < pairs.count; i++) unlisted.delete(pairs.duty[i] * people.length + pairs.person[i]);
  for (const { duty, person, row } of unlisted.values()) {
    const detail = `No pair lists ${people[person].name} for "${duties[duty].name}"; the seat is held all the same.`;
    report.find('Rules', row, 'Fixed without a pair', detail);
  }
}

function findAway({ away, people, duties }: Case, fixed: readonly SeatOfRow[], find: Find): void {
  const awayLabel = new Map(away.map(({ person, label }) => [`${person} ${label.key}`, label.name]));
  for (const { duty, person, row } of fixed) {
    const { slots, groups, name } = duties[duty];
    const key = [...slots, ...groups].find((label) => awayLabel.has(`${person} ${label}`));
    if (key === undefined) continue;
    find(row, `${people[person].name} is Away in "${awayLabel.get(`${person} ${key}`)}" and Fixed to "${name}".`);
  }
}

/** More Fixed seats of one person in a slot or group than the person may hold of it. */
function findFullSets(kase: Case, fixed: readonly SeatOfRow[], find: Find): void {
  const sets = limitSets(kase);
  const setsOf = setsOfDuty(sets, kase.duties.length);
  const held = new Map<number, Tally>();
  for (const { duty, person, row } of fixed) {
    for (const set of setsOf[duty]) addTo(held, set * kase.people.length + person, row);
  }
  for (const [key, { count, lastRow }] of held) {
    const set = sets[Math.floor(key / kase.people.length)];
    const person = key % kase.people.length;
    const most = mostOf(set, person);
    if (count <= most) continue;
    find(lastRow, `Fixed rows give ${kase.people[person].name} ${duties(count)} in "${set.name}"; at most ${most} ${most === 1 ? 'is' : 'are'} allowed.`);
  }
}

function people(count: number): string {
  return `${count} ${count === 1 ? 'person' : 'people'}`;
}

function duties(count: number): string {
  return `${count} ${count === 1 ? 'duty' : 'duties'}`;
}
