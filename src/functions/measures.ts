import type { Case } from '../cover/case';
import type { Plan } from '../cover/plan';
import { rankLookUp } from './seats';

/** By how many seats people stay below their minimums, in all. */
export function minimumsMissed({ people }: Case, { loadByPerson }: Plan): number {
  return people.reduce((missed, { minimum }, p) => missed + Math.max(0, minimum - loadByPerson[p]), 0);
}

/** Seats of the current plan that the plan keeps. */
export function currentKept({ current, people }: Case, { seats }: Plan): number {
  const held = new Set(seats.map(({ duty, person }) => duty * people.length + person));
  return (current ?? []).filter(({ duty, person }) => held.has(duty * people.length + person)).length;
}

/** The sum of the ranks of the seats held; a Fixed seat that no pair lists has none. */
export function rankTotal(kase: Case, { seats }: Plan): number {
  const rankOf = rankLookUp(kase);
  return seats.reduce((total, seat) => total + Number(rankOf(seat)), 0);
}
