import { LAST_PRIORITY, type Case } from '../cover/case';
import type { Move } from '../cover/steps';
import type { Trial } from '../cover/trials';
import { names } from '../functions/reasons';
import type { Solved } from '../functions/solved';

/** Said of what costs nothing at all. */
export const FREE = 'costs no seat';

/** What holding a pair would cost, in a few words. */
export function trialWords({ case: kase, outcome: { plan } }: Solved, trial: Trial): string {
  const [duty, person] = [kase.pairs.duty[trial.pair], kase.pairs.person[trial.pair]];
  const words = [coverWords(kase, trial)];
  if (trial.missed > 0) words.push('misses a minimum by 1 seat more');
  if (trial.passesMaximum) words.push(`passes the maximum (${plan.loadByPerson[person] + 1} of ${kase.people[person].maximum})`);
  if (trial.passesNeed) words.push(`is more than needed (${plan.heldOfDuty[duty] + 1} for ${kase.duties[duty].need})`);
  return words.join('; ');
}

function coverWords({ duties }: Case, { loses, gains, worse, better }: Trial): string {
  const isOne = duties.every(({ priority }) => priority === duties[0].priority);
  const named = isOne ? duties : duties.map(({ name, priority }) => ({ name: `${name} (${priority === LAST_PRIORITY ? 'no priority' : `priority ${priority}`})` }));
  const [less, more] = [loses, gains].map((list) => names(named, list));
  if (less === '') return more === '' ? FREE : `covers 1 seat more: ${more}`;
  const cost = worse === null ? FREE : better === null ? 'costs 1 seat' : 'costs a more urgent seat';
  return `${cost}: ${less}${more === '' ? '' : ` short instead of ${more}`}`;
}

/** More than any priority, which is at most a million and one. */
const PRIORITIES = 2 ** 21;

/** More than anything that passes no limit. */
const LIMIT = 8 * PRIORITIES;

/**
 * How dear a trial is, for putting options in order: 0 for nothing at all, then other duties short, minimums
 * missed, seats lost (the least urgent first, and first for another seat), and last what passes a limit.
 */
export function trialCost({ loses, worse, better, missed, passesNeed, passesMaximum }: Trial): number {
  const limits = (passesNeed ? LIMIT : 0) + (passesMaximum ? LIMIT : 0);
  const cover = worse === null ? 0 : 8 * (PRIORITIES - worse) + (better === null ? 4 : 0);
  return limits + cover + (missed > 0 ? 2 : 0) + (loses.length > 0 ? 1 : 0);
}

/** A move of a seat in words. */
export function moveWords({ duties, people }: Case, { duty, from, to }: Move): string {
  const what = duties[duty].name;
  if (from === null) return `${people[to!].name} takes ${what}`;
  return to === null ? `${people[from].name} puts ${what} down` : `${people[from].name} gives ${what} to ${people[to].name}`;
}
