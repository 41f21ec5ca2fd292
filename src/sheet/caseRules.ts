import { DEFAULT_ORDER, type Away, type Case, type Limit, type Seat } from '../cover/case';
import { quote } from './cell';
import { lookUp } from './directory';
import { nameKey } from './name';
import type { Rule } from './readRules';
import type { Report } from './report';
import { findRuleOddities, knownRules, type Context } from './ruleNames';

/** The part of a case that the rules table says. */
export type CaseRules = Pick<
  Case,
  'fixed' | 'barred' | 'away' | 'limits' | 'clashes' | 'together' | 'rest' | 'order' | 'prices' | 'seconds'
>;

const DEFAULT_SECONDS = 20;

/** A Fixed or Barred seat and the row of the rules that gives it. */
export type SeatOfRow = Seat & { readonly row: number };

/**
 * Turns rules into what they mean for the case. Rules about unknown names have no effect and are found.
 *
 * @returns also the Fixed seats with their rows, for what is to be said of them
 */
export function caseRules(
  rules: readonly Rule[],
  context: Context,
  report: Report,
): { rules: CaseRules; fixedRows: readonly SeatOfRow[] } {
  const known = knownRules(rules, context, report);
  findRuleOddities(known, context, report);
  const of = <W extends Rule['word']>(word: W): Extract<Rule, { word: W }>[] =>
    known.filter((rule): rule is Extract<Rule, { word: W }> => rule.word === word);
  const barred = seats(of('Barred'), context);
  const fixedRows = withoutBarred(seats(of('Fixed'), context), barred, context, report);
  return {
    fixedRows,
    rules: {
      fixed: fixedRows.map(({ duty, person }) => ({ duty, person })),
      barred: barred.map(({ duty, person }) => ({ duty, person })),
      away: awayOf(of('Away'), context),
      limits: limitsOf(of('Limit'), context),
      clashes: dutyPairs(of('Clash'), context),
      together: dutyPairs(of('Together'), context),
      rest: of('Rest').reduce((most, { minutes }) => Math.max(most, minutes), 0),
      seconds: secondsOf(of('Seconds')),
      order: oneOrder(of('Order'), report),
      prices: { place: priceOf(of('Price'), 'place', 1), eligibility: priceOf(of('Price'), 'eligibility', 2) },
    },
  };
}

type SeatRule = Extract<Rule, { word: 'Fixed' | 'Barred' }>;
type TwoDuties = Extract<Rule, { word: 'Clash' | 'Together' }>;

/** Seats sorted like pairs, each once, with the first row that gives them. */
function seats(rules: readonly SeatRule[], { duties, people }: Context): SeatOfRow[] {
  const unique = new Map<number, SeatOfRow>();
  for (const rule of rules) {
    const seat = { duty: lookUp(duties, rule.duty), person: lookUp(people, rule.person), row: rule.row };
    const key = seat.duty * people.order.length + seat.person;
    if (!unique.has(key)) unique.set(key, seat);
  }
  return [...unique.values()].sort(
    (a, b) => duties.rank[a.duty] - duties.rank[b.duty] || people.rank[a.person] - people.rank[b.person],
  );
}

/** Where both rules name one pair, "never" is the safer reading. */
function withoutBarred(fixed: readonly SeatOfRow[], barred: readonly SeatOfRow[], context: Context, report: Report): SeatOfRow[] {
  const { names, fromCase, order } = context.people;
  const barredRow = new Map(barred.map(({ duty, person, row }) => [duty * order.length + person, row]));
  return fixed.filter(({ duty, person, row }) => {
    const against = barredRow.get(duty * order.length + person);
    if (against === undefined) return true;
    const name = names.names[fromCase[person]];
    report.find('Rules', row, 'Fixed and Barred', `Row ${against} bars ${name} from this duty; Barred is kept, Fixed is not.`);
    return false;
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

/** The shortest of several times. */
function secondsOf(rules: readonly Extract<Rule, { word: 'Seconds' }>[]): number {
  return rules.length === 0 ? DEFAULT_SECONDS : Math.min(...rules.map(({ seconds }) => seconds));
}

/** The highest of several prices; a blank one forbids the change. */
function priceOf(rules: readonly Extract<Rule, { word: 'Price' }>[], what: string, usual: number): number | null {
  const prices = rules.filter((rule) => rule.what === what).map(({ price }) => price);
  if (prices.includes(null)) return null;
  return prices.length === 0 ? usual : Math.max(...prices.map((price) => price ?? 0));
}
