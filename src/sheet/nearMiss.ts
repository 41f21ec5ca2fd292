import { nameKey } from './name';

/** Suggestions named at most. */
const NAMED = 3;

/** Questions answered at most: beyond, names are too many to be slips, and comparing them would take long. */
const ASKED = 300;

/** Marks of European letters; those of other scripts are letters of their own and stay. */
const ACCENTS = /[\u0300-\u036F]/gu;

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
  readonly #byWords = new Map<string, { readonly name: string; readonly letters: number }>();
  readonly #listed: () => readonly string[];
  #asked = 0;

  /** @param listed gives the listed names; they are prepared when the first question is asked */
  constructor(listed: () => readonly string[]) {
    this.#listed = listed;
  }

  #prepare(): void {
    for (const name of this.#listed()) {
      const candidate = prepare(name);
      const digits = digitsOf(candidate.key);
      const list = this.#byDigits.get(digits) ?? [];
      this.#byDigits.set(digits, list);
      list.push(candidate);
      const words = withoutDigits(candidate.key);
      if (digits === '' || words === '' || this.#byWords.has(words)) continue;
      this.#byWords.set(words, { name, letters: lettersOf(words) });
    }
  }

  /** The nearest listed names, best first; empty where none is near. */
  nearest(text: string): readonly string[] {
    if (this.#byDigits.size === 0) this.#prepare();
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
    if (this.#byDigits.size === 0) this.#prepare();
    if (digitsOf(nameKey(text)) === '') return null;
    const wanted = withoutDigits(nameKey(text));
    const exact = this.#byWords.get(wanted);
    if (exact !== undefined) return exact.name;
    const most = farthest(wanted.length);
    const letters = lettersOf(wanted);
    for (const [words, other] of this.#byWords) {
      if (Math.abs(words.length - wanted.length) > most || bits(other.letters ^ letters) > 2 * most) continue;
      if (slips(words, wanted, most) <= most) return other.name;
    }
    return null;
  }

  /** The question to put to whoever typed it: ` Did you mean "A" or "B"?`, or '' where nothing is near. */
  question(text: string): string {
    if (this.#asked++ >= ASKED) return '';
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
  const tokens = key.normalize('NFD').replace(ACCENTS, '').match(/[\p{L}\p{M}]+|\p{N}+/gu) ?? [];
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
  return { name, key, essence: essence(key), words: key.split(' ').sort().join(' '), letters: lettersOf(key) };
}

/** A slip of the pen changes two of these bits at most. */
function lettersOf(key: string): number {
  let letters = 0;
  for (let i = 0; i < key.length; i++) letters |= 1 << (key.charCodeAt(i) & 31);
  return letters;
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
  if ((one.essence !== '' && one.essence === other.essence) || one.words === other.words) return 0;
  if (Math.abs(one.key.length - other.key.length) > most) return Infinity;
  // Of three letters, one too many is another name: only the same letters count.
  if (bits(one.letters ^ other.letters) > (one.key.length > 3 ? 2 * most : 0)) return Infinity;
  return slips(one.key, other.key, most);
}

function bits(mask: number): number {
  let count = 0;
  for (let rest = mask; rest !== 0; rest &= rest - 1) count++;
  return count;
}

/**
 * How many letters were left out, put in, mistaken or swapped with their neighbour: the optimal
 * string alignment distance (Damerau, Communications of the ACM 7, 1964).
 *
 * @param most the search ends, with Infinity, where there must be more
 */
export function slips(one: string, other: string, most = Infinity): number {
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
    // A swap reaches back over one row, so two rows beyond `most` are needed to be sure.
    if (Math.min(...current) > most && Math.min(...previous) > most) return Infinity;
    before = previous;
    previous = current;
  }
  return previous[other.length];
}
