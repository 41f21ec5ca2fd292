import { LAST_PRIORITY } from '../cover/case';
import { knotsOf } from '../functions/bottlenecks';
import type { Call } from '../functions/journal';
import { knotReason, shortageReason } from '../functions/reasons';
import { currentKept, minimumsMissed } from '../functions/measures';
import { proofWords } from '../functions/proofWords';
import { beyondHelp } from '../functions/remedies';
import type { Solved } from '../functions/solved';
import { parseAddress } from '../host/address';
import type { Finding } from '../sheet/fault';
import { joinNames } from '../sheet/write';
import { searchView, type SearchView } from './searchModel';
import { counted } from './words';

/** What the pane shows, worked out from the calls alone. */
export interface PaneModel {
  /** By the address of their first cell. */
  readonly cases: readonly CaseView[];
  /** Errors in cells that belong to no case. */
  readonly strays: readonly CellError[];
}

/** One case alive in the workbook. */
export interface CaseView {
  /** Stays the same while the case answers in the same first cell. */
  readonly id: string;
  readonly cells: readonly CellView[];
  /** The sheets these cells are on. */
  readonly sheets: readonly string[];
  /** What is being searched for; null: nothing. */
  readonly search: SearchView | null;
  /** Seats, or null where there is no plan. */
  readonly seats: SeatCount | null;
  /** The same by priority, most urgent first; empty where there is one only. */
  readonly priorities: readonly (SeatCount & { readonly label: string })[];
  /** How far the plan is proven, in words; '' where there is no plan. */
  readonly proof: string;
  /** What else there is to know at a glance, in sentences: minimums missed, changes against the current plan. */
  readonly remarks: readonly string[];
  readonly short: readonly { readonly duty: string; readonly seats: number; readonly reason: string }[];
  /** Why seats stay uncovered, bottleneck by bottleneck. */
  readonly bottlenecks: readonly { readonly number: number; readonly seats: number; readonly reason: string }[];
  /** The cheapest remedies in words; null where the case is too large to look while typing. */
  readonly remedies: readonly string[] | null;
  /** People whose absence would cost seats, the most first; null as above. */
  readonly fragile: readonly { readonly person: string; readonly seats: number; readonly duties: string }[] | null;
  readonly findings: readonly FindingGroup[];
  /** Why there is no plan, in words: input that cannot be read, or what is not answered yet. */
  readonly errors: readonly string[];
  readonly fingerprint: string;
}

/** Seats of a case or of one priority. */
export interface SeatCount {
  readonly needed: number;
  readonly covered: number;
}

/** A cell with a function of ours. */
export interface CellView {
  readonly address: string;
  readonly functionId: string;
}

/** The same with what went wrong. */
export interface CellError extends CellView {
  readonly message: string;
}

/** Findings of one kind. */
export interface FindingGroup {
  readonly finding: string;
  /** The row counts from 1 in its range; null where it is about the whole table. */
  readonly details: readonly { readonly table: Finding['table']; readonly row: number | null; readonly detail: string }[];
}

/** @param calls the last answer of every cell */
export function paneModel(calls: readonly Call[]): PaneModel {
  const bySolved = new Map<Solved, Call[]>();
  const strays: CellError[] = [];
  for (const call of calls) {
    const solved = call.solved ?? call.waitsFor;
    if (solved !== null) {
      const group = bySolved.get(solved);
      if (group === undefined) bySolved.set(solved, [call]);
      else group.push(call);
    } else if (call.answer.kind === 'fault') {
      strays.push({ address: call.address, functionId: call.functionId, message: call.answer.message });
    }
  }
  const cases = [...bySolved].map(([solved, group]) => caseView(solved, group));
  return { cases: cases.sort((a, b) => compareAddresses(a.id, b.id)), strays };
}

/** One sentence for people who hear the pane rather than see it. */
export function spokenSummary({ cases, strays }: PaneModel): string {
  if (cases.length + strays.length === 0) return 'No Dutyproof formulas have answered yet.';
  const errors = strays.length + cases.filter(({ errors: messages }) => messages.length > 0).length;
  const planned = cases.flatMap(({ seats }) => (seats === null ? [] : [seats.needed - seats.covered]));
  const uncovered = planned.reduce((sum, open) => sum + open, 0);
  const parts = planned.length === 0 ? [] : [`${counted(uncovered, 'seat', 'seats')} uncovered`];
  if (errors > 0) parts.push(counted(errors, 'error', 'errors'));
  return `Recalculated: ${parts.join(', ')}.`;
}

function caseView(solved: Solved, calls: readonly Call[]): CaseView {
  const cells = calls
    .map(({ address, functionId }) => ({ address, functionId }))
    .sort((a, b) => compareAddresses(a.address, b.address));
  const { faults, findings } = solved.reading;
  const messages = calls.flatMap(({ answer }) => (answer.kind === 'fault' ? [answer.message] : []));
  const errors = faults.length > 0 ? faults.map(({ message }) => message) : [...new Set(messages)];
  const sheets = [...new Set(cells.map(({ address }) => parseAddress(address)?.sheet ?? 'a cell'))];
  const search = faults.length > 0 ? null : searchView(solved);
  const common = { id: cells[0].address, cells, sheets, findings: groupFindings(findings), errors, search };
  if (faults.length > 0 || !isSolvable(solved)) {
    return { ...common, seats: null, priorities: [], proof: '', remarks: [], short: [], bottlenecks: [], remedies: [], fragile: [], fingerprint: '' };
  }
  const { plan } = solved.outcome;
  const knowsWhy = solved.isAtHand('bottlenecks');
  return {
    ...common,
    seats: { needed: plan.needed, covered: plan.covered },
    priorities: countPriorities(solved),
    proof: sentence(proofWords(solved.outcome)),
    remarks: remarksOf(solved),
    short: knowsWhy ? shortViews(solved) : plainShortViews(solved),
    bottlenecks: knowsWhy ? bottleneckViews(solved) : [],
    remedies: isSmall(solved) && solved.isAtHand('remedies') ? remedyViews(solved) : null,
    fragile: isSmall(solved) && solved.isAtHand('absences') ? fragileViews(solved) : null,
    fingerprint: solved.fingerprint,
  };
}

function remarksOf({ case: kase, outcome: { plan } }: Solved): string[] {
  const missed = minimumsMissed(kase, plan);
  const remarks = missed === 0 ? [] : [`Minimums are missed by ${counted(missed, 'seat', 'seats')}.`];
  if (kase.current === null) return remarks;
  const kept = currentKept(kase, plan);
  return [...remarks, `Of the current plan ${kept} of ${counted(kase.current.length, 'seat is', 'seats are')} kept; ${plan.seats.length - kept} are new.`];
}

function sentence(words: string): string {
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;
}

function shortViews(solved: Solved): CaseView['short'] {
  return solved.shortages.map((shortage) => ({
    duty: solved.case.duties[shortage.duty].name,
    seats: shortage.short,
    reason: shortageReason(solved.case, shortage),
  }));
}

/** Short duties while nobody has asked why. */
function plainShortViews({ case: { duties }, outcome: { plan } }: Solved): CaseView['short'] {
  return duties.flatMap(({ name, need }, d) => (plan.heldOfDuty[d] < need ? [{ duty: name, seats: need - plan.heldOfDuty[d], reason: '' }] : []));
}

/** Small enough for remedies and absences to be worked out at every keystroke. */
function isSmall({ case: { pairs, duties, people } }: Solved): boolean {
  return pairs.count <= 5_000 && duties.length * people.length <= 40_000;
}

function bottleneckViews(solved: Solved): CaseView['bottlenecks'] {
  return knotsOf(solved).map((knot) => ({
    number: knot.number,
    seats: knot.needed - knot.places,
    reason: knotReason(solved.case, knot),
  }));
}

function remedyViews(solved: Solved): string[] | null {
  const { duties, people } = solved.case;
  const { plan } = solved.outcome;
  const found = remediesOf(solved);
  if (found === null) return null;
  const { changes, covered } = found;
  const words = changes.map(({ person, duty }) =>
    duty === null ? `One more place for ${people[person].name}` : `Make ${people[person].name} eligible for ${duties[duty].name}`,
  );
  return covered === plan.needed ? words : [...words, beyondHelp(plan.needed - covered)];
}

/** Limits that are nested among the pairs listed may cross among those that could be. */
function remediesOf(solved: Solved): Solved['remedies'] | null {
  try {
    return solved.remedies;
  } catch {
    return null;
  }
}

function fragileViews(solved: Solved): NonNullable<CaseView['fragile']> {
  const { duties, people } = solved.case;
  return solved.absences
    .flatMap((absence) => (absence === null || absence.lost === 0 ? [] : [absence]))
    .sort((a, b) => b.lost - a.lost)
    .map(({ person, lost, dutiesLost }) => ({
      person: people[person].name,
      seats: lost,
      duties: joinNames(dutiesLost.map((d) => duties[d].name), 4),
    }));
}

/** True where the plan is at hand. */
function isSolvable(solved: Solved): boolean {
  try {
    return solved.isAtHand('plan') && solved.outcome.plan.needed >= 0;
  } catch {
    return false;
  }
}

function countPriorities({ case: kase, outcome }: Solved): (SeatCount & { label: string })[] {
  const counts = new Map<number, { needed: number; covered: number }>();
  kase.duties.forEach(({ need, priority }, d) => {
    const count = counts.get(priority) ?? { needed: 0, covered: 0 };
    counts.set(priority, count);
    count.needed += need;
    count.covered += Math.min(need, outcome.plan.heldOfDuty[d]);
  });
  if (counts.size < 2) return [];
  return [...counts]
    .sort((a, b) => a[0] - b[0])
    .map(([priority, count]) => ({ label: priority === LAST_PRIORITY ? 'No priority' : `Priority ${priority}`, ...count }));
}

function groupFindings(findings: readonly Finding[]): FindingGroup[] {
  const groups = new Map<string, FindingGroup['details'][number][]>();
  for (const { table, row, finding, detail } of findings) {
    const group = groups.get(finding) ?? [];
    groups.set(finding, group);
    group.push({ table, row, detail });
  }
  return [...groups].map(([finding, details]) => ({ finding, details }));
}

/** Sheet by sheet, then row by row as far as the text tells: numbers inside addresses compare as numbers. */
function compareAddresses(one: string, other: string): number {
  return one.localeCompare(other, 'en', { numeric: true });
}
