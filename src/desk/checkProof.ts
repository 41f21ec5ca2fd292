import { PROOF } from '../functions/proof';
import { PROOF_CHECKS, PROOF_NAMES } from '../functions/proofChecks';
import type { Solved } from '../functions/solved';
import type { DraftCell } from '../host/port';
import { nameKey } from '../sheet/name';
import type { Check } from './checkRows';
import { column, type Table } from './checkTables';

/** What the formulas of the proof call names, here are numbers and codes: no spreadsheet takes those for conditions. */
const INSTEAD: Readonly<Record<string, string>> = {
  DutyName: 'DutyNumber',
  PersonName: 'PersonNumber',
  DutySlot: 'CodeSlot',
  DutyGroup: 'CodeGroup',
};

/**
 * True where the proof that no plan covers more can be written down in formulas: a flow, each duty in
 * one slot and group, and no times or clashes, which no table of ours lists duty by duty.
 */
export function isProvable({ case: { duties }, isFlow, outcome: { open } }: Solved): boolean {
  const isPlain = open.sets.every(({ kind }) => kind === 'label');
  return isFlow && isPlain && duties.every(({ slots, groups }) => slots.length < 2 && groups.length < 2);
}

/** The formulas about the bounds of the proof; those about the plan are asked of its sheet instead. */
export function boundChecks(): Check[] {
  const bounds = PROOF_CHECKS.filter(({ fault, formula }) => /Bound|Charge/u.test(formula) && !fault.startsWith('Seats that the bounds'));
  return [
    // Fewer seats than the bounds allow are a fault of their own.
    {
      fault: 'Seats that the bounds allow beyond those handed over',
      formula: '=ABS(SUMPRODUCT((ProofPart="Bound")*ProofMost)-SUM(CoverHanded))',
    },
    ...bounds.map(({ fault, formula }) => ({ fault, formula: inNumbers(formula) })),
  ];
}

function inNumbers(formula: string): string {
  return formula.replace(/[A-Z][a-z]+[A-Z][a-z]+/gu, (name) => INSTEAD[name] ?? name);
}

/** The bounds, the pairs charged to them, and the rules they rest on, in numbers and codes. */
export function proofTables(solved: Solved): Table[] {
  const kase = solved.case;
  const codes = new Map<string, { readonly code: string; readonly name: string }>();
  /** The code of a slot or group, in whatever case it is written. */
  const code = (name: string): string => {
    const key = nameKey(name);
    const known = codes.get(key)?.code ?? `L${codes.size + 1}`;
    if (!codes.has(key)) codes.set(key, { code: known, name });
    return known;
  };
  const label = (keys: readonly string[]): DraftCell => (keys.length === 0 ? null : code(kase.labelNames.get(keys[0]) ?? keys[0]));
  const slots = kase.duties.map(({ slots: own, groups }): DraftCell[] => [label(own), label(groups)]);
  const [proof, rules] = [boundRows(solved, code), ruleRows(solved, code)];
  return [
    {
      title: 'Slots and groups of the duties',
      columns: [column('Slot', 'CodeSlot'), column('Group', 'CodeGroup')],
      rows: slots,
    },
    {
      title: 'Rules',
      columns: [column('Rule', 'RuleWord'), column('Duty', 'RuleDuty'), column('Person', 'RulePerson'), column('Value', 'RuleValue')],
      rows: rules,
    },
    {
      title: 'Why no plan covers more',
      columns: Object.entries(PROOF_NAMES.proof).map(([name, heading]) => column(heading, name)),
      rows: proof,
    },
    {
      title: 'Codes',
      columns: [column('Code', null), column('Slot or group', null)],
      rows: [...codes.values()].map((one) => [one.code, one.name]),
    },
  ];
}

const OWN_WORDS = new Set(['need', 'maximum', 'pair', 'fixed', 'barred', 'away', 'no room']);

/** The rows of the proof about its bounds. */
function boundRows(solved: Solved, code: (name: string) => string): DraftCell[][] {
  const { duties, people } = solved.case;
  const [dutyNumber, personNumber] = [duties, people].map((list) => new Map(list.map(({ name }, i) => [name, i + 1])));
  return PROOF.ofCase(solved)
    .slice(1)
    .flatMap(([part, duty, person, limit, count, most]): DraftCell[][] => {
      if (part !== 'Bound' && part !== 'Charge') return [];
      const word = String(limit);
      const numbers = [dutyNumber.get(String(duty)) ?? null, personNumber.get(String(person)) ?? null];
      return [[part, ...numbers, OWN_WORDS.has(word) ? word : code(word), Number(count), Number(most)]];
    });
}

function ruleRows({ case: { fixed, barred, away, limits } }: Solved, code: (name: string) => string): DraftCell[][] {
  return [
    ...fixed.map(({ duty, person }): DraftCell[] => ['Fixed', duty + 1, person + 1, null]),
    ...barred.map(({ duty, person }): DraftCell[] => ['Barred', duty + 1, person + 1, null]),
    ...away.map(({ person, label }): DraftCell[] => ['Away', null, person + 1, code(label.name)]),
    ...limits.map(({ person, label, most }): DraftCell[] => ['Limit', code(label.name), person === null ? null : person + 1, most]),
  ];
}
