/**
 * The native formulas that check what DUTY.PROOF spilled against the input tables. Each counts
 * faults and must come to 0. They use nothing of ours: COUNTIFS, SUMIFS, SUM and SUMPRODUCT on named
 * columns, so that any spreadsheet program can recompute them.
 */

/** The names the formulas use: columns of the input tables without their headings, and of the proof. */
export const PROOF_NAMES = {
  pairs: { PairDuty: 'Duty', PairPerson: 'Person' },
  people: { PersonName: 'Person', PersonMaximum: 'Maximum' },
  duties: { DutyName: 'Duty', DutyNeed: 'Need', DutySlot: 'Slot', DutyGroup: 'Group' },
  rules: { RuleWord: 'Rule', RuleDuty: 'Duty', RulePerson: 'Person', RuleValue: 'Value' },
  proof: {
    ProofPart: 'Part',
    ProofDuty: 'Duty',
    ProofPerson: 'Person',
    ProofLimit: 'Limit',
    ProofCount: 'Count',
    ProofMost: 'Most',
  },
} as const;

/** One check: what it looks for, and the formula that counts it. */
export interface ProofCheck {
  readonly fault: string;
  readonly formula: string;
}

const part = (name: string): string => `(ProofPart="${name}")`;
const seats = 'COUNTIFS(ProofPart,"Seat",ProofDuty,ProofDuty,ProofPerson,ProofPerson)';
const rule = (word: string): string => `COUNTIFS(RuleWord,"${word}",RuleDuty,ProofDuty,RulePerson,ProofPerson)`;
const ownWords = ['need', 'maximum', 'pair', 'fixed', 'barred', 'away', 'no room'];
const isLabel = ownWords.map((word) => `(ProofLimit<>"${word}")`).join('*');
const labelOfDuty =
  '(COUNTIFS(DutyName,ProofDuty,DutySlot,ProofLimit)+COUNTIFS(DutyName,ProofDuty,DutyGroup,ProofLimit))';

/** Faults of the plan first, then faults in the argument that no plan covers more. */
export const PROOF_CHECKS: readonly ProofCheck[] = [
  {
    fault: 'Seats that neither a pair nor a Fixed rule allows',
    formula: `=SUMPRODUCT(${part('Seat')}*(COUNTIFS(PairDuty,ProofDuty,PairPerson,ProofPerson)+${rule('Fixed')}=0))`,
  },
  { fault: 'Seats that a Barred rule forbids', formula: `=SUMPRODUCT(${part('Seat')}*(${rule('Barred')}>0))` },
  { fault: 'Seats given twice', formula: `=SUMPRODUCT(${part('Seat')}*(${seats}>1))` },
  {
    fault: 'Duties whose seats are counted wrongly',
    formula: `=SUMPRODUCT(${part('Duty')}*(COUNTIFS(ProofPart,"Seat",ProofDuty,ProofDuty)<>ProofCount))`,
  },
  { fault: 'Duties with more people than they need', formula: `=SUMPRODUCT(${part('Duty')}*(ProofCount>ProofMost))` },
  {
    fault: 'Needs that differ from the duties table',
    formula: `=SUMPRODUCT(${part('Duty')}*(SUMIFS(DutyNeed,DutyName,ProofDuty)<>ProofMost))`,
  },
  {
    fault: 'Duties of the table that are missing here or come twice',
    formula: '=SUMPRODUCT((DutyName<>"")*(COUNTIFS(ProofPart,"Duty",ProofDuty,DutyName)<>1))',
  },
  {
    fault: 'People whose seats are counted wrongly',
    formula: `=SUMPRODUCT(${part('Person')}*(COUNTIFS(ProofPart,"Seat",ProofPerson,ProofPerson)<>ProofCount))`,
  },
  { fault: 'People over their maximum', formula: `=SUMPRODUCT(${part('Person')}*(ProofCount>ProofMost))` },
  {
    fault: 'Maximums that differ from the people table',
    formula: `=SUMPRODUCT(${part('Person')}*(SUMIFS(PersonMaximum,PersonName,ProofPerson)<>ProofMost))`,
  },
  {
    fault: 'Holders of seats who are not counted as people',
    formula: `=SUMPRODUCT(${part('Seat')}*(COUNTIFS(ProofPart,"Person",ProofPerson,ProofPerson)<>1))`,
  },
  {
    fault: 'Seats whose slot is not counted',
    formula:
      '=SUMPRODUCT((DutySlot<>"")*(COUNTIFS(ProofPart,"Seat",ProofDuty,DutyName)<>COUNTIFS(ProofPart,"In",ProofDuty,DutyName,ProofLimit,DutySlot)))',
  },
  {
    fault: 'Slots and groups counted where the duty is not in them',
    formula: `=SUMPRODUCT(${part('In')}*(${labelOfDuty}=0))`,
  },
  {
    fault: 'Slots and groups counted wrongly for a person',
    formula: `=SUMPRODUCT(${part('Limit')}*(COUNTIFS(ProofPart,"In",ProofPerson,ProofPerson,ProofLimit,ProofLimit)<>ProofCount))`,
  },
  {
    fault: 'Slots and groups of a person that have no row of their own',
    formula: `=SUMPRODUCT(${part('In')}*(COUNTIFS(ProofPart,"Limit",ProofPerson,ProofPerson,ProofLimit,ProofLimit)<>1))`,
  },
  {
    fault: 'Slots in which more than one duty is allowed',
    formula: `=SUMPRODUCT(${part('Limit')}*(COUNTIFS(DutySlot,ProofLimit)>0)*(ProofMost>1))`,
  },
  { fault: 'People over the limit of a slot or group', formula: `=SUMPRODUCT(${part('Limit')}*(ProofCount>ProofMost))` },
  {
    fault: 'Covered seats counted wrongly',
    formula:
      `=ABS(SUMPRODUCT(${part('Duty')}*((ProofCount<ProofMost)*ProofCount+(ProofCount>=ProofMost)*ProofMost))` +
      `-SUMPRODUCT(${part('Total')}*ProofCount))`,
  },
  {
    fault: 'Seats that the bounds would allow beyond the covered ones',
    formula: `=ABS(SUMPRODUCT(${part('Bound')}*ProofMost)-SUMPRODUCT(${part('Total')}*ProofCount))`,
  },
  {
    fault: 'Bounds on a duty that differ from its need',
    formula: `=SUMPRODUCT(${part('Bound')}*(ProofLimit="need")*(SUMIFS(DutyNeed,DutyName,ProofDuty)<>ProofMost))`,
  },
  {
    fault: 'Bounds on a person below the maximum less Fixed seats',
    formula:
      `=SUMPRODUCT(${part('Bound')}*(ProofLimit="maximum")*(SUMIFS(PersonMaximum,PersonName,ProofPerson)` +
      '-COUNTIFS(RuleWord,"Fixed",RulePerson,ProofPerson)>ProofMost))',
  },
  {
    fault: 'Bounds on a slot or group below 1',
    formula: `=SUMPRODUCT(${part('Bound')}*${isLabel}*(ProofMost<1))`,
  },
  {
    fault: 'Bounds on a group below every Limit on it less Fixed seats',
    formula:
      `=SUMPRODUCT(${part('Bound')}*${isLabel}*(COUNTIFS(DutySlot,ProofLimit)=0)*` +
      '(COUNTIFS(RuleWord,"Limit",RuleDuty,ProofLimit,RuleValue,ProofCount)=0))',
  },
  {
    fault: 'Pairs of a duty without a bound that fall under none',
    formula:
      '=SUMPRODUCT((PairDuty<>"")*(COUNTIFS(DutyName,PairDuty)>0)*(COUNTIFS(ProofPart,"Bound",ProofDuty,PairDuty,ProofLimit,"need")=0)*' +
      '(COUNTIFS(ProofPart,"Charge",ProofDuty,PairDuty,ProofPerson,PairPerson)=0))',
  },
  {
    fault: 'Pairs that fall under a bound which is not there',
    formula:
      `=SUMPRODUCT(${part('Charge')}*(ProofLimit<>"barred")*(ProofLimit<>"away")*(ProofLimit<>"no room")*` +
      '(COUNTIFS(ProofPart,"Bound",ProofPerson,ProofPerson,ProofLimit,ProofLimit)=0))',
  },
  {
    fault: 'Pairs that fall under a bound on another pair',
    formula:
      `=SUMPRODUCT(${part('Charge')}*((ProofLimit="pair")+(ProofLimit="fixed"))*` +
      '(COUNTIFS(ProofPart,"Bound",ProofDuty,ProofDuty,ProofPerson,ProofPerson,ProofLimit,ProofLimit)=0))',
  },
  {
    fault: 'Pairs that fall under a slot or group their duty is not in',
    formula: `=SUMPRODUCT(${part('Charge')}*${isLabel}*(${labelOfDuty}=0))`,
  },
  {
    fault: 'Pairs closed without a rule that closes them',
    formula:
      `=SUMPRODUCT(${part('Charge')}*(((ProofLimit="barred")*(${rule('Barred')}=0))` +
      '+((ProofLimit="away")*(COUNTIFS(RuleWord,"Away",RulePerson,ProofPerson)=0))))',
  },
  {
    fault: 'Fixed bounds without a Fixed rule',
    formula: `=SUMPRODUCT(${part('Bound')}*(ProofLimit="fixed")*(${rule('Fixed')}=0))`,
  },
];
