import { LAST_PRIORITY } from '../cover/case';
import type { Found, Verdict } from '../exact/answers';
import type { Outcome } from './solved';

/** How far the plan is known to be best, in words. */
export function proofWords({ found, faults }: Pick<Outcome, 'found' | 'faults'>): string {
  if (found === null) return faults.length === 0 ? 'proven best' : `not proven: ${faults[0]}`;
  const open = [...coverWords(found), ...found.verdicts.flatMap(laterWords)];
  if (!found.isComplete) open.push('stopped before every aim was worked on');
  if (open.length === 0) return 'proven best';
  return `${isCoverProven(found) ? 'cover proven best, the rest best found' : 'best found'}; ${open.join('; ')}`;
}

function isCoverProven({ verdicts, moreSeats }: Found): boolean {
  const classes = verdicts.filter(({ aim }) => aim === 'cover');
  return classes.length > 0 && moreSeatsBeyond(moreSeats, classes) === 0 && classes.every(({ gap }) => gap === 0);
}

/** Where every priority in turn is proven, no plan is better, even if one that gives up urgent seats covers more in all. */
function moreSeatsBeyond(moreSeats: number, classes: readonly Verdict[]): number {
  return classes.length > 0 && classes.every(({ gap }) => gap === 0) ? 0 : moreSeats;
}

function coverWords({ verdicts, moreSeats }: Found): string[] {
  const classes = verdicts.filter(({ aim }) => aim === 'cover');
  const more = moreSeatsBeyond(moreSeats, classes);
  const words = more > 0 ? [Number.isFinite(more) ? `at most ${more} more ${more === 1 ? 'seat' : 'seats'} possible` : 'how many more seats are possible is not known'] : [];
  if (classes.length < 2) return words;
  const urgent = classes.find(({ gap }) => gap > 0);
  if (urgent === undefined) return words;
  const name = urgent.priority === LAST_PRIORITY ? 'duties without priority' : `priority ${urgent.priority}`;
  return [...words, `${name}: at most ${seats(urgent.gap)} more`];
}

function laterWords({ aim, gap }: Verdict): string[] {
  if (gap === 0) return [];
  const most = Number.isFinite(gap) ? `at most ${Math.ceil(gap)}` : 'not known how many';
  switch (aim) {
    case 'cover':
      return [];
    case 'minimums':
      return [`minimums missed: ${most} fewer possible`];
    case 'changes':
      return [`current seats kept: ${most} more possible`];
    case 'ranks':
      return [`rank total: ${most} lower possible`];
    case 'evenness':
      return [`sum of squares: ${most} lower possible`];
    case 'names':
      return ['the choice between equally good plans is not settled'];
  }
}

function seats(count: number): string {
  return `${Math.ceil(count)} ${count === 1 ? 'seat' : 'seats'}`;
}
