import type { Case } from '../cover/case';
import type { Shortage } from '../cover/shortage';
import { joinNames } from '../sheet/write';

/** Names listed in a sentence before the rest is only counted. */
const NAMED = 5;

/** Why a duty is short, in one or two sentences. */
export function shortageReason(kase: Case, shortage: Shortage): string {
  const { listed, barred, away, eligible, knot } = shortage;
  if (knot !== null) {
    const names = joinNames(knot.duties.map((d) => kase.duties[d].name), NAMED);
    return (
      `${count(knot.people.length, 'person', 'people')} may take ${knot.duties.length === 1 ? 'this duty' : `these ${knot.duties.length} duties (${names})`} ` +
      `and can hold at most ${knot.places} of the ${count(knot.needed, 'seat', 'seats')} needed.`
    );
  }
  if (listed === 0 && eligible === 0) return 'Nobody is listed as able to take it.';
  if (eligible === 0 && away === 0) return `${everybody(listed)} barred from it.`;
  if (eligible === 0 && barred === 0) return `${everybody(listed)} away at that time.`;
  if (eligible === 0) return `Of the ${listed} people listed for it, ${barred} are barred and ${away} away.`;
  return 'Everyone who may take it holds it already, or has no room left beside their Fixed duties.';
}

function everybody(listed: number): string {
  return listed === 1 ? 'The only person listed for it is' : `All ${listed} people listed for it are`;
}

function count(number: number, one: string, many: string): string {
  return `${number} ${number === 1 ? one : many}`;
}
