import type { Case } from '../cover/case';
import type { Knot, Shortage } from '../cover/shortage';
import { joinNames } from '../sheet/write';

/** In place of an answer that the time allowed did not suffice for. */
export const NOT_IN_TIME = 'not worked out in the time allowed';

/** Names listed in a sentence before the rest is only counted. */
const NAMED = 5;

/** Why a duty is short, in a sentence or two. */
export function shortageReason(kase: Case, shortage: Shortage): string {
  const { listed, barred, away, eligible, open, knot } = shortage;
  if (open > 0 && knot === null) return 'Its people are needed elsewhere; which duties it stands back for was not worked out.';
  if (open > 0 && knot !== null) return knot.duties.length === 1 ? knotReason(kase, knot) : `Part of bottleneck ${knot.number}: ${lowerFirst(knotReason(kase, knot))}`;
  if (listed === 0 && eligible === 0) return 'Nobody is listed as able to take it.';
  if (eligible === 0 && away === 0) return `${everybody(listed)} barred from it.`;
  if (eligible === 0 && barred === 0) return `${everybody(listed)} away at that time.`;
  if (eligible === 0) return `Of the ${listed} people listed for it, ${areOf(barred)} barred and ${areOf(away)} away.`;
  return 'Everyone who may take it holds it already, or has no room left beside their Fixed duties.';
}

/** Why the duties of a knot cannot all be covered: Hall's condition in numbers and names. */
export function knotReason(kase: Case, { duties, people, needed, places, isSmallest, isByPriority }: Knot): string {
  if (people.length === 0) return `Nobody may take ${duties.length === 1 ? 'this duty' : 'these duties'}.`;
  const what = duties.length === 1 ? 'this duty' : `these ${duties.length} duties (${names(kase.duties, duties)})`;
  const who = people.length > NAMED ? `${people.length} people` : listInWords(people.map((p) => kase.people[p].name));
  const they = people.length === 1 ? 'has' : 'they have';
  const seats = needed === 1 ? 'the 1 seat' : `the ${needed} seats`;
  const room = places === 0 ? `no room for ${needed === 1 ? 'it' : `any of ${seats}`}` : `room for at most ${places} of ${seats} needed`;
  const caution = isSmallest ? '' : ' Whether fewer duties than these are short by as much was not worked out in the time allowed.';
  const order = isByPriority ? ', the most urgent first' : '';
  return `Only ${who} can take ${what}, and ${they} ${room}${order}.${caution}`;
}

/** `Ann, Bo and Cy`; with semicolons where a name holds a comma itself. */
function listInWords(list: readonly string[]): string {
  const comma = list.some((name) => name.includes(',')) ? ';' : ',';
  return list.length === 1 ? list[0] : `${list.slice(0, -1).join(`${comma} `)} and ${list.at(-1)!}`;
}

/** The names of some duties or people; the end of a long list is only counted. */
export function names(list: readonly { readonly name: string }[], numbers: readonly number[]): string {
  return joinNames(numbers.map((number) => list[number].name), NAMED);
}

function everybody(listed: number): string {
  if (listed === 1) return 'The only person listed for it is';
  return listed === 2 ? 'Both people listed for it are' : `All ${listed} people listed for it are`;
}

/** `1 is`, `2 are`. */
function areOf(number: number): string {
  return `${number} ${number === 1 ? 'is' : 'are'}`;
}

function lowerFirst(sentence: string): string {
  return sentence.charAt(0).toLowerCase() + sentence.slice(1);
}
