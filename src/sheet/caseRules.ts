import { DEFAULT_ORDER, type Away, type Case, type Limit, type Seat } from '../cover/case';
import { quote } from './cell';
import { lookUp, type Directory } from './directory';
import { nameKey } from './name';
import { NearMisses } from './nearMiss';
import type { Rule } from './readRules';
import type { Report } from './report';

/** The part of a case that the rules table says. */
export type CaseRules = Pick<
  Case,
  'fixed' | 'barred' | 'away' | 'limits' | 'clashes' | 'together' | 'rest' | 'order' | 'prices' | 'seconds'
>;

/** What rules refer to. */
export interface Context {
  readonly duties: Directory;
  readonly people: Directory;
  /** Slots and groups: key to first spelling. */
  readonly labels: ReadonlyMap<string, string>;
}

const DEFAULT_SECONDS = 20;

/** Turns rules into what they mean for the case. Rules about unknown names have no effect and are found. */
export function caseRules(rules: readonly Rule[], context: Context, report: Report): CaseRules {
  const known = rules.filter(knownOnly(context, report));
  const of = <W extends Rule['word']>(word: W): Extract<Rule, { word: W }>[] =>
    known.filter((rule): rule is Extract<Rule, { word: W }> => rule.word === word);
  const barred = seats(of('Barred'), context, report);
  return {
    fixed: withoutBarred(seats(of('Fixed'), context, report), barred, context, report),
    barred: barred.map(({ duty, person }) => ({ duty, person })),
    away: awayOf(of('Away'), context),
    limits: limitsOf(of('Limit'), context),
    clashes: dutyPairs(of('Clash'), context),
    together: dutyPairs(of('Together'), context),
    rest: Math.max(0, ...of('Rest').map(({ minutes }) => minutes)),
    seconds: Math.min(...(of('Seconds').length > 0 ? of('Seconds').map(({ seconds }) => seconds) : [DEFAULT_SECONDS])),
    order: oneOrder(of('Order'), report),
    prices: { place: priceOf(of('Price'), 'place', 1), eligibility: priceOf(of('Price'), 'eligibility', 2) },
  };
}

type SeatRule = Extract<Rule, { word: 'Fixed' | 'Barred' }>;
type TwoDuties = Extract<Rule, { word: 'Clash' | 'Together' }>;
type SeatOfRow = Seat & { readonly row: number };

/** True for a rule all of whose names are known; the others are found, with what they may mean. */
function knownOnly({ duties, people, labels }: Context, report: Report): (rule: Rule) => boolean {
  const listed = ({ names, fromCase }: Directory): string[] => Array.from(fromCase, (number) => names.names[number]);
  const candidates = {
    duty: () => listed(duties),
    person: () => listed(people),
    'slot or group': () => [...labels.values()],
  };
  return (rule) => {
    const unknown = (kind: keyof typeof candidates, text: string): boolean => {
      const where = kind === 'slot or group' ? 'in the duties table' : `among the ${kind === 'duty' ? 'duties' : 'people'}`;
      report.find(
        'Rules',
        rule.row,
        `Unknown ${kind}`,
        `${rule.word} has no effect: ${quote(text)} is not ${where}.${new NearMisses(candidates[kind]()).question(text)}`,
      );
      return false;
    };
    if ('duty' in rule && lookUp(duties, rule.duty) === -1) return unknown('duty', rule.duty);
    if ('other' in rule && lookUp(duties, rule.other) === -1) return unknown('duty', rule.other);
    if ('label' in rule && !labels.has(nameKey(rule.label))) return unknown('slot or group', rule.label);
    if ('person' in rule && rule.person !== '' && lookUp(people, rule.person) === -1) return unknown('person', rule.person);
    return true;
  };
}

/** Seats sorted like pairs, each once. */
function seats(rules: readonly SeatRule[], { duties, people }: Context, report: Report): SeatOfRow[] {
  const firstRow = new Map<string, SeatOfRow>();
  for (const rule of rules) {
    const duty = lookUp(duties, rule.duty);
    const person = lookUp(people, rule.person);
    const earlier = firstRow.get(`${duty} ${person}`);
    if (earlier === undefined) firstRow.set(`${duty} ${person}`, { duty, person, row: rule.row });
    else report.find('Rules', rule.row, 'Row given twice', `The same ${rule.word} rule stands in row ${earlier.row} already.`);
  }
  return [...firstRow.values()].sort(
    (a, b) => duties.rank[a.duty] - duties.rank[b.duty] || people.rank[a.person] - people.rank[b.person],
  );
}

/** Where both rules name one pair, "never" is the safer reading. */
function withoutBarred(fixed: readonly SeatOfRow[], barred: readonly SeatOfRow[], context: Context, report: Report): Seat[] {
  return fixed.flatMap(({ duty, person, row }) => {
    const against = barred.find((seat) => seat.duty === duty && seat.person === person);
    if (against === undefined) return [{ duty, person }];
    const name = context.people.names.names[context.people.fromCase[person]];
    report.find('Rules', row, 'Fixed and Barred', `Row ${against.row} bars ${name} from this duty; Barred is kept, Fixed is not.`);
    return [];
  });
}

function awayOf(rules: readonly Extract<Rule, { word: 'Away' }>[], { people, labels }: Context): Away[] {
  const unique = new Map<string, Away>();
  for (const rule of rules) {
    const key = nameKey(rule.label);
    const person = lookUp(people, rule.person);
    unique.set(`${person} ${key}`, { person, label: { key, name: labels.get(key)! } });
  }
  return [...unique.values()].sort((a, b) => people.rank[a.person] - people.rank[b.person] || byKey(a, b));
}

function limitsOf(rules: readonly Extract<Rule, { word: 'Limit' }>[], { people, labels }: Context): Limit[] {
  const unique = new Map<string, Limit>();
  for (const rule of rules) {
    const key = nameKey(rule.label);
    const person = rule.person === '' ? null : lookUp(people, rule.person);
    const most = Math.min(rule.most, unique.get(`${person} ${key}`)?.most ?? Infinity);
    unique.set(`${person} ${key}`, { person, label: { key, name: labels.get(key)! }, most });
  }
  const place = ({ person }: Limit): number => (person === null ? -1 : people.rank[person]);
  return [...unique.values()].sort((a, b) => byKey(a, b) || place(a) - place(b));
}

function byKey(a: { label: { key: string } }, b: { label: { key: string } }): number {
  if (a.label.key === b.label.key) return 0;
  return a.label.key < b.label.key ? -1 : 1;
}

/** Pairs of duties, the lower name order first, sorted, each once. */
function dutyPairs(rules: readonly TwoDuties[], { duties }: Context): (readonly [number, number])[] {
  const unique = new Map<string, readonly [number, number]>();
  for (const { duty, other } of rules) {
    const [a, b] = [lookUp(duties, duty), lookUp(duties, other)].sort((x, y) => duties.rank[x] - duties.rank[y]);
    unique.set(`${a} ${b}`, [a, b]);
  }
  return [...unique.values()].sort((x, y) => duties.rank[x[0]] - duties.rank[y[0]] || duties.rank[x[1]] - duties.rank[y[1]]);
}

/** Two Order rows that disagree cannot both be kept, in whatever order they stand: that is a fault. */
function oneOrder(rules: readonly Extract<Rule, { word: 'Order' }>[], report: Report): CaseRules['order'] {
  const [first, ...others] = rules;
  const other = others.find(({ aims }) => aims.join() !== first.aims.join());
  if (other !== undefined) {
    const expected = `the order of row ${first.row}, ${first.aims.join(', ')}, or one Order row only`;
    report.fault({ table: 'Rules', row: other.row, column: 'Value', found: quote(other.aims.join(', ')), expected });
  }
  return first?.aims ?? DEFAULT_ORDER;
}

/** The highest of several prices; a blank one forbids the change. */
function priceOf(rules: readonly Extract<Rule, { word: 'Price' }>[], what: string, usual: number): number | null {
  const prices = rules.filter((rule) => rule.what === what).map(({ price }) => price);
  if (prices.includes(null)) return null;
  return prices.length === 0 ? usual : Math.max(...prices.map((price) => price ?? 0));
}
