import type { Case } from '../cover/case';
import { PROOF } from '../functions/proof';
import { PROOF_CHECKS, PROOF_NAMES } from '../functions/proofChecks';
import type { Solved } from '../functions/solved';
import { columnLetters } from '../host/address';
import { ALARM, type DraftCell, type SheetDraft } from '../host/port';

/** In a column where there is nothing, so that formulas can compare it. */
export const NONE = '-';

/** The sheet with the check, and the formula that gives its verdict elsewhere. */
export interface CheckSheet {
  readonly sheet: SheetDraft;
  readonly verdict: string;
}

/** One thing looked for: how many faults of its kind a formula counts; 0 where all is well. */
interface Check {
  readonly fault: string;
  readonly formula: string;
}

const SHEET = 'Check';
const HOLDS = 'All is well: nothing in the plan breaks what is checked';
/** The rows of the check: title, verdict, blank, headings, checks. */
const FIRST_CHECK = 4;

const fixedRow = 'COUNTIFS(RuleWord,"Fixed",RuleDuty,PlanDuty,RulePerson,PlanPerson)';
const heldOfDuty = 'COUNTIFS(PlanDuty,DutyName,PlanPerson,"?*")';
const loadOfPerson = 'SUMIFS(PlanLoad,PlanPerson,PersonName)';
const covered = `SUMPRODUCT((${heldOfDuty}<DutyNeed)*${heldOfDuty}+(${heldOfDuty}>=DutyNeed)*DutyNeed)`;

/** What the plan must keep, asked of the plan as it stands on its sheet. Fixed seats stand whatever else is said. */
const PLAN_CHECKS: readonly Check[] = [
  {
    fault: 'Seats that neither a pair nor a Fixed rule allows',
    formula: `=SUMPRODUCT((PlanPerson<>"")*(COUNTIFS(PairDuty,PlanDuty,PairPerson,PlanPerson)+${fixedRow}=0))`,
  },
  {
    fault: 'Seats that a Barred rule forbids',
    formula: '=SUMPRODUCT((PlanPerson<>"")*(COUNTIFS(RuleWord,"Barred",RuleDuty,PlanDuty,RulePerson,PlanPerson)>0))',
  },
  {
    fault: 'Seats of people who are away',
    formula:
      `=SUMPRODUCT((PlanPerson<>"")*(${fixedRow}=0)*(COUNTIFS(RuleWord,"Away",RulePerson,PlanPerson,RuleValue,PlanSlot)` +
      '+COUNTIFS(RuleWord,"Away",RulePerson,PlanPerson,RuleValue,PlanGroup)>0))',
  },
  {
    fault: 'Seats given twice to one person',
    formula: '=SUMPRODUCT((PlanPerson<>"")*(COUNTIFS(PlanDuty,PlanDuty,PlanPerson,PlanPerson)>1))',
  },
  {
    fault: 'Fixed seats that are not held',
    formula: '=SUMPRODUCT((RuleWord="Fixed")*(COUNTIFS(PlanDuty,RuleDuty,PlanPerson,RulePerson)=0))',
  },
  {
    fault: 'Duties with more people than they need',
    formula: `=SUMPRODUCT((${heldOfDuty}>DutyNeed)*(${heldOfDuty}>COUNTIFS(RuleWord,"Fixed",RuleDuty,DutyName)))`,
  },
  {
    fault: 'Rows whose duty, slot, group or load is not as in the duties',
    formula: '=SUMPRODUCT((PlanDuty<>"")*(COUNTIFS(DutyName,PlanDuty,DutySlot,PlanSlot,DutyGroup,PlanGroup,DutyLoad,PlanLoad)=0))',
  },
  {
    fault: 'People over their maximum',
    formula: `=SUMPRODUCT((${loadOfPerson}>PersonMaximum)*(${loadOfPerson}>PersonFixed))`,
  },
  {
    fault: 'Two duties of one person in one slot',
    formula: `=SUMPRODUCT((PlanPerson<>"")*(PlanSlot<>"${NONE}")*(${fixedRow}=0)*(COUNTIFS(PlanPerson,PlanPerson,PlanSlot,PlanSlot)>1))`,
  },
  {
    fault: 'People over the limit of a slot or group',
    formula: '=SUM(LimitFaults)',
  },
  {
    fault: 'Seats fewer than the plan that was handed over',
    formula: `=SUM(HandedCover)-${covered}`,
  },
];

/** A table on the sheet: headings with the names of their columns, and rows. */
interface Table {
  readonly title: string;
  readonly columns: readonly { readonly heading: string; readonly name: string | null }[];
  readonly rows: readonly (readonly DraftCell[])[];
}

/** The check block with the tables it needs, all in plain values but the formulas. */
export function checkSheet(solved: Solved, prefix: string): CheckSheet {
  const kase = solved.case;
  const withProof = solved.isFlow && kase.duties.every(({ slots, groups }) => slots.length < 2 && groups.length < 2);
  const checks = [...PLAN_CHECKS, ...(withProof ? boundChecks() : [])];
  const tables = [...caseTables(solved), ...(withProof ? [proofTable(solved)] : [])];
  const names = [...tables.flatMap(({ columns }) => columns.flatMap(({ name }) => name ?? [])), 'PlanDuty', 'PlanPerson', 'PlanSlot', 'PlanGroup', 'PlanLoad'];
  const named = (formula: string): string => formula.replace(/[A-Z][A-Za-z]+/gu, (word) => (names.includes(word) ? prefix + word : word));

  const rows: DraftCell[][] = [];
  const put = (row: number, column: number, cell: DraftCell): void => {
    while (rows.length <= row) rows.push([]);
    while (rows[row].length <= column) rows[row].push(null);
    rows[row][column] = cell;
  };
  const counts = `B${FIRST_CHECK + 1}:B${FIRST_CHECK + checks.length}`;
  put(0, 0, 'The check');
  put(1, 0, { formula: `=IF(SUM(${counts})=0,"${HOLDS}","${ALARM}: "&SUM(${counts})&" faults, see below")` });
  put(2, 0, withProof ? PROVEN : PARTLY);
  put(3, 0, 'Looked for');
  put(3, 1, 'Found');
  checks.forEach(({ fault, formula }, i) => {
    put(FIRST_CHECK + i, 0, fault);
    put(FIRST_CHECK + i, 1, { formula: named(formula) });
  });
  const ranges: { name: string; cells: string }[] = [];
  let left = 3;
  for (const { title, columns, rows: body } of tables) {
    put(2, left, title);
    columns.forEach(({ heading, name }, c) => {
      put(3, left + c, heading);
      // A named column of nothing still needs a cell.
      const last = FIRST_CHECK + Math.max(1, body.length);
      const letters = columnLetters(left + c);
      if (name !== null) ranges.push({ name: prefix + name, cells: `${letters}${FIRST_CHECK + 1}:${letters}${last}` });
    });
    const start = left;
    body.forEach((row, r) => {
      const inRow = (formula: string): string => formula.replace(/\[(\d)\]/gu, (_, c) => `${columnLetters(start + Number(c))}${FIRST_CHECK + r + 1}`);
      row.forEach((cell, c) => put(FIRST_CHECK + r, start + c, isFormula(cell) ? { formula: inRow(named(cell.formula)) } : cell));
    });
    left += columns.length + 1;
  }
  const verdict = `=IF(SUM(${SHEET}!${counts})=0,"${HOLDS}","${ALARM}: see the sheet ${SHEET}")`;
  return { sheet: { name: SHEET, rows, titleRows: [0], headingRows: [3], widths: [62, 8], names: ranges, alarms: ['A2'] }, verdict };
}

const PROVEN = 'Counted by formulas of the spreadsheet alone: that the plan keeps what is checked, and that no plan covers more.';
const PARTLY =
  'Counted by formulas of the spreadsheet alone. Not among them: overlapping times, Rest, Clash and Together, and whether another plan covers more.';

function isFormula(cell: DraftCell): cell is { readonly formula: string } {
  return cell !== null && typeof cell === 'object';
}

/** The formulas about the bounds of the proof; those about the plan are asked of its sheet instead. */
function boundChecks(): Check[] {
  const bounds = PROOF_CHECKS.filter(({ fault, formula }) => /Bound|Charge/u.test(formula) && !fault.startsWith('Seats that the bounds'));
  const beyond: Check = {
    fault: 'Seats that the bounds would allow beyond those of the plan',
    formula: `=ABS(SUMPRODUCT((ProofPart="Bound")*ProofMost)-${covered})`,
  };
  return [beyond, ...bounds];
}

function caseTables(solved: Solved): Table[] {
  const kase = solved.case;
  const { pairs, duties, people } = kase;
  const { plan, open } = solved.outcome;
  const label = (keys: readonly string[]): string => (keys.length === 0 ? NONE : (kase.labelNames.get(keys[0]) ?? keys[0]));
  const column = (heading: string, name: string | null): { heading: string; name: string | null } => ({ heading, name });
  return [
    {
      title: 'Who may take what',
      columns: [column('Duty', 'PairDuty'), column('Person', 'PairPerson')],
      rows: Array.from(pairs.duty, (d, i) => [duties[d].name, people[pairs.person[i]].name]),
    },
    {
      title: 'People',
      columns: [column('Person', 'PersonName'), column('Maximum', 'PersonMaximum'), column('Load of Fixed seats', 'PersonFixed')],
      rows: people.map(({ name, maximum }, p) => [name, maximum, open.fixedLoad[p]]),
    },
    {
      title: 'Duties',
      columns: [
        column('Duty', 'DutyName'),
        column('Need', 'DutyNeed'),
        column('Slot', 'DutySlot'),
        column('Group', 'DutyGroup'),
        column('Load', 'DutyLoad'),
      ],
      rows: duties.map(({ name, need, slots, groups, load }) => [name, need, label(slots), label(groups), load]),
    },
    { title: 'Rules', columns: [column('Rule', 'RuleWord'), column('Duty', 'RuleDuty'), column('Person', 'RulePerson'), column('Value', 'RuleValue')], rows: ruleRows(kase) },
    {
      title: 'Limits',
      columns: [column('Slot or group', null), column('Person', null), column('Most', null), column('Faults', 'LimitFaults')],
      rows: limitRows(kase),
    },
    { title: 'Handed over', columns: [column('Seats covered', 'HandedCover')], rows: [[plan.covered]] },
  ];
}

function ruleRows({ fixed, barred, away, limits, duties, people }: Case): DraftCell[][] {
  return [
    ...fixed.map(({ duty, person }): DraftCell[] => ['Fixed', duties[duty].name, people[person].name, NONE]),
    ...barred.map(({ duty, person }): DraftCell[] => ['Barred', duties[duty].name, people[person].name, NONE]),
    ...away.map(({ person, label }): DraftCell[] => ['Away', NONE, people[person].name, label.name]),
    ...limits.map(({ person, label, most }): DraftCell[] => ['Limit', label.name, person === null ? NONE : people[person].name, most]),
  ];
}

/** Each limit with a formula that counts the seats of people who are over it. [0] and [1] are cells of its row. */
function limitRows({ limits, people }: Case): DraftCell[][] {
  return limits.map(({ person, label, most }): DraftCell[] => {
    const who = person === null ? 'PlanPerson' : '[1]';
    const counted = `(COUNTIFS(PlanPerson,${who},PlanSlot,[0])+COUNTIFS(PlanPerson,${who},PlanGroup,[0])>[2])`;
    const mine = person === null ? '' : '*(PlanPerson=[1])';
    const formula = `=SUMPRODUCT((PlanPerson<>"")*((PlanSlot=[0])+(PlanGroup=[0])>0)*(${fixedRow}=0)${mine}*${counted})`;
    return [label.name, person === null ? 'everyone' : people[person].name, most, { formula }];
  });
}

function proofTable(solved: Solved): Table {
  const names = Object.entries(PROOF_NAMES.proof).map(([name, heading]) => ({ heading, name }));
  const rows = PROOF.ofCase(solved).slice(1);
  const plain = rows.filter(([part]) => part === 'Bound' || part === 'Charge' || part === 'Total');
  return { title: 'Why no plan covers more', columns: names, rows: plain.map((row) => row.map((cell) => (typeof cell === 'boolean' ? String(cell) : cell))) };
}
