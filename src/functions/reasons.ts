import type { Case } from '../cover/case';
import type { Knot, Shortage } from '../cover/shortage';
import { joinNames } from '../sheet/write';

/** Names listed in a sentence before the rest is only counted. */
const NAMED = 5;

/** Why a duty is short, in a sentence or two. */
export function shortageReason(kase: Case, shortage: Shortage): string {
  const { listed, barred, away, eligible, open, knot } = shortage;
  if (open > 0) return knot.duties.length === 1 ? knotReason(kase, knot) : `Part of bottleneck ${knot.number}: ${knotReason(kase, knot)}`;
  if (listed === 0 && eligible === 0) return 'Nobody is listed as able to take it.';
  if (eligible === 0 && away === 0) return `${everybody(listed)} barred from it.`;
  if (eligible === 0 && barred === 0) return `${everybody(listed)} away at that time.`;
  if (eligible === 0) return `Of the ${listed} people listed for it, ${barred} are barred and ${away} away.`;
  return 'Everyone who may take it holds it already, or has no room left beside their Fixed duties.';
}

/** Why the duties of a knot cannot all be covered: Hall's condition in numbers and names. */
export function knotReason(kase: Case, { duties, people, needed, places }: Knot): string {
  const seats = count(needed, 'seat', 'seats');
  if (people.length === 0) return `Nobody may take ${duties.length === 1 ? 'this duty' : 'these duties'}.`;
  const what = duties.length === 1 ? 'this duty' : `these ${duties.length} duties (${names(kase.duties, duties)})`;
  const who = people.length > NAMED ? `${people.length} people` : names(kase.people, people);
  const only = people.length === 1 ? 'may take' : 'alone may take';
  return `${who} ${only} ${what} and can hold at most ${places} of the ${seats} needed.`;
}

function names(list: readonly { readonly name: string }[], numbers: readonly number[]): string {
  return joinNames(numbers.map((number) => list[number].name), NAMED);
}

function everybody(listed: number): string {
  return listed === 1 ? 'The only person listed for it is' : `All ${listed} people listed for it are`;
}

function count(number: number, one: string, many: string): string {
  return `${number} ${number === 1 ? one : many}`;
}
