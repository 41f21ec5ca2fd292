import { ALARM, type DraftCell } from '../host/port';
import { column, hasTimes, PAIR, type Membership, type Table } from './checkTables';
import type { Case } from '../cover/case';

/** One thing looked for: how many faults of its kind a formula counts; 0 where all is well. */
export interface Check {
  readonly fault: string;
  readonly formula: string;
}

/**
 * What a row of the plan can be found guilty of: as its row says it, and as the list of the check does;
 * null where the list counts people or duties instead of rows.
 */
const ROW_FAULTS = {
  unread: ['cannot be read', 'Rows that cannot be read'],
  duty: ['no such duty', 'Rows with a duty that is none of the case'],
  details: ['slot, group or load differ', 'Rows whose slot, group or load is not that of the duty'],
  person: ['no such person', 'Seats of people who are none of the case'],
  pair: ['may not take it', 'Seats that neither a pair nor a Fixed rule allows'],
  barred: ['barred', 'Seats that a Barred rule forbids'],
  away: ['away then', 'Seats of people who are away'],
  twice: ['given twice', 'Seats given twice to one person'],
  maximum: ['over the maximum', null],
  need: ['more people than needed', null],
  limit: ['over a limit', 'Seats of people over the limit of a slot or group'],
  time: ['too close in time', 'Seats too close in time to another of the same person'],
} as const;

/** Where a row of the plan says what is wrong with it. */
const said = (fault: keyof typeof ROW_FAULTS): string => `"${ALARM}: ${ROW_FAULTS[fault][0]}"`;

/** Before every time there is. */
const NEVER = -1_000_000_000;

/** The columns of the row of the plan, of the numbers found for it, and of what is said of it. */
const [ROW, DUTY, PERSON, STANDING, FIRST_SET] = ['[0]', '[1]', '[2]', '[3]', 6];

/**
 * One row of formulas for every row of the plan, wherever rows are sorted or moved to: the numbers
 * of its duty and person, what the tables say of that pair, and the first fault found.
 *
 * @param count the rows of the plan
 */
export function rowTable(kase: Case, membership: Membership, count: number): Table {
  const sets = Array.from({ length: membership.most }, (_, i) => i);
  const timed = hasTimes(kase);
  const over = sets.map((i) => `[${FIRST_SET + sets.length + i}]`);
  const start = FIRST_SET + 2 * sets.length;
  const formulas = [
    dutyFormula,
    personFormula,
    standingFormula,
    `=IF(${DUTY}=0,0,INDEX(DutyLoad,${DUTY}))`,
    faultFormula(over, timed ? closeFormula(kase.rest, start) : null),
    ...sets.map((i) => `=IF(${DUTY}=0,0,INDEX(DutySet${i + 1},${DUTY}))`),
    ...sets.map((i) => overFormula(`[${FIRST_SET + i}]`, sets)),
    ...(timed ? ['DutyStart', 'DutyEnd'].map(timeFormula) : []),
  ];
  return {
    title: 'The plan, row by row',
    columns: [
      column('Row', null),
      column('Duty', 'RowDuty'),
      column('Person', 'RowPerson'),
      column('Standing', 'RowStanding'),
      column('Load', 'RowLoad'),
      column('Fault', 'RowFault'),
      ...sets.map((i) => column(`Limit ${i + 1}`, `RowSet${i + 1}`)),
      ...sets.map((i) => column(`Over limit ${i + 1}`, null)),
      ...(timed ? [column('Start', 'RowStart'), column('End', 'RowEnd')] : []),
    ],
    rows: Array.from({ length: count }, (_, row): DraftCell[] => [row + 1, ...formulas.map((formula) => ({ formula }))]),
  };
}

// Of names that a spreadsheet takes for one, such as "AB" and "ab", one is as good as the other: the greatest number is taken.
const dutyFormula = `=IFERROR(SUMPRODUCT(MAX((DutyName=INDEX(PlanDuty,${ROW})&"")*DutyNumber)),0)`;

/** 0 for nobody, -1 for someone unknown. */
const personFormula =
  `=IFERROR(IF(INDEX(PlanPerson,${ROW})&""="",0,` + `SUMPRODUCT(MAX((PersonName=INDEX(PlanPerson,${ROW})&"")*(PersonNumber+1)))-1),-1)`;

const pair = `${DUTY}*${PAIR}+${PERSON}`;
const place = `MATCH(${pair},PairNumber,1)`;
const standingFormula = `=IF(${PERSON}<=0,"-",IF(INDEX(PairNumber,${place})=${pair},INDEX(PairStanding,${place}),"-"))`;

/** 1 where someone holds more seats of a set than allowed. */
function overFormula(set: string, sets: readonly number[]): string {
  const counted = sets.map((i) => `COUNTIFS(RowPerson,${PERSON},RowSet${i + 1},${set})`).join('+');
  const own = `${set}*${PAIR}+${PERSON}`;
  const at = `MATCH(${own},OwnNumber,1)`;
  return `=IF(OR(${set}=0,${PERSON}<=0),0,IF(${counted}>IF(INDEX(OwnNumber,${at})=${own},INDEX(OwnMost,${at}),INDEX(LimitMost,${set})),1,0))`;
}

function timeFormula(name: string): string {
  return `=IF(${DUTY}=0,${NEVER},IF(INDEX(${name},${DUTY})="",${NEVER},INDEX(${name},${DUTY})))`;
}

/** True where someone has another duty before the rest after this one is over. */
function closeFormula(rest: number, start: number): string {
  const [from, to] = [`[${start}]`, `[${start + 1}]`];
  return `AND(${from}>${NEVER},SUMPRODUCT((RowPerson=${PERSON})*(RowStart<${to}+${rest})*(${from}<RowEnd+${rest}))>1)`;
}

/** The first fault of a row. Fixed seats stand whatever limits and times say. */
function faultFormula(over: readonly string[], close: string | null): string {
  const differs = ['Slot', 'Group', 'Load'].map((word) => `INDEX(Plan${word},${ROW})&""<>INDEX(Duty${word},${DUTY})&""`).join(',');
  const isBlank = `AND(INDEX(PlanDuty,${ROW})&""="",INDEX(PlanPerson,${ROW})&""="")`;
  const tests: [test: string, answer: string][] = [
    [isBlank, '""'],
    [`${DUTY}=0`, said('duty')],
    [`OR(${differs})`, said('details')],
    [`${PERSON}=0`, '""'],
    [`${PERSON}<0`, said('person')],
    [`${STANDING}="-"`, said('pair')],
    [`${STANDING}="barred"`, said('barred')],
    [`${STANDING}="away"`, said('away')],
    [`COUNTIFS(RowDuty,${DUTY},RowPerson,${PERSON})>1`, said('twice')],
    [`${STANDING}="fixed"`, '""'],
    ...(over.length === 0 ? [] : [[`${over.join('+')}>0`, said('limit')] satisfies [string, string]]),
    ...(close === null ? [] : [[close, said('time')] satisfies [string, string]]),
    [`INDEX(PersonHeld,${PERSON})>MAX(INDEX(PersonMaximum,${PERSON}),INDEX(PersonFixed,${PERSON}))`, said('maximum')],
    [`INDEX(DutyHeld,${DUTY})>MAX(INDEX(DutyNeed,${DUTY}),INDEX(DutyFixed,${DUTY}))`, said('need')],
  ];
  return `=IFERROR(${tests.reduceRight((rest, [test, answer]) => `IF(${test},${answer},${rest})`, '""')},${said('unread')})`;
}

/**
 * What the plan must keep, asked of the plan as it stands on its sheet. No count can go below 0, so
 * that none makes up for another.
 */
export function planChecks({ clashes, together, duties, people }: Case, membership: Membership, count: number, missed: number): Check[] {
  const isAsked = { limit: membership.most > 0, time: duties.some(({ times }) => times.length > 0) } as Record<string, boolean | undefined>;
  const rowFaults = (Object.keys(ROW_FAULTS) as (keyof typeof ROW_FAULTS)[]).flatMap((one): Check[] => {
    const [, fault] = ROW_FAULTS[one];
    return fault === null || isAsked[one] === false ? [] : [{ fault, formula: `=COUNTIFS(RowFault,${said(one)})` }];
  });
  const below = 'SUMPRODUCT((PersonHeld<PersonMinimum)*(PersonMinimum-PersonHeld))';
  return [
    ...rowFaults,
    { fault: 'Fixed seats that are not held', formula: '=MAX(0,COUNTIFS(PairStanding,"fixed")-COUNTIFS(RowStanding,"fixed"))' },
    { fault: 'Duties with more people than they need', formula: '=SUMPRODUCT((DutyHeld>DutyNeed)*(DutyHeld>DutyFixed))' },
    { fault: 'People over their maximum', formula: '=SUMPRODUCT((PersonHeld>PersonMaximum)*(PersonHeld>PersonFixed))' },
    ...(people.some(({ minimum }) => minimum > 0)
      ? [{ fault: 'Minimums missed by more than in the plan that was handed over', formula: `=MAX(0,${below}-${missed})` }]
      : []),
    ...(clashes.length === 0 ? [] : [{ fault: 'People with two duties that clash', formula: '=SUM(ClashFaults)' }]),
    ...(together.length === 0 ? [] : [{ fault: 'Duties that go together, given to different people', formula: '=SUM(TogetherFaults)' }]),
    { fault: 'Seats fewer than in the plan that was handed over', formula: '=SUMPRODUCT((CoverNow<CoverHanded)*(CoverHanded-CoverNow))' },
    { fault: 'Rows put into the plan or taken out', formula: `=ABS(ROWS(PlanDuty)-${count})` },
    // Two cells more than the plan's own are the headings; what is written below lies between the two.
    { fault: 'Cells filled below the plan', formula: '=MAX(0,COUNTA(PlanAround)-COUNTA(PlanDuty)-COUNTA(PlanPerson)-2)' },
  ];
}
