/** Characters that cannot be seen: zero-width ones, direction marks, soft hyphens. */
const INVISIBLE = /[\u00AD\u200B-\u200F\u202A-\u202E\u2060-\u2064\u2066-\u206F\uFEFF]/gu;
const MARKS = /\p{M}/gu;
const WHITE_SPACE = /\s+/gu;
/** Most names: printable ASCII with single spaces inside, which needs no cleaning. */
const PLAIN = /^[!-~]+(?: [!-~]+)*$/u;

/** A name as shown: NFC, no white space at the ends, inner white space as one space. */
export function cleanName(text: string): string {
  if (PLAIN.test(text)) return text;
  return text.normalize('NFC').replace(WHITE_SPACE, ' ').trim();
}

/**
 * The key a name is compared by: cleaned, without characters that cannot be seen, and case folded.
 * Folding goes through lower and upper case, so that ß and ẞ meet SS, and knows no locale.
 */
export function nameKey(text: string): string {
  if (PLAIN.test(text)) return text.toLowerCase();
  const visible = text.replace(INVISIBLE, '').normalize('NFC');
  return cleanName(visible.toLowerCase().toUpperCase().toLowerCase());
}

/** Sorts keys by their letters first, marks ignored, then by code units: the same on every machine. */
export function compareKeys(one: string, other: string): number {
  const a = withoutMarks(one);
  const b = withoutMarks(other);
  if (a !== b) return a < b ? -1 : 1;
  if (one === other) return 0;
  return one < other ? -1 : 1;
}

/** A key without accents and other marks. */
function withoutMarks(key: string): string {
  if (PLAIN.test(key)) return key;
  return key.normalize('NFD').replace(MARKS, '');
}

/** Names of one kind, numbered as they are first met; the first spelling is the one shown. */
export class Names {
  readonly #numberOfText = new Map<string, number>();
  readonly #numberOfKey = new Map<string, number>();
  readonly names: string[] = [];
  readonly keys: string[] = [];

  get count(): number {
    return this.names.length;
  }

  /** @returns the number of the name, a new one where it is met for the first time */
  number(text: string): number {
    const known = this.#numberOfText.get(text);
    if (known !== undefined) return known;
    const key = nameKey(text);
    let number = this.#numberOfKey.get(key);
    if (number === undefined) {
      number = this.names.length;
      this.names.push(cleanName(text));
      this.keys.push(key);
      this.#numberOfKey.set(key, number);
    }
    this.#numberOfText.set(text, number);
    return number;
  }

  /** @returns the number of the name, or -1 where it was never met */
  find(text: string): number {
    return this.#numberOfKey.get(nameKey(text)) ?? -1;
  }

  /** The numbers sorted by key. */
  order(): Int32Array {
    const plain = this.keys.map(withoutMarks);
    const compare = (a: number, b: number): number => {
      if (plain[a] !== plain[b]) return plain[a] < plain[b] ? -1 : 1;
      return this.keys[a] < this.keys[b] ? -1 : 1;
    };
    return Int32Array.from(Array.from(this.keys, (_, i) => i).sort(compare));
  }
}
