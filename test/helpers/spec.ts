import fc from 'fast-check';
import type { Range } from '../../src/sheet/range';

/** A case in plain words, from which both the tables and the oracle's programme are written. */
export interface Spec {
  readonly duties: readonly { name: string; need: number; priority: number | null; slot: string; group: string }[];
  readonly people: readonly { name: string; maximum: number; minimum: number; carried: number }[];
  /** Duty and person numbers, and a rank. */
  readonly pairs: readonly (readonly [number, number, number | null])[];
  readonly rules: readonly SpecRule[];
  /** Duty and person numbers of the plan in force. */
  readonly current: readonly (readonly [number, number])[] | null;
  readonly order: readonly string[];
}

export type SpecRule =
  | { readonly rule: 'Fixed' | 'Barred'; readonly duty: number; readonly person: number }
  | { readonly rule: 'Away'; readonly person: number; readonly label: string }
  | { readonly rule: 'Limit'; readonly label: string; readonly person: number | null; readonly most: number };

/** The five ranges of a spec, with headings. */
export function rangesOf(spec: Spec): (Range | null)[] {
  const duty = (d: number): string => spec.duties[d].name;
  const person = (p: number): string => spec.people[p].name;
  return [
    [['Duty', 'Person', 'Rank'], ...spec.pairs.map(([d, p, rank]) => [duty(d), person(p), rank])],
    [
      ['Person', 'Maximum', 'Minimum', 'Carried'],
      ...spec.people.map(({ name, maximum, minimum, carried }) => [name, maximum, minimum, carried]),
    ],
    [
      ['Duty', 'Need', 'Priority', 'Slot', 'Group'],
      ...spec.duties.map(({ name, need, priority, slot, group }) => [name, need, priority, slot, group]),
    ],
    [
      ['Rule', 'Duty', 'Person', 'Value'],
      ...spec.rules.map((rule) => {
        if (rule.rule === 'Away') return ['Away', '', person(rule.person), rule.label];
        if (rule.rule !== 'Limit') return [rule.rule, duty(rule.duty), person(rule.person), ''];
        return ['Limit', rule.label, rule.person === null ? '' : person(rule.person), rule.most];
      }),
      ['Order', '', '', spec.order.join(', ')],
    ],
    spec.current === null ? null : [['Duty', 'Person'], ...spec.current.map(([d, p]) => [duty(d), person(p)])],
  ];
}

const DAYS = ['Mon', 'Tue', 'Wed'];

/** How large random cases may be, and whether they use minimums, ranks, carried seats and a plan in force. */
interface Size {
  readonly duties?: number;
  readonly people?: number;
  readonly rules?: number;
  readonly aims?: boolean;
}

/** Random small cases whose limits are nested: the slots of a day lie inside the group of that day. */
export function specs({ duties = 7, people = 5, rules = 6, aims = false }: Size = {}): fc.Arbitrary<Spec> {
  const some = <T>(plain: T, arbitrary: fc.Arbitrary<T>): fc.Arbitrary<T> => (aims ? arbitrary : fc.constant(plain));
  const person = fc.record({
    maximum: fc.integer({ min: 0, max: 4 }),
    minimum: some(0, fc.constantFrom(0, 0, 1, 2, 3)),
    carried: some(0, fc.constantFrom(0, 0, 1, 4)),
  });
  const rank = some<number | null>(null, fc.constantFrom(null, 0, 1, 2, 3, 7));
  const cell = fc.record({ chance: fc.double({ min: 0, max: 1, noNaN: true }), rank, isCurrent: fc.boolean() });
  return fc
    .record({
      duties: fc.array(dutyArbitrary(), { minLength: 1, maxLength: duties }),
      people: fc.array(person, { minLength: 1, maxLength: people }),
      density: fc.constantFrom(0.2, 0.4, 0.7),
      cells: fc.array(cell, { minLength: duties * people, maxLength: duties * people }),
      hasCurrent: some(false, fc.boolean()),
      order: fc.constantFrom(...ORDERS),
    })
    .chain(({ duties: drawn, people: staff, density, cells, hasCurrent, order }) => {
      const at = (d: number, p: number) => cells[d * people + p];
      const all = drawn.flatMap((_, d) => staff.map((__, p) => [d, p] as const));
      const base = {
        duties: drawn.map((entry, d) => ({ name: `Duty ${d}`, ...entry })),
        people: staff.map((entry, p) => ({ name: `Person ${p}`, ...entry })),
        pairs: all.filter(([d, p]) => at(d, p).chance < density).map(([d, p]) => [d, p, at(d, p).rank] as const),
        current: hasCurrent ? all.filter(([d, p]) => at(d, p).isCurrent && at(d, p).chance < density + 0.1) : null,
        order,
      };
      return fc
        .uniqueArray(ruleArbitrary(drawn.length, staff.length), { maxLength: rules, selector: ruleKey })
        .map((chosen): Spec => ({ ...base, rules: chosen }));
    });
}

const ORDERS = [
  ['changes', 'ranks', 'evenness'],
  ['ranks', 'evenness', 'changes'],
  ['evenness', 'changes', 'ranks'],
  ['evenness', 'ranks', 'changes'],
];

function dutyArbitrary() {
  const day = fc.constantFrom(...DAYS, '');
  return fc
    .record({
      need: fc.constantFrom(0, 1, 1, 1, 2, 3),
      priority: fc.constantFrom(null, 1, 2, 3),
      day,
      time: fc.constantFrom('am', 'pm', ''),
    })
    .map(({ need, priority, day: group, time }) => ({
      need,
      priority,
      group,
      slot: group === '' || time === '' ? '' : `${group} ${time}`,
    }));
}

function ruleArbitrary(dutyCount: number, personCount: number): fc.Arbitrary<SpecRule> {
  const duty = fc.integer({ min: 0, max: dutyCount - 1 });
  const person = fc.integer({ min: 0, max: personCount - 1 });
  const label = fc.constantFrom(...DAYS, ...DAYS.flatMap((day) => [`${day} am`, `${day} pm`]));
  return fc.oneof(
    fc.record({ rule: fc.constantFrom('Fixed' as const, 'Barred' as const), duty, person }),
    fc.record({ rule: fc.constant('Away' as const), person, label }),
    fc.record({
      rule: fc.constant('Limit' as const),
      label,
      person: fc.option(person),
      most: fc.integer({ min: 0, max: 2 }),
    }),
  );
}

/** Fixed and Barred of one pair exclude each other here; the contract's finding has its own test. */
function ruleKey(rule: SpecRule): string {
  if (rule.rule === 'Away') return `Away ${rule.person} ${rule.label}`;
  if (rule.rule === 'Limit') return `Limit ${rule.person} ${rule.label}`;
  return `pair ${rule.duty} ${rule.person}`;
}
