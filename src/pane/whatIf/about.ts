import { shortageReason } from '../../functions/reasons';
import type { Solved } from '../../functions/solved';
import { joinNames } from '../../sheet/write';
import { counted } from '../model';

/** Names in a sentence before the rest is only counted. */
const NAMED = 5;

/** What there is to know of a duty, in sentences: its seats, and why it is short if it is. */
export function aboutDuty(solved: Solved, duty: number): string[] {
  const { need } = solved.case.duties[duty];
  const held = solved.outcome.plan.heldOfDuty[duty];
  const seats = `Needs ${need}, held by ${held}.`;
  if (held >= need) return [seats];
  const shortage = solved.isAtHand('bottlenecks') ? solved.shortages.find((one) => one.duty === duty) : undefined;
  return [`${seats} ${counted(need - held, 'seat is', 'seats are')} short.`, ...(shortage === undefined ? [] : [shortageReason(solved.case, shortage)])];
}

/** What there is to know of a person, in sentences: their seats, and what would be lost without them. */
export function aboutPerson(solved: Solved, person: number): string[] {
  const { maximum, minimum } = solved.case.people[person];
  const load = solved.outcome.plan.loadByPerson[person];
  return [`Holds ${load} of at most ${maximum}${minimum > 0 ? ` and at least ${minimum}` : ''}.`, ...absenceWords(solved, person)];
}

function absenceWords(solved: Solved, person: number): string[] {
  const absence = solved.absence(person);
  if (absence === null) return ['What would be lost without them has to be searched: ask for it with DUTY.ABSENCES.'];
  if (absence.holds.length === 0) return [];
  const { lost, dutiesLost } = absence;
  const names = joinNames(dutiesLost.map((d) => solved.case.duties[d].name), NAMED);
  if (lost > 0) return [`If they were away, ${counted(lost, 'seat is', 'seats are')} lost: ${names}.`];
  return [`If they were away, no seat is lost${names === '' ? '' : `, but others are short then: ${names}`}.`];
}
