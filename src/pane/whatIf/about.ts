import { names, shortageReason } from '../../functions/reasons';
import type { Solved } from '../../functions/solved';
import { counted } from '../words';

/** What there is to know of a duty, in sentences: its seats, and why it is short if it is. */
export function aboutDuty(solved: Solved, duty: number): string[] {
  const { need } = solved.case.duties[duty];
  const held = solved.outcome.plan.heldOfDuty[duty];
  const why = solved.isAtHand('bottlenecks') ? solved.shortages.filter((shortage) => shortage.duty === duty) : [];
  return [`Needs ${need}, held by ${held}.`, ...why.map((shortage) => shortageReason(solved.case, shortage))];
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
  const lacking = dutiesLost.length === 0 ? '' : `; short then: ${names(solved.case.duties, dutiesLost)}`;
  return [`If they were away, ${counted(lost, 'seat is', 'seats are')} lost${lacking}.`];
}
