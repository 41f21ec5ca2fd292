import fc from 'fast-check';
import type { Range } from '../../src/sheet/range';

/** A case in plain words, from which both the tables and the oracle's programme are written. */
export interface Spec {
  readonly duties: readonly { name: string; need: number; priority: number | null; slot: string; group: string }[];
  readonly people: readonly { name: string; maximum: number }[];
  /** Duty and person numbers. */
  readonly pairs: readonly (readonly [number, number])[];
  readonly rules: readonly SpecRule[];
}

export type SpecRule =
  | { readonly rule: 'Fixed' | 'Barred'; readonly duty: number; readonly person: number }
  | { readonly rule: 'Away'; readonly person: number; readonly label: string }
  | { readonly rule: 'Limit'; readonly label: string; readonly person: number | null; readonly most: number };

/** The five ranges of a spec, with headings. */
export function rangesOf(spec: Spec): Range[] {
  const duty = (d: number): string => spec.duties[d].name;
  const person = (p: number): string => spec.people[p].name;
  return [
    [['Duty', 'Person'], ...spec.pairs.map(([d, p]) => [duty(d), person(p)])],
    [['Person', 'Maximum'], ...spec.people.map(({ name, maximum }) => [name, maximum])],
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
    ],
  ];
}

const DAYS = ['Mon', 'Tue', 'Wed'];

/** Random small cases whose limits are nested: the slots of a day lie inside the group of that day. */
export function specs({ duties = 7, people = 5, rules = 6 } = {}): fc.Arbitrary<Spec> {
  const day = fc.constantFrom(...DAYS, '');
  const duty = fc
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
  return fc
    .record({
      duties: fc.array(duty, { minLength: 1, maxLength: duties }),
      maximums: fc.array(fc.integer({ min: 0, max: 4 }), { minLength: 1, maxLength: people }),
      density: fc.constantFrom(0.2, 0.4, 0.7),
      seed: fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: duties * people, maxLength: duties * people }),
    })
    .chain(({ duties: drawn, maximums, density, seed }) => {
      const base = {
        duties: drawn.map((entry, d) => ({ name: `Duty ${d}`, ...entry })),
        people: maximums.map((maximum, p) => ({ name: `Person ${p}`, maximum })),
        pairs: drawn.flatMap((_, d) =>
          maximums.flatMap((__, p): (readonly [number, number])[] => (seed[d * people + p] < density ? [[d, p]] : [])),
        ),
      };
      return fc
        .uniqueArray(ruleArbitrary(drawn.length, maximums.length), { maxLength: rules, selector: ruleKey })
        .map((chosen): Spec => ({ ...base, rules: chosen }));
    });
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
