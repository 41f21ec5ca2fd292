import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Case, Seat } from '../../src/cover/case';
import { readCase } from '../../src/sheet/readCase';

type Table = readonly (readonly (string | number)[])[];

const DUTIES = ['Choir', 'Évensong', 'Bell Ringing', 'Straße 7', 'Organ 12', 'Tea'];
const PEOPLE = ['Ann Lee', 'Zoë', 'Bob', 'Ángel Ruiz', 'bo b', 'Ove 2'];
const LABELS = ['Mon 9:00', 'Sat', 'Mon'];

const duty = fc.constantFrom(...DUTIES);
const person = fc.constantFrom(...PEOPLE);
const label = fc.constantFrom(...LABELS);
const small = fc.oneof(fc.integer({ min: 0, max: 3 }), fc.constant(''));
const priority = fc.oneof(fc.integer({ min: 1, max: 3 }), fc.constant(''));
const slot = fc.oneof(label, fc.constant(''));

const rule = fc.oneof(
  fc.tuple(fc.constantFrom('Fixed', 'Barred'), duty, person, fc.constant('')),
  fc.tuple(fc.constant('Away'), fc.constant(''), person, label),
  fc.tuple(fc.constant('Limit'), label, fc.oneof(person, fc.constant('')), fc.integer({ min: 0, max: 3 })),
  fc.tuple(fc.constantFrom('Clash', 'Together'), fc.constantFrom(...DUTIES.slice(0, 3)), fc.constant(''), fc.constantFrom(...DUTIES.slice(3))),
  fc.tuple(fc.constantFrom('Rest', 'Seconds'), fc.constant(''), fc.constant(''), fc.integer({ min: 1, max: 9 })),
  fc.tuple(fc.constant('Order'), fc.constant(''), fc.constant(''), fc.constantFrom('ranks', 'ranks, changes', 'evenness')),
  fc.tuple(fc.constant('Price'), fc.constantFrom('place', 'eligibility'), fc.constant(''), small),
);

/** Tables with headings; rows given twice, unlisted names and rules that contradict each other are all in it. */
const tables = fc.tuple(
  fc.array(fc.tuple(duty, person, small), { maxLength: 14 }).map((rows): Table => [['Duty', 'Person', 'Rank'], ...rows]),
  fc.oneof(
    { weight: 4, arbitrary: fc.array(fc.tuple(person, small, small, small, small), { maxLength: 8 }).map(
      (rows): Table => [['Person', 'Maximum', 'Minimum', 'Stretch', 'Carried'], ...rows],
    ) },
    { weight: 1, arbitrary: fc.constant<Table>([[2]]) },
  ),
  fc.option(
    fc.array(fc.tuple(duty, small, priority, slot, slot, small), { maxLength: 8 }).map(
      (rows): Table => [['Duty', 'Need', 'Priority', 'Slot', 'Group', 'Load'], ...rows],
    ),
  ),
  fc.option(fc.array(rule, { maxLength: 10 }).map((rows): Table => [['Rule', 'Duty', 'Person', 'Value'], ...rows])),
  fc.option(fc.array(fc.tuple(duty, person), { maxLength: 5 }).map((rows): Table => [['Duty', 'Person'], ...rows])),
);

/** Ways to type the same name. */
const RESPELLINGS: readonly ((name: string) => string)[] = [
  (name) => name,
  (name) => name.toUpperCase(),
  (name) => name.toLowerCase(),
  (name) => `\u00A0 ${name.replaceAll(' ', ' \u2009 ')} `,
  (name) => name.normalize('NFD'),
  (name) => `\u200B${name}\u200E`,
];

/** The same table with its rows in another order and its names typed in other ways. */
function disturb(table: Table | null, numbers: readonly number[]): Table | null {
  if (table === null || table.length < 2) return table;
  const [headings, ...rows] = table;
  const order = rows.map((row, i) => ({ row, key: numbers[i % numbers.length] })).sort((a, b) => a.key - b.key);
  let next = 0;
  const respell = (text: string): string => RESPELLINGS[numbers[next++ % numbers.length] % RESPELLINGS.length](text);
  return [
    headings,
    ...order.map(({ row }) => row.map((cell) => (typeof cell === 'string' && cell !== '' ? respell(cell) : cell))),
  ];
}

/** What a case says, by the keys of its names and without the order of its tables. */
function content(kase: Case) {
  const { pairs, duties, people } = kase;
  const seat = (s: Seat) => [duties[s.duty].key, people[s.person].key];
  const dutyKey = (d: number) => duties[d].key;
  return {
    duties: Array.from(kase.dutyOrder, (d) => ({ ...duties[d], name: '' })),
    people: Array.from(kase.personOrder, (p) => ({ ...people[p], name: '' })),
    pairs: Array.from({ length: pairs.count }, (_, i) => [dutyKey(pairs.duty[i]), people[pairs.person[i]].key, pairs.rank[i]]),
    ranked: kase.ranked,
    fixed: kase.fixed.map(seat),
    barred: kase.barred.map(seat),
    away: kase.away.map((row) => [people[row.person].key, row.label.key]),
    limits: kase.limits.map((row) => [row.person === null ? null : people[row.person].key, row.label.key, row.most]),
    clashes: kase.clashes.map((two) => two.map(dutyKey)),
    together: kase.together.map((two) => two.map(dutyKey)),
    others: [kase.rest, kase.order, kase.prices, kase.seconds],
    current: kase.current === null ? null : kase.current.map(seat),
    labels: [...kase.labelNames.keys()].sort(),
  };
}

describe('one case however it is typed', () => {
  const numbers = fc.array(fc.nat(1000), { minLength: 7, maxLength: 13 });

  it('keeps its content, faults and kinds of findings when rows are re-sorted and names respelt', () => {
    fc.assert(
      fc.property(tables, fc.array(numbers, { minLength: 5, maxLength: 5 }), (ranges, ways) => {
        const one = readCase(ranges);
        const other = readCase(ranges.map((table, i) => disturb(table, ways[i])));
        expect(other.case === null).toBe(one.case === null);
        expect(other.faults.length).toBe(one.faults.length);
        if (one.case !== null && other.case !== null) expect(content(other.case)).toEqual(content(one.case));
        const kinds = ({ findings }: typeof one) => findings.map(({ table, finding }) => `${table}: ${finding}`).sort();
        expect(kinds(other)).toEqual(kinds(one));
      }),
      { numRuns: 1000 },
    );
  });

  it('lists its parts in the order of names: pairs, seats and limits sorted, each once', () => {
    fc.assert(
      fc.property(tables, (ranges) => {
        const { case: kase } = readCase(ranges);
        if (kase === null) return;
        const dutyPlace = placesIn(kase.dutyOrder);
        const personPlace = placesIn(kase.personOrder);
        const place = ({ duty: d, person: p }: Seat) => dutyPlace[d] * kase.people.length + personPlace[p];
        const { pairs } = kase;
        const listed = Array.from({ length: pairs.count }, (_, i) => ({ duty: pairs.duty[i], person: pairs.person[i] }));
        for (const seats of [listed, kase.fixed, kase.barred, kase.current ?? []]) {
          const places = seats.map(place);
          expect(places).toEqual([...new Set(places)].sort((a, b) => a - b));
        }
        const barred = new Set(kase.barred.map(place));
        expect(kase.fixed.filter((seat) => barred.has(place(seat)))).toEqual([]);
      }),
      { numRuns: 500 },
    );
  });
});

function placesIn(order: Int32Array): Int32Array {
  const places = new Int32Array(order.length);
  order.forEach((number, at) => (places[number] = at));
  return places;
}
