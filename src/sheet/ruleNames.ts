import { quote } from './cell';
import { lookUp, type Directory } from './directory';
import { nameKey } from './name';
import { NearMisses } from './nearMiss';
import type { Rule } from './readRules';
import type { Report } from './report';

/** What rules refer to. */
export interface Context {
  readonly duties: Directory;
  readonly people: Directory;
  /** Slots and groups: key to first spelling. */
  readonly labels: ReadonlyMap<string, string>;
  /** Keys of the labels that are both a slot and a group. */
  readonly doubleLabels: ReadonlySet<string>;
}

type Kind = 'duty' | 'person' | 'slot or group';

const WHERE: Record<Kind, string> = {
  duty: 'among the duties',
  person: 'among the people',
  'slot or group': 'in the duties table',
};

/** The rules all of whose names are known. The others have no effect and are found, with what they may mean. */
export function knownRules(rules: readonly Rule[], context: Context, report: Report): Rule[] {
  const near: Record<Kind, NearMisses> = {
    duty: new NearMisses(() => namesOf(context.duties)),
    person: new NearMisses(() => namesOf(context.people)),
    'slot or group': new NearMisses(() => [...context.labels.values()]),
  };
  return rules.filter((rule) => {
    const unknown = unknownName(rule, context);
    if (unknown === null) return true;
    const [kind, text] = unknown;
    const detail = `${rule.word} has no effect: ${quote(text)} is not ${WHERE[kind]}.${near[kind].question(text)}`;
    report.find('Rules', rule.row, `Unknown ${kind}`, detail);
    return false;
  });
}

/** The first name of the rule that is unknown; null where there is none. */
function unknownName(rule: Rule, { duties, people, labels }: Context): readonly [Kind, string] | null {
  if ('duty' in rule && lookUp(duties, rule.duty) === -1) return ['duty', rule.duty];
  if ('other' in rule && lookUp(duties, rule.other) === -1) return ['duty', rule.other];
  if ('label' in rule && !labels.has(nameKey(rule.label))) return ['slot or group', rule.label];
  if ('person' in rule && rule.person !== '' && lookUp(people, rule.person) === -1) return ['person', rule.person];
  return null;
}

function namesOf({ names, fromCase }: Directory): string[] {
  return Array.from(fromCase, (number) => names.names[number]);
}

/** Rules that say again what an earlier row says, and rules whose label is a slot as well as a group: found. */
export function findRuleOddities(known: readonly Rule[], context: Context, report: Report): void {
  const firstRow = new Map<string, number>();
  for (const rule of known) {
    const subject = subjectOf(rule, context);
    const row = firstRow.get(subject);
    if (row === undefined) firstRow.set(subject, rule.row);
    else report.find('Rules', rule.row, 'Row given twice', `The same ${rule.word} rule stands in row ${row} already${KEPT[rule.word] ?? ''}.`);
    if ('label' in rule && context.doubleLabels.has(nameKey(rule.label))) {
      const detail = `${quote(rule.label)} is a slot and also a group: ${rule.word} covers the duties of both.`;
      report.find('Rules', rule.row, 'Slot and group of one name', detail);
    }
  }
}

/** Which of two numbers counts where the rows differ in nothing else. */
const KEPT: Partial<Record<Rule['word'], string>> = {
  Limit: '; of two numbers the lower one counts',
  Rest: '; of two numbers the higher one counts',
  Seconds: '; of two numbers the lower one counts',
  Price: '; of two prices the higher one counts, and blank forbids the change',
};

/** What a rule is about: equal for two rules that differ in a number at most. */
function subjectOf(rule: Rule, { duties, people }: Context): string {
  const person = 'person' in rule && rule.person !== '' ? lookUp(people, rule.person) : -1;
  switch (rule.word) {
    case 'Fixed':
    case 'Barred':
      return `${rule.word} ${lookUp(duties, rule.duty)} ${person}`;
    case 'Away':
    case 'Limit':
      return `${rule.word} ${person} ${nameKey(rule.label)}`;
    case 'Clash':
    case 'Together': {
      const [one, other] = [lookUp(duties, rule.duty), lookUp(duties, rule.other)];
      return `${rule.word} ${Math.min(one, other)} ${Math.max(one, other)}`;
    }
    case 'Order':
      return `${rule.word} ${rule.aims.join()}`;
    case 'Price':
      return `${rule.word} ${rule.what}`;
    default:
      return rule.word;
  }
}
