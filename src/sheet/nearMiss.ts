import { nameKey, withoutMarks } from './name';

/** Suggestions named at most. */
const NAMED = 3;

/** A listed name prepared for comparison. */
interface Candidate {
  readonly name: string;
  readonly key: string;
  readonly essence: string;
  /** Its words in alphabetical order. */
  readonly words: string;
  /** One bit for each letter that occurs. */
  readonly letters: number;
}

/** Finds listed names that a name which is not listed may have been meant to be. */
export class NearMisses {
  /** Names with other numbers in them are other duties, not misspelt ones: candidates by their digits. */
  readonly #byDigits = new Map<string, Candidate[]>();
  /** One name for every text that is left when the digits are taken out of the listed names. */
  readonly #byWords = new Map<string, string>();

  constructor(listed: readonly string[]) {
    for (const name of listed) {
      const candidate = prepare(name);
      const digits = digitsOf(candidate.key);
      const list = this.#byDigits.get(digits) ?? [];
      this.#byDigits.set(digits, list);
      list.push(candidate);
      const words = withoutDigits(candidate.key);
      if (digits !== '' && !this.#byWords.has(words)) this.#byWords.set(words, name);
    }
  }

  /** The nearest listed names, best first; empty where none is near. */
  nearest(text: string): readonly string[] {
    const wanted = prepare(text);
    let best = farthest(wanted.key.length) + 1;
    let found: string[] = [];
    for (const candidate of this.#byDigits.get(digitsOf(wanted.key)) ?? []) {
      const distance = distanceBetween(wanted, candidate, best);
      if (distance > best || distance > farthest(wanted.key.length)) continue;
      if (distance < best) found = [];
      best = distance;
      found.push(candidate.name);
    }
    return found.slice(0, NAMED);
  }

  /** A listed name that differs by its numbers and by slips of the pen elsewhere; null where there is none. */
  relative(text: string): string | null {
    const wanted = withoutDigits(nameKey(text));
    if (digitsOf(nameKey(text)) === '') return null;
    for (const [words, name] of this.#byWords) {
      if (Math.abs(words.length - wanted.length) <= 2 && slips(words, wanted) <= farthest(wanted.length)) return name;
    }
    return null;
  }

  /** The question to put to whoever typed it: ` Did you mean "A" or "B"?`, or '' where nothing is near. */
  question(text: string): string {
    const names = this.nearest(text).map((name) => `"${name}"`);
    if (names.length === 0) {
      const relative = this.relative(text);
      return relative === null ? '' : ` There is no such name with this number; one like it is "${relative}".`;
    }
    const last = names.pop()!;
    return ` Did you mean ${names.length > 0 ? `${names.join(', ')} or ` : ''}${last}?`;
  }
}

/**
 * What is left of a name without spacing, punctuation, accents and leading zeros: names of one
 * essence ("Mon 9:00", "mon 09:00") are almost the same.
 */
export function essence(key: string): string {
  const tokens = withoutMarks(key).match(/\p{L}+|\p{N}+/gu) ?? [];
  let text = '';
  let afterNumber = false;
  for (const token of tokens) {
    const isNumber = /^\p{N}/u.test(token);
    if (isNumber && afterNumber) text += '.';
    text += isNumber ? token.replace(/^0+(?=.)/u, '') : token;
    afterNumber = isNumber;
  }
  return text;
}

function prepare(name: string): Candidate {
  const key = nameKey(name);
  let letters = 0;
  for (const character of key) letters |= 1 << (character.codePointAt(0)! & 31);
  return { name, key, essence: essence(key), words: key.split(' ').sort().join(' '), letters };
}

function digitsOf(key: string): string {
  return (key.match(/\p{N}+/gu) ?? []).map((digits) => digits.replace(/^0+(?=.)/u, '')).join(' ');
}

function withoutDigits(key: string): string {
  return key.replace(/\p{N}+/gu, '').trim();
}

/** The most slips of the pen in a name of so many characters. */
function farthest(length: number): number {
  if (length < 3) return 0;
  return length < 7 ? 1 : 2;
}

function distanceBetween(one: Candidate, other: Candidate, most: number): number {
  if (one.essence === other.essence || one.words === other.words) return 0;
  if (Math.abs(one.key.length - other.key.length) > most) return Infinity;
  // Of three letters, one too many is another name: only the same letters count.
  if (bits(one.letters ^ other.letters) > (one.key.length > 3 ? 2 * most : 0)) return Infinity;
  return slips(one.key, other.key);
}

function bits(mask: number): number {
  let count = 0;
  for (let rest = mask; rest !== 0; rest &= rest - 1) count++;
  return count;
}

/**
 * How many letters were left out, put in, mistaken or swapped with their neighbour: the optimal
 * string alignment distance (Damerau, Communications of the ACM 7, 1964).
 */
export function slips(one: string, other: string): number {
  let before: number[] = [];
  let previous = Array.from({ length: other.length + 1 }, (_, j) => j);
  for (let i = 1; i <= one.length; i++) {
    const current = [i];
    for (let j = 1; j <= other.length; j++) {
      const same = one[i - 1] === other[j - 1];
      let least = Math.min(previous[j] + 1, current[j - 1] + 1, previous[j - 1] + (same ? 0 : 1));
      const swapped = i > 1 && j > 1 && one[i - 1] === other[j - 2] && one[i - 2] === other[j - 1];
      if (swapped) least = Math.min(least, before[j - 2] + 1);
      current.push(least);
    }
    before = previous;
    previous = current;
  }
  return previous[other.length];
}
