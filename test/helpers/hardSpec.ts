import fc from 'fast-check';
import type { Range } from '../../src/sheet/range';

/** A small case that is no flow, in plain words. */
export interface HardSpec {
  readonly duties: readonly {
    readonly need: number;
    readonly priority: number | null;
    readonly slot: string;
    readonly group: string;
    /** Minutes since midnight, and how long; null: no time. */
    readonly time: readonly [start: number, length: number] | null;
    readonly load: number;
  }[];
  readonly people: readonly { readonly maximum: number; readonly minimum: number; readonly carried: number }[];
  readonly pairs: readonly (readonly [duty: number, person: number, rank: number | null])[];
  readonly fixed: readonly (readonly [duty: number, person: number])[];
  readonly barred: readonly (readonly [duty: number, person: number])[];
  readonly clash: readonly (readonly [number, number])[];
  readonly together: readonly (readonly [number, number])[];
  readonly limits: readonly { readonly label: string; readonly person: number | null; readonly most: number }[];
  readonly rest: number;
  readonly current: readonly (readonly [duty: number, person: number])[] | null;
  readonly order: readonly ('changes' | 'ranks' | 'evenness')[];
}

const dutyName = (d: number): string => `Duty ${d}`;
const personName = (p: number): string => `Person ${p}`;

/** The five ranges of a case, as someone would type them. */
export function hardRanges(spec: HardSpec): (Range | null)[] {
  const day = 46_000;
  const row = (rule: string, duty: string, person: string, value: string | number): (string | number)[] => [rule, duty, person, value];
  const times = ({ time }: HardSpec['duties'][number]): (number | null)[] =>
    time === null ? [null, null] : [day + time[0] / 1440, day + (time[0] + time[1]) / 1440];
  return [
    [['Duty', 'Person', 'Rank'], ...spec.pairs.map(([d, p, rank]) => [dutyName(d), personName(p), rank])],
    [['Person', 'Maximum', 'Minimum', 'Carried'], ...spec.people.map(({ maximum, minimum, carried }, p) => [personName(p), maximum, minimum, carried])],
    [
      ['Duty', 'Need', 'Priority', 'Slot', 'Group', 'Start', 'End', 'Load'],
      ...spec.duties.map((duty, d) => [dutyName(d), duty.need, duty.priority, duty.slot, duty.group, ...times(duty), duty.load]),
    ],
    [
      ['Rule', 'Duty', 'Person', 'Value'],
      ...spec.fixed.map(([d, p]) => row('Fixed', dutyName(d), personName(p), '')),
      ...spec.barred.map(([d, p]) => row('Barred', dutyName(d), personName(p), '')),
      ...spec.clash.map(([a, b]) => row('Clash', dutyName(a), '', dutyName(b))),
      ...spec.together.map(([a, b]) => row('Together', dutyName(a), '', dutyName(b))),
      ...spec.limits.map(({ label, person, most }) => row('Limit', label, person === null ? '' : personName(person), most)),
      row('Rest', '', '', spec.rest),
      row('Order', '', '', spec.order.join(', ')),
    ],
    spec.current === null ? null : [['Duty', 'Person'], ...spec.current.map(([d, p]) => [dutyName(d), personName(p)])],
  ];
}

const GROUPS = ['North', 'South', ''];

/** Random cases with overlapping times, rest, clashes, duties that go together, loads and crossing limits. */
export function hardSpecs({ duties = 5, people = 3 } = {}): fc.Arbitrary<HardSpec> {
  const duty = fc.record({
    need: fc.constantFrom(1, 1, 1, 2),
    priority: fc.constantFrom(null, 1, 2),
    slot: fc.constantFrom('', '', 'early', 'late'),
    group: fc.constantFrom(...GROUPS),
    time: fc.option(fc.tuple(fc.integer({ min: 0, max: 20 }).map((n) => 60 * n), fc.integer({ min: 1, max: 6 }).map((n) => 60 * n)), { freq: 3 }),
    load: fc.constantFrom(1, 1, 1, 2, 3, 0),
  });
  const person = fc.record({ maximum: fc.integer({ min: 0, max: 4 }), minimum: fc.constantFrom(0, 0, 1, 2), carried: fc.constantFrom(0, 0, 3) });
  return fc.tuple(fc.array(duty, { minLength: 2, maxLength: duties }), fc.array(person, { minLength: 1, maxLength: people })).chain(([drawn, staff]) => {
    const cells = drawn.flatMap((_, d) => staff.map((__, p) => [d, p] as const));
    const seat = fc.constantFrom(...cells);
    const two = fc.constantFrom(...drawn.flatMap((_, a) => drawn.slice(a + 1).map((__, i) => [a, a + 1 + i] as const)));
    const some = <T>(arbitrary: fc.Arbitrary<T>, maxLength: number): fc.Arbitrary<T[]> =>
      fc.uniqueArray(arbitrary, { maxLength, selector: (value) => JSON.stringify(value) });
    return fc
      .record({
        listed: fc.subarray(cells, { minLength: Math.min(3, cells.length) }),
        ranks: fc.array(fc.constantFrom(null, 1, 2, 5), { minLength: cells.length, maxLength: cells.length }),
        marked: some(fc.tuple(seat, fc.boolean()), 2),
        clash: some(two, 1),
        together: fc.oneof({ weight: 2, arbitrary: fc.constant([]) }, some(two, 2)),
        limits: some(fc.record({ label: fc.constantFrom('North', 'South', 'early'), person: fc.option(fc.nat(staff.length - 1)), most: fc.nat(2) }), 2),
        rest: fc.constantFrom(0, 0, 30, 120),
        current: fc.option(fc.subarray(cells)),
        order: fc.constantFrom(...ORDERS),
      })
      .map(({ listed, ranks, marked, ...rest }): HardSpec => {
        const isFree = marked.filter(([[d, p]], i) => marked.findIndex(([[e, q]]) => d === e && p === q) === i);
        return {
          ...rest,
          duties: drawn,
          people: staff,
          pairs: listed.map(([d, p], i) => [d, p, ranks[i]] as const),
          fixed: isFree.filter(([, isFixed]) => isFixed).map(([at]) => at),
          barred: isFree.filter(([, isFixed]) => !isFixed).map(([at]) => at),
        };
      });
  });
}

const ORDERS: HardSpec['order'][] = [
  ['changes', 'ranks', 'evenness'],
  ['ranks', 'evenness', 'changes'],
  ['evenness', 'changes', 'ranks'],
];
