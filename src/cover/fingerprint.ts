import { sha256 } from '@noble/hashes/sha2.js';
import type { Case } from './case';

/** Letters and digits that are not taken for one another when read aloud (Crockford's base 32). */
const ALPHABET = '0123456789ABCDEFGHJKMNPQRSTVWXYZ';
const GROUPS = 4;
const GROUP_LENGTH = 4;

/**
 * A short text that two colleagues can compare: equal for equal cases whatever the order of rows and
 * the spelling of names in upper or lower case; 80 bits of SHA-256, so different for different ones.
 */
export function fingerprint(kase: Case): string {
  const hash = sha256.create();
  const encoder = new TextEncoder();
  for (const part of parts(kase)) hash.update(encoder.encode(part));
  const bytes = hash.digest();
  let text = '';
  for (let i = 0; i < GROUPS * GROUP_LENGTH; i++) {
    if (i > 0 && i % GROUP_LENGTH === 0) text += '-';
    text += ALPHABET[bitsAt(bytes, 5 * i)];
  }
  return text;
}

/** Five bits from a bit position on. */
function bitsAt(bytes: Uint8Array, position: number): number {
  const at = position >> 3;
  return (((bytes[at] << 8) | bytes[at + 1]) >> (11 - (position & 7))) & 31;
}

/** The case as texts in canonical order; JSON keeps the parts of a text apart. */
function* parts(kase: Case): Generator<string> {
  const { duties, people, pairs } = kase;
  const rankOf = (order: Int32Array): Int32Array => {
    const rank = new Int32Array(order.length);
    order.forEach((number, i) => (rank[number] = i));
    return rank;
  };
  const dutyRank = rankOf(kase.dutyOrder);
  const personRank = rankOf(kase.personOrder);
  for (const d of kase.dutyOrder) {
    const { key, need, priority, slots, groups, times, load } = duties[d];
    yield JSON.stringify(['duty', key, need, priority, slots, groups, times, load]);
  }
  for (const p of kase.personOrder) {
    const { key, maximum, minimum, stretch, carried, listed } = people[p];
    yield JSON.stringify(['person', key, maximum, minimum, stretch, carried, listed]);
  }
  for (let i = 0; i < pairs.count; i++) {
    yield `${dutyRank[pairs.duty[i]]},${personRank[pairs.person[i]]},${pairs.rank[i]};`;
  }
  for (const [word, seats] of [['fixed', kase.fixed], ['barred', kase.barred], ['current', kase.current ?? []]] as const) {
    for (const { duty, person } of seats) yield `${word} ${dutyRank[duty]},${personRank[person]};`;
  }
  for (const [word, two] of [['clash', kase.clashes], ['together', kase.together]] as const) {
    for (const [one, other] of two) yield `${word} ${dutyRank[one]},${dutyRank[other]};`;
  }
  yield JSON.stringify([kase.order, kase.prices, kase.rest, kase.seconds, kase.current === null]);
  for (const { person, label } of kase.away) yield JSON.stringify(['away', personRank[person], label.key]);
  for (const { person, label, most } of kase.limits) {
    yield JSON.stringify(['limit', label.key, person === null ? null : personRank[person], most]);
  }
}
